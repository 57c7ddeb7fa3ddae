/** Answers of the other views of the chart panel as the page gets them, from declarations in a string, through the whole way. */

import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { OperatingPointWant } from "../../extension/features/charts/operatingPoint.js";
import { createPowerFeature, type PowerWant } from "../../extension/features/charts/power.js";
import { probeAt } from "../../extension/features/charts/probe.js";
import { travelChart } from "../../extension/features/charts/travel.js";
import { chartAnswerSchema } from "../../extension/protocol/chartMessages.js";
import type { ShownChart } from "../../extension/protocol/charts/views.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { analyseFixture, chartIn } from "./chartFixture.js";
import { readFixture } from "./fixture.js";
import { parser } from "./parser.js";

export function travelShown(source: string, mechanism: string, saved?: string): ShownChart<"travel"> {
  const of = (text: string) => travelChart(analyseFixture(text), mechanism);
  return travelled("travel", { chart: of(source), saved: saved === undefined ? null : of(saved) });
}

export function powerShown(source: string, robot: string, saved?: string, want: Partial<PowerWant> = {}): ShownChart<"power"> {
  const { chartOf } = createPowerFeature();
  const of = (text: string) => chartOf(analyseFixture(text), robot, { span: null, cycle: "first", ...want });
  return travelled("power", { chart: of(source), saved: saved === undefined ? null : of(saved) });
}

export function probeShown(
  source: string,
  mechanism: string,
  { torqueNm }: NonNullable<OperatingPointWant["probe"]>,
): ShownChart<"operating-point"> {
  const { files, snapshot } = readFixture(source);
  const { analyse } = createAnalyser(parser);
  const probe = probeAt(analyse([...files.keys()], snapshot), mechanism, torqueNm, analyse);
  return travelled("operating-point", { chart: chartIn(source, mechanism), saved: null, probe });
}

/** What its message does not take is no answer. */
function travelled<V extends ShownChart["view"]>(view: V, parts: object): ShownChart<V> {
  const message = JSON.parse(JSON.stringify({ kind: "chart", view, old: null, ...parts }));
  const answer = readMessage(chartAnswerSchema, message);
  if (answer?.kind !== "chart" || answer.view !== view) throw new Error(`There is no chart for the view ${view}.`);
  return answer as ShownChart<V>;
}

/** A hoist that holds and an arm that gives power back on its way down, on a battery that sags; motors with heat. */
export function cartSource({ lasts = "4 s", within = "5 s", more = "" } = {}): string {
  return `import { arm, battery, breaker, lift, mechanism, motor, reduction, robot, spur } from "loadmark";
export const pack = battery({ openCircuit: "12.6 V", resistance: "0.25 ohm", mustStayAbove: "11 V" });
export const quick = motor({
  voltage: "12 V",
  noLoad: { speed: "310 rpm", current: "0.35 A" },
  stall: { torque: "1.3 N*m", current: "4.4 A" },
  thermal: { windingToHousing: "6 K/W", housingToAmbient: "14 K/W", windingTime: "9 s", housingTime: "380 s", limit: "60 degC" },
});
export const hoist = mechanism("tray hoist", {
  motor: quick,
  stages: [spur(16, 54)],
  load: lift({ mass: "5.9 kg", drumRadius: "30 mm", travel: "0.7 m" }),
  within: "${within}",
  holdFor: "10 s",
  protect: breaker({ holdCurrent: "1.8 A", trips: { at: "4 A", after: "1 s" } }),
  supply: pack,
});
export const boom = mechanism("boom", {
  motor: quick,
  stages: [reduction(12)],
  load: arm({ mass: "4 kg", centreOfMass: "0.4 m", from: "80 deg", to: "-40 deg" }),
  supply: pack,${more}
});
export default robot("cart", {
  supply: pack,
  mechanisms: [hoist, boom],
  loadCycle: [
    { lasts: "${lasts}", moving: [hoist] },
    { lasts: "3 s", moving: [boom], holding: [hoist] },
  ],
  cycles: 12,
});
`;
}
