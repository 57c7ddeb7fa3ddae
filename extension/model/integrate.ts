/**
 * Integrates a system with error control, stepping exactly to its kinks and stops and noting events in between.
 *
 * Deliberately not here: the method's coefficients (rodas5p.ts) and the physics.
 */
import { createStepper, type Rates, type Stepper, type StepStart } from "./stepper.js";

/**
 * A watched value of the state: `kink` ends a step where the rates change their formula, `stop` ends the integration, `note`
 * is only reported. A change of sign counts in the given direction.
 */
export interface Watch {
  readonly kind: "kink" | "stop" | "note";
  readonly crosses: "up" | "down" | "both";
  /** Component that the value follows one to one, if it is one: then a crossing there and back inside a step is seen too. */
  readonly component?: number;
}

export interface OdeSystem extends Rates {
  /** Size of each component that counts as 1 for the tolerance. */
  readonly scale: Float64Array;
  readonly watches: readonly Watch[];
  /** Everything at a point where a step may start: rates, their derivatives, and the watched values. */
  readonly prepare: (timeS: number, state: Float64Array, start: StepStart, watched: Float64Array) => void;
  /** The watched values at a point. */
  readonly watch: (timeS: number, state: Float64Array, watched: Float64Array) => void;
}

export interface Course {
  /** Largest error of a step as a share of scale and value. */
  readonly tolerance: number;
  readonly endS: number;
  readonly firstStepS: number;
  readonly mostSteps: number;
  /** After each step, the system prepared at its end; `at` gives states inside it. It may set components that no rate depends on. */
  readonly onStep?: (fromS: number, toS: number, state: Float64Array, at: Stepper["at"]) => void;
  readonly onNote?: (watch: number, timeS: number, state: Float64Array, rising: boolean) => void;
}

export interface Arrival {
  readonly timeS: number;
  /** Index of the stop reached; null: the end time, or too many steps. */
  readonly stop: number | null;
  /** False where the steps ran out. */
  readonly finished: boolean;
  readonly steps: number;
  /** What the next step would be, s. */
  readonly nextStepS: number;
}

const LEAST_GROWTH = 0.15;
const MOST_GROWTH = 6;
const SAFETY = 0.9;
/** A kink is passed by this share of the step, so that the next step starts on the other side. */
const PAST_KINK = 1e-9;
/** Crossings nearer to the start of a step than this are the kink that it started from. */
const AT_START = 1e-6;

/** Advances `state` in place from `startS`; returns where and why it ended. */
export function integrate(system: OdeSystem, startS: number, state: Float64Array, course: Course): Arrival {
  const { size, watches } = system;
  const stepper = createStepper(system);
  let start = createStart(size);
  let end = createStart(size);
  let before = new Float64Array(watches.length);
  let after = new Float64Array(watches.length);
  const inner = new Float64Array(size);
  const search = { system, stepper, inner, after: new Float64Array(watches.length) };
  const least = 1e-14;
  let timeS = startS;
  let length = course.firstStepS;
  let steps = 0;
  system.prepare(timeS, state, start, before);
  const signs: number[] = Array.from(before, (value) => (value >= 0 ? 1 : -1));

  while (timeS < course.endS) {
    if (steps++ >= course.mostSteps) return { timeS, stop: null, finished: false, steps, nextStepS: length };
    const left = course.endS - timeS;
    length = Math.min(length, left);
    if (left - length < 1e-12 * left) length = left;
    stepper.step(timeS, state, length, start);
    const size1 = errorSize(stepper, system.scale, course.tolerance);
    const growth = Number.isFinite(size1) ? Math.min(MOST_GROWTH, Math.max(LEAST_GROWTH, SAFETY * size1 ** -0.2)) : LEAST_GROWTH;
    if (!(size1 <= 1) && length > least * Math.max(Math.abs(timeS), course.firstStepS)) {
      length *= growth;
      continue;
    }
    const next = length * growth;
    let share = 1;
    let landed = -1;
    system.prepare(timeS + length, stepper.end, end, after);
    for (let i = 0; i < watches.length; i++) {
      const watch = watches[i] as Watch;
      if (watch.kind === "note") continue;
      const crossing = firstCrossing(search, timeS, length, i, before, after, signs);
      if (crossing === null) continue;
      if (watch.kind === "kink" && crossing < AT_START) signs[i] = -(signs[i] as number);
      else if (landed < 0 || crossing < share) {
        share = crossing;
        landed = i;
      }
    }
    noteCrossings(search, timeS, length, share, before, after, signs, course);
    if (landed >= 0) {
      const stops = (watches[landed] as Watch).kind === "stop";
      const cut = stops
        ? refine(search, timeS, state, length, share, landed, start)
        : Math.min(share * (1 + PAST_KINK), 1) * length;
      if (!stops && cut < length) stepper.step(timeS, state, cut, start);
      length = cut;
      system.prepare(timeS + length, stepper.end, end, after);
      finishStep(landed);
      const nextStepS = Math.max(next - cut, cut);
      if (stops) return { timeS, stop: landed, finished: true, steps, nextStepS };
      length = nextStepS;
      continue;
    }
    finishStep(-1);
    length = next;
  }
  return { timeS, stop: null, finished: true, steps, nextStepS: length };

  /** A kink landed on has changed side, however its value is rounded. */
  function finishStep(landed: number): void {
    const fromS = timeS;
    timeS = length >= course.endS - timeS ? course.endS : timeS + length;
    state.set(stepper.end);
    [start, end] = [end, start];
    [before, after] = [after, before];
    course.onStep?.(fromS, timeS, state, stepper.at);
    for (let i = 0; i < watches.length; i++) {
      const value = before[i] as number;
      if (i === landed) signs[i] = -(signs[i] as number);
      else if (value !== 0) signs[i] = value > 0 ? 1 : -1;
    }
  }
}

function createStart(size: number): StepStart {
  return { rates: new Float64Array(size), jacobian: new Float64Array(size * size), timeRates: new Float64Array(size) };
}

interface Search {
  readonly system: OdeSystem;
  readonly stepper: Stepper;
  readonly inner: Float64Array;
  readonly after: Float64Array;
}

function errorSize(stepper: Stepper, scale: Float64Array, tolerance: number): number {
  let worst = 0;
  for (let i = 0; i < scale.length; i++) {
    const size = Math.abs(stepper.error[i] as number) / (tolerance * ((scale[i] as number) + Math.abs(stepper.end[i] as number)));
    if (!(size <= worst)) worst = size;
  }
  return Math.max(worst, 1e-12);
}

/** True where a change away from `from` (a value on the side left) is watched for. */
function counts(watch: Watch, from: number): boolean {
  return watch.crosses === "both" || (watch.crosses === "up") === from < 0;
}

/** Share of the step at which watch i changes sign first; null: it does not. */
function firstCrossing(
  search: Search,
  timeS: number,
  lengthS: number,
  i: number,
  before: Float64Array,
  after: Float64Array,
  signs: readonly number[],
): number | null {
  const watch = search.system.watches[i] as Watch;
  const sign = signs[i] as number;
  if (!counts(watch, sign)) return null;
  if ((after[i] as number) * sign < 0) return rootIn(search, timeS, lengthS, i, 0, 1, sign);
  if (watch.component === undefined) return null;
  // The watched value follows one component, up to a constant: its inner values cost no evaluation.
  const offset = (after[i] as number) - (search.stepper.end[watch.component] as number);
  for (const share of [0.25, 0.5, 0.75]) {
    const value = search.stepper.componentAt(share, watch.component) + offset;
    if (value * sign < 0 && (before[i] as number) * sign >= 0) return rootIn(search, timeS, lengthS, i, 0, share, sign);
  }
  return null;
}

/** Root of watch i between two shares of the step, by bisection sped up with the secant (Illinois) on the dense output. */
function rootIn(search: Search, timeS: number, lengthS: number, i: number, low: number, high: number, sign: number): number {
  const value = (share: number): number => {
    search.stepper.at(share, search.inner);
    search.system.watch(timeS + share * lengthS, search.inner, search.after);
    return (search.after[i] as number) * sign;
  };
  let from = low;
  let to = high;
  let valueFrom = Math.max(value(from), 0);
  let valueTo = value(to);
  let side = 0;
  for (let k = 0; k < 60 && to - from > 1e-13; k++) {
    const share = valueFrom === valueTo ? (from + to) / 2 : from + ((to - from) * valueFrom) / (valueFrom - valueTo);
    const guess = k % 8 === 7 || !(share > from && share < to) ? (from + to) / 2 : share;
    const found = value(guess);
    if (found === 0) return guess;
    if (found > 0) {
      from = guess;
      valueFrom = found;
      if (side === 1) valueTo /= 2;
      side = 1;
    } else {
      to = guess;
      valueTo = found;
      if (side === -1) valueFrom /= 2;
      side = -1;
    }
  }
  return (from + to) / 2;
}

/** Steps again to a stop, correcting the step's length until the watched value is 0 there, not only on the dense output. */
function refine(
  search: Search,
  timeS: number,
  state: Float64Array,
  lengthS: number,
  share: number,
  i: number,
  start: StepStart,
): number {
  const { stepper, system, inner, after } = search;
  const valueAt = (at: number): number => {
    stepper.at(at, inner);
    system.watch(timeS + at * lengthS, inner, after);
    return after[i] as number;
  };
  const near = Math.min(1e-4, share / 2);
  const slope = (valueAt(share) - valueAt(share - near)) / (near * lengthS);
  let length = share * lengthS;
  for (let k = 0; ; k++) {
    stepper.step(timeS, state, length, start);
    system.watch(timeS + length, stepper.end, after);
    const change = -(after[i] as number) / slope;
    const worth = Math.abs(change) > 1e-13 * (timeS + length) && Math.abs(change) < 0.1 * length;
    if (k === 4 || !worth) return length;
    length += change;
  }
}

function noteCrossings(
  search: Search,
  timeS: number,
  lengthS: number,
  until: number,
  before: Float64Array,
  after: Float64Array,
  signs: readonly number[],
  course: Course,
): void {
  search.system.watches.forEach((watch, i) => {
    if (watch.kind !== "note" || !course.onNote) return;
    const share = firstCrossing(search, timeS, lengthS, i, before, after, signs);
    if (share === null || share > until) return;
    search.stepper.at(share, search.inner);
    course.onNote(i, timeS + share * lengthS, search.inner, (signs[i] as number) < 0);
  });
}
