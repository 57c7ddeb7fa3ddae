/** All values at one torque, as cells that keep their places and as one sentence for those who hear it. */
import type { ReadOut } from "../../frame/sheet.js";
import { QUANTITIES } from "./quantities.js";
import type { Stop } from "./stops.js";
import { type ChartUnits, shareText, writeTorque, writeValue } from "./units.js";

export function readoutOf(stop: Stop, units: ChartUnits): ReadOut {
  const row = (name: string, values: Stop["available"]) => ({
    name,
    cells: QUANTITIES.map((quantity) => writeValue(units, quantity, values)),
  });
  return {
    at: `${writeTorque(units, stop.torqueNm)}, ${shareText(stop.shareOfStall)} of stall`,
    names: stop.names.join(", "),
    head: QUANTITIES.map(({ title }) => title),
    rows: [row("Available", stop.available), row("Sheet", stop.sheet)],
    spoken: sentenceOf(stop, units),
  };
}

function sentenceOf({ available, sheet, names }: Stop, units: ChartUnits): string {
  const list = (values: Stop["available"]): string =>
    QUANTITIES.map((quantity) => `${quantity.title.toLowerCase()} ${writeValue(units, quantity, values)}`).join(", ");
  return [
    ...(names.length > 0 ? [`${names.join(", ")}.`] : []),
    available === null ? "Beyond the available line." : `Available: ${list(available)}.`,
    sheet === null ? "Beyond the sheet's line." : `Sheet: ${list(sheet)}.`,
  ].join(" ");
}
