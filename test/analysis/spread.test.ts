/** The spread over tolerance and ranges, against the distributions that follow by hand. */
import { describe, expect, it } from "vitest";
import type { AnalysedMechanism } from "../../extension/analysis/analysis.js";
import { createRandom, spreadPoints } from "../../extension/analysis/random.js";
import { type Spread, spreadOf } from "../../extension/analysis/spread.js";
import { solveTravel } from "../../extension/model/travel.js";
import { makeReport } from "../../extension/report/report.js";
import { tellSpread } from "../../extension/report/spreadWords.js";
import { writeText } from "../../extension/report/text.js";
import { analyseFixture, PRELUDE } from "../support/checkFindings.js";

function mechanismIn(text: string) {
  const analysis = analyseFixture(text);
  const mechanism = analysis.mechanisms[0];
  if (mechanism?.drive === undefined) throw new Error("no mechanism with numbers");
  return { analysis, mechanism, drive: mechanism.drive };
}

function spreadIn(text: string): Spread | undefined {
  const { analysis, mechanism } = mechanismIn(text);
  return spreadOf(analysis, mechanism);
}

/** `fields` beside the motor and stages; `tolerance` as written. */
const hoist = (fields: string, tolerance?: string) => `${PRELUDE}
const spread = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" },${tolerance === undefined ? "" : ` tolerance: ${tolerance}`} });
export const hoist = mechanism("hoist", { motor: spread, stages: [spur(20, 40, { efficiency: 0.9 })], ${fields} });`;
const LIFT = 'load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "1 m" })';

/** Quantile of a sum of two independent uniform values within ±a and ±b: its distribution function is a parabola at the ends. */
function quantileOfSum(a: number, b: number, share: number): number {
  const [wide, narrow] = [Math.max(a, b), Math.min(a, b)];
  const tail = (below: number): number => Math.sqrt(8 * below * wide * narrow) - wide - narrow;
  const corner = narrow / (2 * wide);
  if (share < corner) return tail(share);
  return share > 1 - corner ? -tail(1 - share) : (share - 0.5) * 2 * wide;
}

describe("the spread of a mechanism", () => {
  it("is left out where nothing is uncertain", () => {
    expect(spreadIn(hoist(LIFT))).toBeUndefined();
    expect(spreadIn(hoist(LIFT, "0"))).toBeUndefined();
  });

  it("is the same in every run, and says how many draws and which seed", () => {
    const spread = spreadIn(hoist(LIFT, "0.08"));
    expect(spread).toEqual(spreadIn(hoist(LIFT, "0.08")));
    expect(spread).toMatchObject({ draws: 200, seed: 1, tolerance: 0.08, ranges: 0, trippingShare: null });
  });

  it("of a stalled motor's current is V over a uniform resistance", () => {
    const spread = spreadIn(hoist('load: lift({ mass: "50 kg", drumRadius: "20 mm", travel: "1 m" })', "0.1"));
    // R = 3 ohm within ±10 %: 90 % of the draws lie within ±9 %. A slice of 200 is 0.1 % of R wide.
    expect(spread?.motorCurrentA.p5).toBeCloseTo(4 / 1.09, 2);
    expect(spread?.motorCurrentA.p50).toBeCloseTo(4, 2);
    expect(spread?.motorCurrentA.p95).toBeCloseTo(4 / 0.91, 2);
    expect(spread?.timeS).toEqual({ p5: null, p50: null, p95: null });
  });

  it("of the travel's time is that of linear propagation where the tolerance is small", () => {
    const text = hoist(LIFT, "0.004");
    const { drive } = mechanismIn(text);
    const timeWith = (resistance: number, constants: number): number =>
      solveTravel({
        ...drive,
        motor: {
          ...drive.motor,
          resistanceOhm: drive.motor.resistanceOhm * (1 + resistance),
          backEmfVPerRadPerS: drive.motor.backEmfVPerRadPerS * (1 + constants),
          torqueConstantNmPerA: drive.motor.torqueConstantNmPerA * (1 + constants),
        },
      })?.timeS ?? Number.NaN;
    const [byResistance, byConstants] = [timeWith(0.004, 0) - timeWith(-0.004, 0), timeWith(0, 0.004) - timeWith(0, -0.004)];
    const middle = timeWith(0, 0);
    const half = (share: number): number => quantileOfSum(Math.abs(byResistance) / 2, Math.abs(byConstants) / 2, share);
    const spread = spreadIn(text);
    // 200 draws place a quantile within some hundredths of the whole width.
    const width = half(0.95) - half(0.05);
    expect(width).toBeGreaterThan(0.002 * middle);
    expect(Math.abs((spread?.timeS?.p5 ?? 0) - middle - half(0.05))).toBeLessThan(0.05 * width);
    expect(Math.abs((spread?.timeS?.p50 ?? 0) - middle)).toBeLessThan(0.05 * width);
    expect(Math.abs((spread?.timeS?.p95 ?? 0) - middle - half(0.95))).toBeLessThan(0.05 * width);
  });

  it("is uniform within a range, in whichever units its ends are written", () => {
    const spread = spreadIn(hoist('load: lift({ mass: between("4 kg", "6000 g"), drumRadius: "20 mm", travel: "1 m" })'));
    expect(spread).toMatchObject({ draws: 200, tolerance: 0, ranges: 1 });
    // I = T/k_t + I_0·ω/ω_0 on a straight line: 0.2 A + 3.8 A · T/2 N·m at the sheet's voltage.
    const current = (kilograms: number): number => 0.2 + (3.8 * ((kilograms * 9.80665 * 0.02) / (2 * 0.9))) / 2;
    expect(spread?.motorCurrentA.p5).toBeCloseTo(current(4.1), 3);
    expect(spread?.motorCurrentA.p50).toBeCloseTo(current(5), 3);
    expect(spread?.motorCurrentA.p95).toBeCloseTo(current(5.9), 3);
  });

  it("reaches a range in the supply that the robot lends", () => {
    const text = `${hoist('load: lift({ mass: "50 kg", drumRadius: "20 mm", travel: "1 m" })').replace("battery,", "battery, robot,")}
robot("one", { supply: battery({ openCircuit: between("10 V", "14 V"), resistance: "1 ohm" }), mechanisms: [hoist] });`;
    // Stalled: V/(3 ohm + 1 ohm).
    const spread = spreadIn(text);
    expect(spread?.motorCurrentA.p5).toBeCloseTo(10.2 / 4, 2);
    expect(spread?.motorCurrentA.p95).toBeCloseTo(13.8 / 4, 2);
  });

  it("counts the draws in which protection opens", () => {
    // Held, I = m·g·r/N/k_t = 1.275 A at k_t = 0.5 N·m/A; it opens above 1.05 times 1.2 A: where k_t is below 1.275/1.26 of its own, which is
    // (1 + 0.0118/0.1)/2 of a tolerance of ±10 %.
    const held = (5.2 * 9.80665 * 0.025) / 2 / 0.5;
    const hold = 'holdFor: "10000 s", protect: breaker({ holdCurrent: "1.2 A", trips: { at: "2.4 A", after: "10 s" } })';
    const spread = spreadIn(hoist(`load: lift({ mass: "5.2 kg", drumRadius: "25 mm", travel: "10 mm" }), ${hold}`, "0.1"));
    const expected = (held / (1.05 * 1.2) - 1 + 0.1) / 0.2;
    expect(expected).toBeGreaterThan(0.4);
    expect(expected).toBeLessThan(0.7);
    expect(Math.abs((spread?.trippingShare ?? 0) - expected)).toBeLessThan(0.011);
  });

  it("has no time where nothing travels", () => {
    expect(spreadIn(hoist('load: roller({ torque: "1 N*m" })', "0.1"))?.timeS).toBeNull();
  });
});

describe("the spread in words", () => {
  const spread: Spread = {
    draws: 200,
    seed: 1,
    tolerance: 0.1,
    ranges: 2,
    motorCurrentA: { p5: 3.1, p50: 3.2, p95: 3.4 },
    timeS: { p5: 1.2, p50: 1.3, p95: 1.5 },
    trippingShare: 0.12,
  };

  it("names times, currents, trips, and what was drawn from", () => {
    expect(tellSpread(spread)).toBe(
      "nine of ten take 1.2 s to 1.5 s and draw 3.1 A to 3.4 A, 12 % trip (200 draws over ±10 % of the motor and 2 ranges)",
    );
    expect(tellSpread({ ...spread, timeS: null, trippingShare: 0, tolerance: 0, ranges: 1 })).toBe(
      "nine of ten draw 3.1 A to 3.4 A, none trip (200 draws over 1 range)",
    );
  });

  it("says where some or most never arrive", () => {
    const told = (p5: number | null, p95: number | null) =>
      tellSpread({ ...spread, timeS: { p5, p50: p5, p95 }, trippingShare: null, ranges: 0 });
    expect(told(1.2, null)).toBe(
      "nine of ten take 1.2 s or more, if they arrive at all, and draw 3.1 A to 3.4 A (200 draws over ±10 % of the motor)",
    );
    expect(told(null, null)).toBe("nine of ten never arrive and draw 3.1 A to 3.4 A (200 draws over ±10 % of the motor)");
  });

  it("stands in both reports, and only where something is uncertain", () => {
    const { analysis } = mechanismIn(hoist(LIFT, "0.1"));
    const extras = { sensitivityOf: () => [], spreadOf: (one: AnalysedMechanism) => spreadOf(analysis, one), proposals: [] };
    const [reported] = makeReport(analysis, (file) => file, extras).mechanisms;
    expect(reported?.spread).toMatchObject({ draws: 200, seed: 1, tolerance: 0.1, ranges: 0, trippingShare: null });
    const median = reported?.spread?.timeS?.p50 ?? 0;
    expect(Math.abs(median / (reported?.travel?.timeS ?? 1) - 1)).toBeLessThan(0.01);
    expect(writeText(analysis, (file) => file, extras)).toMatch(
      /\n {2}spread {7}nine of ten take .* \(200 draws over ±10 % of the motor\)\n/,
    );
    const certain = mechanismIn(hoist(LIFT)).analysis;
    const plain = { ...extras, spreadOf: (one: AnalysedMechanism) => spreadOf(certain, one) };
    expect(Object.keys(makeReport(certain, (file) => file, plain).mechanisms[0] ?? {})).not.toContain("spread");
    expect(writeText(certain, (file) => file, plain)).not.toContain("spread");
  });
});

describe("points spread evenly", () => {
  it("have one coordinate in each slice, and none follows another", () => {
    const points = spreadPoints(100, 3, createRandom(7));
    for (let axis = 0; axis < 3; axis++) {
      const slices = points.map((point) => Math.floor((point[axis] ?? 0) * 100)).sort((a, b) => a - b);
      expect(slices).toEqual(Array.from({ length: 100 }, (_, slice) => slice));
    }
    const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
    const [first, second] = [0, 1].map((axis) => points.map((point) => (point[axis] ?? 0) - 0.5)) as [number[], number[]];
    const correlation = mean(first.map((value, i) => value * (second[i] ?? 0))) / mean(first.map((value) => value * value));
    expect(Math.abs(correlation)).toBeLessThan(0.25);
  });

  it("come from the published generator", () => {
    // Park and Miller's check for the multiplier 48 271: from 1, the 10 000th number is 399 268 537.
    const next = createRandom(0);
    let last = 0;
    for (let drawn = 8; drawn < 10_000; drawn++) last = next();
    expect(Math.round(last * (2 ** 31 - 1))).toBe(399_268_537);
  });
});
