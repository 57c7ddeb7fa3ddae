/** The view of one travel at full command: torque needed and given, current and speed, over time or over position. */

import type { TravelChart } from "../../../extension/protocol/charts/travel.js";
import type { ShownChart, ViewMemory } from "../../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { type Choice, factsBeside, type PlotPart, type Sheet } from "../../frame/sheet.js";
import type { SeriesDrawing } from "../../plots/series/drawing.js";
import { roomFor } from "../../plots/series/frame.js";
import { createSeriesPlot, type SeriesCursor } from "../../plots/series/seriesPlot.js";
import { writerIn } from "../../quantity.js";
import type { View } from "../view.js";
import { drawTravel, speedDimension, wholeSpan } from "./drawings.js";
import { outcomeWords } from "./events.js";
import { abscissaOf, type Moment, momentsOf, moves, type Over, whatLiesAcross } from "./moments.js";
import { eventSentences, travelFacts, travelFile, travelReadOut, travelTable } from "./numbers.js";

export const travelView: View<"travel"> = {
  name: "travel",
  title: "Travel",
  want: () => ({ view: "travel" }),
  subject: ({ chart }) => ({ mechanism: chart.mechanism }),
  sheet: travelSheet,
  zoomed: (span) => ({ span }),
  chosen: (_key, value) => ({ over: value === "position" ? "position" : "time", cursor: null, span: null }),
};

export function travelSheet({ chart, saved }: ShownChart<"travel">, memory: ViewMemory<"travel">, system: UnitSystem): Sheet {
  const over = whatLiesAcross(chart, memory.over);
  const whole = wholeSpan(chart, over);
  const span = shownSpan(whole, over === memory.over ? memory.span : null);
  const besides = saved !== null && saved.coordinate === chart.coordinate ? saved : null;
  const drawings = drawTravel(chart, besides, { over, ...span }, system);
  const moments = momentsOf(chart, over).filter((one) => abscissaOf(one, over) >= span.from && abscissaOf(one, over) <= span.to);
  const dimension = over === "time" ? "time" : (chart.coordinate ?? "length");
  const write = writerIn(system);
  const room = roomFor([drawings.torque, drawings.current]);
  const part = (words: string, height: number, drawing: SeriesDrawing, values: readonly (keyof Moment)[]): PlotPart => ({
    height,
    words,
    create: (canvas, options) =>
      createSeriesPlot(canvas, { drawing, room, cursorAt: cursorIn(drawing, values, moments, over) }, options),
  });
  return {
    title: chart.mechanism,
    state: chart.state,
    verdict: chart.verdict,
    notes: chart.motorCount > 1 ? [`Values of one motor of ${chart.motorCount}.`] : [],
    facts: factsBeside(travelFacts(chart, system), saved === null ? [] : travelFacts(saved, system)),
    findings: chart.findings,
    assumed: chart.assumed,
    notChecked: chart.notChecked,
    plots: [
      part(describeTorque(chart, over, system), 230, drawings.torque, ["neededNm", "givenNm"]),
      // Without a motion there is none to show.
      ...(moves(chart) ? [part(describeCurrent(chart, over, system), 235, drawings.current, ["currentA", "speed"])] : []),
    ],
    across: over === "time" ? "Time" : "Position",
    stops: moments.map((moment) => abscissaOf(moment, over)),
    restsAt: restsAt(moments, over),
    readAt: (stop) => travelReadOut(chart, moments[stop] as Moment, over, system),
    table: () => travelTable(chart, moments, system),
    file: () => travelFile(chart, momentsOf(chart, over), system),
    choices: acrossChoice(chart, over),
    probe: null,
    zoom: {
      ...span,
      least: whole.from,
      greatest: whole.to,
      words: (from, to) => `${write(from, dimension)} to ${write(to, dimension)}`,
    },
    footnote: "Full command from rest, from cold. Needed: without acceleration.",
  };
}

function shownSpan(whole: { readonly from: number; readonly to: number }, span: ViewMemory<"travel">["span"]) {
  const [from, to] = [Math.max(span?.from ?? whole.from, whole.from), Math.min(span?.to ?? whole.to, whole.to)];
  return to > from ? { from, to } : whole;
}

/** Where the load asks for most. */
function restsAt(moments: readonly Moment[], over: Over): number {
  const hardest = moments.reduce<Moment | undefined>(
    (most, one) => (most && most.neededNm >= one.neededNm ? most : one),
    undefined,
  );
  return hardest === undefined ? 0 : abscissaOf(hardest, over);
}

function acrossChoice(chart: TravelChart, over: Over): readonly Choice[] {
  if (chart.coordinate === null || !moves(chart)) return [];
  const options = [
    { value: "time", words: "Time" },
    { value: "position", words: "Position" },
  ];
  return [{ key: "over", label: "Over", chosen: over, options }];
}

const SIDES: Partial<Record<keyof Moment, "left" | "right">> = {
  neededNm: "left",
  givenNm: "left",
  currentA: "left",
  speed: "right",
};

function cursorIn(
  drawing: SeriesDrawing,
  values: readonly (keyof Moment)[],
  moments: readonly Moment[],
  over: Over,
): (stop: number) => SeriesCursor {
  return (stop) => {
    const moment = moments[stop];
    const rings = values.flatMap((name) => {
      const side = SIDES[name] ?? "left";
      const value = moment?.[name] ?? null;
      const axis = drawing[side];
      return value === null || axis === null ? [] : [{ side, y: axis.unit.fromSi(value) }];
    });
    return { x: drawing.across.unit.fromSi(moment === undefined ? 0 : abscissaOf(moment, over)), rings };
  };
}

function describeTorque(chart: TravelChart, over: Over, system: UnitSystem): string {
  const write = writerIn(system);
  const where =
    chart.coordinate === null || chart.hardest.position === null ? "" : ` at ${write(chart.hardest.position, chart.coordinate)}`;
  return [
    `Torque needed and given over ${over}, one motor.`,
    `Needed at most ${write(chart.hardest.torqueNm, "torque")}${where}, at stall ${write(chart.stallTorqueNm, "torque")}.`,
    `Travel: ${outcomeWords(chart, write)}.`,
  ].join(" ");
}

function describeCurrent(chart: TravelChart, over: Over, system: UnitSystem): string {
  const write = writerIn(system);
  const fastest = Math.max(0, ...chart.speeds.map(Math.abs));
  return [
    `Current of one motor and speed of the load over ${over}.`,
    `At most ${write(chart.numbers.peakMotorCurrentA, "current")} and ${write(fastest, speedDimension(chart))}.`,
    ...(chart.currentLimitA === null ? [] : [`Current limit ${write(chart.currentLimitA, "current")}.`]),
    ...eventSentences(chart, system),
  ].join(" ");
}
