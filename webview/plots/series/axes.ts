/** Axes of series: from their least to their greatest value, 0 among them where that is near, with round ticks. Pure. */

import type { UnitSystem } from "../../../extension/units/systems.js";
import type { Dimension } from "../../../extension/units/table.js";
import { type AxisUnit, axisUnit } from "../axisUnit.js";
import { ticksBetween } from "../ticks.js";
import type { SeriesAxis } from "./drawing.js";

/** Least room that a value axis leaves beyond its greatest value, as a share. */
const HEADROOM = 0.06;

/** An axis of values: it ends at ticks, but below 0. `fromZero`: 0 belongs to it. */
export function valueAxis(
  name: string,
  values: Iterable<number>,
  dimension: Dimension,
  system: UnitSystem,
  { fromZero = true, intervals = 4 }: { readonly fromZero?: boolean; readonly intervals?: number } = {},
): SeriesAxis {
  const [least, greatest] = extent(values, fromZero);
  const unit = axisUnit(Math.max(Math.abs(least), Math.abs(greatest)), dimension, system);
  const [low, high] = [unit.fromSi(least), unit.fromSi(greatest)];
  const room = (high - low) * HEADROOM;
  const top = high > 0 || !fromZero ? high + room : high;
  const around = ticksBetween(fromZero ? Math.max(low, 0) : low - room, top, intervals, "around");
  if (!fromZero || low >= 0)
    return { min: around[0] ?? 0, max: around.at(-1) ?? 1, ticks: around, title: `${name} (${unit.text})`, unit };
  // Below 0 it ends where the values do: another whole interval would be empty for most.
  const [min, max] = [low - room, high > 0 ? (around.at(-1) ?? top) : 0];
  return { min, max, ticks: ticksBetween(min, max, intervals, "within"), title: `${name} (${unit.text})`, unit };
}

/** An axis that ends where it must, such as one of time. */
export function fixedAxis(name: string, unit: AxisUnit, from: number, to: number): SeriesAxis {
  const [min, max] = to > from ? [from, to] : [from, from + (Math.abs(from) || 1)];
  return { min, max, ticks: ticksBetween(min, max, 6, "within"), title: `${name} (${unit.text})`, unit };
}

/** An axis of even factors between two ends above 0, for a number without a unit. */
export function logAxis(name: string, min: number, max: number): SeriesAxis {
  return { min, max, scale: "log", ticks: logTicks(min, max), title: name, unit: PLAIN };
}

const PLAIN: AxisUnit = { text: "", fromSi: (value) => value, toSi: (value) => value };

/** Round numbers: 1, 2 and 5 of each decade, and more of them where that would be few. */
function logTicks(min: number, max: number): readonly number[] {
  for (const multiples of [
    [1, 2, 5],
    [1, 1.5, 2, 3, 4, 5, 6, 8],
    [1, 1.2, 1.4, 1.6, 1.8, 2, 2.5, 3, 3.5, 4, 5, 6, 7, 8, 9],
  ]) {
    const decades = Array.from(
      { length: Math.ceil(Math.log10(max)) - Math.floor(Math.log10(min)) + 1 },
      (_, index) => Math.floor(Math.log10(min)) + index,
    );
    const ticks = decades
      .flatMap((decade) => multiples.map((multiple) => Number((multiple * 10 ** decade).toPrecision(6))))
      .filter((tick) => tick >= min && tick <= max);
    if (ticks.length >= LEAST_TICKS) return ticks;
  }
  return [min, max];
}

const LEAST_TICKS = 5;

const NOTHING = 1e-280;
/** Values nearer to each other than this share of their size are the same. */
const SAME = 1e-6;

function extent(values: Iterable<number>, fromZero: boolean): readonly [number, number] {
  let [least, greatest] = fromZero ? [0, 0] : [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of values) {
    if (value < least) least = value;
    if (value > greatest) greatest = value;
  }
  if (!Number.isFinite(least) || !Number.isFinite(greatest)) return [0, 1];
  // Below this ticks would lose their digits: nothing to show.
  const size = Math.max(Math.abs(least), Math.abs(greatest));
  if (size < NOTHING) return [0, 1];
  // As good as one value: a tenth to either side of it.
  return greatest - least > size * SAME ? [least, greatest] : [least - size / 10, greatest + size / 10];
}
