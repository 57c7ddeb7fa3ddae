/** A mechanism over its ratio in numbers: the marked ratios, the read-out at one, the table and the file. */
import type { RatioMapChart, RatioMapPoint } from "../../../extension/protocol/charts/ratioMap.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { typeset, writeNumber, writeShare } from "../../../extension/units/write.js";
import { digits } from "../../frame/csv.js";
import type { ReadOut, Table } from "../../frame/sheet.js";
import { columnIn, listed, NOTHING, writerIn } from "../../quantity.js";

/** About this many rows for people, beside the marked ones. */
const ROWS = 20;

export function ratioFacts(chart: RatioMapChart, system: UnitSystem): (readonly [string, string])[] {
  const { now, fastest, bestEfficiency, kept, neverKept } = chart;
  const tell = (point: RatioMapPoint | null): string => {
    if (point === null) return NOTHING;
    return `${writeNumber(point.ratio)}: ${[timeText(chart, point, system), shareText(point)].join(", ")}`;
  };
  const spans = kept.map(({ from, to }) => `${writeNumber(from)} to ${writeNumber(to)}`);
  return [
    ["Now", tell(now)],
    ["Keeps every rule", spans.length === 0 ? "no ratio" : spans.join(", ")],
    ["Fastest of these", tell(fastest)],
    [
      "Best efficiency",
      bestEfficiency === null ? NOTHING : `${writeNumber(bestEfficiency.ratio)}: ${efficiencyText(bestEfficiency)} of the motor`,
    ],
    ...(neverKept.length === 0 ? [] : [["No ratio mends", neverKept.join(", ")] as const]),
  ];
}

export function ratioReadOut(chart: RatioMapChart, index: number, system: UnitSystem): ReadOut {
  const point = chart.samples[index] ?? chart.now;
  const write = writerIn(system);
  const breaks = brokenText(point);
  const cells: [string, string][] = [
    [chart.hasTravel ? "Travel" : "Output speed", timeText(chart, point, system)],
    ["Current", write(point.currentA, "current")],
    ["Share of stall", shareText(point)],
    ["Efficiency", efficiencyText(point)],
    ["Output", write(point.outputRadPerS, "speed")],
  ];
  return {
    at: `ratio ${writeNumber(point.ratio)}`,
    names: [...namesOf(chart, point), breaks].join("; "),
    head: cells.map(([name]) => name),
    rows: [{ name: "One motor", cells: cells.map(([, text]) => text) }],
    spoken: `Ratio ${writeNumber(point.ratio)}. ${cells.map(([name, text]) => `${name} ${text}`).join(", ")}. ${breaks}.`,
  };
}

export function ratioTable(chart: RatioMapChart, system: UnitSystem): Table {
  const every = Math.max(1, Math.round(chart.samples.length / ROWS));
  const kept = chart.samples.filter((point, index) => index % every === 0 || namesOf(chart, point).length > 0);
  return tableOf(chart, kept, system, writeNumber, typeset);
}

export function ratioFile(chart: RatioMapChart, system: UnitSystem): Table {
  return tableOf(
    chart,
    chart.samples,
    system,
    (value) => digits(value),
    (symbol) => symbol,
  );
}

function tableOf(
  chart: RatioMapChart,
  points: readonly RatioMapPoint[],
  system: UnitSystem,
  tell: (value: number) => string,
  tellUnit: (symbol: string) => string,
): Table {
  const [time, speed, current] = (["time", "speed", "current"] as const).map((dimension) => columnIn(system, dimension));
  const text = (value: number | null | undefined, numberOf: (value: number) => number = (one) => one): string =>
    value === null || value === undefined ? "" : tell(numberOf(value));
  const perCent = (share: number): number => share * 100;
  return {
    caption: `${chart.mechanism}: over the ratio`,
    head: [
      "Ratio",
      `Travel (${tellUnit(time?.symbol ?? "")})`,
      `Output speed (${tellUnit(speed?.symbol ?? "")})`,
      `Current (${tellUnit(current?.symbol ?? "")})`,
      "Share of stall (%)",
      "Efficiency (%)",
      "Breaks",
      "Point",
    ],
    rows: points.map((point) => [
      text(point.ratio),
      text(point.timeS, time?.numberOf),
      text(point.outputRadPerS, speed?.numberOf),
      text(point.currentA, current?.numberOf),
      text(point.stallShare, perCent),
      text(point.efficiency, perCent),
      point.breaks.join("; "),
      namesOf(chart, point).join("; "),
    ]),
  };
}

function namesOf({ now, fastest, bestEfficiency }: RatioMapChart, { ratio }: RatioMapPoint): string[] {
  return [
    ...(ratio === now.ratio ? ["now"] : []),
    ...(ratio === fastest?.ratio ? ["fastest that keeps every rule"] : []),
    ...(ratio === bestEfficiency?.ratio ? ["best efficiency"] : []),
  ];
}

export function timeText({ hasTravel }: RatioMapChart, { timeS, outputRadPerS }: RatioMapPoint, system: UnitSystem): string {
  const write = writerIn(system);
  if (!hasTravel) return write(outputRadPerS, "speed");
  return timeS === null ? "does not arrive" : write(timeS, "time");
}

function shareText({ stallShare }: RatioMapPoint): string {
  return stallShare === null ? NOTHING : `${writeShare(stallShare)} of stall`;
}

function efficiencyText({ efficiency }: RatioMapPoint): string {
  return efficiency === null ? NOTHING : writeShare(efficiency);
}

function brokenText({ breaks }: RatioMapPoint): string {
  return breaks.length === 0 ? "keeps every rule" : `breaks: ${listed(breaks)}`;
}
