/** The view of a load cycle as data and words: what is stacked, what is read off, what is written to files. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { drawPower } from "../../webview/views/power/drawings.js";
import { stackOf } from "../../webview/views/power/stack.js";
import { stopsWithin } from "../../webview/views/power/stops.js";
import { powerView } from "../../webview/views/power/view.js";
import { cartSource, powerShown } from "../support/viewFixture.js";

const shown = powerShown(cartSource(), "cart");
const { chart } = shown;
const memory = { cursor: null, span: null, cycle: "first" } as const;
const sheet = powerView.sheet(shown, memory, "metric");

describe("a stack", () => {
  it("adds up what is taken above 0 and what is sent back below, whatever the order", () => {
    const powers = fc.array(fc.array(fc.integer({ min: -50, max: 50 }), { minLength: 5, maxLength: 5 }), {
      minLength: 1,
      maxLength: 6,
    });
    fc.assert(
      fc.property(powers, (given) => {
        const mechanisms = given.map((powerW, index) => ({ name: String(index), powerW, windingC: null }));
        const { bands } = stackOf({ ...chart, timesS: [0, 1, 2, 3, 4], mechanisms });
        for (let index = 0; index < 5; index++) {
          const all = given.map((powerW) => powerW[index] ?? 0);
          const sum = (sign: 1 | -1) => all.filter((power) => power * sign > 0).reduce((total, power) => total + power, 0);
          const edges = bands.flatMap(({ lower, upper }) => [lower[index] ?? 0, upper[index] ?? 0]);
          expect(Math.max(0, ...edges)).toBe(sum(1));
          expect(Math.min(0, ...edges) + 0).toBe(sum(-1) + 0);
          const heights = bands.reduce((total, { lower, upper }) => total + (upper[index] ?? 0) - (lower[index] ?? 0), 0);
          expect(heights).toBe(sum(1) + sum(-1));
        }
      }),
    );
  });

  it("leaves out what never takes anything, but keeps the colours of the others", () => {
    const idle = { name: "idle", powerW: chart.timesS.map(() => 0), windingC: null };
    const { bands } = stackOf({ ...chart, mechanisms: [idle, ...chart.mechanisms] });
    expect(bands.map(({ name, turn }) => [name, turn])).toEqual([
      ["tray hoist", 1],
      ["boom", 2],
    ]);
  });
});

describe("the sheet of a load cycle", () => {
  it("draws what is sent back below 0", () => {
    const { power } = drawPower(chart, null, { fromS: 0, toS: 7 }, "metric");
    const back = Math.min(...chart.mechanisms.flatMap(({ powerW }) => powerW));
    expect(back).toBeLessThan(-10);
    expect(power.left?.min).toBeLessThan(back);
    expect(Math.min(...(power.stack?.bands.flatMap(({ upper }) => upper) ?? []))).toBeCloseTo(back, 9);
  });

  it("has a line for the floor, a mark at the lowest voltage, and the steps", () => {
    const { supply, power } = drawPower(chart, null, { fromS: 0, toS: 7 }, "metric");
    expect(supply.levels).toEqual([{ side: "left", y: 11, words: "must stay above 11 V", hatched: "below" }]);
    expect(supply.dots[0]?.y).toBeCloseTo(Math.min(...chart.voltageV), 9);
    expect(power.uprights.map(({ x, words }) => [x, words])).toEqual([
      [0, "step 1"],
      [4, "step 2"],
    ]);
  });

  it("words protection and windings", () => {
    const { states } = drawPower(chart, null, { fromS: 0, toS: 7 }, "metric");
    expect(states?.rows.map(({ words }) => words)).toEqual([
      expect.stringMatching(/^breaker of tray hoist \(holds 1\.8 A\): stays closed$/),
      expect.stringMatching(/^winding of tray hoist \(limit 60 °C\): at most [\d.]+ °C at [\d.]+ s, [\d.]+ °C in all cycles$/),
      expect.stringMatching(
        /^winding of boom \(limit 60 °C\): above its limit from [\d.]+ s on, [\d.]+ °C at 7 s, [\d.]+ °C in all cycles$/,
      ),
    ]);
    expect(states?.rows[2]?.spans).toHaveLength(1);
  });

  it("reads off everyone at one moment, and says it", () => {
    const stop = sheet.stops.findIndex((timeS) => timeS > 2);
    const { at, names, rows, spoken } = sheet.readAt(stop);
    expect(at).toMatch(/^2\.\d+ s: 1\d\.\d V, 1\.\d+ A, \d+(\.\d)? W$/);
    expect(names).toBe("step 1, tray hoist moves");
    // As stacked, the last mechanism on top.
    expect(rows.map(({ name }) => name)).toEqual(["boom", "tray hoist"]);
    expect(rows[0]?.cells[0]).toBe("0 W");
    expect(spoken).toContain("tray hoist");
    expect(spoken).not.toContain("boom");
  });

  it("stands still at every moment once, at the one of less voltage where there are two", () => {
    const stops = stopsWithin({ ...chart, timesS: [0, 1, 1, 2], voltageV: [12, 12, 9, 12] }, 0, 2);
    expect(stops).toEqual([0, 2, 3]);
    expect(new Set(sheet.stops).size).toBe(sheet.stops.length);
  });

  it("writes every moment to a file, with names and units", () => {
    const { head, rows } = sheet.file();
    expect(head).toEqual([
      "Time (s)",
      "Supply voltage (V)",
      "Supply current (A)",
      "All mechanisms (W)",
      "Power of tray hoist (W)",
      "Power of boom (W)",
      "Winding of tray hoist (degC)",
      "Winding of boom (degC)",
    ]);
    expect(rows).toHaveLength(chart.timesS.length);
    for (const row of rows) {
      const [, volts = 0, amperes = 0, all = 0, hoist = 0, boom = 0] = row.map(Number);
      expect(hoist + boom).toBeCloseTo(all, 6);
      expect(volts * amperes).toBeCloseTo(all, 6);
    }
    const inch = powerView.sheet(shown, memory, "inch").file();
    expect(inch.head.at(-1)).toBe("Winding of boom (degF)");
    expect(Number(inch.rows[0]?.at(-1))).toBeCloseTo(77, 6);
  });

  it("has the report's numbers as facts, beside the saved ones where these differ", () => {
    const other = powerView.sheet(powerShown(cartSource(), "cart", cartSource({ lasts: "6 s" })), memory, "metric");
    const fact = (name: string) => other.facts.find((one) => one.name === name);
    expect(fact("Load cycle")).toEqual({ name: "Load cycle", now: "7 s", was: "9 s" });
    expect(fact("Lowest voltage")?.now).toBe(`${Number(chart.numbers.lowestVoltageV.toPrecision(3))} V`);
    expect(fact("Cycles done")).toEqual({ name: "Cycles done", now: "12 of 12", was: null });
  });

  it("shows the span that is remembered, as far as the cycle goes", () => {
    const zoomed = powerView.sheet(shown, { ...memory, span: { fromS: 4, toS: 99 } }, "metric");
    expect(zoomed.zoom).toMatchObject({ from: 4, to: 7, least: 0, greatest: 7 });
    expect(Math.min(...zoomed.stops)).toBeGreaterThanOrEqual(4);
    expect(powerView.sheet(shown, { ...memory, span: { fromS: 50, toS: 99 } }, "metric").zoom).toMatchObject({ from: 0, to: 7 });
  });
});
