/** What the view of what matters shows, as plain data. */
import { describe, expect, it } from "vitest";
import { NO_MATTERS_MEMORY } from "../../extension/protocol/charts/matters.js";
import { barsOf, MOST_BARS, outputsIn, writeEffect } from "../../webview/views/matters/ranks.js";
import { drawSpread, spreadWords } from "../../webview/views/matters/spreadPlot.js";
import { mattersSheet } from "../../webview/views/matters/view.js";
import { hoistSource } from "../support/chartFixture.js";
import { mattersShown } from "../support/mattersFixture.js";

const shown = mattersShown(hoistSource(), "tray hoist");

describe("the ranks", () => {
  it("are those of the result that is asked about", () => {
    for (const output of outputsIn(shown.chart)) {
      const bars = barsOf(shown.chart, null, output);
      const sizes = bars.map(({ effect }) => Math.abs(effect));
      expect(sizes).toEqual([...sizes].sort((one, other) => other - one));
      expect(bars).toHaveLength(shown.chart.inputs.filter((one) => one[output] !== null).length);
    }
  });

  it("stand beside those of the saved result", () => {
    const saved = { ...shown.chart, inputs: shown.chart.inputs.map((one) => ({ ...one, share: 0.5 })) };
    expect(barsOf(shown.chart, saved, "share").every(({ was }) => was === 0.5)).toBe(true);
    expect(barsOf(shown.chart, null, "share").every(({ was }) => was === null)).toBe(true);
  });

  it("are written with their sign", () => {
    expect([1.016, -1, 0.0821, -0.00046].map(writeEffect)).toEqual(["+1.02", "−1.00", "+0.082", "−0.00046"]);
  });
});

describe("the sheet", () => {
  it("shows one result at a time, and takes another where the one that is remembered has none", () => {
    const sheet = mattersSheet(shown, { ...NO_MATTERS_MEMORY, output: "time" }, "metric");
    expect(sheet.choices[0]).toMatchObject({ key: "output", chosen: "time" });
    expect(sheet.stops.length).toBeLessThanOrEqual(MOST_BARS);
    expect(sheet.plots[0]?.words).toMatch(/^Per cent of travel time for one per cent more of each: \w/);
    const still = { ...shown.chart, inputs: shown.chart.inputs.map((one) => ({ ...one, time: null })) };
    const other = mattersSheet({ ...shown, chart: still }, { ...NO_MATTERS_MEMORY, output: "time" }, "metric");
    expect(other.choices[0]?.chosen).toBe("current");
    expect(other.choices[0]?.options.map(({ value }) => value)).toEqual(["current", "share"]);
  });

  it("reads off all results of an input, and lists every input in the table", () => {
    const sheet = mattersSheet(shown, { ...NO_MATTERS_MEMORY, output: "share" }, "metric");
    const [first] = barsOf(shown.chart, null, "share");
    const read = sheet.readAt(0);
    expect(read.names).toBe(first?.words);
    expect(read.rows[0]?.cells[2]).toBe(`${writeEffect(first?.effect ?? 0)} %`);
    expect(sheet.table().rows).toHaveLength(shown.chart.inputs.length);
    expect(sheet.file().head).toEqual(["Declared", "Current (%)", "Travel time (%)", "Share of stall (%)"]);
  });

  it("says why there is no spread", () => {
    const { notChecked, plots } = mattersSheet(shown, NO_MATTERS_MEMORY, "metric");
    expect(notChecked.at(-1)).toMatch(/^Spread: nothing is declared as uncertain/);
    expect(plots).toHaveLength(1);
  });
});

describe("the spread", () => {
  const spread = {
    draws: 200,
    seed: 1,
    tolerance: 0.1,
    ranges: 2,
    motorCurrentA: { p5: 1.8, p50: 2, p95: 2.3 },
    timeS: { p5: 4, p50: 5, p95: 7 },
    trippingShare: 0.12,
  };

  it("is drawn around its middle", () => {
    const { rows, across } = drawSpread(spread, "metric");
    expect(rows.map(({ spans }) => spans.map(({ from, to }) => [Math.round(from), Math.round(to)]))).toEqual([
      [[-10, 15]],
      [[-20, 40]],
    ]);
    expect(across.min).toBeLessThan(-20);
    expect(across.max).toBeGreaterThan(40);
  });

  it("is told with the share that would trip, the number of draws and their seed", () => {
    expect(spreadWords(spread, "metric")).toEqual([
      ["Current, nine of ten", "1.8 A to 2.3 A"],
      ["Travel, nine of ten", "4 s to 7 s"],
      ["Protection opens", "in 12 % of the draws"],
      ["Drawn", "200 times over ±10 % of the motor and 2 ranges, seed 1"],
    ]);
    const never = { ...spread, timeS: { p5: 4, p50: null, p95: null }, trippingShare: null };
    expect(spreadWords(never, "metric").map(([name]) => name)).not.toContain("Protection opens");
    expect(spreadWords(never, "metric")[1]?.[1]).toBe("4 s or more, some never arrive");
    expect(drawSpread(never, "metric").rows).toHaveLength(1);
  });
});
