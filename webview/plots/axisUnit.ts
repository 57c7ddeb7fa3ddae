/** One unit for a whole axis, chosen by its greatest value. */
import { fromSi } from "../../extension/units/parse.js";
import { type Dimension, UNITS } from "../../extension/units/table.js";
import { suitableSymbol, typeset } from "../../extension/units/write.js";

export interface AxisUnit {
  /** As people read it: "mN·m". */
  readonly text: string;
  readonly fromSi: (si: number) => number;
}

export function axisUnit(greatestSi: number, dimension: Dimension): AxisUnit {
  const symbol = suitableSymbol(greatestSi, dimension);
  const unit = UNITS.get(symbol);
  return { text: typeset(symbol), fromSi: (si) => (unit === undefined ? si : fromSi(si, unit)) };
}

export const PER_CENT: AxisUnit = { text: "%", fromSi: (share) => share * 100 };
