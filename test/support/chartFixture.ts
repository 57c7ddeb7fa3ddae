/** A chart as the page gets it, from declarations in a string, through the whole way: evaluation, model, chart, JSON. */

import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { Analysis } from "../../extension/analysis/analysis.js";
import { operatingPointChart } from "../../extension/features/charts/operatingPoint.js";
import { type OperatingPointChart, operatingPointChartSchema } from "../../extension/protocol/charts/operatingPoint.js";
import type { ShownChart as AnyShownChart } from "../../extension/protocol/charts/views.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { readFixture } from "./fixture.js";
import { parser as ts } from "./parser.js";

export function analyseFixture(source: string): Analysis {
  const { files, snapshot } = readFixture(source);
  return createAnalyser(ts).analyse([...files.keys()], snapshot);
}

/** The chart of one mechanism, which must be there and pass the check of its message. */
export function chartIn(source: string, mechanism: string): OperatingPointChart {
  const chart = operatingPointChart(analyseFixture(source), mechanism);
  const travelled = readMessage(operatingPointChartSchema, JSON.parse(JSON.stringify(chart ?? null)));
  if (travelled === undefined) throw new Error(`There is no chart of ${mechanism}, or it is not what its message says.`);
  return travelled;
}

export type ShownChart = AnyShownChart<"operating-point">;

export function shownChart(chart: OperatingPointChart, more: Partial<ShownChart> = {}): ShownChart {
  return { kind: "chart", view: "operating-point", chart, saved: null, old: null, probe: null, ...more };
}

export interface HoistNumbers {
  readonly name?: string;
  readonly driven?: number;
  readonly mass?: string;
  readonly stallTorque?: string;
  readonly openCircuit?: string;
  readonly more?: string;
}

/** A hoist on one motor behind a battery with 0.1 ohm. */
export function hoistSource({
  name = "tray hoist",
  driven = 54,
  mass = "5.9 kg",
  stallTorque = "1.3 N*m",
  openCircuit = "12.6 V",
  more = "",
}: HoistNumbers = {}): string {
  return `import { battery, breaker, lift, mechanism, motor, spur } from "loadmark";
export const pack = battery({ openCircuit: "${openCircuit}", resistance: "0.1 ohm" });
export const quick = motor({
  voltage: "12 V",
  noLoad: { speed: "310 rpm", current: "0.35 A" },
  stall: { torque: "${stallTorque}", current: "4.4 A" },
});
export const hoist = mechanism(${JSON.stringify(name)}, {
  motor: quick,
  stages: [spur(16, ${driven})],
  load: lift({ mass: "${mass}", drumRadius: "30 mm", travel: "0.7 m" }),
  supply: pack,${more}
});
`;
}
