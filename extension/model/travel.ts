/**
 * One travel at full command: from rest at the start to the end, with heat and protection integrated along.
 *
 * Protection is watched but does not stop the travel: its time then says when it would. Deliberately not here: the equations
 * (motion.ts) and the closed forms (closedTravel.ts).
 */
import type { Drive } from "./drive.js";
import { ambientOf } from "./heat.js";
import { type Arrival, integrate } from "./integrate.js";
import { availableLine } from "./line.js";
import { layoutOf, type Mode } from "./motionLayout.js";
import { type CarriedState, carriedState, startState } from "./motionState.js";
import { type MotionScales, type MotionSystem, motionSystem } from "./motionSystem.js";
import { createObserver, type Observation, type Observer } from "./observer.js";
import { operatingPointAt } from "./operatingPoint.js";
import { type Plant, plantOf, turningInertia } from "./plant.js";
import { throughTrain } from "./stages.js";

/**
 * `arrives`; `never-starts`: too heavy from rest; `stands-still`: somewhere on the way; `never-reaches-speed`: a target at or beyond
 * the steady speed; `unresolved`: too many steps or events to follow.
 */
export type TravelOutcome = "arrives" | "never-starts" | "stands-still" | "never-reaches-speed" | "unresolved";

/** One motor's values unless the name says source. */
export interface TravelResult extends Readonly<Observation> {
  readonly outcome: TravelOutcome;
  /** null where it does not arrive. */
  readonly timeS: number | null;
  /** Time that the numbers cover, s: to the arrival, or to where it ends without. */
  readonly coveredS: number;
  /** In the load's own coordinate per second. */
  readonly endSpeed: number;
  readonly rmsMotorCurrentA: number;
  readonly sourceEnergyJ: number;
  /** What a following phase starts from. */
  readonly carried: CarriedState;
}

export interface TravelOptions {
  readonly sampling?: boolean;
  /** Absent: cold, protection at rest. */
  readonly from?: CarriedState;
  /** Speed that a flywheel starts from, rad/s. */
  readonly fromSpeedRadPerS?: number;
}

/** Error of a step as a share: over a whole travel 1e-8 is kept. */
export const TOLERANCE = 2e-10;
/** Past this a travel is given up as unresolved. */
export const MOST_STEPS = 20_000;
/** Shorter than this (rad, or rad/s of a flywheel) there is nothing to travel. */
const NO_TRAVEL = 1e-100;
const MOST_PHASES = 10_000;
/** Shorter mechanical time constants than this share of the travel: speed follows torque at once. */
const FOLLOWING_SHARE = 1e-5;
/** A target beyond the steady speed is approached to this share of it. */
const STEADY_SHARE = 1e-6;

/** The travel; null for a roller, which has none. */
export function solveTravel(drive: Drive, options: TravelOptions = {}): TravelResult | null {
  const plant = plantOf(drive);
  if (plant.load.kind === "roller") return null;
  const scales = scalesOf(plant);
  const observer = createObserver(plant, options.sampling ?? false);
  const state = startState(plant, options.from, options.fromSpeedRadPerS);
  const goal = goalOf(plant);
  if (goal.target <= Math.max(state[plant.load.endless ? 1 : 0] as number, NO_TRAVEL))
    return finish(plant, observer, state, 0, "arrives");
  return run(plant, scales, observer, state, goal);
}

interface Goal {
  /** Progress in rad, or a flywheel's speed in rad/s. */
  readonly target: number;
  /** False where the target lies at or beyond the steady speed: the travel then ends just below that. */
  readonly reachable: boolean;
}

function goalOf(plant: Plant): Goal {
  const { load } = plant.drive;
  if (load.kind !== "flywheel") return { target: plant.spanRad, reachable: true };
  const torque = throughTrain(plant.train, plant.load.opposing(0, 1)) / (plant.train.ratio * plant.count);
  const steady = operatingPointAt(plant.drive, torque).speedRadPerS / plant.train.ratio;
  const reachable = load.speedRadPerS < steady;
  return { target: reachable ? load.speedRadPerS : steady * (1 - STEADY_SHARE), reachable };
}

function run(plant: Plant, scales: MotionScales, observer: Observer, state: Float64Array, goal: Goal): TravelResult {
  const kind = isFollowing(plant, scales) ? "following" : "moving";
  const moving = motionSystem(plant, { kind }, scales);
  const targets = plant.load.endless ? [goal.target] : [...cornersAhead(plant), goal.target];
  let timeS = 0;
  let stepS = firstStep(moving, scales, state);
  observer.look(moving, timeS, state);

  if (!starts(plant, moving, state)) {
    const wait = awaitStart(plant, scales, observer, state, kind);
    timeS = wait.timeS;
    if (!wait.started) return finish(plant, observer, state, timeS, wait.finished ? "never-starts" : "unresolved");
  }
  let next = 0;
  moving.setTarget(targets[0] as number);
  for (let phase = 0; phase < MOST_PHASES; phase++) {
    const endS = timeS < plant.rampS ? plant.rampS : Number.POSITIVE_INFINITY;
    const arrival: Arrival = integrate(moving, timeS, state, course(moving, observer, endS, stepS));
    timeS = arrival.timeS;
    stepS = arrival.nextStepS;
    if (!arrival.finished) break;
    if (arrival.stop === null) continue;
    if (arrival.stop === moving.index.burnt) break;
    if (arrival.stop === moving.index.standstill) return finish(plant, observer, state, timeS, "stands-still");
    next++;
    if (next === targets.length) {
      const speed = moving.front.motorSpeed / plant.train.ratio;
      return finish(plant, observer, state, timeS, goal.reachable ? "arrives" : "never-reaches-speed", speed);
    }
    state[0] = pastCorner(targets[next - 1] as number, plant.spanRad);
    moving.setTarget(targets[next] as number);
  }
  return finish(plant, observer, state, timeS, "unresolved");
}

/** Blocked by the stop until the ramp's command is enough. */
function awaitStart(
  plant: Plant,
  scales: MotionScales,
  observer: Observer,
  state: Float64Array,
  startsAs: "moving" | "following",
): { readonly timeS: number; readonly started: boolean; readonly finished: boolean } {
  if (!(plant.rampS > 0)) return { timeS: 0, started: false, finished: true };
  const mode: Mode = { kind: "blocked", startsAs };
  const blocked = motionSystem(plant, mode, scales);
  const arrival = integrate(blocked, 0, state, course(blocked, observer, plant.rampS, plant.rampS / 50));
  return {
    timeS: arrival.timeS,
    started: arrival.stop !== null && arrival.stop === blocked.index.breakaway,
    finished: arrival.finished,
  };
}

function course(system: MotionSystem, observer: Observer, endS: number, firstStepS: number): Parameters<typeof integrate>[3] {
  return { tolerance: TOLERANCE, endS, firstStepS, mostSteps: MOST_STEPS, ...observer.listen(system) };
}

/** Looked at a moment after the start: a command that grows from 0 may move a load without friction at once. */
function starts(plant: Plant, system: MotionSystem, state: Float64Array): boolean {
  return (state[1] as number) > 0 || system.instantAt(plant.rampS * 1e-9, state).startGap > 0;
}

function cornersAhead(plant: Plant): number[] {
  return plant.load.corners.map((corner) => plant.direction * (corner - plant.load.startRad)).sort((one, other) => one - other);
}

/** A hair beyond a corner, so that slopes are those of the piece ahead. */
function pastCorner(progress: number, span: number): number {
  return progress + 1e-13 * span;
}

function isFollowing(plant: Plant, scales: MotionScales): boolean {
  const positions = [plant.load.startRad, ...plant.load.corners, plant.load.endRad];
  const inertia = Math.max(...positions.map((position) => turningInertia(plant, position)));
  if (inertia === 0) return true;
  if (plant.load.endless) return false;
  return mechanicalTimeConstant(plant, inertia) < FOLLOWING_SHARE * scales.timeS;
}

/** τ = J/(n·N²·k_t·(k_e/R + I_loss′)), losses of the train left out, s. Source: the DC machine's speed step, any textbook of drives. */
export function mechanicalTimeConstant(plant: Plant, inertiaKgM2: number): number {
  const line = availableLine(plant.drive);
  const damping = plant.motor.torqueConstantNmPerA * (plant.motor.backEmfVPerRadPerS / line.seriesOhm + plant.lossSlopeAsPerRad);
  return inertiaKgM2 / (plant.count * plant.train.ratio * plant.train.ratio * damping);
}

export function scalesOf(plant: Plant): MotionScales {
  const line = availableLine(plant.drive);
  const speedRadPerS = Math.max(line.noLoadSpeedRadPerS, 1e-9 * plant.motor.noLoadSpeedRadPerS) / plant.train.ratio;
  const inertia = turningInertia(plant, plant.load.startRad);
  const timeS = plant.load.endless ? Math.max(mechanicalTimeConstant(plant, inertia), 1e-12) : plant.spanRad / speedRadPerS;
  const progressRad = plant.load.endless ? speedRadPerS * timeS : plant.spanRad;
  return { progressRad, speedRadPerS, timeS, currentA: Math.max(Math.min(line.stallCurrentA, plant.limitA), 1e-9) };
}

/** A fraction of the shorter of the mechanical time constant and the travel. */
function firstStep(system: MotionSystem, scales: MotionScales, state: Float64Array): number {
  const damping = -(system.instantAt(0, state).speedRateBy[1] as number);
  return 0.02 * (damping > 0 ? Math.min(1 / damping, scales.timeS) : scales.timeS);
}

function finish(
  plant: Plant,
  observer: Observer,
  state: Float64Array,
  timeS: number,
  outcome: TravelOutcome,
  speed = 0,
): TravelResult {
  observer.close(timeS);
  const layout = layoutOf(plant);
  const ambientC = ambientOf(plant.drive);
  const at = (index: number, otherwise: number): number => (index < 0 ? otherwise : (state[index] as number));
  const { seen } = observer;
  return {
    ...seen,
    windingPeakC: layout.winding < 0 ? null : (seen.windingPeakC ?? ambientC),
    outcome,
    timeS: outcome === "arrives" ? timeS : null,
    coveredS: timeS,
    endSpeed: speed * plant.load.ownPerRad,
    rmsMotorCurrentA: timeS > 0 ? Math.sqrt(at(layout.squares, 0) / timeS) : seen.peakMotorCurrentA,
    sourceEnergyJ: at(layout.energy, 0),
    carried: carriedState(plant, state),
  };
}
