/** The probe on the torque axis in words: the point there, and what the ratio that brings the mechanism there leads to. */
import type { Probe } from "../../../extension/protocol/charts/operatingPoint.js";
import type { ShownChart, ViewMemory } from "../../../extension/protocol/charts/views.js";
import { writeNumber, writeQuantity } from "../../../extension/units/write.js";
import type { SheetProbe } from "../../frame/sheet.js";
import { listed } from "../../quantity.js";
import type { Drawing } from "./drawing.js";
import { QUANTITIES } from "./quantities.js";
import { type ChartUnits, shareText, writeTorque, writeValue } from "./units.js";

export function probeOf(
  { chart, probe: answer }: ShownChart<"operating-point">,
  { probe }: Pick<ViewMemory<"operating-point">, "probe">,
  units: ChartUnits,
  { torque }: Drawing,
): SheetProbe {
  const greatest = torque.unit.toSi(torque.max);
  const at = probe?.torqueNm ?? null;
  return {
    label: "Try a torque",
    at,
    restsAt: chart.hardest.torqueNm,
    least: 0,
    greatest,
    words: (torqueNm) => writeTorque(units, torqueNm),
    says: answer === null ? [] : probeSentences(answer, units),
    canWrite: at !== null && answer !== null && answer.change !== null && answer.torqueNm === at,
  };
}

export function probeSentences({ torqueNm, point, change, cannot }: Probe, units: ChartUnits): readonly string[] {
  const values = (of: Probe["point"] | NonNullable<Probe["change"]>["needed"]): string =>
    QUANTITIES.map((quantity) => writeValue(units, quantity, of)).join(", ");
  const here = `At ${writeTorque(units, torqueNm)}: ${point.stalls ? "the motor stands still" : values(point)}.`;
  if (change === null) return [here, ...(cannot === null ? [] : [cannot])];
  const { words, ratio, needed, timeS, verdict, findings, others } = change;
  const time = timeS === null ? "" : `, travel ${writeQuantity(timeS, "time")}`;
  return [
    here,
    `${capital(words)}, ratio ${writeNumber(ratio)}: needs ${writeTorque(units, needed.torqueNm)}, ${shareText(needed.stallShare)} of stall, at ${values(needed)}${time}. ${verdict}.`,
    ...findings,
    ...(others.length > 0 ? [`The same number also changes ${listed(others)}.`] : []),
  ];
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
