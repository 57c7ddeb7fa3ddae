/** The view of one mechanism's operating point: two plots over torque, of what its motors give and what its load needs. */
import type { OperatingPointChart } from "../../../extension/protocol/charts/operatingPoint.js";
import type { ShownChart, ViewMemory } from "../../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { factsBeside, type PlotPart, type ReadOut, type Sheet } from "../../frame/sheet.js";
import type { View } from "../view.js";
import { fileOf } from "./csv.js";
import { tableOf } from "./dataTable.js";
import { describeMotion, describePower } from "./describe.js";
import { type Drawing, drawChart } from "./drawing.js";
import { writtenFacts } from "./facts.js";
import { createPlot } from "./plot.js";
import type { PlotPlace } from "./plotConfig.js";
import { probeOf } from "./probe.js";
import { QUANTITIES } from "./quantities.js";
import { readoutOf } from "./readout.js";
import { type Stop, stopsOf } from "./stops.js";
import { unitsOf } from "./units.js";

type Shown = ShownChart<"operating-point">;

export const operatingPointView: View<"operating-point"> = {
  name: "operating-point",
  title: "Operating point",
  want: ({ probe }) => ({ view: "operating-point", probe }),
  subject: ({ chart }) => ({ mechanism: chart.mechanism }),
  sheet: operatingPointSheet,
  probed: (at) => ({ probe: at === null ? null : { torqueNm: at } }),
};

export function operatingPointSheet(
  shown: Shown,
  memory: Pick<ViewMemory<"operating-point">, "probe">,
  system: UnitSystem,
): Sheet {
  const { chart, saved } = shown;
  const drawing = drawChart(shown, system);
  const units = unitsOf(drawing);
  const stops = stopsOf(chart);
  const read = (stop: number): ReadOut => readoutOf(stops[stop] as Stop, units);
  return {
    title: chart.mechanism,
    state: chart.state,
    verdict: chart.verdict,
    notes: chart.motorCount > 1 ? [`Values of one motor of ${chart.motorCount}.`] : [],
    facts: factsBeside(writtenFacts(chart, units), saved === null ? [] : writtenFacts(saved, units)),
    findings: chart.findings,
    assumed: chart.assumed,
    notChecked: chart.notChecked,
    plots: [
      plotPart("upper", describeMotion(chart, drawing), 240, drawing, stops),
      plotPart("lower", describePower(chart, units), 215, drawing, stops),
    ],
    across: "Torque",
    stops: stops.map(({ torqueNm }) => torqueNm),
    restsAt: chart.hardest.torqueNm,
    readAt: read,
    table: () => tableOf(chart.mechanism, stops, units),
    file: () => fileOf(stops, system),
    choices: [],
    probe: probeOf(shown, memory, units, drawing),
    plotsKey: JSON.stringify([chart, saved, system]),
    zoom: null,
    footnote: footnoteOf(chart),
  };
}

function footnoteOf({ motorCount }: OperatingPointChart): string {
  return `Values of ${motorCount > 1 ? `one motor of ${motorCount}` : "the motor"}. Thin dashes: its sheet.`;
}

function plotPart(place: PlotPlace, words: string, height: number, drawing: Drawing, stops: readonly Stop[]): PlotPart {
  return {
    height,
    words,
    create: (canvas, options) => {
      const plot = createPlot(canvas, { place, ...options });
      const units = unitsOf(drawing);
      return {
        draw: (theme) => plot.show(drawing, theme),
        setCursor(index) {
          const stop = index === null ? undefined : stops[index];
          if (stop === undefined) return plot.setCursor(null);
          const { available } = stop;
          const values = QUANTITIES.flatMap((quantity) => {
            const value = available && quantity.read(available);
            return value === null ? [] : [[quantity.name, units.of[quantity.name].fromSi(value)]];
          });
          plot.setCursor({ x: units.torque.fromSi(stop.torqueNm), values: Object.fromEntries(values) });
        },
        setProbe: (torqueNm) => plot.setProbe(torqueNm === null ? null : units.torque.fromSi(torqueNm)),
        at: (px) => units.torque.toSi(plot.torqueAt(px)),
        destroy: () => plot.destroy(),
      };
    },
  };
}
