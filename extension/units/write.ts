/**
 * Numbers for people: three significant digits, typeset units, a prefix that suits the size.
 *
 * The only place that turns a number into text with a unit. Does not know which quantity matters or why.
 */
import { fromSi } from "./parse.js";
import { type Dimension, UNITS, unitsOf } from "./table.js";

/** Units to choose from when writing, by falling size; the first whose number is at least 1 is taken. */
const WRITTEN: Readonly<Record<Dimension, readonly string[]>> = {
  voltage: ["V", "mV"],
  current: ["A", "mA"],
  resistance: ["ohm", "mohm"],
  torque: ["N*m", "mN*m"],
  speed: ["rpm"],
  torqueConstant: ["N*m/A", "mN*m/A"],
  mass: ["kg", "g"],
  length: ["m", "mm"],
  time: ["s", "ms"],
  inertia: ["kg*m^2", "g*m^2", "kg*mm^2", "g*mm^2"],
  angle: ["deg"],
  force: ["kN", "N", "mN"],
  energy: ["kJ", "J", "mJ"],
  power: ["kW", "W", "mW"],
  charge: ["A*h", "mA*h"],
  temperature: ["degC"],
  thermalResistance: ["K/W"],
  linearSpeed: ["m/s", "mm/s"],
};

/** `si` in the unit that suits its size: 0.0123 N·m is "12.3 mN·m". Fewer digits only where room is short. */
export function writeQuantity(si: number, dimension: Dimension, digits = 3): string {
  return writeIn(si, suitableSymbol(si, dimension), digits);
}

/** The unit in which a value of this size is written. */
export function suitableSymbol(si: number, dimension: Dimension): string {
  const symbols = WRITTEN[dimension];
  const fits = symbols.find((symbol) => Math.abs(numberIn(si, symbol)) >= 0.9995);
  const symbol = si === 0 ? symbols.find((candidate) => UNITS.get(candidate)?.factor === 1) : fits;
  return symbol ?? symbols.at(-1) ?? "";
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

function numberIn(si: number, symbol: string): number {
  const unit = UNITS.get(symbol);
  return unit === undefined ? si : fromSi(si, unit);
}

function isSpelledTwice(symbol: string): boolean {
  return symbol === "ft*lbf" || symbol === "in*lbf" || symbol === "in*ozf" || symbol === "degC/W";
}
