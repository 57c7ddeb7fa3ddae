/** The least value of functions whose least value is known in closed form. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { searchLeast } from "../../extension/model/leastValue.js";

interface Found {
  readonly x: number;
  readonly calls: number;
}

function least(valueAt: (x: number) => number, low: number, high: number, tolerance = 1e-3, most = 200): Found {
  let best = { x: Number.NaN, value: Number.POSITIVE_INFINITY };
  let calls = 0;
  searchLeast(
    (x) => {
      expect(x).toBeGreaterThanOrEqual(low);
      expect(x).toBeLessThanOrEqual(high);
      calls += 1;
      const value = valueAt(x);
      if (value < best.value) best = { x, value };
      return value;
    },
    low,
    high,
    { tolerance, most },
  );
  return { x: best.x, calls };
}

describe("the search for a least value", () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    ["a parabola", (x) => (x - 0.7) ** 2, -3, 5, 0.7],
    ["x + 1/x", (x) => x + 1 / x, 0.1, 20, 1],
    ["a kink", (x) => Math.abs(x - 2), -1, 9, 2],
    ["a slope, whose least value is at its end", (x) => x, 3, 8, 3],
    ["x·ln x, least at 1/e", (x) => x * Math.log(x), 0.01, 4, Math.exp(-1)],
    [
      "one that is infinite on the left of 1, else least at the root of 2x³ − 3x² − 1",
      (x) => (x < 1 ? Number.POSITIVE_INFINITY : (x - 1.5) ** 2 + 1 / x),
      0,
      12,
      1.67765,
    ],
  ])("finds that of %s", (_, valueAt, low, high, expected) => {
    expect(Math.abs(least(valueAt, low, high, 1e-4).x - expected)).toBeLessThan(4e-4);
  });

  it("finds that of any smooth valley, in far fewer calls than golden section takes", () => {
    fc.assert(
      fc.property(fc.double({ min: -4, max: 4, noNaN: true }), fc.double({ min: 0.05, max: 5, noNaN: true }), (at, steep) => {
        const { x, calls } = least((z) => Math.cosh(steep * (z - at)), -5, 5);
        expect(Math.abs(x - at)).toBeLessThan(3e-3);
        // Golden section needs ln(10/1e-3)/ln(1.618) = 19 for the same.
        expect(calls).toBeLessThan(19);
      }),
      { numRuns: 300, seed: 5 },
    );
  });

  it("ends after as many calls as it may make, whatever the values are", () => {
    expect(least(() => Number.POSITIVE_INFINITY, 0, 1, 1e-9, 12).calls).toBeLessThanOrEqual(12);
    expect(least(() => 1, 0, 1, 1e-9, 12).calls).toBeLessThanOrEqual(12);
  });
});
