/** The plots of a mechanism over its ratio as plain data: what keeps the rules and what stock gives, then time, then current and share. */
import type { RatioMapChart, RatioMapPoint } from "../../../extension/protocol/charts/ratioMap.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeNumber } from "../../../extension/units/write.js";
import { PER_CENT } from "../../plots/axisUnit.js";
import { logAxis, valueAxis } from "../../plots/series/axes.js";
import {
  EMPTY_DRAWING,
  type Ink,
  type SeriesAxis,
  type SeriesDrawing,
  type SeriesLine,
  type Side,
  type StateRow,
  type Upright,
} from "../../plots/series/drawing.js";

export interface RatioDrawings {
  readonly strip: SeriesDrawing;
  readonly time: SeriesDrawing;
  readonly current: SeriesDrawing;
}

/** Slow travels near the stall would flatten all others: the axis ends at this multiple of the quickest. */
const MOST_TIMES = 4;
/** Half of a tick's width as a share of the ratio. */
const TICK = 0.0015;
/** Rules that have a row of their own. */
const MOST_ROWS = 4;

export function drawRatioMap(chart: RatioMapChart, saved: RatioMapChart | null, system: UnitSystem): RatioDrawings {
  const [first, last] = [chart.samples[0]?.ratio ?? 1, chart.samples.at(-1)?.ratio ?? 2];
  const across = logAxis("Ratio: motor turns per turn of the output shaft", first, Math.max(last, first * 1.01));
  const marks = uprightsOf(chart, true);
  const bare = uprightsOf(chart, false);
  return {
    strip: { ...EMPTY_DRAWING, across, showsAcross: false, uprights: bare, rows: rowsOf(chart) },
    time: { ...EMPTY_DRAWING, across, showsAcross: false, uprights: marks, ...timeLines(chart, saved, system) },
    current: { ...EMPTY_DRAWING, across, uprights: bare, ...currentLines(chart, saved, system) },
  };
}

function rowsOf({ kept, stock, anyRatio, broken }: RatioMapChart): StateRow[] {
  const tick = ({ ratio }: { readonly ratio: number }) => ({ from: ratio * (1 - TICK), to: ratio * (1 + TICK) });
  const one = stock.filter(({ gears }) => gears === 1);
  const shown = one.length > 0 ? one : stock;
  const words = one.length > 0 ? "In stock, with one gear changed" : "In stock";
  return [
    { words: kept.length > 0 ? "Keeps every rule" : "Keeps every rule: no ratio", spans: kept, plain: true },
    ...(anyRatio ? [{ words: "Any ratio: a plain reduction", spans: [], plain: true as const }] : []),
    ...(shown.length > 0 ? [{ words, spans: shown.map(tick), plain: true as const }] : []),
    ...broken.slice(0, MOST_ROWS),
  ];
}

/** Marks that lie on each other are one. */
function uprightsOf({ now, fastest, bestEfficiency }: RatioMapChart, isNamed: boolean): Upright[] {
  const marks = [
    { ratio: now.ratio, words: "now", kind: "event" as const },
    ...(fastest === null ? [] : [{ ratio: fastest.ratio, words: "fastest", kind: "part" as const }]),
    ...(bestEfficiency === null ? [] : [{ ratio: bestEfficiency.ratio, words: "best efficiency", kind: "part" as const }]),
  ];
  const found: Upright[] = [];
  for (const { ratio, words, kind } of marks) {
    const same = found.findIndex(({ x }) => Math.abs(Math.log(x / ratio)) < 1e-3);
    const before = found[same];
    if (before === undefined) found.push({ x: ratio, words: isNamed ? words : "", kind });
    else if (isNamed) found[same] = { ...before, words: `${before.words}, ${words}` };
  }
  return found;
}

type Lines = Pick<SeriesDrawing, "left" | "right" | "lines" | "levels">;

function timeLines(chart: RatioMapChart, saved: RatioMapChart | null, system: UnitSystem): Lines {
  const read = (point: RatioMapPoint) => (chart.hasTravel ? point.timeS : point.outputRadPerS);
  const values = [...chart.samples, ...(saved?.samples ?? [])].flatMap((point) => read(point) ?? []);
  const least = Math.min(...values);
  const shown = chart.hasTravel ? values.filter((value) => value <= least * MOST_TIMES) : values;
  const within = chart.hasTravel && chart.withinS !== null && chart.withinS <= least * MOST_TIMES ? [chart.withinS] : [];
  const left = valueAxis(
    chart.hasTravel ? "Travel" : "Output speed",
    [...shown, ...within],
    chart.hasTravel ? "time" : "speed",
    system,
    {
      intervals: 3,
    },
  );
  const name = chart.hasTravel ? "travel time" : "output speed";
  return {
    left,
    right: null,
    lines: [
      ...savedLines(saved, left, read),
      ...curves(chart.samples, left, { name, side: "left", ink: "speed", dash: [], marker: "circle", read }),
    ],
    levels: within.map((seconds) => ({
      side: "left",
      y: left.unit.fromSi(seconds),
      words: `within ${writeNumber(left.unit.fromSi(seconds))} ${left.unit.text}`,
      hatched: "above",
    })),
  };
}

function currentLines(chart: RatioMapChart, saved: RatioMapChart | null, system: UnitSystem): Lines {
  const current = ({ currentA }: RatioMapPoint) => currentA;
  const share = ({ stallShare }: RatioMapPoint) => stallShare;
  const all = [...chart.samples, ...(saved?.samples ?? [])];
  const left = valueAxis("Current", all.map(current), "current", system, { intervals: 4 });
  const right: SeriesAxis = { min: 0, max: 125, ticks: [0, 25, 50, 75, 100, 125], title: "Share of stall (%)", unit: PER_CENT };
  return {
    left,
    right,
    lines: [
      ...savedLines(saved, left, current),
      ...curves(chart.samples, left, {
        name: "current",
        side: "left",
        ink: "current",
        dash: [9, 3, 2, 3],
        marker: "triangle",
        read: current,
      }),
      ...curves(chart.samples, right, {
        name: "share of stall",
        side: "right",
        ink: "torque",
        dash: [4, 3],
        marker: "square",
        read: share,
      }),
    ],
    levels: [],
  };
}

interface Curve {
  readonly name: string;
  readonly side: Side;
  readonly ink: Ink;
  readonly dash: readonly number[];
  readonly marker: SeriesLine["marker"];
  readonly read: (point: RatioMapPoint) => number | null;
}

/** Broken where there is no value; the longest piece carries the name. */
function curves(points: readonly RatioMapPoint[], axis: SeriesAxis, { read, name, ...look }: Curve): SeriesLine[] {
  const pieces: { xs: number[]; ys: number[] }[] = [];
  let piece: { xs: number[]; ys: number[] } | undefined;
  for (const point of points) {
    const value = read(point);
    if (value === null) {
      piece = undefined;
      continue;
    }
    if (piece === undefined) {
      piece = { xs: [], ys: [] };
      pieces.push(piece);
    }
    piece.xs.push(point.ratio);
    piece.ys.push(axis.unit.fromSi(value));
  }
  const longest = pieces.toSorted((one, other) => other.xs.length - one.xs.length)[0];
  return pieces.map(({ xs, ys }) => ({ ...look, name: xs === longest?.xs ? name : "", xs, ys, width: 2 }));
}

function savedLines(saved: RatioMapChart | null, axis: SeriesAxis, read: Curve["read"]): SeriesLine[] {
  if (saved === null) return [];
  const look = { name: "saved", side: "left" as const, ink: "quiet" as const, dash: [1, 3], marker: null };
  return curves(saved.samples, axis, { ...look, read }).map((line) => ({ ...line, width: 1.5 }));
}
