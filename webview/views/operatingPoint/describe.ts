/** The plots in sentences, for those who hear them: what is drawn, and every limit that is hatched. */
import type { OperatingPointChart } from "../../../extension/protocol/charts/operatingPoint.js";
import { writeNumber } from "../../../extension/units/write.js";
import type { Drawing } from "./drawing.js";
import { CURRENT, EFFICIENCY, POWER, SPEED } from "./quantities.js";
import { type ChartUnits, unitsOf, writeTorque, writeValue } from "./units.js";

export function describeMotion({ available, hardest, sheet }: OperatingPointChart, drawing: Drawing): string {
  const units = unitsOf(drawing);
  const line = ({ noLoadSpeedRadPerS, stallTorqueNm, stallCurrentA }: OperatingPointChart["available"]): string => {
    const { speed, current } = units.of;
    const noLoad = `${writeNumber(speed.fromSi(noLoadSpeedRadPerS))} ${speed.text} at no load`;
    return `${noLoad}, standstill at ${writeTorque(units, stallTorqueNm)} and ${writeNumber(current.fromSi(stallCurrentA))} ${current.text}`;
  };
  return [
    "Speed and current over torque, one motor.",
    `Available line: ${line(available)}.`,
    `Sheet's line: ${line(sheet)}.`,
    hardest.stalls
      ? `Needed: ${writeTorque(units, hardest.torqueNm)}; the motor stands still.`
      : `Needed: ${writeTorque(units, hardest.torqueNm)}, at ${writeValue(units, SPEED, hardest)} and ${writeValue(units, CURRENT, hardest)}.`,
    ...limitSentences(drawing),
  ].join(" ");
}

export function describePower({ peakPower, bestEfficiency, hardest }: OperatingPointChart, units: ChartUnits): string {
  return [
    "Output power and efficiency over torque, one motor.",
    ...(peakPower
      ? [`Peak output power: ${writeValue(units, POWER, peakPower)} at ${writeTorque(units, peakPower.torqueNm)}.`]
      : []),
    ...(bestEfficiency
      ? [`Best efficiency: ${writeValue(units, EFFICIENCY, bestEfficiency)} at ${writeTorque(units, bestEfficiency.torqueNm)}.`]
      : []),
    ...(hardest.stalls ? [] : [`Where needed: ${writeValue(units, POWER, hardest)}, ${writeValue(units, EFFICIENCY, hardest)}.`]),
  ].join(" ");
}

function limitSentences({ zones, boundaries, torque }: Drawing): string[] {
  const limits = [...zones.map(({ from, words }) => ({ x: from, words })), ...boundaries];
  return limits.map(({ x, words }) => `From ${writeNumber(x)} ${torque.unit.text}: ${words}.`);
}
