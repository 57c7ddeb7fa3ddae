/**
 * One step of a robot's load cycle after another: from event to event, each mechanism in the mode that the last event left it in.
 *
 * Deliberately not here: cycles and their repetition (solveRobot.ts).
 */
import { type Course, integrate } from "./integrate.js";
import { MOST_STEPS } from "./motionScales.js";
import { createStart } from "./odeSystem.js";
import { fuseRate } from "./protection.js";
import type { RobotStep } from "./robotDrive.js";
import type { RobotObserver } from "./robotObserver.js";
import { type Command, type RobotPart, targetOf } from "./robotPart.js";
import { isKeptOpen, type Moment, type RobotProtector } from "./robotProtector.js";
import type { RobotOutcome } from "./robotSolution.js";
import { gather, type RunSums, scatter } from "./robotState.js";
import { createRobotSystem, type RobotSystem, type Sharing } from "./robotSystem.js";
import { beginStep, reconsider, reset, trip, turn } from "./robotTurns.js";
import type { RobotEvent } from "./robotWatches.js";

export interface RobotRun {
  readonly parts: readonly RobotPart[];
  readonly protectors: readonly RobotProtector[];
  readonly sharing: Sharing;
  readonly observer: RobotObserver;
  /** Systems by the modes that they are for. */
  readonly systems: Map<string, RobotSystem>;
  readonly sums: RunSums;
  /** By mechanism: first moment stalled at full command, s. */
  readonly stalledAtS: (number | null)[];
  cycle: number;
  step: number;
  /** Time of the run at the start of the step, and time in the step, s. */
  stepStartS: number;
  stepS: number;
  /** Length of the step before, s. */
  lastedS: number;
  /** What the next step of integration may be, s. */
  nextStepS: number;
  events: number;
  steps: number;
  outcome: RobotOutcome;
}

/** Errors of a step as shares: over a load cycle of minutes they leave about 1e-8, where 1e-6 is asked for. */
const STIFF_TOLERANCE = 1e-6;
const EXPLICIT_TOLERANCE = 1e-7;
const MOST_EVENTS = 10_000;
const MOST_STEPS_OF_RUN = 60_000;
const MOST_SETTLING = 100;
/** Courses of more time constants than this go by the stiff method. */
const STIFF_TIME_CONSTANTS = 150;

/** Runs one step; `onArrival` is told each mechanism that arrives, with the time in the step. False: the run is over. */
export function runStep(run: RobotRun, step: RobotStep, onArrival: (part: RobotPart, stepS: number) => void): boolean {
  begin(run, step);
  const waiting = new Set(run.parts.filter(({ command }) => command === "move"));
  const tellArrivals = (): void => {
    for (const part of waiting) {
      if (!part.arrived) continue;
      waiting.delete(part);
      onArrival(part, run.stepS);
    }
  };
  while (run.stepS < step.lastsS) {
    const seated = settle(run);
    tellArrivals();
    if (!seated || !advance(run, seated, step.lastsS)) return false;
    tellArrivals();
  }
  run.lastedS = step.lastsS;
  return true;
}

function begin(run: RobotRun, step: RobotStep): void {
  for (const part of run.parts) beginStep(part, commandOf(step, part.index), run.lastedS);
  for (const protector of run.protectors) {
    protector.closesAtS -= run.lastedS;
    // Without voltage a PTC cools and conducts again.
    const unpowered = protector.open && protector.protection.kind === "ptc" && !isKeptOpen(protector);
    if (unpowered) reset(protector, run.stepStartS, 0);
  }
  run.stepS = 0;
  run.nextStepS = Number.POSITIVE_INFINITY;
}

function commandOf({ moving, holding }: RobotStep, index: number): Command {
  if (moving.includes(index)) return "move";
  return holding.includes(index) ? "hold" : "off";
}

interface Seated {
  readonly system: RobotSystem;
  readonly state: Float64Array;
}

/** Puts every mechanism into the mode that it should be in now; null: it never comes to rest. */
function settle(run: RobotRun): Seated | null {
  for (const protector of run.protectors) {
    if (protector.open && protector.closesAtS <= run.stepS) reset(protector, run.stepStartS + run.stepS, run.stepS);
  }
  for (let k = 0; k < MOST_SETTLING; k++) {
    const system = systemFor(run);
    const state = gather(system);
    system.prepare(run.stepS, state, createStart(system.size, false), [], false);
    if (!reconsiderAll(run, system, state)) {
      tellStalls(run);
      return { system, state };
    }
  }
  run.outcome = "unresolved";
  return null;
}

function reconsiderAll(run: RobotRun, system: RobotSystem, state: Float64Array): boolean {
  let changed = false;
  for (const { unit } of system.seats) changed = reconsider(unit.part, unit, run.stepS) || changed;
  for (const { unit, place } of system.seats) {
    const theta = place[unit.part.layout.protection] ?? -1;
    const own = run.sharing.own.find(({ mechanism }) => mechanism === unit.part.index);
    const currentA = unit.rates.carried(unit.front);
    if (!own || own.open || theta < 0 || !isTripped(own, state[theta] as number, currentA)) continue;
    trip(own, momentOf(run), currentA);
    changed = true;
  }
  for (const { protector, state: theta } of system.places.protectors) {
    const currentA = system.carriedBy(protector, "front");
    if (protector.open || !isTripped(protector, state[theta] as number, currentA)) continue;
    trip(protector, momentOf(run), currentA);
    changed = true;
  }
  return changed;
}

/** At what opens it, and not cooling. */
function isTripped({ replica }: RobotProtector, borne: number, currentA: number): boolean {
  return borne >= 1 && (replica === null || Math.abs(currentA) > replica.holdCurrentA);
}

/** Integrates to the next event and does what it asks for. */
function advance(run: RobotRun, { system, state }: Seated, endS: number): boolean {
  run.observer.look(system, run.stepStartS + run.stepS);
  const untilS = nextKnown(run, endS);
  const arrival = integrate(system, run.stepS, state, courseOf(run, system, untilS));
  scatter(run.sums, system, state);
  run.stepS = arrival.timeS;
  run.nextStepS = arrival.nextStepS;
  run.events++;
  if (!arrival.finished || run.events >= MOST_EVENTS || run.steps >= MOST_STEPS_OF_RUN) {
    run.outcome = "unresolved";
    return false;
  }
  const event = arrival.stop === null ? null : system.events[arrival.stop];
  if (event) act(run, system, event);
  return run.outcome === "done";
}

function act(run: RobotRun, system: RobotSystem, event: RobotEvent): void {
  if (event.kind === "supply") run.outcome = "empty";
  else if (event.kind === "protector") trip(event.protector, momentOf(run), system.carriedBy(event.protector, "front"));
  else if (event.event === "opens") {
    const { part, rates, front } = event.unit;
    const own = run.sharing.own.find(({ mechanism }) => mechanism === part.index);
    if (own) trip(own, momentOf(run), rates.carried(front));
  } else turn(event.unit, event.event, run.stepS);
}

function courseOf(run: RobotRun, system: RobotSystem, endS: number): Course {
  const { observer, stepStartS, stepS } = run;
  const fastest = fastestRate(run, system);
  const lastsS = lengthOf(system, endS - stepS);
  const stiff = fastest * lastsS > STIFF_TIME_CONSTANTS;
  const guessS = (stiff ? 0.02 : 0.2) / fastest;
  const isFirst = !Number.isFinite(run.nextStepS);
  return {
    tolerance: stiff ? STIFF_TOLERANCE : EXPLICIT_TOLERANCE,
    endS,
    firstStepS: Math.min(isFirst ? guessS : Math.max(run.nextStepS, guessS), endS - stepS),
    mostSteps: MOST_STEPS,
    stiff,
    onStep: (fromS, toS, state, at) => {
      run.steps++;
      restFuses(system, state);
      notePeaks(run, system, state);
      observer.stepped(system, stepStartS, fromS, toS, at);
    },
    onNote: (watch, timeS, state, rising) => {
      const event = system.events[watch];
      if (!event) return;
      if (event.kind !== "supply" && event.event === "may-open") noteMayOpen(run, system, event, timeS, state);
      else observer.noted(system, event, stepStartS, timeS, state, rising);
    },
  };
}

function noteMayOpen(run: RobotRun, system: RobotSystem, event: RobotEvent, timeS: number, state: Float64Array): void {
  if (event.kind === "supply") return;
  system.pointAt(timeS, state);
  const protector =
    event.kind === "protector" ? event.protector : run.sharing.own.find(({ mechanism }) => mechanism === event.unit.part.index);
  if (!protector || protector.mayOpenAtS !== null) return;
  protector.mayOpenAtS = run.stepStartS + timeS;
  protector.mayOpenA =
    event.kind === "protector" ? system.carriedBy(event.protector, "at") : event.unit.rates.carried(event.unit.at);
}

function notePeaks({ sharing }: RobotRun, system: RobotSystem, state: Float64Array): void {
  for (const { unit, place } of system.seats) {
    const at = place[unit.part.layout.protection];
    const own = at === undefined ? undefined : sharing.own.find(({ mechanism }) => mechanism === unit.part.index);
    if (own !== undefined && at !== undefined) own.peak = Math.max(own.peak, state[at] as number);
  }
  for (const { protector, state: at } of system.places.protectors) protector.peak = Math.max(protector.peak, state[at] as number);
}

/** Below its first gate a fuse forgets what it has borne. */
function restFuses(system: RobotSystem, state: Float64Array): void {
  for (const { unit, place } of system.seats) {
    const { layout, plant } = unit.part;
    const { protection } = plant.drive;
    if (protection?.kind !== "fuse" || fuseRate(protection.ratingA, unit.rates.carried(unit.front), "fast").rate > 0) continue;
    state[place[layout.protection] as number] = 0;
    state[place[layout.fast] as number] = 0;
  }
  for (const { protector, state: slow, fast } of system.places.protectors) {
    const { protection } = protector;
    if (protection.kind !== "fuse" || fuseRate(protection.ratingA, system.carriedBy(protector, "front"), "fast").rate > 0)
      continue;
    state[slow] = 0;
    state[fast] = 0;
  }
}

/** The next moment that is known beforehand: a reset, the end of a ramp, the end of the step. */
function nextKnown(run: RobotRun, endS: number): number {
  let next = endS;
  for (const { open, closesAtS } of run.protectors) if (open && closesAtS > run.stepS) next = Math.min(next, closesAtS);
  for (const { plant, mode, startedAtS } of run.parts) {
    const rampEndS = startedAtS + plant.rampS;
    if (mode.kind !== "idle" && mode.kind !== "held" && rampEndS > run.stepS) next = Math.min(next, rampEndS);
  }
  return next;
}

function fastestRate(run: RobotRun, system: RobotSystem): number {
  let fastest = Number.MIN_VALUE;
  for (const { unit } of system.seats) {
    const { mode, movingRate, stillRate } = unit.part;
    fastest = Math.max(fastest, mode.kind === "moving" ? movingRate : 0, stillRate);
  }
  for (const { replica } of run.sharing.shared) fastest = Math.max(fastest, replica ? 1 / replica.timeConstantS : 0);
  return fastest;
}

/** About how long the modes stay as they are, s: until the first arrival, or to the end. */
function lengthOf(system: RobotSystem, mostS: number): number {
  let lengthS = mostS;
  for (const { unit } of system.seats) {
    const { mode, plant, progressRad, scales } = unit.part;
    if ((mode.kind !== "moving" && mode.kind !== "following") || plant.load.endless) continue;
    lengthS = Math.min(lengthS, (2 * (targetOf(unit.part) - progressRad)) / scales.speedRadPerS);
  }
  return lengthS;
}

function systemFor(run: RobotRun): RobotSystem {
  const key =
    run.parts.map(({ mode, command }) => `${mode.kind[0]}${command[0]}`).join("") +
    run.protectors.map(({ open }) => (open ? 1 : 0)).join("");
  const known = run.systems.get(key);
  if (known) return known;
  const made = createRobotSystem(run.parts, run.sharing);
  run.systems.set(key, made);
  return made;
}

function tellStalls(run: RobotRun): void {
  for (const { index, mode, plant, startedAtS } of run.parts) {
    const full = mode.kind === "blocked" && run.stepS - startedAtS >= plant.rampS;
    if (full) run.stalledAtS[index] ??= run.stepStartS + run.stepS;
  }
}

function momentOf({ stepStartS, stepS, cycle, step }: RobotRun): Moment {
  return { runS: stepStartS + stepS, stepS, cycle, step };
}
