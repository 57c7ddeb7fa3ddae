/** What the view of the ratio map draws and offers, as plain data. */
import { describe, expect, it } from "vitest";
import { logAxis } from "../../webview/plots/series/axes.js";
import { EMPTY_DRAWING } from "../../webview/plots/series/drawing.js";
import { frameOf } from "../../webview/plots/series/frame.js";
import { drawRatioMap } from "../../webview/views/ratioMap/drawings.js";
import { ratioMapSheet } from "../../webview/views/ratioMap/view.js";
import { hoistSource } from "../support/chartFixture.js";
import { ratioMapShown } from "../support/ratioFixture.js";

describe("an axis of even factors", () => {
  it.each([
    [0.55, 5.8],
    [1, 1000],
    [3.65, 43.4],
    [2, 2.6],
  ])("has round ticks within %d and %d", (min, max) => {
    const { ticks } = logAxis("Ratio", min, max);
    expect(ticks.length).toBeGreaterThanOrEqual(2);
    for (const [index, tick] of ticks.entries()) {
      expect(tick).toBeGreaterThanOrEqual(min);
      expect(tick).toBeLessThanOrEqual(max);
      if (index > 0) expect(tick).toBeGreaterThan(ticks[index - 1] ?? Number.NaN);
    }
  });

  it("puts equal factors equally far apart, and reads them back", () => {
    const frame = frameOf({ ...EMPTY_DRAWING, across: logAxis("Ratio", 1, 100) }, 500, 200, { left: 50, right: 50 });
    expect(frame.x(10) - frame.x(1)).toBeCloseTo(frame.x(100) - frame.x(10), 9);
    expect(frame.valueAt(frame.x(7))).toBeCloseTo(7, 9);
  });
});

describe("the drawing of a ratio map", () => {
  const shown = ratioMapShown(hoistSource({ driven: 30, more: ' within: "9 s",' }), "tray hoist");
  const drawings = drawRatioMap(shown.chart, null, "metric");

  it("begins with the strip and the ticks of stock", () => {
    const { rows } = drawings.strip;
    expect(rows[0]).toMatchObject({ words: "Keeps every rule", plain: true, spans: shown.chart.kept });
    expect(rows[1]?.words).toBe("In stock, with one gear changed");
    expect(rows[1]?.spans).toHaveLength(shown.chart.stock.filter(({ gears }) => gears === 1).length);
    expect(rows.slice(2).map(({ words }) => words)).toContain("Past its peak of power");
    expect(rows.slice(2).every(({ plain }) => plain === undefined)).toBe(true);
  });

  it("marks the ratio that is, the fastest and the most efficient", () => {
    const words = drawings.time.uprights.map((one) => one.words);
    expect(words).toEqual(["now", "fastest", "best efficiency"]);
    expect(drawings.time.uprights[0]?.x).toBe(shown.chart.now.ratio);
  });

  it("makes one of marks that lie on each other", () => {
    const { chart } = shown;
    const same = drawRatioMap({ ...chart, fastest: chart.now, bestEfficiency: null }, null, "metric");
    expect(same.time.uprights.map((one) => one.words)).toEqual(["now, fastest"]);
  });

  it("breaks the line of times where nothing arrives, and keeps slow travels from flattening it", () => {
    const times = shown.chart.samples.flatMap(({ timeS }) => (timeS === null ? [] : [timeS]));
    expect(drawings.time.lines.flatMap(({ xs }) => [...xs])).toHaveLength(times.length);
    expect(Math.max(...times)).toBeGreaterThan(4 * Math.min(...times));
    expect(drawings.time.left?.max).toBeLessThan(8 * Math.min(...times));
  });

  it("offers to write the fastest, the most efficient, and what is nearest to the cursor", () => {
    const sheet = ratioMapSheet(shown, "metric");
    const { toWrite, mechanism, samples } = shown.chart;
    const [first, second, ...none] = sheet.actionsAt?.(null) ?? [];
    expect(none).toEqual([]);
    expect(first?.words).toMatch(/^Write the fastest: stage 1 with \d+ and \d+ teeth, ratio [\d.]+, travel [\d.]+ s$/);
    const write = { mechanism, ratio: toWrite.fastest?.ratio };
    expect(first?.message).toEqual({ type: "writeToCode", want: { view: "ratio-map", write } });
    expect(second?.words).toMatch(/^Write the most efficient: /);
    const stop = samples.findIndex(({ ratio }) => ratio > 2.2);
    expect(sheet.actionsAt?.(stop).at(-1)?.words).toMatch(/^Write what is nearest to the cursor: stage 1 with \d+ and \d+ teeth/);
    // One that stalls may be written, but not unsaid.
    expect(sheet.actionsAt?.(1).at(-1)?.words).toMatch(/\(breaks a rule\)$/);
  });

  it("reads off what a ratio leads to and which rules it breaks", () => {
    const sheet = ratioMapSheet(shown, "metric");
    const now = shown.chart.samples.findIndex(({ ratio }) => ratio === shown.chart.now.ratio);
    expect(sheet.readAt(now)).toMatchObject({ at: "ratio 1.88", names: "now; breaks: Past its peak of power" });
    expect(sheet.table().head).toEqual([
      "Ratio",
      "Travel (s)",
      "Output speed (rpm)",
      "Current (A)",
      "Share of stall (%)",
      "Efficiency (%)",
      "Breaks",
      "Point",
    ]);
    expect(sheet.file().rows).toHaveLength(shown.chart.samples.length);
  });
});
