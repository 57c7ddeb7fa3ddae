/** A quantity in SI and in the trade's other units. */
import { parseAnyQuantity } from "../../units/parse.js";
import { UNITS, type Unit } from "../../units/table.js";
import { typeset, writeIn, writeOthers } from "../../units/write.js";

/** Such as "90 mΩ = 0.09 Ω"; `undefined` for a text that is no quantity. The SI unit comes first. */
export function quantityLine(text: string): string | undefined {
  const parsed = parseAnyQuantity(text);
  if (parsed === undefined) return undefined;
  const { si, unit, number } = parsed;
  const base = [...UNITS.values()].find((one) => one.dimension === unit.dimension && isBase(one));
  const inBase = base === undefined || base.symbol === unit.symbol ? [] : [writeIn(si, base.symbol)];
  const others = writeOthers(si, unit.dimension, unit.symbol).filter((other) => !inBase.includes(other));
  return [`${number} ${typeset(unit.symbol)}`, ...inBase, ...others].join(" = ");
}

function isBase({ factor, offset, reciprocal }: Unit): boolean {
  return factor === 1 && offset === undefined && reciprocal === undefined;
}
