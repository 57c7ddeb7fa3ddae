/**
 * One step of an explicit Runge-Kutta method of order 8, for smooth courses without short time constants.
 *
 * Deliberately not here: choosing steps and watching for events (integrate.ts), and what is integrated.
 */
import { DENSE, END_STAGE, ERROR_5, ROWS, STAGES, STEP_STAGES, WEIGHTS_3 } from "./dop853.js";
import type { Rates, Stepper, StepStart } from "./stepper.js";

type Row = (typeof ROWS)[number];

/** Share of the step at which a stage looks at the time: the sum of its row. */
const NODES = ROWS.map((row) => row.reduce((sum, [, weight]) => sum + weight, 0));

/** A row as two flat lists, for speed. */
interface FlatRow {
  readonly stages: Int32Array;
  readonly weights: Float64Array;
}
const flat = (row: Row): FlatRow => ({
  stages: Int32Array.from(row, ([stage]) => stage),
  weights: Float64Array.from(row, ([, weight]) => weight),
});
const FLAT_ROWS = ROWS.map(flat);
const FLAT_DENSE = DENSE.map(flat);
const FLAT_ERROR_5 = flat(ERROR_5);
const FLAT_WEIGHTS_3 = flat(WEIGHTS_3);
/** Change over the step, two vectors of its ends' rates, and the four of the coefficients. */
const DENSE_VECTORS = 3 + DENSE.length;

/** DOP853; needs only the rates of the start. */
export function createExplicitStepper({ size: n, coupled, evaluate }: Rates): Stepper {
  // Plain arrays: typed ones of this size would be allocated outside the heap, at the cost of some steps.
  const stages = new Array<number>(STAGES * n).fill(0);
  const dense = new Array<number>(DENSE_VECTORS * n).fill(0);
  const begin = new Float64Array(n);
  const argument = new Float64Array(n);
  const rates = new Float64Array(n);
  const end = new Float64Array(n);
  let beginS = 0;
  let lengthS = 0;
  let interpolated = false;

  function step(timeS: number, state: Float64Array, length: number, start: StepStart): void {
    interpolated = false;
    beginS = timeS;
    lengthS = length;
    begin.set(state);
    for (let i = 0; i < n; i++) stages[i] = start.rates[i] as number;
    for (let stage = 1; stage < STEP_STAGES; stage++) takeStage(stage);
    advance(FLAT_ROWS[END_STAGE] as FlatRow, end, n);
  }

  function takeStage(stage: number): void {
    advance(FLAT_ROWS[stage] as FlatRow, argument, coupled);
    evaluate(beginS + (NODES[stage] as number) * lengthS, argument, rates);
    keepRates(stage);
  }

  function keepRates(stage: number): void {
    for (let i = 0; i < n; i++) stages[stage * n + i] = rates[i] as number;
  }

  /** y + h·Σ weight·rate, for the leading components. */
  function advance(row: FlatRow, into: Float64Array, leading: number): void {
    const { stages: from, weights } = row;
    for (let i = 0; i < leading; i++) into[i] = begin[i] as number;
    for (let k = 0; k < weights.length; k++) {
      const weight = lengthS * (weights[k] as number);
      const base = (from[k] as number) * n;
      for (let i = 0; i < leading; i++) into[i] = (into[i] as number) + weight * (stages[base + i] as number);
    }
  }

  function weighted(row: FlatRow, i: number): number {
    const { stages: from, weights } = row;
    let sum = 0;
    for (let k = 0; k < weights.length; k++) sum += (weights[k] as number) * (stages[(from[k] as number) * n + i] as number);
    return sum;
  }

  /** h·|e5|²/√(|e5|² + 0.01·|e3|²), root mean squares of both estimates over what is allowed. Source as for the coefficients. */
  function errorSize(scale: Float64Array, tolerance: number): number {
    let fifth = 0;
    let third = 0;
    for (let i = 0; i < n; i++) {
      const allowed = tolerance * ((scale[i] as number) + Math.abs(end[i] as number));
      const rate = ((end[i] as number) - (begin[i] as number)) / lengthS;
      fifth += (weighted(FLAT_ERROR_5, i) / allowed) ** 2;
      third += ((rate - weighted(FLAT_WEIGHTS_3, i)) / allowed) ** 2;
    }
    const both = fifth + 0.01 * third;
    return both === 0 ? 0 : (lengthS * fifth) / Math.sqrt(n * both);
  }

  function interpolate(): void {
    if (interpolated) return;
    interpolated = true;
    evaluate(beginS + lengthS, end, rates);
    keepRates(END_STAGE);
    for (let stage = END_STAGE + 1; stage < STAGES; stage++) takeStage(stage);
    for (let i = 0; i < n; i++) {
      const change = (end[i] as number) - (begin[i] as number);
      const bend = lengthS * (stages[i] as number) - change;
      dense[i] = change;
      dense[n + i] = bend;
      dense[2 * n + i] = change - lengthS * (stages[END_STAGE * n + i] as number) - bend;
      for (let k = 0; k < FLAT_DENSE.length; k++) dense[(3 + k) * n + i] = lengthS * weighted(FLAT_DENSE[k] as FlatRow, i);
    }
  }

  function componentAt(share: number, i: number): number {
    interpolate();
    const rest = 1 - share;
    let sum = 0;
    // Factors alternate share, rest, share … from the outermost vector inwards.
    for (let k = DENSE_VECTORS - 1; k >= 0; k--) sum = (k % 2 === 0 ? share : rest) * ((dense[k * n + i] as number) + sum);
    return (begin[i] as number) + sum;
  }

  function at(share: number, state: Float64Array): void {
    for (let i = 0; i < n; i++) state[i] = componentAt(share, i);
  }

  return { end, step, errorSize, growthPower: 0.125, at, componentAt };
}
