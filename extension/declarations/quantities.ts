/**
 * The types of quantity strings: a number, one space, a unit.
 *
 * Unions of template literals spelled out on purpose: a compile error then names the alias and not every member. The same units
 * stand in the units table; a test holds the two equal.
 */

/** A voltage: `"12 V"`. */
export type Voltage = `${number} V` | `${number} mV` | `${number} kV`;

/** An electric current: `"4.6 A"`. */
export type Current = `${number} A` | `${number} mA` | `${number} uA`;

/** An electrical resistance: `"90 mohm"`. */
export type Resistance = `${number} ohm` | `${number} mohm` | `${number} kohm`;

/** A torque: `"2.9 N*m"`. */
export type Torque =
  | `${number} N*m`
  | `${number} mN*m`
  | `${number} N*cm`
  | `${number} N*mm`
  | `${number} kgf*m`
  | `${number} kgf*cm`
  | `${number} gf*cm`
  | `${number} lbf*ft`
  | `${number} ft*lbf`
  | `${number} lbf*in`
  | `${number} in*lbf`
  | `${number} ozf*in`
  | `${number} in*ozf`;

/** A speed of rotation: `"138 rpm"`. */
export type Speed = `${number} rad/s` | `${number} rpm` | `${number} rev/s` | `${number} deg/s`;

/** Torque per ampere, or its equals in volts per speed: `"0.02 N*m/A"`, `"400 rpm/V"`. */
export type TorqueConstant =
  | `${number} N*m/A`
  | `${number} mN*m/A`
  | `${number} N*cm/A`
  | `${number} kgf*cm/A`
  | `${number} lbf*in/A`
  | `${number} ozf*in/A`
  | `${number} V*s/rad`
  | `${number} V/krpm`
  | `${number} rpm/V`;

/** A mass: `"20 kg"`. */
export type Mass = `${number} kg` | `${number} g` | `${number} lb` | `${number} oz`;

/** A length: `"40 mm"`. */
export type Length = `${number} m` | `${number} cm` | `${number} mm` | `${number} um` | `${number} in` | `${number} ft`;

/** A time: `"6 s"`. */
export type Time = `${number} s` | `${number} ms` | `${number} min` | `${number} h`;

/** A moment of inertia: `"0.02 kg*m^2"`. */
export type Inertia =
  | `${number} kg*m^2`
  | `${number} kg*cm^2`
  | `${number} kg*mm^2`
  | `${number} g*m^2`
  | `${number} g*cm^2`
  | `${number} g*mm^2`
  | `${number} lb*ft^2`
  | `${number} lb*in^2`
  | `${number} oz*in^2`;

/** An angle: `"30 deg"`. */
export type Angle = `${number} deg` | `${number} rad` | `${number} rev`;

/** A force: `"15 N"`. */
export type Force =
  | `${number} N`
  | `${number} mN`
  | `${number} kN`
  | `${number} kgf`
  | `${number} gf`
  | `${number} lbf`
  | `${number} ozf`;

/** An energy: `"20 J"`. */
export type Energy = `${number} J` | `${number} mJ` | `${number} kJ` | `${number} W*h`;

/** An electric charge: `"4 A*h"`. */
export type Charge = `${number} A*h` | `${number} mA*h` | `${number} C`;

/** A temperature: `"25 degC"`. */
export type Temperature = `${number} degC` | `${number} degF` | `${number} K`;

/** A thermal resistance: `"3 K/W"`. */
export type ThermalResistance = `${number} K/W` | `${number} degC/W`;

/** A value that is known only to lie between two others; `between` makes it. */
export interface Range<Q extends string | number> {
  readonly kind: "between";
  readonly low: Q;
  readonly high: Q;
}
