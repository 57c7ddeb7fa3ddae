/**
 * One travel by integration: waiting for the ramp, moving from corner to corner, ending at the target or where it stands still.
 *
 * Deliberately not here: the equations (motion.ts) and the closed forms (closedTravel.ts).
 */
import { type Course, integrate } from "./integrate.js";
import type { Mode } from "./motionLayout.js";
import {
  COARSE_FACTOR,
  CORNERED_SHARE,
  EXPLICIT_TOLERANCE,
  isFollowing,
  MOST_STEPS,
  type MotionScales,
  mechanicalTimeConstant,
  STIFF_TOLERANCE,
  scalesOf,
} from "./motionScales.js";
import { startState } from "./motionState.js";
import { type MotionSystem, motionSystem } from "./motionSystem.js";
import { createObserver, type Observer } from "./observer.js";
import { createStart } from "./odeSystem.js";
import { pieceAround } from "./piece.js";
import { type Plant, turningInertia } from "./plant.js";
import type { TravelGoal } from "./travelGoal.js";
import { finishTravel, type TravelOptions, type TravelResult } from "./travelResult.js";

const MOST_PHASES = 10_000;
/** A course that has not ended by then never does. */
const NEVER_S = 1e30;
/** After this many time constants what settled at the start is below 1e-8. */
const SETTLING_TIME_CONSTANTS = 20;
/** Travels of more time constants than this go by the stiff method. */
const STIFF_TIME_CONSTANTS = 150;

/** The travel to the goal. */
export function integrateTravel(plant: Plant, goal: TravelGoal, options: TravelOptions): TravelResult {
  const scales = scalesOf(plant);
  const observer = createObserver(plant, options.sampling ?? false);
  const state = startState(plant, options.from, options.fromSpeedRadPerS);
  const kind = isFollowing(plant, scales) ? "following" : "moving";
  const moving = motionSystem(plant, { kind }, scales);
  if (options.timeOnly) moving.ignoreSums();
  const targets = plant.load.endless ? [goal.target] : [...cornersAhead(plant), goal.target];
  // At a current limit the start shows nothing of the line's own time constant.
  const fastest = Math.max(fastestRate(moving, 0, state), mechanicalRate(plant));
  const stiff = kind === "following" || fastest * Math.max(scales.timeS, plant.rampS) > STIFF_TIME_CONSTANTS;
  const method = methodFor(plant, stiff, options.coarse);
  const settling = methodFor(plant, false, options.coarse);
  let timeS = 0;
  let stepS = (stiff ? 0.02 : 0.1) * Math.min(1 / fastest, scales.timeS);
  const begins = starts(plant, moving, state);
  const still = !begins && kind === "following";
  observer.look(still ? motionSystem(plant, { kind: "blocked", startsAs: kind }, scales) : moving, timeS, state);

  if (!begins) {
    const wait = awaitStart(plant, scales, observer, state, kind, options.coarse);
    timeS = wait.timeS;
    if (!wait.started) return finishTravel(plant, observer, state, timeS, wait.finished ? "never-starts" : "unresolved");
  }
  // What settles at the start does so fastest by the explicit method; only then its short time constant is in the way.
  const settledS = stiff && kind === "moving" ? timeS + SETTLING_TIME_CONSTANTS / fastest : timeS;
  let next = 0;
  moving.setTarget(targets[0] as number, pieceTowards(plant, 0, targets[0] as number));
  for (let phase = 0; phase < MOST_PHASES; phase++) {
    const settles = timeS < settledS;
    const rampedS = timeS < plant.rampS ? plant.rampS : NEVER_S;
    const endS = settles ? Math.min(settledS, rampedS) : rampedS;
    const arrival = integrate(moving, timeS, state, course(moving, observer, endS, stepS, settles ? settling : method));
    timeS = arrival.timeS;
    stepS = arrival.nextStepS;
    if (!arrival.finished) break;
    if (arrival.stop === null && timeS < NEVER_S) continue;
    if (arrival.stop === null) break;
    if (arrival.stop === moving.index.burnt) break;
    if (arrival.stop === moving.index.topSpeed) {
      return finishTravel(plant, observer, state, timeS, "never-reaches-speed", moving.front.motorSpeed / plant.train.ratio);
    }
    if (arrival.stop === moving.index.standstill) return finishTravel(plant, observer, state, timeS, "stands-still");
    next++;
    if (next === targets.length) {
      const speed = moving.front.motorSpeed / plant.train.ratio;
      return finishTravel(plant, observer, state, timeS, goal.reachable ? "arrives" : "never-reaches-speed", speed);
    }
    const [corner, target] = [targets[next - 1] as number, targets[next] as number];
    state[0] = pastCorner(corner, plant.spanRad);
    moving.setTarget(target, pieceTowards(plant, corner, target));
  }
  return finishTravel(plant, observer, state, timeS, "unresolved");
}

/** Blocked by the stop until the ramp's command is enough. */
function awaitStart(
  plant: Plant,
  scales: MotionScales,
  observer: Observer,
  state: Float64Array,
  startsAs: "moving" | "following",
  coarse = false,
): { readonly timeS: number; readonly started: boolean; readonly finished: boolean } {
  if (!(plant.rampS > 0)) return { timeS: 0, started: false, finished: true };
  const mode: Mode = { kind: "blocked", startsAs };
  const blocked = motionSystem(plant, mode, scales);
  const method = methodFor(plant, fastestRate(blocked, plant.rampS, state) * plant.rampS > STIFF_TIME_CONSTANTS, coarse);
  const arrival = integrate(blocked, 0, state, course(blocked, observer, plant.rampS, plant.rampS / 50, method));
  return {
    timeS: arrival.timeS,
    started: arrival.stop !== null && arrival.stop === blocked.index.breakaway,
    finished: arrival.finished,
  };
}

function course(system: MotionSystem, observer: Observer, endS: number, firstStepS: number, method: Method): Course {
  const { onStep, onNote } = observer.listen(system);
  return { stiff: method.stiff, tolerance: method.tolerance, endS, firstStepS, mostSteps: MOST_STEPS, onStep, onNote };
}

type Method = Pick<Course, "stiff" | "tolerance">;

function methodFor(plant: Plant, stiff: boolean, coarse = false): Method {
  const share = (plant.load.corners.length > 0 ? CORNERED_SHARE : 1) * (coarse ? COARSE_FACTOR : 1);
  return { stiff, tolerance: share * (stiff ? STIFF_TOLERANCE : EXPLICIT_TOLERANCE) };
}

/** Looked at a moment after the start: a command that grows from 0 may move a load without friction at once. */
function starts(plant: Plant, system: MotionSystem, state: Float64Array): boolean {
  if (plant.rampS === 0) return (state[1] as number) > 0 || system.front.startGap > 0;
  return (state[1] as number) > 0 || system.instantAt(plant.rampS * 1e-9, state).startGap > 0;
}

/** Rate of the fastest change at a time, 1/s: rotors settling, load swinging, heat or protection; finite and above 0. */
function fastestRate(system: MotionSystem, timeS: number, state: Float64Array): number {
  const { size } = system;
  const start = createStart(size, true);
  system.prepare(timeS, state, start, [], true);
  let fastest = Math.sqrt(Math.abs(start.jacobian[size] as number));
  for (let i = 0; i < size; i++) fastest = Math.max(fastest, Math.abs(start.jacobian[i * size + i] as number));
  return Math.min(Math.max(fastest, Number.MIN_VALUE), Number.MAX_VALUE);
}

function mechanicalRate(plant: Plant): number {
  const timeS = mechanicalTimeConstant(plant, turningInertia(plant, plant.load.startRad));
  return timeS > 0 ? Math.min(1 / timeS, Number.MAX_VALUE) : 0;
}

function cornersAhead(plant: Plant): number[] {
  return plant.load.corners.map((corner) => plant.direction * (corner - plant.load.startRad)).sort((one, other) => one - other);
}

/** The plant with the load between two points of progress (rad). */
function pieceTowards(plant: Plant, from: number, to: number): Plant {
  return plant.load.endless ? plant : pieceAround(plant, plant.load.startRad + (plant.direction * (from + to)) / 2);
}

/** A hair beyond a corner, so that slopes are those of the piece ahead. */
function pastCorner(progress: number, span: number): number {
  return progress + 1e-13 * span;
}
