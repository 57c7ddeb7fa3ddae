import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { alignedScales, ticksWithin } from "../../webview/plots/ticks.js";

const anySize = fc.oneof(
  fc.constantFrom(0, 1e-9, 1e9, Number.MIN_VALUE, 1e-300, 1e300, Number.MAX_VALUE / 20),
  fc.double({ min: 0, max: 1e12, noNaN: true }),
  fc.tuple(fc.double({ min: 1, max: 10, noNaN: true }), fc.integer({ min: -30, max: 30 })).map(([a, b]) => a * 10 ** b),
);

function checkRising(ticks: readonly number[], max: number): void {
  expect(ticks[0]).toBe(0);
  for (const [index, tick] of ticks.entries()) {
    expect(Number.isFinite(tick)).toBe(true);
    if (index > 0) expect(tick).toBeGreaterThan(ticks[index - 1] ?? Number.NaN);
  }
  expect(ticks.at(-1)).toBeLessThanOrEqual(max * (1 + 1e-9));
}

describe("aligned scales", () => {
  it("have as many intervals each, and hold their values, whatever their size", () => {
    fc.assert(
      fc.property(anySize, anySize, (one, other) => {
        const scales = alignedScales([one, other]);
        expect(new Set(scales.map(({ ticks }) => ticks.length)).size).toBe(1);
        for (const [index, { max, ticks }] of scales.entries()) {
          checkRising(ticks, max);
          expect(max).toBeGreaterThan(0);
          expect(max).toBeGreaterThanOrEqual(([one, other][index] ?? Number.NaN) * (1 - 1e-9));
        }
      }),
    );
  });

  it("keep little empty room: at most twice the value, as the steps of a decade are that far apart at most", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e6, noNaN: true }), (value) => {
        expect(alignedScales([value])[0]?.max).toBeLessThanOrEqual(2 * value * (1 + 1e-9));
      }),
    );
  });

  it("read well: 325 and 4.5 share four intervals, up to 400 and 6", () => {
    expect(alignedScales([325, 4.5])).toEqual([
      { max: 400, ticks: [0, 100, 200, 300, 400] },
      { max: 6, ticks: [0, 1.5, 3, 4.5, 6] },
    ]);
  });

  it("count per cent in round steps", () => {
    for (const power of [1, 9.7, 11.2, 13.9, 16, 99]) expect(alignedScales([power, 100])[1]?.max).toBe(100);
  });
});

describe("ticks within an axis", () => {
  it("rise and stay inside, whatever its size", () => {
    fc.assert(
      fc.property(anySize, (max) => {
        checkRising(ticksWithin(max), max === 0 ? 1 : max);
      }),
    );
  });

  it("are three to seven on usual axes", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (max) => {
        const { length } = ticksWithin(max);
        expect(length).toBeGreaterThanOrEqual(3);
        expect(length).toBeLessThanOrEqual(7);
      }),
    );
  });
});
