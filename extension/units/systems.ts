/**
 * The units that people may choose to read: SI, the trade's metric ones, or the trade's inch and pound.
 *
 * By falling size; the first whose number is at least 1 is written. Hovers and messages use the trade's metric ones.
 */
import { fromSi } from "./parse.js";
import { type Dimension, UNITS } from "./table.js";

export type UnitSystem = "si" | "metric" | "inch";

type Choices = Readonly<Record<Dimension, readonly string[]>>;

const METRIC: Choices = {
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

const WRITTEN: Readonly<Record<UnitSystem, Choices>> = {
  metric: METRIC,
  si: { ...METRIC, speed: ["rad/s"], angle: ["rad"], charge: ["C"] },
  inch: {
    ...METRIC,
    torque: ["lbf*ft", "lbf*in", "ozf*in"],
    torqueConstant: ["lbf*in/A", "ozf*in/A"],
    mass: ["lb", "oz"],
    length: ["ft", "in"],
    inertia: ["lb*ft^2", "lb*in^2", "oz*in^2"],
    force: ["lbf", "ozf"],
    temperature: ["degF"],
    linearSpeed: ["ft/s"],
  },
};

/** The unit in which a value of this size is written. */
export function suitableSymbol(si: number, dimension: Dimension, system: UnitSystem = "metric"): string {
  const symbols = WRITTEN[system][dimension];
  const fits = symbols.find((symbol) => Math.abs(numberIn(si, symbol)) >= 0.9995);
  if (si === 0) return plainSymbol(dimension, system);
  return fits ?? symbols.at(-1) ?? "";
}

/** The unit without a prefix, in which programs are given numbers of any size. */
export function plainSymbol(dimension: Dimension, system: UnitSystem): string {
  const symbols = WRITTEN[system][dimension];
  return symbols.find((symbol) => UNITS.get(symbol)?.factor === 1) ?? symbols[0] ?? "";
}

/** `si` as a number of the unit named. */
export function numberIn(si: number, symbol: string): number {
  const unit = UNITS.get(symbol);
  return unit === undefined ? si : fromSi(si, unit);
}
