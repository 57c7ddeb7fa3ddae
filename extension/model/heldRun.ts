/**
 * What happens while a mechanism is held, stalled or kept turning for long: heat, limits, protection.
 *
 * Deliberately not here: the travel before it (travel.ts) and what is held (hold.ts).
 */
import { heatNetworkOf, heatTimeConstants, holdingHeat, steadyHeat } from "./heat.js";
import { integrate } from "./integrate.js";
import type { Mode } from "./motionLayout.js";
import { MOST_STEPS, scalesOf } from "./motionScales.js";
import { type CarriedState, carriedState, startState } from "./motionState.js";
import { type MotionSystem, motionSystem } from "./motionSystem.js";
import { createObserver, type Observation, type Observer } from "./observer.js";
import type { Plant } from "./plant.js";
import { isBorderline, NEVER, type TripVerdict, thermalReplica } from "./protection.js";
import { steadyHold } from "./steadyHold.js";

/** One motor's values unless the name says source. */
export interface HeldRun {
  /** At the start, A. */
  readonly motorCurrentA: number;
  readonly sourceCurrentA: number;
  readonly trip: TripVerdict;
  /** °C at the end of the asked time, or of steady heat; null without thermal data or where the heat runs away. */
  readonly windingFinalC: number | null;
  /** s until the winding passes its limit, however long it lasts; null: never. */
  readonly limitAfterS: number | null;
  /** True where no steady temperature exists. */
  readonly runsAway: boolean;
  /** False where the supply cannot bring the current. */
  readonly supplied: boolean;
  /** At the end of the asked time. */
  readonly carried: CarriedState;
}

/** Error of a step as a share: temperatures and times of minutes need no more. */
const HELD_TOLERANCE = 3e-9;
/** For ever: this many of the longest time constant. */
const FOREVER = 40;
/** A fuse may need this long just above its rating, s. */
const FUSE_S = 400_000;

/**
 * Keeps the mode from a state (absent: cold, protection at rest) for a time, and looks further until nothing changes any more; `onlyAsked`:
 * no further than that time.
 */
export function solveHeld(plant: Plant, mode: Mode, lastsS?: number, from?: CarriedState, onlyAsked = false): HeldRun {
  const system = motionSystem(plant, mode, scalesOf(plant));
  const state = startState(plant, from);
  const observer = createObserver(plant, false);
  // At full command: the ramp lies behind.
  const startS = plant.rampS;
  observer.look(system, startS, state);
  const first = system.instantAt(startS, state);
  const { currentA, supplyA } = first;
  if (from === undefined && staysSteady(plant, mode)) {
    const steady = { currentA, supplyA, carriedA: system.carried(first), supplied: first.supplied };
    return steadyHold(plant, steady, system.network, lastsS);
  }
  const foreverS = startS + FOREVER * longestTimeConstant(plant);
  const wantedS = lastsS === undefined ? foreverS : startS + lastsS;
  let timeS = keep(system, observer, state, startS, wantedS);
  const whole = timeS >= wantedS;
  const end = carriedState(plant, state);
  if (whole && !onlyAsked && foreverS > wantedS) timeS = keep(system, observer, state, wantedS, foreverS);
  const lastA = system.carried(system.instantAt(timeS, state));

  const steady = lastsS === undefined ? steadyWinding(plant, mode, end.windingC) : end.windingC;
  return {
    motorCurrentA: currentA,
    sourceCurrentA: supplyA,
    trip: seenTrip(plant, observer.seen, lastA, startS),
    windingFinalC: system.network === null || !whole ? null : steady,
    limitAfterS: observer.seen.windingLimitAfterS === null ? null : observer.seen.windingLimitAfterS - startS,
    runsAway: system.network !== null && (!whole || steady === null),
    supplied: observer.seen.supplied,
    carried: end,
  };
}

/** Advances to a time, or to where the winding is past everything; returns the time reached. What has settled stays so. */
function keep(system: MotionSystem, observer: Observer, state: Float64Array, fromS: number, toS: number): number {
  const { onStep, onNote } = observer.listen(system);
  const firstStepS = (toS - fromS) / 1e4;
  const course = { tolerance: HELD_TOLERANCE, endS: toS, firstStepS, mostSteps: MOST_STEPS, stiff: true, onStep, onNote };
  const arrival = integrate(system, fromS, state, course);
  return arrival.stop !== null && arrival.stop === system.index.settled ? toS : arrival.timeS;
}

function longestTimeConstant(plant: Plant): number {
  const network = heatNetworkOf(plant.motor);
  const { protection } = plant.drive;
  const protects =
    protection === undefined ? 0 : protection.kind === "fuse" ? FUSE_S / FOREVER : thermalReplica(protection).timeConstantS;
  return Math.max(network ? heatTimeConstants(network)[1] : 0, protects);
}

/** Holding still, the steady temperature has a formula that needs no waiting, however near to running away. */
function steadyWinding(plant: Plant, mode: Mode, atEnd: number): number | null {
  const network = heatNetworkOf(plant.motor);
  if (!network || mode.kind !== "held" || mode.motorSpeedRadPerS > 0) return atEnd;
  return steadyHeat(network, holdingHeat(plant.motor, mode.torqueNm))?.windingC ?? null;
}

/** Without heat nothing changes; a current that holds a torque changes only with the magnets, what it draws also with the winding. */
function staysSteady(plant: Plant, mode: Mode): boolean {
  if (!plant.motor.thermal) return true;
  const held = mode.kind === "held" && mode.motorSpeedRadPerS === 0;
  return held && plant.motor.magnet === undefined && plant.drive.protection?.carries !== "supply";
}

function seenTrip(plant: Plant, seen: Observation, lastA: number, startS: number): TripVerdict {
  const { protection } = plant.drive;
  if (!protection) return NEVER;
  const since = (timeS: number | null): number | null => (timeS === null ? null : timeS - startS);
  const opensAfterS = since(seen.opensAfterS);
  return {
    opensAfterS,
    mayOpenAfterS: protection.kind === "fuse" ? since(seen.mayOpenAfterS) : opensAfterS,
    borderline: seen.borderline || (opensAfterS === null && isBorderline(protection, lastA)),
  };
}
