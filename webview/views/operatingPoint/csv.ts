/** Every plotted point as numbers for programs, units without prefix. Holds no name from anyone's code. */
import type { CurveValues } from "../../../extension/protocol/charts/operatingPoint.js";
import { fromSi } from "../../../extension/units/parse.js";
import { UNITS } from "../../../extension/units/table.js";
import { digits } from "../../frame/csv.js";
import type { Table } from "../../frame/sheet.js";
import { QUANTITIES, type Quantity } from "./quantities.js";
import type { Stop } from "./stops.js";

const UNIT: Readonly<Record<Quantity["name"], string>> = { speed: "rpm", current: "A", power: "W", efficiency: "%" };

export function fileOf(stops: readonly Stop[]): Table {
  return {
    caption: "",
    head: [
      "Torque (N*m)",
      "Share of stall torque (%)",
      ...QUANTITIES.map(({ title, name }) => `${title} (${UNIT[name]})`),
      ...QUANTITIES.map(({ title, name }) => `${title} by the sheet (${UNIT[name]})`),
      "Point",
    ],
    rows: stops.map(({ torqueNm, shareOfStall, available, sheet, names }) => [
      digits(torqueNm),
      digits(shareOfStall === null ? null : shareOfStall * 100),
      ...QUANTITIES.map((quantity) => digits(valueIn(quantity, available))),
      ...QUANTITIES.map((quantity) => digits(valueIn(quantity, sheet))),
      names.join("; "),
    ]),
  };
}

function valueIn(quantity: Quantity, values: CurveValues | null): number | null {
  const value = values && quantity.read(values);
  if (value === null) return null;
  const unit = UNITS.get(UNIT[quantity.name]);
  return unit === undefined ? value * 100 : fromSi(value, unit);
}
