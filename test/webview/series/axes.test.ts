/** Axes of series: 0 where it belongs, round ticks, and every value inside, by property. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { axisUnit } from "../../../webview/plots/axisUnit.js";
import { fixedAxis, valueAxis } from "../../../webview/plots/series/axes.js";

describe("a value axis", () => {
  it("starts at 0 and ends at a round tick above the greatest value", () => {
    const axis = valueAxis("Current", [0.3, 4.4], "current", "metric");
    expect(axis.min).toBe(0);
    expect(axis.ticks[0]).toBe(0);
    expect(axis.max).toBe(axis.ticks.at(-1));
    expect(axis.max).toBeGreaterThan(4.4);
    expect(axis.title).toBe("Current (A)");
  });

  it("shows a supply between its floor and its open circuit, not from 0", () => {
    const { min, max } = valueAxis("Voltage", [9, 12.6, 10.4], "voltage", "metric", { fromZero: false, intervals: 3 });
    expect(min).toBeGreaterThan(5);
    expect(min).toBeLessThan(9);
    expect(max).toBeGreaterThan(12.6);
  });

  it("goes as far below 0 as its values, with 0 among its ticks", () => {
    const { min, ticks } = valueAxis("Power", [-35, 95], "power", "metric");
    expect(min).toBeLessThan(-35);
    expect(min).toBeGreaterThan(-60);
    expect(ticks).toContain(0);
  });

  it("takes its unit from its greatest size, and from the units chosen", () => {
    expect(valueAxis("Torque", [0.02], "torque", "metric").title).toBe("Torque (mN·m)");
    expect(valueAxis("Torque", [0.5], "torque", "inch").title).toBe("Torque (lbf·in)");
    expect(valueAxis("Speed", [-30, 4], "speed", "si").title).toBe("Speed (rad/s)");
  });

  it("holds every value between finite ends, whatever these are", () => {
    const values = fc.array(fc.double({ min: -1e12, max: 1e12, noNaN: true }), { maxLength: 20 });
    fc.assert(
      fc.property(values, fc.boolean(), fc.integer({ min: 2, max: 8 }), (some, fromZero, intervals) => {
        const { min, max, ticks, unit } = valueAxis("Power", some, "power", "metric", { fromZero, intervals });
        expect(Number.isFinite(min) && Number.isFinite(max) && max > min).toBe(true);
        for (const value of some.map(unit.fromSi)) {
          expect(value).toBeGreaterThanOrEqual(min - Math.abs(min) * 1e-9 - 1e-270);
          expect(value).toBeLessThanOrEqual(max + Math.abs(max) * 1e-9);
        }
        expect(ticks).toEqual([...ticks].sort((one, other) => one - other));
        expect(ticks.length).toBeLessThan(30);
      }),
    );
  });
});

describe("an axis that ends where it must", () => {
  it("has its ticks inside", () => {
    const { ticks, min, max } = fixedAxis("Time", axisUnit(35, "time"), 24.3, 31.7);
    expect([min, max]).toEqual([24.3, 31.7]);
    expect(ticks).toEqual([26, 28, 30]);
  });

  it("has a length, even where there is nothing", () => {
    const { min, max } = fixedAxis("Time", axisUnit(0, "time"), 0, 0);
    expect(max).toBeGreaterThan(min);
  });
});
