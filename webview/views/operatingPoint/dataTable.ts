/** The table behind the plots: the same points in numbers. */
import type { Table } from "../../frame/sheet.js";
import { QUANTITIES } from "./quantities.js";
import { type Stop, thinned } from "./stops.js";
import { type ChartUnits, shareNumber, torqueNumber, valueNumber } from "./units.js";

/** About this many rows beside the named ones. */
const ROWS = 20;

export function tableOf(mechanism: string, stops: readonly Stop[], units: ChartUnits): Table {
  return {
    caption: `${mechanism}: one motor over torque`,
    head: [
      `Torque (${units.torque.text})`,
      "Share of stall (%)",
      ...QUANTITIES.map(({ title, name }) => `${title} (${units.of[name].text})`),
      ...QUANTITIES.map(({ title, name }) => `${title}, sheet (${units.of[name].text})`),
      "Point",
    ],
    rows: thinned(stops, ROWS).map(({ torqueNm, shareOfStall, available, sheet, names }) => [
      torqueNumber(units, torqueNm),
      shareNumber(shareOfStall),
      ...QUANTITIES.map((quantity) => valueNumber(units, quantity, available)),
      ...QUANTITIES.map((quantity) => valueNumber(units, quantity, sheet)),
      names.join(", "),
    ]),
  };
}
