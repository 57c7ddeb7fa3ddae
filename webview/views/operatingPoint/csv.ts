/** Every plotted point as numbers for programs, units without prefix. Holds no name from anyone's code. */
import type { CurveValues } from "../../../extension/protocol/charts/operatingPoint.js";
import { numberIn, plainSymbol, type UnitSystem } from "../../../extension/units/systems.js";
import { digits } from "../../frame/csv.js";
import type { Table } from "../../frame/sheet.js";
import { QUANTITIES, type Quantity } from "./quantities.js";
import type { Stop } from "./stops.js";

export function fileOf(stops: readonly Stop[], system: UnitSystem): Table {
  const symbolOf = ({ dimension }: Quantity): string => (dimension === "share" ? "%" : plainSymbol(dimension, system));
  const torque = plainSymbol("torque", system);
  const valueIn = (quantity: Quantity, values: CurveValues | null): number | null => {
    const value = values && quantity.read(values);
    if (value === null) return null;
    return quantity.dimension === "share" ? value * 100 : numberIn(value, symbolOf(quantity));
  };
  return {
    caption: "",
    head: [
      `Torque (${torque})`,
      "Share of stall torque (%)",
      ...QUANTITIES.map((quantity) => `${quantity.title} (${symbolOf(quantity)})`),
      ...QUANTITIES.map((quantity) => `${quantity.title} by the sheet (${symbolOf(quantity)})`),
      "Point",
    ],
    rows: stops.map(({ torqueNm, shareOfStall, available, sheet, names }) => [
      digits(numberIn(torqueNm, torque)),
      digits(shareOfStall === null ? null : shareOfStall * 100),
      ...QUANTITIES.map((quantity) => digits(valueIn(quantity, available))),
      ...QUANTITIES.map((quantity) => digits(valueIn(quantity, sheet))),
      names.join("; "),
    ]),
  };
}
