/** Quantities given as points over shaft position, linear between them and constant beyond the ends. */
import type { Curve } from "./drive.js";

/** Value at a position. */
export function curveValue(curve: Curve, position: number): number {
  const [start, end, share] = segmentAt(curve, position);
  return start[1] + (end[1] - start[1]) * share;
}

/** Slope at a position; at a corner, that of the side towards greater positions. */
export function curveSlope(curve: Curve, position: number): number {
  const first = curve[0];
  const last = curve.at(-1);
  if (!first || !last || position < first[0] || position >= last[0]) return 0;
  const [start, end] = segmentAt(curve, position);
  const width = end[0] - start[0];
  return width > 0 ? (end[1] - start[1]) / width : 0;
}

type Point = Curve[number];

function segmentAt(curve: Curve, position: number): [Point, Point, number] {
  const first = curve[0] ?? [0, 0];
  const last = curve.at(-1) ?? first;
  if (position <= first[0]) return [first, curve[1] ?? first, 0];
  if (position >= last[0]) return [last, last, 0];
  let low = 0;
  let high = curve.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((curve[middle] ?? last)[0] <= position) low = middle;
    else high = middle;
  }
  const start = curve[low] ?? first;
  const end = curve[high] ?? last;
  return [start, end, (position - start[0]) / (end[0] - start[0])];
}
