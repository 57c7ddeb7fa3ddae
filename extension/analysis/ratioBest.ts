/** The best ratios: the fastest of all that keep the rules, and those among what can be written into the code. */
import type { StockRatio } from "../proposals/stockRatios.js";
import { goldenLeast } from "./goldenLeast.js";
import type { PointReader, RatioPoint } from "./ratioPoint.js";
import type { RatioSpan } from "./ratioSpans.js";

/** What it costs to be at a ratio; less is better. */
export type Cost = (point: RatioPoint) => number;

/** The time of the travel; for a load without one the output's speed counts, the faster the better. */
export function timeCost(points: readonly RatioPoint[]): Cost {
  const hasTravel = points.some(({ timeS }) => timeS !== null);
  return ({ timeS, outputRadPerS }) => (hasTravel ? (timeS ?? Number.POSITIVE_INFINITY) : -outputRadPerS);
}

export interface Search {
  readonly keeps: (point: RatioPoint) => boolean;
  readonly pointAt: PointReader;
  readonly cost: Cost;
}

/** In each span by golden section around its best sample; the time has one minimum over the ratio. */
export function* fastestIn(
  spans: readonly RatioSpan[],
  points: readonly RatioPoint[],
  { keeps, pointAt, cost }: Search,
): Generator<undefined, RatioPoint | null> {
  let best: RatioPoint | null = null;
  const consider = (point: RatioPoint): void => {
    if (keeps(point) && Number.isFinite(cost(point)) && (best === null || cost(point) < cost(best))) best = point;
  };
  for (const { from, to } of spans) {
    const inside = points.filter(({ ratio }) => from <= ratio && ratio <= to).sort((one, other) => one.ratio - other.ratio);
    const least = inside.reduce((found, point, index) => (cost(point) < cost(inside[found] ?? point) ? index : found), 0);
    const [left, right] = [inside[least - 1]?.ratio ?? from, inside[least + 1]?.ratio ?? to];
    for (const point of inside) consider(point);
    yield* goldenLeast(Math.log(left), Math.log(right), (log) => {
      const point = pointAt(Math.exp(log));
      consider(point);
      return cost(point);
    });
  }
  return best;
}

/** A ratio that can be written, with the change that does it. */
export interface WritableRatio extends RatioPoint {
  readonly words: string;
}

/** Of what can be written, so many that lie best are tried. */
const MOST_TRIED = 6;

/** The best of the choices that keeps the rules; those that lie best by `estimate` are tried. */
export function* bestWritable(
  choices: readonly StockRatio[],
  estimate: (ratio: number) => number,
  { keeps, pointAt, cost }: Search,
): Generator<undefined, WritableRatio | null> {
  const sorted = choices
    .map((choice) => ({ choice, guess: estimate(choice.ratio) }))
    .filter(({ guess }) => Number.isFinite(guess))
    .sort((one, other) => one.guess - other.guess || one.choice.gears - other.choice.gears);
  let best: WritableRatio | null = null;
  for (const { choice } of sorted.slice(0, MOST_TRIED)) {
    yield;
    const point = pointAt(choice.ratio);
    if (keeps(point) && (best === null || cost(point) < cost(best))) best = { ...point, words: choice.change.words };
  }
  return best;
}

/** The cost between samples, along the logarithm of the ratio. */
export function interpolated(points: readonly RatioPoint[], cost: Cost): (ratio: number) => number {
  return (ratio) => {
    const next = points.findIndex((point) => point.ratio >= ratio);
    const [low, high] = [points[next - 1] ?? points[next], points[next]];
    if (low === undefined || high === undefined) return Number.POSITIVE_INFINITY;
    const share = low === high ? 0 : Math.log(ratio / low.ratio) / Math.log(high.ratio / low.ratio);
    return cost(low) + share * (cost(high) - cost(low));
  };
}
