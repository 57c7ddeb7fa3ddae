/** The two plots of a travel as plain data: torque needed and given, and current with speed, over time or over position. */
import type { TravelChart } from "../../../extension/protocol/charts/travel.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import type { Dimension } from "../../../extension/units/table.js";
import { axisUnit } from "../../plots/axisUnit.js";
import { fixedAxis, valueAxis } from "../../plots/series/axes.js";
import {
  EMPTY_DRAWING,
  type Level,
  type SeriesAxis,
  type SeriesDrawing,
  type SeriesLine,
  type Upright,
} from "../../plots/series/drawing.js";
import { writerIn } from "../../quantity.js";
import { eventWords } from "./events.js";
import { moves, type Over, positionAt } from "./moments.js";

export interface TravelDrawings {
  readonly torque: SeriesDrawing;
  readonly current: SeriesDrawing;
}

export interface Across {
  readonly over: Over;
  /** What is shown, SI. */
  readonly from: number;
  readonly to: number;
}

const LONG_SHORT = [9, 3, 2, 3];
const SAVED: Pick<SeriesLine, "ink" | "dash" | "width" | "marker"> = { ink: "quiet", dash: [1, 3], width: 1.5, marker: null };
/** The hold is drawn this much of the travel's time at most: its currents are the same all along. */
const HOLD_SHARE = 0.25;
/** A time allowed up to this multiple of the travel's own is shown on the axis; a longer one is told alone. */
const WITHIN_SHARE = 1.8;

/** All that there is to see of the abscissa, SI. */
export function wholeSpan(chart: TravelChart, over: Over): { readonly from: number; readonly to: number } {
  if (over === "position") {
    const { from, to } = chart.travel ?? { from: 0, to: 1 };
    return { from: Math.min(from, to), to: Math.max(from, to) };
  }
  const end = chart.timesS.at(-1) ?? 0;
  const within = chart.withinS !== null && chart.withinS <= end * WITHIN_SHARE ? chart.withinS : 0;
  return { from: 0, to: Math.max(end + holdShown(chart), within * 1.03, end * 1.03) || 1 };
}

export function drawTravel(chart: TravelChart, saved: TravelChart | null, across: Across, system: UnitSystem): TravelDrawings {
  const { over, from, to } = across;
  const dimension: Dimension = over === "time" ? "time" : (chart.coordinate ?? "length");
  const whole = wholeSpan(chart, over);
  const unit = axisUnit(Math.max(Math.abs(whole.from), Math.abs(whole.to)), dimension, system);
  const axis = fixedAxis(over === "time" ? "Time" : "Position", unit, unit.fromSi(from), unit.fromSi(to));
  const uprights = uprightsOf(chart, over, axis, system);
  return {
    torque: {
      ...torquePlot(chart, saved, over, axis, system),
      showsAcross: !moves(chart),
      uprights: uprights.map((one) => ({ ...one, words: "" })),
    },
    current: { ...currentPlot(chart, saved, over, axis, system), uprights },
  };
}

function torquePlot(
  chart: TravelChart,
  saved: TravelChart | null,
  over: Over,
  across: SeriesAxis,
  system: UnitSystem,
): SeriesDrawing {
  const all = [chart, ...(saved === null ? [] : [saved])];
  const values = all.flatMap(({ neededNm, givenNm, needed, stallTorqueNm }) => [
    ...neededNm,
    ...givenNm,
    ...needed.map(({ torqueNm }) => torqueNm),
    stallTorqueNm,
  ]);
  const left = valueAxis("Torque, one motor", values, "torque", system);
  const write = writerIn(system);
  const neededLine = (source: TravelChart): Pick<SeriesLine, "xs" | "ys"> =>
    over === "time"
      ? { xs: abscissas(source, over, across), ys: source.neededNm.map(left.unit.fromSi) }
      : {
          xs: source.needed.map(({ position }) => across.unit.fromSi(position)),
          ys: source.needed.map(({ torqueNm }) => left.unit.fromSi(torqueNm)),
        };
  const givenLine = (source: TravelChart): Pick<SeriesLine, "xs" | "ys"> => ({
    xs: abscissas(source, over, across),
    ys: source.givenNm.map(left.unit.fromSi),
  });
  const side = "left";
  const lines: SeriesLine[] = [
    ...(saved === null
      ? []
      : [
          { name: "saved", side, ...neededLine(saved), ...SAVED } as const,
          { name: "", side, ...givenLine(saved), ...SAVED } as const,
        ]),
    { name: "given", side, ...givenLine(chart), ink: "efficiency", dash: LONG_SHORT, width: 2, marker: "triangle" },
    { name: "needed", side, ...neededLine(chart), ink: "torque", dash: [], width: 2, marker: "circle" },
    ...holdLine(chart, over, across, side, chart.hold?.torqueNm ?? 0, left, "torque"),
  ];
  const level: Level = {
    side,
    y: left.unit.fromSi(chart.stallTorqueNm),
    words: `at stall ${write(chart.stallTorqueNm, "torque")}`,
    hatched: "above",
  };
  return { ...EMPTY_DRAWING, across, showsAcross: false, left, lines, levels: chart.stallTorqueNm > 0 ? [level] : [] };
}

function currentPlot(
  chart: TravelChart,
  saved: TravelChart | null,
  over: Over,
  across: SeriesAxis,
  system: UnitSystem,
): SeriesDrawing {
  const all = [chart, ...(saved === null ? [] : [saved])];
  const write = writerIn(system);
  const limits = chart.currentLimitA === null ? [] : [chart.currentLimitA];
  const left = valueAxis("Current, one motor", [...all.flatMap(({ currentA }) => currentA), ...limits], "current", system);
  const speed = speedDimension(chart);
  const right = valueAxis(
    "Speed of the load",
    all.flatMap(({ speeds }) => speeds),
    speed,
    system,
  );
  const line = (source: TravelChart, values: readonly number[], axis: SeriesAxis): Pick<SeriesLine, "xs" | "ys"> => ({
    xs: abscissas(source, over, across),
    ys: values.map(axis.unit.fromSi),
  });
  return {
    ...EMPTY_DRAWING,
    across,
    left,
    right,
    lines: [
      ...(saved === null ? [] : [{ name: "saved", side: "left", ...line(saved, saved.currentA, left), ...SAVED } as const]),
      {
        name: "speed",
        side: "right",
        ...line(chart, chart.speeds, right),
        ink: "speed",
        dash: LONG_SHORT,
        width: 1.5,
        marker: "square",
      },
      {
        name: "current",
        side: "left",
        ...line(chart, chart.currentA, left),
        ink: "current",
        dash: [],
        width: 2,
        marker: "circle",
      },
      ...holdLine(chart, over, across, "left", chart.hold?.currentA ?? 0, left, "current"),
    ],
    levels: limits.map((limit) => ({
      side: "left",
      y: left.unit.fromSi(limit),
      words: `current limit ${write(limit, "current")}`,
      hatched: "above",
    })),
  };
}

export function speedDimension({ coordinate }: TravelChart): "linearSpeed" | "speed" {
  return coordinate === "length" ? "linearSpeed" : "speed";
}

function abscissas(source: TravelChart, over: Over, { unit }: SeriesAxis): number[] {
  return (over === "time" ? source.timesS : source.positions).map(unit.fromSi);
}

function holdShown({ hold, timesS, outcome }: TravelChart): number {
  return hold === null || outcome !== "arrives" ? 0 : Math.min(hold.forS, (timesS.at(-1) ?? 0) * HOLD_SHARE);
}

function holdLine(
  chart: TravelChart,
  over: Over,
  { unit }: SeriesAxis,
  side: "left",
  value: number,
  axis: SeriesAxis,
  ink: "torque" | "current",
): SeriesLine[] {
  const lasts = holdShown(chart);
  if (over !== "time" || lasts === 0) return [];
  const end = chart.timesS.at(-1) ?? 0;
  const y = axis.unit.fromSi(value);
  return [
    { name: "holds", side, xs: [end, end + lasts].map(unit.fromSi), ys: [y, y], ink, dash: [3, 2], width: 2, marker: null },
  ];
}

function uprightsOf(chart: TravelChart, over: Over, across: SeriesAxis, system: UnitSystem): Upright[] {
  const write = writerIn(system);
  const { unit } = across;
  const events = moves(chart) ? chart.events : [];
  const end = chart.travel?.to;
  const marks = events.map((event): Upright => {
    const words = eventWords(event, chart, write);
    // Along position the end of the travel is the end of the axis.
    const at =
      over === "time" ? event.timeS : event.kind === "arrives" && end !== undefined ? end : positionAt(chart, event.timeS);
    return { x: unit.fromSi(at), words, kind: "event" };
  });
  const isShown = over === "time" && chart.withinS !== null && chart.withinS <= wholeSpan(chart, over).to;
  const within =
    isShown && chart.withinS !== null
      ? [{ x: unit.fromSi(chart.withinS), words: `within ${write(chart.withinS, "time")}`, kind: "due" as const }]
      : [];
  return [...marks, ...within];
}
