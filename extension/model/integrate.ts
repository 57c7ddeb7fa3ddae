/**
 * Integrates a system with error control, stepping exactly to its kinks and stops and noting events in between.
 *
 * Deliberately not here: the methods (stiffStepper.ts, explicitStepper.ts) and the physics.
 */
import { firstCrossing, type TriedStep, watchedAt } from "./crossings.js";
import { createExplicitStepper } from "./explicitStepper.js";
import { createStart, type OdeSystem, type Watch } from "./odeSystem.js";
import type { Stepper } from "./stepper.js";
import { createStiffStepper } from "./stiffStepper.js";

export interface Course {
  /** Largest error of a step as a share of scale and value. */
  readonly tolerance: number;
  readonly endS: number;
  readonly firstStepS: number;
  readonly mostSteps: number;
  /** True where time constants are much shorter than the course. */
  readonly stiff: boolean;
  /** After each step, the system prepared at its end; `at` gives states inside it. It may set components that no rate depends on. */
  readonly onStep?: (fromS: number, toS: number, state: Float64Array, at: Stepper["at"]) => void;
  readonly onNote?: (watch: number, timeS: number, state: Float64Array, rising: boolean) => void;
}

export interface Arrival {
  readonly timeS: number;
  /** Index of the stop reached; null: the end time, or too many steps. */
  readonly stop: number | null;
  /** False where the steps ran out, or the events did. */
  readonly finished: boolean;
  readonly steps: number;
  /** What the next step would be, s. */
  readonly nextStepS: number;
}

const LEAST_GROWTH = 0.15;
const MOST_GROWTH = 6;
const SAFETY = 0.9;
const LEAST_ERROR = 1e-12;
/** Kinks and notes past which a course is given up. */
const MOST_EVENTS = 10_000;
/** Steps are not shortened below this share of the time. */
const LEAST_STEP = 1e-14;
/** A kink is passed by this share of the step, so that the next step starts on the other side. */
const PAST_KINK = 1e-9;
/** A step refused is aimed this share past the kink inside it, unless that leaves more than this of it. */
const JUST_PAST = 1e-6;
const KINK_RETRY = 0.9999;
/** From this error on a refused step does not show where its kink is. */
const BENT = 100;
/** Share of a step that tells a rate. */
const NUDGE = 1e-7;
/** Crossings nearer to the start of a step than this are the kink that it started from. */
const AT_START = 1e-6;
/** A step reaches at most this many times the straight way to a stop. */
const PAST_STOP = 1.25;
/** Misses of a stop below this share of the step are made good along the rates: the error is their square. */
const NEAR_STOP = 1e-6;

/** Advances `state` in place from `startS`; returns where and why it ended. */
export function integrate(system: OdeSystem, startS: number, state: Float64Array, course: Course): Arrival {
  const tried = createTried(system, course, startS);
  const { stepper, signs } = tried;
  system.prepare(startS, state, tried.start, tried.before, course.stiff);
  system.accept?.();
  for (const value of tried.before) signs.push(value >= 0 ? 1 : -1);
  let length = course.firstStepS;
  // The last step that no kink shortened, and whether one does now.
  let usual = 0;
  let aimed = false;
  let wasAimed = false;

  for (let steps = 1; tried.timeS < course.endS; steps++) {
    if (steps > course.mostSteps || tried.events > MOST_EVENTS)
      return { timeS: tried.timeS, stop: null, finished: false, steps, nextStepS: length };
    const left = course.endS - tried.timeS;
    length = Math.min(length, left, reachOfStops(tried));
    if (left - length < 1e-12 * left) length = left;
    tried.lengthS = length;
    stepper.step(tried.timeS, state, length, tried.start);
    const error = Math.max(stepper.errorSize(system.scale, course.tolerance), LEAST_ERROR);
    const growth = growthOf(error, stepper.growthPower);
    if (!(error <= 1) && length > LEAST_STEP * Math.max(Math.abs(tried.timeS), course.firstStepS)) {
      const without = length * growth;
      length = shorter(tried, state, length, error, course);
      aimed ||= length !== without;
      continue;
    }
    const next = length * growth;
    system.prepare(tried.timeS + length, stepper.end, tried.end, tried.after, course.stiff);
    const landing = findLanding(tried);
    report(tried, landing?.share ?? 1, course);
    if (!landing) {
      finish(tried, state, course, null);
      // One step cut short for a kink says nothing of the next; several in a row do.
      if (!aimed) [usual, length] = [length, next];
      else length = wasAimed ? next : Math.max(next, usual / 2);
      [wasAimed, aimed] = [aimed, false];
      continue;
    }
    tried.events++;
    const stops = (system.watches[landing.watch] as Watch).kind === "stop";
    if (stops) landOnStop(tried, state, landing, course);
    else landPastKink(tried, state, landing.share, course);
    // On the other side of a kink it goes on in steps like those before it, however short the last one was cut.
    const nextStepS = Math.max(next - tried.lengthS, tried.lengthS, usual / 2);
    [wasAimed, aimed] = [aimed, false];
    finish(tried, state, course, landing.watch);
    if (stops) return { timeS: tried.timeS, stop: landing.watch, finished: true, steps, nextStepS };
    length = nextStepS;
  }
  return { timeS: tried.timeS, stop: null, finished: true, steps: 0, nextStepS: length };
}

function createTried(system: OdeSystem, course: Course, timeS: number): TriedStep {
  const count = system.watches.length;
  return {
    system,
    stepper: course.stiff ? createStiffStepper(system) : createExplicitStepper(system),
    timeS,
    lengthS: 0,
    events: 0,
    start: createStart(system.size, course.stiff),
    end: createStart(system.size, course.stiff),
    before: new Array<number>(count).fill(0),
    after: new Array<number>(count).fill(0),
    signs: [],
    inner: new Float64Array(system.size),
    watched: new Array<number>(count).fill(0),
  };
}

/** No step goes much further than to where a straight line would meet the next stop: what lies behind is never asked for. */
function reachOfStops({ system, start, before }: TriedStep): number {
  let reach = Number.POSITIVE_INFINITY;
  for (let i = 0; i < system.watches.length; i++) {
    const { kind, component, crosses } = system.watches[i] as Watch;
    if (kind !== "stop" || component === undefined) continue;
    const rate = start.rates[component] as number;
    const straightS = -(before[i] as number) / rate;
    if (straightS > 0 && crosses !== (rate > 0 ? "down" : "up")) reach = Math.min(reach, PAST_STOP * straightS);
  }
  return reach;
}

/** A step refused for a kink inside it is tried again to just past that kink, where the kink cannot disturb it any more. */
function shorter(tried: TriedStep, state: Float64Array, length: number, error: number, course: Course): number {
  const { system, stepper } = tried;
  const usual = length * growthOf(error, stepper.growthPower);
  if (!Number.isFinite(stepper.end[0] as number)) return usual;
  system.prepare(tried.timeS + length, stepper.end, tried.end, tried.after, course.stiff);
  let share = 1;
  for (let i = 0; i < system.watches.length; i++) {
    if ((system.watches[i] as Watch).kind !== "kink") continue;
    const shown = firstCrossing(tried, i);
    if (shown === null || shown < AT_START) continue;
    // A kink far inside bends the dense output so much that it may be shown too late: the rates of the start then say more.
    const ahead = error > BENT ? aheadByRates(tried, state, i) : null;
    share = Math.min(share, ahead === null ? shown : Math.min(shown, Math.max(ahead, shown / 2)));
  }
  return share < KINK_RETRY ? length * share * (1 + JUST_PAST) : usual;
}

/** Share of the step at which watch i would reach 0 at the rate of its start (Newton's iteration); null: not inside the step. */
function aheadByRates(
  { system, start, timeS, lengthS, before, inner, watched }: TriedStep,
  state: Float64Array,
  i: number,
): number | null {
  for (let k = 0; k < inner.length; k++) inner[k] = (state[k] as number) + NUDGE * lengthS * (start.rates[k] as number);
  system.watch(timeS + NUDGE * lengthS, inner, watched);
  const share = (-(before[i] as number) * NUDGE) / ((watched[i] as number) - (before[i] as number));
  return share > AT_START && share < 1 ? share : null;
}

function growthOf(error: number, power: number): number {
  if (!Number.isFinite(error)) return LEAST_GROWTH;
  return Math.min(MOST_GROWTH, Math.max(LEAST_GROWTH, SAFETY * error ** -power));
}

interface Landing {
  readonly watch: number;
  readonly share: number;
}

/** The first kink or stop inside the step. */
function findLanding(tried: TriedStep): Landing | null {
  const { watches } = tried.system;
  let landing: Landing | null = null;
  for (let i = 0; i < watches.length; i++) {
    const { kind } = watches[i] as Watch;
    if (kind === "note") continue;
    const share = firstCrossing(tried, i);
    if (share === null) continue;
    if (kind === "kink" && share < AT_START) tried.signs[i] = -(tried.signs[i] as number);
    else if (!landing || share < landing.share) landing = { watch: i, share };
  }
  return landing;
}

/** Tells the notes up to where the step will really end. */
function report(tried: TriedStep, until: number, course: Course): void {
  if (!course.onNote) return;
  const { watches } = tried.system;
  for (let i = 0; i < watches.length; i++) {
    if ((watches[i] as Watch).kind !== "note") continue;
    const share = firstCrossing(tried, i);
    if (share === null || share > until) continue;
    tried.events++;
    tried.stepper.at(share, tried.inner);
    course.onNote(i, tried.timeS + share * tried.lengthS, tried.inner, (tried.signs[i] as number) < 0);
  }
}

function landPastKink(tried: TriedStep, state: Float64Array, share: number, course: Course): void {
  const cut = share * (1 + PAST_KINK);
  if (cut >= 1) return;
  stepAgain(tried, state, cut * tried.lengthS, course);
}

/** Steps again to a stop, so that the watched value is 0 at the step's end itself, not only on the dense output. */
function landOnStop(tried: TriedStep, state: Float64Array, landing: Landing, course: Course): void {
  const { watch, share } = landing;
  const near = Math.min(1e-4, share / 2);
  const slope = (watchedAt(tried, watch, share) - watchedAt(tried, watch, share - near)) / (near * tried.lengthS);
  let length = share * tried.lengthS;
  for (let k = 0; k < 4; k++) {
    stepAgain(tried, state, length, course);
    const missing = -(tried.after[watch] as number) / slope;
    if (!(Math.abs(missing) < 0.1 * length)) return;
    if (Math.abs(missing) < NEAR_STOP * length) {
      const { end } = tried.stepper;
      for (let i = 0; i < end.length; i++) end[i] = (end[i] as number) + missing * (tried.end.rates[i] as number);
      tried.lengthS += missing;
      return;
    }
    length += missing;
  }
}

function stepAgain(tried: TriedStep, state: Float64Array, lengthS: number, course: Course): void {
  tried.lengthS = lengthS;
  tried.stepper.step(tried.timeS, state, lengthS, tried.start);
  tried.system.prepare(tried.timeS + lengthS, tried.stepper.end, tried.end, tried.after, course.stiff);
}

/** Takes the step: its end becomes the next start, and each watched value is on the side that it shows, the landed one across. */
function finish(tried: TriedStep, state: Float64Array, course: Course, landed: number | null): void {
  const fromS = tried.timeS;
  tried.timeS = tried.lengthS >= course.endS - fromS ? course.endS : fromS + tried.lengthS;
  state.set(tried.stepper.end);
  tried.system.accept?.();
  [tried.start, tried.end] = [tried.end, tried.start];
  [tried.before, tried.after] = [tried.after, tried.before];
  for (let i = 0; i < tried.signs.length; i++) {
    const value = tried.before[i] as number;
    if (i === landed) tried.signs[i] = -(tried.signs[i] as number);
    else if (value !== 0 && !(landed !== null && isOnStop(tried, i, value))) tried.signs[i] = value > 0 ? 1 : -1;
  }
  course.onStep?.(fromS, tried.timeS, state, tried.stepper.at);
}

/** A stop crossed together with the kink just landed on keeps its side, so that the next step finds it at its start. */
function isOnStop({ system, signs }: TriedStep, i: number, value: number): boolean {
  const { kind, crosses } = system.watches[i] as Watch;
  const sign = signs[i] as number;
  return kind === "stop" && value * sign < 0 && crosses !== (sign < 0 ? "down" : "up");
}
