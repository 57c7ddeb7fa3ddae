/** What the mechanism needs and gets at its hardest position, in words and numbers. */
import type { OperatingPointChart } from "../../../extension/protocol/charts/operatingPoint.js";
import { QUANTITIES } from "./quantities.js";
import { type ChartUnits, NOTHING, shareText, writeTorque, writeValue } from "./units.js";

export function writtenFacts(chart: OperatingPointChart, units: ChartUnits): (readonly [name: string, text: string])[] {
  const { hardest, available } = chart;
  return [
    ["Torque needed", writeTorque(units, hardest.torqueNm)],
    ["Torque at stall", writeTorque(units, available.stallTorqueNm)],
    ["Share of stall", shareText(hardest.stallShare)],
    ["Hardest", hardest.where ?? NOTHING],
    ...QUANTITIES.map((quantity) => [quantity.title, writeValue(units, quantity, hardest)] as const),
  ];
}
