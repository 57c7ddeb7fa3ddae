/** The view of a robot's load cycle: who takes how much power when, what that does to the supply, and how protection and windings stand. */
import type { PowerChart } from "../../../extension/protocol/charts/power.js";
import type { ShownChart, ViewMemory } from "../../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeQuantity } from "../../../extension/units/write.js";
import { factsBeside, type PlotPart, type Sheet } from "../../frame/sheet.js";
import { paintSwatch } from "../../plots/series/bandFill.js";
import type { SeriesDrawing, Side } from "../../plots/series/drawing.js";
import { heightOfRows, roomFor } from "../../plots/series/frame.js";
import { createSeriesPlot, type SeriesCursor } from "../../plots/series/seriesPlot.js";
import type { View } from "../view.js";
import { describePowerPlot, describeStates, describeSupply } from "./describe.js";
import { drawPower, type Span } from "./drawings.js";
import { powerFacts, powerFile, powerReadOut, powerTable } from "./numbers.js";
import { stopsWithin } from "./stops.js";

export const powerView: View<"power"> = {
  name: "power",
  title: "Power by mechanism",
  want: ({ span, cycle }) => ({ view: "power", span, cycle }),
  subject: ({ chart }) => ({ robot: chart.robot }),
  sheet: powerSheet,
  zoomed: (span) => ({ span: span && { fromS: span.from, toS: span.to } }),
};

export function powerSheet({ chart, saved }: ShownChart<"power">, memory: ViewMemory<"power">, system: UnitSystem): Sheet {
  const span = shownSpan(chart, memory);
  const drawings = drawPower(chart, saved, span, system);
  const stops = stopsWithin(chart, span.fromS, span.toS);
  const timeAt = (stop: number): number => chart.timesS[stops[stop] ?? 0] ?? 0;
  const all = [drawings.power, drawings.supply, ...(drawings.states === null ? [] : [drawings.states])];
  const room = roomFor(all);
  const part = (words: string, height: number, drawing: SeriesDrawing, rings: readonly Side[] = []): PlotPart => ({
    height,
    words,
    create: (canvas, options) =>
      createSeriesPlot(canvas, { drawing, room, cursorAt: cursorIn(drawing, rings, stops, timeAt) }, options),
  });
  const statesPart = (drawing: SeriesDrawing): PlotPart => {
    const height = heightOfRows(drawing.rows.length);
    return { ...part(describeStates(drawing.rows), height, drawing), pictureHeight: height };
  };
  return {
    title: chart.robot,
    state: chart.state,
    verdict: chart.verdict,
    notes: chart.cycles > 1 ? [`Plotted is cycle ${chart.cycle} of ${chart.cycles}; the numbers above the plots count all.`] : [],
    facts: factsBeside(powerFacts(chart, system), saved === null ? [] : powerFacts(saved, system)),
    findings: chart.findings,
    assumed: chart.assumed,
    notChecked: chart.notChecked,
    plots: [
      part(describePowerPlot(chart), 250, drawings.power),
      part(describeSupply(chart), drawings.states === null ? 190 : 150, drawings.supply, ["right", "left"]),
      ...(drawings.states === null ? [] : [statesPart(drawings.states)]),
    ],
    across: "Time",
    stops: stops.map((index) => chart.timesS[index] ?? 0),
    restsAt: lowestAt(chart, stops),
    readAt: (stop) => powerReadOut(chart, stops[stop] ?? 0, system),
    table: () => powerTable(chart, stops, system),
    file: () => powerFile(chart, system),
    choices: cycleChoice(chart, memory),
    probe: null,
    zoom: {
      from: span.fromS,
      to: span.toS,
      least: 0,
      greatest: chart.cycleS,
      words: (from, to) => `${writeQuantity(from, "time")} to ${writeQuantity(to, "time")}`,
    },
    keys: chart.mechanisms.map(({ name }, turn) => ({ name, swatch: paintSwatch(turn) })),
    footnote: "At the supply's terminals; below 0: sent back.",
  };
}

/** Where the last cycle that is followed is another than the first. */
function cycleChoice({ lastCycle }: PowerChart, { cycle }: ViewMemory<"power">): Sheet["choices"] {
  if (lastCycle <= 1) return [];
  const options = [
    { value: "first", words: "First" },
    { value: "last", words: `Last (${lastCycle})` },
  ];
  return [{ key: "cycle", label: "Cycle", chosen: cycle, options }];
}

/** What is zoomed to, as far as this cycle goes. */
function shownSpan({ cycleS }: PowerChart, { span }: ViewMemory<"power">): Span {
  const [fromS, toS] = [Math.max(span?.fromS ?? 0, 0), Math.min(span?.toS ?? cycleS, cycleS)];
  return toS > fromS ? { fromS, toS } : { fromS: 0, toS: cycleS };
}

function lowestAt({ timesS, voltageV }: PowerChart, stops: readonly number[]): number {
  const lowest = stops.reduce((one, other) => ((voltageV[other] ?? 0) < (voltageV[one] ?? 0) ? other : one), stops[0] ?? 0);
  return timesS[lowest] ?? 0;
}

/** Rings on the lines of the sides named; a stack has none. */
function cursorIn(
  drawing: SeriesDrawing,
  rings: readonly Side[],
  stops: readonly number[],
  timeAt: (stop: number) => number,
): (stop: number) => SeriesCursor {
  const lines = drawing.lines.filter(({ side, ink }) => rings.includes(side) && ink !== "quiet");
  return (stop) => ({
    x: drawing.across.unit.fromSi(timeAt(stop)),
    rings: lines.map(({ side, ys }) => ({ side, y: ys[stops[stop] ?? 0] ?? 0 })),
  });
}
