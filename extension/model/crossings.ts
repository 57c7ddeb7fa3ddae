/**
 * Where inside a step a watched value changes sign.
 *
 * Deliberately not here: what a change means (integrate.ts).
 */
import type { OdeSystem, Watch } from "./odeSystem.js";
import type { Stepper, StepStart } from "./stepper.js";

/** The last step tried, with what was watched at its ends. */
export interface TriedStep {
  readonly system: OdeSystem;
  readonly stepper: Stepper;
  timeS: number;
  lengthS: number;
  /** Kinks and notes met so far. */
  events: number;
  start: StepStart;
  end: StepStart;
  before: number[];
  after: number[];
  /** Side on which each watched value is taken to be at the start: a kink just landed on has changed it, however it is rounded. */
  readonly signs: number[];
  /** Room for a state and for watched values inside the step. */
  readonly inner: Float64Array;
  readonly watched: number[];
}

/** Share of the step at which watch i first changes sign the way it is watched for; null: it does not. */
export function firstCrossing(tried: TriedStep, i: number): number | null {
  const { stepper, start, end, before, after } = tried;
  const watch = tried.system.watches[i] as Watch;
  const sign = tried.signs[i] as number;
  if (watch.crosses !== "both" && (watch.crosses === "up") !== sign < 0) return null;
  if ((after[i] as number) * sign < 0) return rootBefore(tried, i, 1);
  const component = watch.component;
  if (component === undefined) return null;
  // There and back again: only what runs towards the border at first and away from it at the end can have crossed it.
  const returns = (start.rates[component] as number) * sign < 0 && (end.rates[component] as number) * sign > 0;
  if (!returns || (before[i] as number) * sign < 0) return null;
  const turn = turningShare((share) => stepper.componentAt(share, component) * sign);
  return watchedAt(tried, i, turn) * sign < 0 ? rootBefore(tried, i, turn) : null;
}

/** Share of the step at which a value that falls at first and rises at the end is least: golden section. */
function turningShare(value: (share: number) => number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let from = 0;
  let to = 1;
  let [left, right] = [1 - golden, golden];
  let [valueLeft, valueRight] = [value(left), value(right)];
  for (let k = 0; k < 40; k++) {
    if (valueLeft < valueRight) {
      to = right;
      right = left;
      valueRight = valueLeft;
      left = to - golden * (to - from);
      valueLeft = value(left);
    } else {
      from = left;
      left = right;
      valueLeft = valueRight;
      right = from + golden * (to - from);
      valueRight = value(right);
    }
  }
  return (from + to) / 2;
}

/** Root of watch i between the start and a share of the step: bisection sped up with the secant (Illinois) on the dense output. */
function rootBefore(tried: TriedStep, i: number, high: number): number {
  const sign = tried.signs[i] as number;
  const value = (share: number): number => watchedAt(tried, i, share) * sign;
  let from = 0;
  let to = high;
  let valueFrom = Math.max(value(from), 0);
  let valueTo = value(to);
  let side = 0;
  for (let k = 0; k < 60 && to - from > 1e-13; k++) {
    const secant = from + ((to - from) * valueFrom) / (valueFrom - valueTo);
    const guess = k % 8 === 7 || !(secant > from && secant < to) ? (from + to) / 2 : secant;
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

/** Value of watch i at a share of the step; what follows one component costs no evaluation. */
export function watchedAt(tried: TriedStep, i: number, share: number): number {
  const { system, stepper, inner, watched } = tried;
  const component = (system.watches[i] as Watch).component;
  if (component !== undefined) {
    return stepper.componentAt(share, component) - (stepper.end[component] as number) + (tried.after[i] as number);
  }
  stepper.at(share, inner);
  system.watch(tried.timeS + share * tried.lengthS, inner, watched);
  return watched[i] as number;
}
