/** Units to choose from: which one is taken, and that every system gives the same quantity. */
import { describe, expect, it } from "vitest";
import { numberIn, plainSymbol, suitableSymbol, type UnitSystem } from "../../extension/units/systems.js";
import { DIMENSIONS, type Dimension, UNITS } from "../../extension/units/table.js";
import { writeQuantity } from "../../extension/units/write.js";

const SYSTEMS: readonly UnitSystem[] = ["metric", "si", "inch"];

describe("unit systems", () => {
  it.each(SYSTEMS)("know a unit of the right dimension for every quantity: %s", (system) => {
    for (const dimension of Object.keys(DIMENSIONS) as Dimension[]) {
      for (const size of [0, 1e-9, 0.02, 1, 50, 4e4]) {
        expect(UNITS.get(suitableSymbol(size, dimension, system))?.dimension).toBe(dimension);
      }
      expect(UNITS.get(plainSymbol(dimension, system))?.dimension).toBe(dimension);
    }
  });

  it("write speeds and angles as SI, as the trade, and inches only where they are asked for", () => {
    const speed = (100 * Math.PI) / 30;
    expect(SYSTEMS.map((system) => writeQuantity(speed, "speed", 3, system))).toEqual(["100 rpm", "10.5 rad/s", "100 rpm"]);
    expect(SYSTEMS.map((system) => writeQuantity(Math.PI / 2, "angle", 3, system))).toEqual(["90°", "1.57 rad", "90°"]);
    // 1 lbf = 4.4482216152605 N, 1 in = 25.4 mm (NIST SP 811, App. B): 1 N·m is 8.85 lbf·in, 0.7 m is 2.3 ft.
    expect(SYSTEMS.map((system) => writeQuantity(1, "torque", 3, system))).toEqual(["1 N·m", "1 N·m", "8.85 lbf·in"]);
    expect(SYSTEMS.map((system) => writeQuantity(0.7, "length", 3, system))).toEqual(["700 mm", "700 mm", "2.3 ft"]);
    expect(SYSTEMS.map((system) => writeQuantity(300.15, "temperature", 3, system))).toEqual(["27 °C", "27 °C", "80.6 °F"]);
  });

  it("give programs numbers without a prefix", () => {
    expect(plainSymbol("torque", "metric")).toBe("N*m");
    expect(plainSymbol("speed", "metric")).toBe("rpm");
    expect(plainSymbol("speed", "si")).toBe("rad/s");
    expect(plainSymbol("power", "inch")).toBe("W");
    expect(numberIn(0.0254, "in")).toBeCloseTo(1, 12);
  });
});
