/** The view of one mechanism over its ratio: what keeps every rule, what stock gives, and what each ratio leads to. */
import type { RatioMapChart, RatioMapPoint } from "../../../extension/protocol/charts/ratioMap.js";
import type { ShownChart } from "../../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { factsBeside, type PlotPart, type Sheet } from "../../frame/sheet.js";
import type { SeriesDrawing, Side } from "../../plots/series/drawing.js";
import { heightOfRows, roomFor } from "../../plots/series/frame.js";
import { createSeriesPlot, type SeriesCursor } from "../../plots/series/seriesPlot.js";
import type { View } from "../view.js";
import { ratioActions } from "./actions.js";
import { describeCurrent, describeStrip, describeTime } from "./describe.js";
import { drawRatioMap } from "./drawings.js";
import { ratioFacts, ratioFile, ratioReadOut, ratioTable } from "./numbers.js";

/** Room below a plot for the numbers of the axis, px, where another plot below it has them. */
const NO_NUMBERS = 30;

export const ratioMapView: View<"ratio-map"> = {
  name: "ratio-map",
  title: "Ratio map",
  want: () => ({ view: "ratio-map", write: null }),
  subject: ({ chart }) => ({ mechanism: chart.mechanism }),
  sheet: (shown, _memory, system) => ratioMapSheet(shown, system),
};

/** What a plot rings at the cursor, by side. */
type Rings = readonly { readonly side: Side; readonly read: (point: RatioMapPoint) => number | null }[];

export function ratioMapSheet({ chart, saved }: ShownChart<"ratio-map">, system: UnitSystem): Sheet {
  const drawings = drawRatioMap(chart, saved, system);
  const room = roomFor([drawings.strip, drawings.time, drawings.current]);
  const part = (words: string, height: number, drawing: SeriesDrawing, rings: Rings): PlotPart => ({
    height,
    words,
    create: (canvas, options) => createSeriesPlot(canvas, { drawing, room, cursorAt: cursorIn(chart, drawing, rings) }, options),
  });
  const time: Rings = [{ side: "left", read: (point) => (chart.hasTravel ? point.timeS : point.outputRadPerS) }];
  const current: Rings = [
    { side: "left", read: ({ currentA }) => currentA },
    { side: "right", read: ({ stallShare }) => stallShare },
  ];
  return {
    title: chart.mechanism,
    state: chart.state,
    verdict: chart.verdict,
    notes: chart.motorCount > 1 ? [`Values of one motor of ${chart.motorCount}.`] : [],
    facts: factsBeside(ratioFacts(chart, system), saved === null ? [] : ratioFacts(saved, system)),
    findings: chart.findings,
    assumed: chart.assumed,
    notChecked: chart.notChecked,
    plots: [
      part(describeStrip(chart), heightOfRows(drawings.strip.rows.length) - NO_NUMBERS, drawings.strip, []),
      part(describeTime(chart, system), 190, drawings.time, time),
      part(describeCurrent(chart), 220, drawings.current, current),
    ],
    across: "Ratio",
    stops: chart.samples.map(({ ratio }) => ratio),
    restsAt: chart.now.ratio,
    readAt: (stop) => ratioReadOut(chart, stop, system),
    table: () => ratioTable(chart, system),
    file: () => ratioFile(chart, system),
    choices: [],
    zoom: null,
    probe: null,
    actionsAt: (stop) => ratioActions(chart, stop === null ? null : (chart.samples[stop]?.ratio ?? null), system),
    footnote: "The whole ratio varied; numbers at the hardest position.",
  };
}

function cursorIn({ samples }: RatioMapChart, drawing: SeriesDrawing, rings: Rings): (stop: number) => SeriesCursor {
  return (stop) => {
    const point = samples[stop];
    const ringed = rings.flatMap(({ side, read }) => {
      const value = point === undefined ? null : read(point);
      const axis = drawing[side];
      const y = value === null || axis === null ? null : axis.unit.fromSi(value);
      return y === null || axis === null || y > axis.max ? [] : [{ side, y }];
    });
    return { x: point?.ratio ?? 0, rings: ringed };
  };
}
