/**
 * The plotted points as comma-separated values (RFC 4180): every point, names and units in the header, units without prefix.
 *
 * Numbers with ten digits and a decimal point, whatever the country. Holds no name from anyone's code.
 */
import type { CurveValues } from "../extension/protocol/chart.js";
import { fromSi } from "../extension/units/parse.js";
import { UNITS } from "../extension/units/table.js";
import { QUANTITIES, type Quantity } from "./plots/quantities.js";
import type { Stop } from "./stops.js";

const UNIT: Readonly<Record<Quantity["name"], string>> = { speed: "rpm", current: "A", power: "W", efficiency: "%" };

export function csvOf(stops: readonly Stop[]): string {
  const header = [
    "Torque (N*m)",
    "Share of stall torque (%)",
    ...QUANTITIES.map(({ title, name }) => `${title} (${UNIT[name]})`),
    ...QUANTITIES.map(({ title, name }) => `${title} by the sheet (${UNIT[name]})`),
    "Point",
  ];
  const rows = stops.map(({ torqueNm, shareOfStall, available, sheet, names }) => [
    number(torqueNm),
    number(shareOfStall === null ? null : shareOfStall * 100),
    ...QUANTITIES.map((quantity) => number(valueIn(quantity, available))),
    ...QUANTITIES.map((quantity) => number(valueIn(quantity, sheet))),
    names.join("; "),
  ]);
  return [header, ...rows].map((cells) => `${cells.join(",")}\r\n`).join("");
}

function valueIn(quantity: Quantity, values: CurveValues | null): number | null {
  const value = values && quantity.read(values);
  if (value === null) return null;
  const unit = UNITS.get(UNIT[quantity.name]);
  return unit === undefined ? value * 100 : fromSi(value, unit);
}

function number(value: number | null): string {
  return value === null ? "" : String(Number(value.toPrecision(10)));
}
