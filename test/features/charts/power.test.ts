/** A robot's load cycle as it is plotted: against hand-solved circuits and its own balance. */
import { describe, expect, it } from "vitest";
import type { Wish } from "../../../extension/features/charts/feature.js";
import { createPowerFeature, type PowerWant } from "../../../extension/features/charts/power.js";
import { type PowerChart, powerChartSchema } from "../../../extension/protocol/charts/power.js";
import { readMessage } from "../../../extension/protocol/readMessage.js";
import { analyseFixture } from "../../support/chartFixture.js";

/** Two hoists too heavy to move: they stand stalled, which a hand can solve. */
const STALLED = `import { battery, breaker, lift, mechanism, motor, robot } from "loadmark";
const slow = motor({ voltage: "12 V", noLoad: { speed: "120 rpm", current: "0.3 A" }, stall: { torque: "3 N*m", current: "6 A" } });
export const pack = battery({ openCircuit: "12 V", resistance: "0.5 ohm", mustStayAbove: "9 V" });
const load = lift({ mass: "500 kg", drumRadius: "50 mm", travel: "0.8 m" });
export const left = mechanism("left", { motor: slow, stages: [], load, supply: pack, protect: breaker({ holdCurrent: "2 A", trips: { at: "6 A", after: "1.5 s" } }) });
export const right = mechanism("right", { motor: slow, stages: [], load, supply: pack });
export default robot("cart", {
  supply: pack,
  mechanisms: [left, right],
  loadCycle: [{ lasts: "2 s", moving: [left] }, { lasts: "3 s", moving: [left, right] }, { lasts: "1 s" }],
  cycles: 2,
});
`;

const ALL: PowerWant = { span: null, cycle: "first" };
const wish: Wish = { mechanisms: [], robots: [], file: undefined, shownMechanism: null, shownRobot: null };

function chartOf(source: string, want: PowerWant = ALL, name = "cart"): PowerChart {
  const chart = createPowerFeature().chartOf(analyseFixture(source), name, want);
  const travelled = readMessage(powerChartSchema, JSON.parse(JSON.stringify(chart ?? null)));
  if (travelled === undefined) throw new Error("There is no chart, or it is not what its message says.");
  return travelled;
}

const at = ({ timesS }: PowerChart, timeS: number) => timesS.findLastIndex((one) => one <= timeS);

describe("the chart of a load cycle", () => {
  it("has the currents of a circuit solved by hand", () => {
    const chart = chartOf(STALLED);
    // A stalled motor is 12 V / 6 A = 2 ohm. One behind 0.5 ohm takes 12 / 2.5 A; two take 12 / (0.5 + 1) A together.
    const one = at(chart, 1);
    expect(chart.currentA[one]).toBeCloseTo(12 / 2.5, 6);
    expect(chart.voltageV[one]).toBeCloseTo(12 - 0.5 * (12 / 2.5), 6);
    expect(chart.mechanisms.map(({ powerW }) => powerW[one])).toEqual([expect.closeTo((12 / 2.5) ** 2 * 2, 5), 0]);
    const two = at(chart, 2.5);
    expect(chart.currentA[two]).toBeCloseTo(8, 6);
    expect(chart.voltageV[two]).toBeCloseTo(8, 6);
    for (const { powerW } of chart.mechanisms) expect(powerW[two]).toBeCloseTo(4 * 8, 5);
    const rest = at(chart, 5.5);
    expect(chart.voltageV[rest]).toBeCloseTo(12, 9);
    expect(chart.mechanisms.map(({ powerW }) => powerW[rest])).toEqual([0, 0]);
  });

  it("adds up at every moment, within the floor's hatch or not", () => {
    const chart = chartOf(STALLED);
    for (const [index, voltage] of chart.voltageV.entries()) {
      const sum = chart.mechanisms.reduce((total, { powerW }) => total + (powerW[index] ?? 0), 0);
      expect(sum).toBeCloseTo(voltage * (chart.currentA[index] ?? Number.NaN), 9);
    }
    expect(chart.floor).toEqual({ voltageV: 9, forS: 0 });
    expect(Math.min(...chart.voltageV)).toBeCloseTo(chart.numbers.lowestVoltageV, 9);
    expect(Math.max(...chart.currentA)).toBeCloseTo(chart.numbers.peakCurrentA, 9);
    expect(chart.findings.map(({ rule }) => rule)).toContain("sags");
  });

  it("tells steps by name, and when protection opens in which cycle", () => {
    const chart = chartOf(STALLED);
    expect(chart.steps).toEqual([
      { startS: 0, endS: 2, moving: ["left"], holding: [] },
      { startS: 2, endS: 5, moving: ["left", "right"], holding: [] },
      { startS: 5, endS: 6, moving: [], holding: [] },
    ]);
    // Replica of IEC 60255-149: τ = 1.5 s / ln(36/32); at 4.8 A for 2 s, then 4 A, from θ at 2 s to 1.
    const tau = 1.5 / Math.log(36 / 32);
    const theta = (4.8 / 2) ** 2 * (1 - Math.exp(-2 / tau));
    const opens = 2 + tau * Math.log((4 - theta) / (4 - 1));
    expect(chart.protectors).toHaveLength(1);
    expect(chart.protectors[0]).toMatchObject({ kind: "breaker", feeds: ["left"], shared: false, holdsA: 2 });
    expect(chart.protectors[0]?.open[0]?.fromS).toBeCloseTo(opens, 3);
    expect(chart.protectors[0]?.open[0]?.toS).toBe(6);
    const last = chartOf(STALLED, { span: null, cycle: "last" });
    expect([last.cycle, last.lastCycle, last.cycles]).toEqual([2, 2, 2]);
    // It stays open from the cycle before.
    expect(last.protectors[0]?.open[0]).toEqual({ fromS: 0, toS: 6 });
    expect(last.mechanisms[0]?.powerW.every((power) => power === 0)).toBe(true);
  });

  it("holds a span of the cycle where that is wanted", () => {
    const chart = chartOf(STALLED, { span: { fromS: -5, toS: 3 }, cycle: "first" });
    expect(chart.span).toEqual({ fromS: 0, toS: 3 });
    expect(chartOf(STALLED, { span: { fromS: 4, toS: 4 }, cycle: "first" }).span).toEqual({ fromS: 0, toS: 6 });
  });

  it("samples a part anew where the whole has more than is kept, and finds the same there", () => {
    // Arms that swing to and fro in many short steps: thousands of moments.
    const arm = 'arm({ mass: "0.4 kg", centreOfMass: "0.2 m", from: "-60 deg", to: "60 deg" })';
    const names = Array.from({ length: 6 }, (_, index) => `part${index}`);
    const busy = `import { arm, battery, mechanism, motor, robot } from "loadmark";
const slow = motor({ voltage: "12 V", noLoad: { speed: "120 rpm", current: "0.3 A" }, stall: { torque: "3 N*m", current: "6 A" } });
const pack = battery({ openCircuit: "12 V", resistance: "0.2 ohm" });
${names.map((name) => `const ${name} = mechanism("${name}", { motor: slow, stages: [], load: ${arm}, supply: pack });`).join("\n")}
export default robot("cart", { supply: pack, mechanisms: [${names.join(", ")}], loadCycle: [
${Array.from({ length: 60 }, (_, step) => `{ lasts: "2 s", moving: [${names.filter((_name, index) => (index + step) % 2 === 0).join(", ")}] },`).join("\n")}
] });
`;
    const whole = chartOf(busy);
    const part = chartOf(busy, { span: { fromS: 40, toS: 44 }, cycle: "first" });
    const inside = (chart: PowerChart) => chart.timesS.filter((timeS) => timeS >= 40 && timeS <= 44).length;
    expect(inside(part)).toBeGreaterThan(2 * inside(whole));
    expect(part.timesS.every((timeS) => timeS > 35 && timeS < 49)).toBe(true);
    // A start from rest takes the most: the whole has kept it.
    const peak = (chart: PowerChart) =>
      Math.max(...chart.currentA.filter((_, index) => Math.abs((chart.timesS[index] ?? 0) - 42) < 1));
    expect(peak(whole)).toBeCloseTo(peak(part), 2);
  });

  it("keeps temperatures with their limits", () => {
    const warm = STALLED.replace(
      'current: "6 A" } });',
      'current: "6 A" }, thermal: { windingToHousing: "4 K/W", housingToAmbient: "8 K/W", windingTime: "5 s", housingTime: "300 s", limit: "60 degC" } });',
    );
    const { windings, mechanisms, timesS } = chartOf(warm);
    expect(windings.map(({ mechanism, limitC }) => [mechanism, limitC])).toEqual([
      ["left", 60],
      ["right", 60],
    ]);
    const series = mechanisms[0]?.windingC ?? [];
    expect(series[0]).toBeCloseTo(25, 6);
    const first = timesS[series.findIndex((celsius) => celsius > 60)];
    expect(windings[0]?.above[0]?.fromS).toBeLessThanOrEqual(first ?? Number.NaN);
    expect(windings[0]?.peakC).toBeGreaterThanOrEqual(Math.max(...series) - 1e-9);
  });

  it("says what to write where there is no robot, and where it has no load cycle", () => {
    const feature = createPowerFeature();
    const alone = STALLED.slice(0, STALLED.indexOf("export default"));
    const none = feature.nothing(analyseFixture(alone), wish);
    expect(none.says.join(" ")).toContain("No robot is declared");
    expect(none.example).toContain("mechanisms: [left, right]");
    // What is said to write is accepted as written.
    const written = analyseFixture(`${alone}${none.example?.replace(/^import.*\n/, 'import { robot } from "loadmark";\n')}`);
    expect(written.findings.filter(({ rule }) => rule === "bad-declaration")).toEqual([]);
    expect(written.robots[0]?.numbers).toBeDefined();
    const idle = analyseFixture(STALLED.replace(/ {2}loadCycle: .*\n/, "").replace(/ {2}cycles: 2,\n/, ""));
    expect(feature.chartOf(idle, "cart", ALL)).toBeUndefined();
    expect(feature.nothing(idle, wish)).toMatchObject({
      says: [expect.stringContaining("no load cycle")],
      example: expect.stringContaining("loadCycle: ["),
    });
    expect(feature.nothing(analyseFixture("export {};\n"), wish).reason).toBe("nothing-declared");
  });

  it("is of the robot at the caret, else of the one that lists the mechanism there", () => {
    const two = `${STALLED.replace("export default robot", "export const cart = robot")}export const other = robot("other", { supply: pack, mechanisms: [right], loadCycle: [{ lasts: "1 s" }] });\n`;
    const analysis = analyseFixture(two);
    const { subjects } = createPowerFeature();
    const [left, right] = ["left", "right"].map((name) => analysis.mechanisms.filter((one) => one.name === name));
    expect(subjects(analysis, wish)[0]).toBe("cart");
    expect(subjects(analysis, { ...wish, shownRobot: "other" })[0]).toBe("other");
    expect(subjects(analysis, { ...wish, shownRobot: "other", mechanisms: left ?? [] })[0]).toBe("cart");
    expect(
      subjects(analysis, { ...wish, robots: analysis.robots.filter(({ name }) => name === "other"), mechanisms: right ?? [] })[0],
    ).toBe("other");
  });
});
