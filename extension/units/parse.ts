/**
 * Quantity strings to SI: `"4.6 A"` is 4.6.
 *
 * The written form is exactly a JavaScript number, one space, a unit: the same strings that the template-literal types
 * of the declarations accept. Never throws; a refusal is one sentence that says what to write.
 */
import { nearest } from "./nearest.js";
import { DIMENSIONS, type Dimension, UNITS, type Unit, unitsOf } from "./table.js";

export type Parsed =
  | { readonly ok: true; readonly si: number; readonly number: number; readonly unit: Unit }
  | { readonly ok: false; readonly message: string };

/** Reads `text` as a quantity of `dimension`; `si` is in the dimension's SI unit (K, rad, rad/s, coulomb…). */
export function parseQuantity(text: string, dimension: Dimension): Parsed {
  const split = splitQuantity(text);
  const { noun, example } = DIMENSIONS[dimension];
  if (split === undefined) {
    return refuse(`"${shorten(text)}" is not ${noun}; write a number, one space and a unit, such as "${example}"`);
  }
  if (split.symbol === "") {
    return refuse(`"${text}" has no unit; write ${noun} such as "${split.digits} ${unitsOf(dimension)[0]?.symbol}"`);
  }
  const unit = UNITS.get(split.symbol);
  if (unit === undefined) {
    const names = unitsOf(dimension).map((known) => known.symbol);
    const near = nearest(split.symbol, names) ?? nearest(split.symbol, [...UNITS.keys()]);
    const hint = near === undefined ? `use one of ${names.join(", ")}` : `did you mean "${split.digits} ${near}"?`;
    return refuse(`"${shorten(split.symbol)}" is not a known unit; ${hint}`);
  }
  if (unit.dimension !== dimension) {
    return refuse(`"${text}" is ${DIMENSIONS[unit.dimension].noun}; here goes ${noun} such as "${example}"`);
  }
  if (!split.spaced) {
    return refuse(`"${text}" needs one space between number and unit: "${split.digits} ${unit.symbol}"`);
  }
  const si = toSi(split.number, unit);
  return Number.isFinite(si) ? { ok: true, si, number: split.number, unit } : refuse(`"${text}" is outside what can be computed`);
}

/** Reads a string in whichever unit it names, or `undefined` where it isn't a quantity. */
export function parseAnyQuantity(text: string): Extract<Parsed, { ok: true }> | undefined {
  const unit = UNITS.get(text.slice(text.indexOf(" ") + 1));
  const parsed = unit === undefined ? undefined : parseQuantity(text, unit.dimension);
  return parsed?.ok ? parsed : undefined;
}

/** SI value of `number` in `unit`. */
export function toSi(number: number, unit: Unit): number {
  return unit.reciprocal ? unit.factor / number : number * unit.factor + (unit.offset ?? 0);
}

/** The number that `si` has in `unit`. */
export function fromSi(si: number, unit: Unit): number {
  return unit.reciprocal ? unit.factor / si : (si - (unit.offset ?? 0)) / unit.factor;
}

interface Split {
  readonly digits: string;
  readonly number: number;
  readonly spaced: boolean;
  readonly symbol: string;
}

function splitQuantity(text: string): Split | undefined {
  const match = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)(\s*)(.*)$/.exec(text);
  if (match === null) return undefined;
  const [, digits = "", space = "", symbol = ""] = match;
  const number = Number(digits);
  return Number.isFinite(number) ? { digits, number, spaced: space === " ", symbol: symbol.trimEnd() } : undefined;
}

function refuse(message: string): Parsed {
  return { ok: false, message };
}

function shorten(text: string): string {
  return text.length <= 40 ? text : `${text.slice(0, 39)}…`;
}
