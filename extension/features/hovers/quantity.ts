/** A quantity in SI and in the trade's other units. */
import { parseAnyQuantity } from "../../units/parse.js";
import { UNITS } from "../../units/table.js";
import { typeset, writeIn, writeNumber, writeOthers } from "../../units/write.js";
import { writeBlock } from "./block.js";

/** A hover for a quantity that nothing else is to be said about. */
export function describeQuantity(text: string): string | undefined {
  const parsed = parseAnyQuantity(text);
  const line = quantityLine(text);
  if (parsed === undefined || line === undefined) return undefined;
  return writeBlock({ verdict: `${writeNumber(parsed.number)} ${typeset(parsed.unit.symbol)}`, lines: [line] });
}

/** The quantity in SI, then in the other units; `undefined` for a text that is no quantity. */
export function quantityLine(text: string): string | undefined {
  const parsed = parseAnyQuantity(text);
  if (parsed === undefined) return undefined;
  const { si, unit } = parsed;
  const base = [...UNITS.values()].find((one) => one.dimension === unit.dimension && isBase(one));
  const others = writeOthers(si, unit.dimension, unit.symbol);
  const inBase = base === undefined ? undefined : writeIn(si, base.symbol);
  const rest = others.filter((other) => other !== inBase);
  const first = inBase === undefined ? [] : [`${inBase} (SI)`];
  return `= ${[...first, ...rest].join(" = ")}`;
}

function isBase({ factor, offset, reciprocal }: { factor: number; offset?: number; reciprocal?: true }): boolean {
  return factor === 1 && offset === undefined && reciprocal === undefined;
}
