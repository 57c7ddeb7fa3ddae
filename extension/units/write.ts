/**
 * Numbers for people: three significant digits, typeset units, a prefix that suits the size.
 *
 * The only place that turns a number into text with a unit. Does not know which quantity matters or why.
 */
import { numberIn, suitableSymbol, type UnitSystem } from "./systems.js";
import { type Dimension, unitsOf } from "./table.js";

/** `si` in the unit that suits its size: 0.0123 N·m is "12.3 mN·m". Fewer digits only where room is short. */
export function writeQuantity(si: number, dimension: Dimension, digits = 3, system: UnitSystem = "metric"): string {
  return writeIn(si, suitableSymbol(si, dimension, system), digits);
}

/** `si` in the unit named. */
export function writeIn(si: number, symbol: string, digits = 3): string {
  // The degree sign of an angle stands against its number (ISO 80000-1); that of a temperature does not.
  const gap = symbol.startsWith("deg") && !/^deg[CF]/.test(symbol) ? "" : " ";
  return `${writeDigits(numberIn(si, symbol), digits)}${gap}${typeset(symbol)}`;
}

/** Three significant digits, no exponent between 1e-4 and 1e6, a true minus sign. */
export function writeNumber(value: number): string {
  return writeDigits(value, 3);
}

function writeDigits(value: number, digits: number): string {
  const rounded = Number(value.toPrecision(digits));
  const size = Math.abs(rounded);
  const text = size === 0 ? "0" : size >= 1e6 || size < 1e-4 ? rounded.toExponential() : String(rounded);
  return text.replace(/^-/, "\u2212");
}

/** A share of one as per cent: 0.583 is "58 %". Below 10 % one decimal. */
export function writeShare(share: number): string {
  const perCent = share * 100;
  return `${writeNumber(Math.abs(perCent) < 10 ? Number(perCent.toFixed(1)) : Math.round(perCent))} %`;
}

/** The same quantity in every other unit of its dimension, usual ones first. */
export function writeOthers(si: number, dimension: Dimension, except: string): readonly string[] {
  return unitsOf(dimension)
    .filter((unit) => unit.symbol !== except && !isSpelledTwice(unit.symbol))
    .map((unit) => writeIn(si, unit.symbol));
}

/** "kg*m^2" as "kg·m²". */
export function typeset(symbol: string): string {
  return symbol
    .replaceAll("*", "·")
    .replace("^2", "²")
    .replace(/^deg([CF])/, "°$1")
    .replace(/^deg/, "°")
    .replace(/ohm$/, "Ω")
    .replace(/^u/, "µ");
}

function isSpelledTwice(symbol: string): boolean {
  return symbol === "ft*lbf" || symbol === "in*lbf" || symbol === "in*ozf" || symbol === "degC/W";
}
