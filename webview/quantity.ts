/** Quantities as people read them in the units that they chose. */
import { numberIn, plainSymbol, suitableSymbol, type UnitSystem } from "../extension/units/systems.js";
import type { Dimension } from "../extension/units/table.js";
import { typeset, writeNumber, writeQuantity } from "../extension/units/write.js";

/** What stands where there is no number. */
export const NOTHING = "–";

const KELVIN = 273.15;

export type Write = (si: number | null, dimension: Dimension) => string;

export function writerIn(system: UnitSystem): Write {
  return (si, dimension) => (si === null ? NOTHING : writeQuantity(si, dimension, 3, system));
}

export function writeTemperature(celsius: number | null, system: UnitSystem): string {
  if (celsius === null) return NOTHING;
  const symbol = suitableSymbol(celsius + KELVIN, "temperature", system);
  return `${writeNumber(numberIn(celsius + KELVIN, symbol))} ${typeset(symbol)}`;
}

/** A column of a table: its unit without prefix, and numbers in it. */
export interface Column {
  readonly symbol: string;
  readonly numberOf: (si: number) => number;
}

export function columnIn(system: UnitSystem, dimension: Dimension): Column {
  const symbol = plainSymbol(dimension, system);
  return { symbol, numberOf: (si) => numberIn(si, symbol) };
}

/** The same for temperatures in °C. */
export function temperatureColumn(system: UnitSystem): Column {
  const { symbol, numberOf } = columnIn(system, "temperature");
  return { symbol, numberOf: (celsius) => numberOf(celsius + KELVIN) };
}

/** "hoist, arm and base" */
export function listed(names: readonly string[]): string {
  const last = names.at(-1) ?? "nothing";
  return names.length < 2 ? last : `${names.slice(0, -1).join(", ")} and ${last}`;
}
