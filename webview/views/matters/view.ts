/** The view of what matters: which declared numbers move a mechanism's results most, and how far these spread over what is uncertain. */
import { MATTERS_OUTPUTS, type MattersChart, type MattersOutput } from "../../../extension/protocol/charts/matters.js";
import type { ShownChart, ViewMemory } from "../../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { digits } from "../../frame/csv.js";
import { factsBeside, type PlotPart, type ReadOut, type Sheet, type Table } from "../../frame/sheet.js";
import { heightOfRows, roomFor } from "../../plots/series/frame.js";
import { createSeriesPlot } from "../../plots/series/seriesPlot.js";
import { NOTHING } from "../../quantity.js";
import type { View } from "../view.js";
import { createBarPlot, heightOfBars } from "./barPlot.js";
import { type Bar, barsOf, MOST_BARS, OUTPUT_WORDS, outputsIn, writeEffect } from "./ranks.js";
import { drawSpread, spreadWords } from "./spreadPlot.js";

export const mattersView: View<"matters"> = {
  name: "matters",
  title: "What matters",
  want: () => ({ view: "matters" }),
  subject: ({ chart }) => ({ mechanism: chart.mechanism }),
  sheet: mattersSheet,
  chosen: (_key, value) => ({ output: MATTERS_OUTPUTS.find((one) => one === value) ?? "current", cursor: null }),
};

export function mattersSheet({ chart, saved }: ShownChart<"matters">, memory: ViewMemory<"matters">, system: UnitSystem): Sheet {
  const outputs = outputsIn(chart);
  const output = outputs.includes(memory.output) ? memory.output : (outputs[0] ?? "current");
  const bars = barsOf(chart, saved, output).slice(0, MOST_BARS);
  return {
    title: chart.mechanism,
    state: chart.state,
    verdict: chart.verdict,
    notes: chart.motorCount > 1 ? [`Values of one motor of ${chart.motorCount}.`] : [],
    facts: factsBeside(factsOf(chart, system), saved === null ? [] : factsOf(saved, system)),
    findings: chart.findings,
    assumed: chart.assumed,
    notChecked: [
      ...chart.notChecked,
      ...(chart.spread === null ? ['Spread: nothing is declared as uncertain (a motor\'s "tolerance", or "between").'] : []),
    ],
    plots: [barPart(bars, output), ...spreadPart(chart, system)],
    across: "Rank",
    downwards: true,
    stops: bars.map((_, index) => index + 1),
    restsAt: 1,
    readAt: (stop) => readOut(chart, bars[stop], stop),
    table: () => tableOf(chart, (value) => (value === null ? NOTHING : writeEffect(value))),
    file: () => tableOf(chart, digits),
    choices:
      outputs.length < 2
        ? []
        : [
            {
              key: "output",
              label: "Effect on",
              chosen: output,
              options: outputs.map((value) => ({ value, words: OUTPUT_WORDS[value] })),
            },
          ],
    zoom: null,
    probe: null,
    footnote: "Per cent for one per cent, at the numbers that are; counts by one up and down.",
  };
}

function factsOf(chart: MattersChart, system: UnitSystem): (readonly [string, string])[] {
  const most = outputsIn(chart).flatMap((output): (readonly [string, string])[] => {
    const [first] = barsOf(chart, null, output);
    return first === undefined
      ? []
      : [[`${OUTPUT_WORDS[output]}, most by`, `${first.words} (${writeEffect(first.effect)} %)`] as const];
  });
  return [...most, ...(chart.spread === null ? [] : spreadWords(chart.spread, system))];
}

function barPart(bars: readonly Bar[], output: MattersOutput): PlotPart {
  const what = OUTPUT_WORDS[output].toLowerCase();
  const title = `Per cent of ${what} for one per cent more of each`;
  const listed = bars.map(({ words, effect }) => `${words} ${writeEffect(effect)}`).join(", ");
  return {
    height: heightOfBars(bars.length),
    words: bars.length === 0 ? `Nothing that is declared moves the ${what}.` : `${title}: ${listed}.`,
    create: (canvas, options) => createBarPlot(canvas, { bars, title }, options),
  };
}

function spreadPart({ spread }: MattersChart, system: UnitSystem): PlotPart[] {
  const drawing = spread && drawSpread(spread, system);
  if (spread === null || drawing === null || drawing.rows.length === 0) return [];
  const words = spreadWords(spread, system).map(([name, text]) => `${name}: ${text}.`);
  return [
    {
      height: heightOfRows(drawing.rows.length),
      words: ["Spread of the draws around their middle.", ...words].join(" "),
      // The cursor is about a bar: here it has no place.
      create: (canvas, options) =>
        createSeriesPlot(
          canvas,
          { drawing, room: roomFor([drawing]), cursorAt: () => ({ x: Number.POSITIVE_INFINITY, rings: [] }) },
          options,
        ),
    },
  ];
}

function readOut({ inputs }: MattersChart, bar: Bar | undefined, stop: number): ReadOut {
  const input = inputs.find(({ words }) => words === bar?.words);
  const cells = MATTERS_OUTPUTS.map((output) => {
    const effect = input?.[output] ?? null;
    return [OUTPUT_WORDS[output], effect === null ? NOTHING : `${writeEffect(effect)} %`] as const;
  });
  const name = bar?.words ?? "nothing";
  return {
    at: `rank ${stop + 1}`,
    names: name,
    head: cells.map(([head]) => head),
    rows: [{ name: "One per cent more", cells: cells.map(([, text]) => text) }],
    spoken: `${name}, rank ${stop + 1}. One per cent more: ${cells.map(([head, text]) => `${head} ${text}`).join(", ")}.`,
  };
}

function tableOf({ mechanism, inputs }: MattersChart, tell: (value: number | null) => string): Table {
  return {
    caption: `${mechanism}: per cent of each result for one per cent more of what is declared`,
    head: ["Declared", ...MATTERS_OUTPUTS.map((output) => `${OUTPUT_WORDS[output]} (%)`)],
    rows: inputs.map((input) => [input.words, ...MATTERS_OUTPUTS.map((output) => tell(input[output]))]),
  };
}
