/** The template-literal types and the units table name the same units. */
import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { type Dimension, unitsOf } from "../../extension/units/table.js";

const SOURCE = readFileSync(path.join(import.meta.dirname, "../../extension/declarations/quantities.ts"), "utf8");

const TYPES: Readonly<Record<string, Dimension>> = {
  Voltage: "voltage",
  Current: "current",
  Resistance: "resistance",
  Torque: "torque",
  Speed: "speed",
  TorqueConstant: "torqueConstant",
  Mass: "mass",
  Length: "length",
  Time: "time",
  Inertia: "inertia",
  Angle: "angle",
  Force: "force",
  Energy: "energy",
  Charge: "charge",
  Temperature: "temperature",
  ThermalResistance: "thermalResistance",
};

describe("quantity types", () => {
  it.each(Object.entries(TYPES))("%s names the units of %s", (type, dimension) => {
    const body = new RegExp(`export type ${type} =([^;]*);`).exec(SOURCE)?.[1] ?? "";
    const written = [...body.matchAll(/`\$\{number\} ([^`]+)`/g)].map((match) => match[1]);
    expect(written.sort()).toEqual(
      unitsOf(dimension)
        .map(({ symbol }) => symbol)
        .sort(),
    );
  });

  it("are all held to the table", () => {
    const declared = [...SOURCE.matchAll(/export type (\w+) =/g)].map((match) => match[1]);
    expect(declared.sort()).toEqual(Object.keys(TYPES).sort());
  });
});
