/** The ratio map as the page gets it: prepared step by step, kept by what it rests on, and the edits that write a ratio. */
import { describe, expect, it } from "vitest";
import { withEdits } from "../../../extension/analysis/writeChange.js";
import { createRatioMapFeature } from "../../../extension/features/charts/ratioMap.js";
import { analyseFixture, hoistSource } from "../../support/chartFixture.js";
import { prepare, ratioMapShown } from "../../support/ratioFixture.js";

describe("the ratio map", () => {
  it("is there once it is prepared, and passes the check of its message", () => {
    const feature = createRatioMapFeature();
    const analysis = analyseFixture(hoistSource());
    expect(feature.chartOf(analysis, "tray hoist", { write: null })).toBeUndefined();
    expect(prepare(feature, analysis, "tray hoist")).toBeGreaterThan(64);
    expect(feature.chartOf(analysis, "tray hoist", { write: null })?.now.ratio).toBeCloseTo(54 / 16, 12);
    const { chart } = ratioMapShown(hoistSource(), "tray hoist");
    expect(chart).toMatchObject({ mechanism: "tray hoist", hasTravel: true, anyRatio: false, state: "fine" });
    expect(chart.broken.map(({ words }) => words)).toContain("Past its peak of power");
  });

  it("costs nothing again after an edit elsewhere in the file, and anew after one that matters", () => {
    const feature = createRatioMapFeature();
    prepare(feature, analyseFixture(hoistSource()), "tray hoist");
    const moved = analyseFixture(`// A remark.\n\n${hoistSource()}`);
    expect(prepare(feature, moved, "tray hoist")).toBe(0);
    expect(feature.chartOf(moved, "tray hoist", { write: null })).toBeDefined();
    expect(prepare(feature, analyseFixture(hoistSource({ mass: "6 kg" })), "tray hoist")).toBeGreaterThan(0);
    // A range with another width, in the supply that a robot lends.
    const lent = (high: string) =>
      `${hoistSource().replace("  supply: pack,", "").replace('"12.6 V"', `between("12 V", "${high}")`).replace("battery,", "battery, between, robot,")}
export default robot("cart", { supply: pack, mechanisms: [hoist] });`;
    expect(prepare(feature, analyseFixture(lent("13 V")), "tray hoist")).toBeGreaterThan(0);
    expect(prepare(feature, analyseFixture(lent("13 V")), "tray hoist")).toBe(0);
    expect(prepare(feature, analyseFixture(lent("14 V")), "tray hoist")).toBeGreaterThan(0);
    // What is allowed counts no more.
    const allowed = hoistSource({ driven: 30 }).replace(
      "export const hoist",
      "// loadmark-allow past-peak: short\nexport const hoist",
    );
    expect(prepare(feature, analyseFixture(hoistSource({ driven: 30 })), "tray hoist")).toBeGreaterThan(0);
    expect(prepare(feature, analyseFixture(allowed), "tray hoist")).toBeGreaterThan(0);
  });

  it("writes the nearest pair in stock where the gears are declared", () => {
    const source = hoistSource()
      .replace("spur(16, 54)", "spur(16, WHEEL)")
      .replace("export const pack", "export const WHEEL = 54;\nexport const pack");
    const feature = createRatioMapFeature();
    const analysis = analyseFixture(source);
    const edits = feature.editsFor?.(analysis, "tray hoist", { write: { mechanism: "tray hoist", ratio: 3.02 } });
    // 48 : 16 is 3; no other pair of the usual counts with one gear changed is nearer to 3.02.
    const text = withEdits(analysis.snapshot, edits ?? []).read("/robot/robot.ts") ?? "";
    expect(text).toContain("export const WHEEL = 48;");
    expect(analyseFixture(text).mechanisms[0]?.declared?.ratio).toBe(3);
    expect(feature.editsFor?.(analysis, "tray hoist", { write: null })).toBeUndefined();
    expect(feature.editsFor?.(analysis, "nobody", { write: { mechanism: "nobody", ratio: 3 } })).toBeUndefined();
  });

  it("writes a plain reduction in three digits", () => {
    const source = hoistSource().replace("spur(16, 54)", "reduction(3.4)").replace("spur }", "reduction }");
    const analysis = analyseFixture(source);
    const edits = createRatioMapFeature().editsFor?.(analysis, "tray hoist", {
      write: { mechanism: "tray hoist", ratio: 3.4567 },
    });
    expect(edits?.map(({ newText }) => newText)).toEqual(["3.46"]);
  });
});
