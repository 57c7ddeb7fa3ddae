/** What may be written, and what is said of what may not. */
import { assert, constantFrom, double, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { parseQuantity } from "../../extension/units/parse.js";
import { type Dimension, UNITS } from "../../extension/units/table.js";

describe("parseQuantity", () => {
  it("reads every unit with any finite number that JavaScript writes", () => {
    const number = double({ min: 1e-12, max: 1e12, noNaN: true });
    assert(
      property(constantFrom(...UNITS.values()), number, (unit, value) => {
        const parsed = parseQuantity(`${value} ${unit.symbol}`, unit.dimension);
        expect(parsed.ok).toBe(true);
        if (!parsed.ok) return;
        expect(parsed.number).toBe(value);
        expect(parsed.unit).toBe(unit);
      }),
    );
  });

  it.each([
    ["4.6 A", "current", 4.6],
    ["-30 deg", "angle", -Math.PI / 6],
    [".5 m", "length", 0.5],
    ["1e3 mm", "length", 1],
    ["+2 kg", "mass", 2],
    ["0 N", "force", 0],
  ] as const)("reads %s", (text, dimension, si) => {
    const parsed = parseQuantity(text, dimension);
    expect(parsed.ok && parsed.si).toBeCloseTo(si, 12);
  });

  it.each<readonly [text: string, dimension: Dimension, says: string]>([
    ["138 rmp", "speed", 'did you mean "138 rpm"?'],
    ["2.9 Nm", "torque", 'did you mean "2.9 N*m"?'],
    ["2.9 n*m", "torque", 'did you mean "2.9 N*m"?'],
    ["4.7 V", "current", "is a voltage; here goes a current"],
    ["20kg", "mass", 'one space between number and unit: "20 kg"'],
    ["20  kg", "mass", 'one space between number and unit: "20 kg"'],
    ["20", "mass", 'has no unit; write a mass such as "20 kg"'],
    ["kg", "mass", "write a number, one space and a unit"],
    ["", "mass", "write a number, one space and a unit"],
    ["NaN kg", "mass", "write a number, one space and a unit"],
    ["Infinity kg", "mass", "write a number, one space and a unit"],
    ["1e999 kg", "mass", "write a number, one space and a unit"],
    ["5 parsec", "length", "use one of m, cm, mm"],
  ])("refuses %j as %s", (text, dimension, says) => {
    const parsed = parseQuantity(text, dimension);
    expect(parsed.ok).toBe(false);
    expect(parsed.ok ? "" : parsed.message).toContain(says);
  });

  it("keeps messages short whatever the text", () => {
    const parsed = parseQuantity("x".repeat(100_000), "mass");
    expect(parsed.ok).toBe(false);
    expect(parsed.ok ? "" : parsed.message).toMatch(/^.{20,200}$/);
  });
});
