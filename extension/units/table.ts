/**
 * Every unit that a quantity may be written in, with its exact factor to SI.
 *
 * One unit belongs to one dimension. Symbols are those of SI and of the trade, in plain ASCII as they stand in source
 * (`N*m`, `kg*m^2`); `write.ts` makes the typeset form for people. Does not parse and does not format.
 */

export type Dimension =
  | "voltage"
  | "current"
  | "resistance"
  | "torque"
  | "speed"
  | "torqueConstant"
  | "mass"
  | "length"
  | "time"
  | "inertia"
  | "angle"
  | "force"
  | "energy"
  | "power"
  | "charge"
  | "temperature"
  | "thermalResistance"
  | "linearSpeed";

export interface Unit {
  readonly symbol: string;
  readonly dimension: Dimension;
  /** SI value = number × factor + offset; for a reciprocal unit SI value = factor / number. */
  readonly factor: number;
  readonly offset?: number;
  readonly reciprocal?: true;
}

export interface DimensionFacts {
  /** With its article, for messages: "a torque". */
  readonly noun: string;
  /** An example for messages. */
  readonly example: string;
}

export const DIMENSIONS: Readonly<Record<Dimension, DimensionFacts>> = {
  voltage: { noun: "a voltage", example: "12 V" },
  current: { noun: "a current", example: "4.6 A" },
  resistance: { noun: "a resistance", example: "90 mohm" },
  torque: { noun: "a torque", example: "2.9 N*m" },
  speed: { noun: "a speed of rotation", example: "138 rpm" },
  torqueConstant: { noun: "a torque constant", example: "0.02 N*m/A" },
  mass: { noun: "a mass", example: "20 kg" },
  length: { noun: "a length", example: "40 mm" },
  time: { noun: "a time", example: "6 s" },
  inertia: { noun: "a moment of inertia", example: "0.02 kg*m^2" },
  angle: { noun: "an angle", example: "30 deg" },
  force: { noun: "a force", example: "15 N" },
  energy: { noun: "an energy", example: "20 J" },
  power: { noun: "a power", example: "30 W" },
  charge: { noun: "a charge", example: "4 A*h" },
  temperature: { noun: "a temperature", example: "25 degC" },
  thermalResistance: { noun: "a thermal resistance", example: "3 K/W" },
  linearSpeed: { noun: "a speed", example: "1.2 m/s" },
};

// Exact by definition: the international pound and inch, standard gravity (NIST SP 811 (2008), App. B; from memory).
const GRAVITY = 9.80665;
const LB = 0.45359237;
const OZ = LB / 16;
const INCH = 0.0254;
const FOOT = 12 * INCH;
const LBF = LB * GRAVITY;
const OZF = OZ * GRAVITY;
const RPM = Math.PI / 30;
const DEGREE = Math.PI / 180;

const list: readonly Unit[] = [
  ...of("voltage", { V: 1, mV: 1e-3, kV: 1e3 }),
  ...of("current", { A: 1, mA: 1e-3, uA: 1e-6 }),
  ...of("resistance", { ohm: 1, mohm: 1e-3, kohm: 1e3 }),
  ...of("torque", {
    "N*m": 1,
    "mN*m": 1e-3,
    "N*cm": 1e-2,
    "N*mm": 1e-3,
    "kgf*m": GRAVITY,
    "kgf*cm": GRAVITY / 100,
    "gf*cm": GRAVITY / 1e5,
    "lbf*ft": LBF * FOOT,
    "ft*lbf": LBF * FOOT,
    "lbf*in": LBF * INCH,
    "in*lbf": LBF * INCH,
    "ozf*in": OZF * INCH,
    "in*ozf": OZF * INCH,
  }),
  ...of("speed", { rpm: RPM, "rad/s": 1, "rev/s": 2 * Math.PI, "deg/s": DEGREE }),
  ...of("torqueConstant", {
    "N*m/A": 1,
    "mN*m/A": 1e-3,
    "N*cm/A": 1e-2,
    "kgf*cm/A": GRAVITY / 100,
    "lbf*in/A": LBF * INCH,
    "ozf*in/A": OZF * INCH,
    "V*s/rad": 1,
    "V/krpm": 1 / (1000 * RPM),
  }),
  { symbol: "rpm/V", dimension: "torqueConstant", factor: 1 / RPM, reciprocal: true },
  ...of("mass", { kg: 1, g: 1e-3, lb: LB, oz: OZ }),
  ...of("length", { m: 1, cm: 1e-2, mm: 1e-3, um: 1e-6, in: INCH, ft: FOOT }),
  ...of("time", { s: 1, ms: 1e-3, min: 60, h: 3600 }),
  ...of("inertia", {
    "kg*m^2": 1,
    "kg*cm^2": 1e-4,
    "kg*mm^2": 1e-6,
    "g*m^2": 1e-3,
    "g*cm^2": 1e-7,
    "g*mm^2": 1e-9,
    "lb*ft^2": LB * FOOT * FOOT,
    "lb*in^2": LB * INCH * INCH,
    "oz*in^2": OZ * INCH * INCH,
  }),
  ...of("angle", { deg: DEGREE, rad: 1, rev: 2 * Math.PI }),
  ...of("force", { N: 1, mN: 1e-3, kN: 1e3, kgf: GRAVITY, gf: GRAVITY / 1000, lbf: LBF, ozf: OZF }),
  ...of("energy", { J: 1, mJ: 1e-3, kJ: 1e3, "W*h": 3600 }),
  ...of("power", { W: 1, mW: 1e-3, kW: 1e3, hp: 550 * FOOT * LBF, "metric-hp": 75 * GRAVITY, "electric-hp": 746 }),
  ...of("charge", { "A*h": 3600, "mA*h": 3.6, C: 1 }),
  { symbol: "degC", dimension: "temperature", factor: 1, offset: 273.15 },
  { symbol: "degF", dimension: "temperature", factor: 5 / 9, offset: 459.67 * (5 / 9) },
  { symbol: "K", dimension: "temperature", factor: 1 },
  ...of("thermalResistance", { "K/W": 1, "degC/W": 1 }),
  ...of("linearSpeed", { "m/s": 1, "mm/s": 1e-3, "km/h": 1 / 3.6, "ft/s": FOOT, mph: 5280 * FOOT * (1 / 3600) }),
];

export const UNITS: ReadonlyMap<string, Unit> = new Map(list.map((unit) => [unit.symbol, unit]));

/** The units of one dimension, the most usual first. */
export function unitsOf(dimension: Dimension): readonly Unit[] {
  return list.filter((unit) => unit.dimension === dimension);
}

function of(dimension: Dimension, factors: Readonly<Record<string, number>>): Unit[] {
  return Object.entries(factors).map(([symbol, factor]) => ({ symbol, dimension, factor }));
}
