/** Where along the ratio something holds, as spans of neighbours. */
import type { PointReader, RatioPoint } from "./ratioPoint.js";

export interface RatioSpan {
  readonly from: number;
  readonly to: number;
}

/** Halvings of the span between a ratio that keeps the rules and its neighbour that does not: to a ten-thousandth of it. */
const HALVINGS = 13;

interface Edges {
  readonly pointAt: PointReader;
  readonly onPoint: (point: RatioPoint) => void;
}

/** Spans of neighbours that keep the rules, their ends found by halving; each end lies where they are kept. */
export function* keptSpans(
  points: readonly RatioPoint[],
  keeps: (point: RatioPoint) => boolean,
  { pointAt, onPoint }: Edges,
): Generator<undefined, RatioSpan[]> {
  const edge = function* (inside: RatioPoint, outside: RatioPoint): Generator<undefined, number> {
    let [low, high] = [inside, outside];
    for (let round = 0; round < HALVINGS; round++) {
      yield;
      const middle = pointAt(Math.sqrt(low.ratio * high.ratio));
      if (keeps(middle)) low = middle;
      else high = middle;
    }
    onPoint(low);
    onPoint(high);
    return low.ratio;
  };
  const spans: RatioSpan[] = [];
  let from: number | undefined;
  for (const [index, point] of points.entries()) {
    const before = points[index - 1];
    const passes = keeps(point);
    if (passes && from === undefined) from = before === undefined ? point.ratio : yield* edge(point, before);
    if (passes || from === undefined || before === undefined) continue;
    spans.push({ from, to: yield* edge(before, point) });
    from = undefined;
  }
  const last = points.at(-1);
  if (from !== undefined && last !== undefined) spans.push({ from, to: last.ratio });
  return spans;
}

/** Spans of neighbours that pass a test, ending midway to those that do not: exact where the ends of what is kept are among them. */
export function spansBetween(points: readonly RatioPoint[], test: (point: RatioPoint) => boolean): RatioSpan[] {
  const spans: RatioSpan[] = [];
  let from: number | undefined;
  for (const [index, point] of points.entries()) {
    const before = points[index - 1]?.ratio ?? point.ratio;
    const passes = test(point);
    if (passes && from === undefined) from = Math.sqrt(before * point.ratio);
    if (passes || from === undefined) continue;
    spans.push({ from, to: Math.sqrt(before * point.ratio) });
    from = undefined;
  }
  const last = points.at(-1);
  if (from !== undefined && last !== undefined) spans.push({ from, to: last.ratio });
  return spans;
}
