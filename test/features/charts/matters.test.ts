/** What matters as the page gets it: the analysis's own effects and spread, worked out once. */
import { describe, expect, it } from "vitest";
import { sensitivitiesOf } from "../../../extension/analysis/sensitivity.js";
import { spreadOf } from "../../../extension/analysis/spread.js";
import { createMattersFeature } from "../../../extension/features/charts/matters.js";
import { analyseFixture, hoistSource } from "../../support/chartFixture.js";
import { mattersShown, prepareMatters } from "../../support/mattersFixture.js";

const uncertain = hoistSource({
  more: ' protect: breaker({ holdCurrent: "1.6 A", trips: { at: "3 A", after: "4 s" } }),',
}).replace('current: "4.4 A" },', 'current: "4.4 A" }, tolerance: 0.2,');

describe("what matters", () => {
  it("is what the analysis says of each declared number, in words, the greatest effect first", () => {
    const analysis = analyseFixture(uncertain);
    const [mechanism] = analysis.mechanisms;
    if (mechanism === undefined) throw new Error("no mechanism");
    const { chart } = mattersShown(uncertain, "tray hoist");
    const all = sensitivitiesOf(analysis, mechanism);
    const mass = all.find(({ input, output }) => input === "load.mass" && output === "share");
    expect(chart.inputs.find(({ words }) => words === "mass")?.share).toBeCloseTo(mass?.perCentPerPerCent ?? Number.NaN, 12);
    expect(chart.inputs.map(({ words }) => words)).toContain("stage 1 driven");
    const effects = chart.inputs.flatMap(({ current, time, share }) => [current, time, share].filter((one) => one !== null));
    expect(effects).toHaveLength(all.length);
    const sizes = chart.inputs.map(({ current, time, share }) =>
      Number(Math.max(...[current, time, share].map((one) => Math.abs(one ?? 0))).toPrecision(9)),
    );
    expect(sizes).toEqual([...sizes].sort((one, other) => other - one));
    expect(chart.spread).toEqual(spreadOf(analysis, mechanism));
    expect(chart.spread).toMatchObject({ tolerance: 0.2, ranges: 0, seed: 1 });
  });

  it("has no spread where nothing is uncertain", () => {
    expect(mattersShown(hoistSource(), "tray hoist").chart.spread).toBeNull();
  });

  it("is worked out once, and anew after an edit that matters", () => {
    const feature = createMattersFeature();
    expect(feature.chartOf(analyseFixture(uncertain), "tray hoist", undefined)).toBeUndefined();
    // A step for each of the 200 draws: a host can stop between any two.
    expect(prepareMatters(feature, analyseFixture(uncertain), "tray hoist")).toBeGreaterThan(200);
    expect(prepareMatters(feature, analyseFixture(`// A remark.\n${uncertain}`), "tray hoist")).toBe(0);
    const wider = uncertain.replace("tolerance: 0.2", "tolerance: 0.1");
    expect(prepareMatters(feature, analyseFixture(wider), "tray hoist")).toBeGreaterThan(0);
  });
});
