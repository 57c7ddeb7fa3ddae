/** One unit for a whole axis, chosen by its greatest value. */
import { fromSi, toSi } from "../../extension/units/parse.js";
import { suitableSymbol, type UnitSystem } from "../../extension/units/systems.js";
import { type Dimension, UNITS } from "../../extension/units/table.js";
import { typeset } from "../../extension/units/write.js";

export interface AxisUnit {
  /** As people read it: "mN·m". */
  readonly text: string;
  readonly fromSi: (si: number) => number;
  readonly toSi: (value: number) => number;
}

export function axisUnit(greatestSi: number, dimension: Dimension, system: UnitSystem = "metric"): AxisUnit {
  const symbol = suitableSymbol(greatestSi, dimension, system);
  const unit = UNITS.get(symbol);
  if (unit === undefined) return { text: typeset(symbol), fromSi: (si) => si, toSi: (value) => value };
  return { text: typeset(symbol), fromSi: (si) => fromSi(si, unit), toSi: (value) => toSi(value, unit) };
}

export const PER_CENT: AxisUnit = { text: "%", fromSi: (share) => share * 100, toSi: (perCent) => perCent / 100 };
