/** The plots of a load cycle in sentences, for those who hear them. */
import type { PowerChart } from "../../../extension/protocol/charts/power.js";
import { writeQuantity } from "../../../extension/units/write.js";
import type { StateRow } from "../../plots/series/drawing.js";
import { stepWords } from "./numbers.js";

export function describePowerPlot(chart: PowerChart): string {
  const { steps, mechanisms, timesS } = chart;
  const peaks = mechanisms.map(({ name, powerW }) => {
    const most = Math.max(0, ...powerW);
    const least = Math.min(0, ...powerW);
    const back = least < -1e-6 ? `, sends back up to ${writeQuantity(-least, "power")}` : "";
    return `${name} at most ${writeQuantity(most, "power")} at ${writeQuantity(timesS[powerW.indexOf(most)] ?? 0, "time")}${back}`;
  });
  return [
    "Electrical power of each mechanism over the load cycle, stacked.",
    ...steps.map(
      ({ startS, endS }, step) =>
        `${writeQuantity(startS, "time")} to ${writeQuantity(endS, "time")}: ${stepWords(chart, step)}.`,
    ),
    `${peaks.join("; ")}.`,
  ].join(" ");
}

export function describeSupply({ voltageV, timesS, floor, openCircuitV, currentA }: PowerChart): string {
  const lowest = Math.min(...voltageV, openCircuitV);
  const at = timesS[voltageV.indexOf(lowest)] ?? 0;
  return [
    "Voltage and current of the supply over the load cycle.",
    `Lowest ${writeQuantity(lowest, "voltage")} at ${writeQuantity(at, "time")}, at most ${writeQuantity(Math.max(0, ...currentA), "current")}.`,
    ...(floor === null ? [] : [`Must stay above ${writeQuantity(floor.voltageV, "voltage")}.`]),
  ].join(" ");
}

export function describeStates(rows: readonly StateRow[]): string {
  return `Protection and windings over the load cycle. ${rows.map(({ words }) => `${words}.`).join(" ")}`;
}
