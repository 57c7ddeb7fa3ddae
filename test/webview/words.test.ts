/** The page's sentences and facts, read as its reader does; the numbers in them are checked where they are drawn. */
import { describe, expect, it } from "vitest";
import type { Nothing } from "../../extension/protocol/chartMessages.js";
import { factsBeside } from "../../webview/frame/sheet.js";
import { CAUTIONS } from "../../webview/page/cautions.js";
import { emptySentences } from "../../webview/page/emptyText.js";
import { describeMotion, describePower } from "../../webview/views/operatingPoint/describe.js";
import { drawChart } from "../../webview/views/operatingPoint/drawing.js";
import { writtenFacts } from "../../webview/views/operatingPoint/facts.js";
import { readoutOf } from "../../webview/views/operatingPoint/readout.js";
import { stopsOf } from "../../webview/views/operatingPoint/stops.js";
import { unitsOf } from "../../webview/views/operatingPoint/units.js";
import { chartIn, hoistSource } from "../support/chartFixture.js";

const nothing = (reason: Nothing["reason"]): Nothing => ({
  kind: "nothing",
  view: "operating-point",
  reason,
  says: [],
  example: null,
});
const chart = chartIn(hoistSource(), "tray hoist");
const drawing = drawChart({ chart, saved: null });
const units = unitsOf(drawing);

describe("the page's words", () => {
  it("describe the plots and every limit", () => {
    expect(describeMotion(chart, drawing)).toMatchInlineSnapshot(
      `"Speed and current over torque, one motor. Available line: 325 rpm at no load, standstill at 1.32 N·m and 4.46 A. Sheet's line: 310 rpm at no load, standstill at 1.3 N·m and 4.4 A. Needed: 0.525 N·m, at 195 rpm and 2 A. From 0.658 N·m: past the peak of power. From 1.32 N·m: beyond stall."`,
    );
    expect(describePower(chart, units)).toMatchInlineSnapshot(
      `"Output power and efficiency over torque, one motor. Peak output power: 11.2 W at 0.658 N·m. Best efficiency: 49 % at 0.297 N·m. Where needed: 10.7 W, 43 %."`,
    );
  });

  it("say of a motor that stalls that it stands still", () => {
    const stalled = chartIn(hoistSource({ mass: "22 kg" }), "tray hoist");
    expect(describeMotion(stalled, drawChart({ chart: stalled, saved: null }))).toContain("the motor stands still");
  });

  it("read off a stop", () => {
    const needed = stopsOf(chart).find(({ names }) => names.includes("needed"));
    const last = stopsOf(chart).at(-1);
    if (needed === undefined || last === undefined) throw new Error("There are no stops.");
    expect(readoutOf(needed, units).at).toBe("0.525 N·m, 40 % of stall");
    expect(readoutOf(needed, units).spoken).toMatchInlineSnapshot(
      `"needed. Available: speed 195 rpm, current 2 A, output power 10.7 W, efficiency 43 %. Sheet: speed 185 rpm, current 1.98 A, output power 10.2 W, efficiency 43 %."`,
    );
    expect(readoutOf(last, units).spoken).toContain("Beyond the sheet's line.");
  });

  it("tell facts, and what they were where they read differently", () => {
    const changed = chartIn(hoistSource({ driven: 40 }), "tray hoist");
    const facts = factsBeside(writtenFacts(changed, units), writtenFacts(chart, units));
    // 54 teeth instead of 40 ask for 40/54 of the torque.
    expect(facts.find(({ name }) => name === "Torque needed")).toEqual({
      name: "Torque needed",
      now: "0.708 N·m",
      was: "0.525 N·m",
    });
    expect(facts.find(({ name }) => name === "Torque at stall")?.was).toBeNull();
    expect(factsBeside(writtenFacts(chart, units), writtenFacts(chart, units)).every(({ was }) => was === null)).toBe(true);
  });

  it("say what to do where there is nothing to show", () => {
    expect(emptySentences(nothing("nothing-declared"))[0]).toContain("mechanism(…)");
    expect(emptySentences(nothing("nothing-computed"))[0]).toContain("Problems");
  });

  it("hold the cautions", () => {
    for (const part of ["not a safety assessment", "fall when power is lost", "fuse or breaker", "powered gears", "lithium"]) {
      expect(CAUTIONS).toContain(part);
    }
  });
});
