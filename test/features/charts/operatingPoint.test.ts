/** The chart's data against the equations of the motor, written out by hand. */
import fc from "fast-check";
import * as v from "valibot";
import { describe, expect, it } from "vitest";
import { type OperatingPointChart, operatingPointChart } from "../../../extension/features/charts/operatingPoint.js";
import { operatingPointChartSchema } from "../../../extension/protocol/charts/operatingPoint.js";
import { analyseWithCursor } from "../../support/cursorFixture.js";
import { handPoint, liftTorque, MOTOR, SHEET } from "../../support/handNumbers.js";

function hoist(rest = "", stages = "spur(20, 80)", motor = MOTOR): string {
  return `import { battery, breaker, lift, mechanism, motor, spur, wheels } from "loadmark";
const slow = ${motor};
export const hoist = mechanism("hoist", {
  motor: slow, stages: [${stages}], load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }), ${rest}
});
`;
}

function chartOf(source: string, name = "hoist"): OperatingPointChart {
  const chart = operatingPointChart(analyseWithCursor(source).analysis, name);
  if (chart === undefined) throw new Error("There is no chart.");
  return chart;
}

const RAD_PER_RPM = Math.PI / 30;
const NO_LOAD = SHEET.noLoadRpm * RAD_PER_RPM;

describe("operatingPointChart", () => {
  it("plots the straight line of the sheet, and on it the mechanism's own without a battery", () => {
    const { samples, available, sheet } = chartOf(hoist());
    expect(samples.length).toBeGreaterThan(100);
    for (const { torqueNm, ...lines } of samples) {
      const share = torqueNm / SHEET.stallNm;
      const speed = NO_LOAD * (1 - share);
      const current = SHEET.noLoadA + (SHEET.stallA - SHEET.noLoadA) * share;
      for (const line of [lines.available, lines.sheet]) {
        expect(line?.speedRadPerS).toBeCloseTo(speed, 9);
        expect(line?.currentA).toBeCloseTo(current, 9);
        expect(line?.shaftPowerW).toBeCloseTo(torqueNm * speed, 9);
        expect(line?.efficiency).toBeCloseTo((torqueNm * speed) / (SHEET.voltageV * current), 9);
      }
    }
    for (const ends of [available, sheet]) {
      expect(ends.stallTorqueNm).toBeCloseTo(3, 12);
      expect(ends.noLoadSpeedRadPerS).toBeCloseTo(NO_LOAD, 12);
      expect(ends.stallCurrentA).toBeCloseTo(6, 12);
    }
  });

  it("marks the hardest point, peak power and best efficiency, each also a sample", () => {
    const { hardest, peakPower, bestEfficiency, samples } = chartOf(hoist());
    const hand = handPoint(liftTorque(10, 0.05), 4, 0.98);
    expect(hardest.torqueNm).toBeCloseTo(hand.motorNm, 12);
    expect(hardest.speedRadPerS).toBeCloseTo(hand.motorRpm * RAD_PER_RPM, 12);
    expect(hardest.currentA).toBeCloseTo(hand.currentA, 12);
    expect(hardest.stallShare).toBeCloseTo(hand.share, 12);
    expect(hardest).toMatchObject({ where: "all along its travel", limitedBy: "line", stalls: false });
    // Half the stall torque at half the no-load speed; t = √a/(1 + √a) with a = I0/Is.
    expect(peakPower?.torqueNm).toBeCloseTo(1.5, 6);
    expect(peakPower?.shaftPowerW).toBeCloseTo(1.5 * (NO_LOAD / 2), 9);
    const root = Math.sqrt(SHEET.noLoadA / SHEET.stallA);
    expect(bestEfficiency?.torqueNm).toBeCloseTo((3 * root) / (1 + root), 6);
    const torques = samples.map(({ torqueNm }) => torqueNm);
    for (const point of [hardest, peakPower, bestEfficiency]) expect(torques).toContain(point?.torqueNm);
    expect(torques).toEqual(torques.toSorted((one, other) => one - other));
    expect(new Set(torques).size).toBe(torques.length);
  });

  it("bends below the sheet's line by what supply and wiring take", () => {
    const { samples, available, sheet } = chartOf(
      hoist('motorCount: 2, wiring: "50 mohm", supply: battery({ openCircuit: "11.5 V", resistance: "100 mohm" })'),
    );
    const series = 12 / 6 + 0.05 + 2 * 0.1;
    const kt = 3 / 6;
    const ke = (12 - 2 * 0.3) / NO_LOAD;
    expect(available.stallCurrentA).toBeCloseTo(11.5 / series, 9);
    expect(available.stallTorqueNm).toBeCloseTo((kt * 11.5) / series, 9);
    expect(sheet.stallTorqueNm).toBeCloseTo(3, 12);
    for (const { torqueNm, available: line } of samples) {
      if (line === null) {
        expect(torqueNm).toBeGreaterThan(available.stallTorqueNm);
        continue;
      }
      // The DC machine's two equations: V = k_e·ω + I·R, T = k_t·(I − I0·ω/ω0).
      expect(ke * line.speedRadPerS + line.currentA * series).toBeCloseTo(11.5, 9);
      expect(kt * (line.currentA - (0.3 * line.speedRadPerS) / NO_LOAD)).toBeCloseTo(torqueNm, 9);
    }
  });

  it("stops where a current limit stops it", () => {
    const { limits, samples, peakPower } = chartOf(hoist('motorCurrentLimit: "3 A"'));
    const from = ((3 - 0.3) / (6 - 0.3)) * 3;
    // At standstill all of the limit turns into torque: T = k_t·I.
    expect(limits.stopsAtNm).toBeCloseTo((3 / 6) * 3, 12);
    expect(limits.current?.currentA).toBe(3);
    expect(limits.current?.fromNm).toBeCloseTo(from, 12);
    expect(limits.current?.toNm).toBe(limits.stopsAtNm);
    expect(peakPower?.torqueNm).toBeCloseTo(from, 6);
    for (const { torqueNm, available } of samples) {
      expect(available === null).toBe(torqueNm > limits.stopsAtNm);
      if (available !== null) expect(available.currentA).toBeLessThanOrEqual(3 + 1e-12);
    }
    expect(chartOf(hoist('motorCurrentLimit: "30 A"')).limits.current).toBeNull();
  });

  it("names what else gives way", () => {
    const motor = MOTOR.replace('current: "6 A" },', 'current: "6 A" }, rated: { torque: "0.9 N*m" },');
    const protect = 'protect: breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "5 s" } })';
    const { limits } = chartOf(hoist(protect, 'spur(20, 80, { maxTorque: "5 N*m" })', motor));
    const held = ((2 - 0.3) / (6 - 0.3)) * 3;
    expect(limits.pastPeakFromNm).toBeCloseTo(1.5, 12);
    expect(limits.others.map(({ kind }) => kind)).toEqual(["protection", "rated-torque", "stage-torque"]);
    expect(limits.others[0]?.fromTorqueNm).toBeCloseTo(held, 12);
    expect(limits.others[1]?.fromTorqueNm).toBeCloseTo(0.9, 12);
    expect(limits.others[2]?.fromTorqueNm).toBeCloseTo(5 / (4 * 0.98), 12);
  });

  it("says that wheels slip", () => {
    const load = 'load: wheels({ mass: "10 kg", radius: "5 cm", grip: 0.5, distance: "1 m" })';
    const { limits } = chartOf(hoist().replace(/load: lift\([^)]*\)/, load));
    const traction = 0.5 * 10 * 9.80665 * 0.05;
    expect(limits.others).toHaveLength(1);
    expect(limits.others[0]?.fromTorqueNm).toBeCloseTo(traction / (4 * 0.98), 12);
  });

  it("carries the verdict, the findings and what it rests on", () => {
    const chart = chartOf(hoist("", "spur(20, 60)"));
    expect(chart).toMatchObject({ mechanism: "hoist", motorCount: 1, state: "warning", verdict: "Past its peak of power" });
    expect(chart.findings.map(({ rule, level }) => [rule, level])).toEqual([
      ["past-peak", "warning"],
      ["backdrives", "information"],
    ]);
    expect(chart.assumed).toContain("Stage 1 (spur): customary efficiency 0.98.");
  });

  it("is what the protocol carries, down to the last number", () => {
    const chart = chartOf(hoist('motorCurrentLimit: "3 A"'));
    const carried = v.parse(operatingPointChartSchema, chart);
    expect(Object.keys(carried).length).toBeGreaterThan(10);
    expect(chart).toMatchObject(carried);
  });

  it("is absent for a name that nothing has, and where nothing can be computed", () => {
    expect(operatingPointChart(analyseWithCursor(hoist()).analysis, "other")).toBeUndefined();
    expect(operatingPointChart(analyseWithCursor(hoist("", "spur(20, teeth())")).analysis, "hoist")).toBeUndefined();
  });

  it("stays finite for legal values of any size", () => {
    const positive = fc.double({ min: 1e-9, max: 1e9, noNaN: true });
    let charts = 0;
    fc.assert(
      fc.property(positive, positive, positive, positive, fc.option(positive), (stall, rpm, amps, mass, limit) => {
        const motor = MOTOR.replace('"3 N*m"', `"${stall} N*m"`)
          .replace('"120 rpm"', `"${rpm} rpm"`)
          .replace('"6 A"', `"${amps} A"`);
        const source = hoist(limit === null ? "" : `motorCurrentLimit: "${limit} A"`, "spur(20, 80)", motor).replace(
          '"10 kg"',
          `"${mass} kg"`,
        );
        const chart = operatingPointChart(analyseWithCursor(source).analysis, "hoist");
        if (chart !== undefined) charts += 1;
        const isOff = (value: unknown): boolean => typeof value === "number" && !Number.isFinite(value);
        expect(Object.values(flat(chart)).filter(isOff)).toEqual([]);
      }),
      { numRuns: 60, seed: 11 },
    );
    expect(charts).toBeGreaterThan(20);
  });
});

/** Every plain value inside, whatever its depth. */
function flat(value: unknown): unknown[] {
  return typeof value === "object" && value !== null ? Object.values(value).flatMap(flat) : [value];
}
