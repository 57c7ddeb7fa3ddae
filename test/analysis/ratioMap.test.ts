/** The ratio map against dense scans of the whole analysis, and against the textbook for a pure inertia. */
import { describe, expect, it } from "vitest";
import type { Analysis } from "../../extension/analysis/analysis.js";
import { mapRatio, type RatioMap } from "../../extension/analysis/ratioMap.js";
import { analyseFixture, PRELUDE } from "../support/checkFindings.js";

function mapOf(analysis: Analysis): RatioMap {
  const [mechanism] = analysis.mechanisms;
  if (mechanism === undefined) throw new Error("no mechanism");
  const search = mapRatio(analysis, mechanism);
  for (;;) {
    const next = search.next();
    if (next.done !== true) continue;
    if (next.value === undefined) throw new Error("no numbers");
    return next.value;
  }
}

/** A hoist of one plain reduction, so that any ratio can be written. */
const hoist = (ratio: number, fields = "", above = "") => `${PRELUDE}
${above}export const hoist = mechanism("hoist", {
  motor: twelveVolt,
  stages: [reduction(${ratio}, { efficiency: 0.9 })],
  load: lift({ mass: "6 kg", drumRadius: "30 mm", travel: "0.8 m" }),${fields}
});`;

/** What the analysis says of a ratio: its travel time, and the rules of level warning or error. */
function judged(text: string): { readonly timeS: number | null; readonly rules: readonly string[] } {
  const { mechanisms, findings } = analyseFixture(text);
  const rules = findings.filter(({ level }) => level !== "information").map(({ rule }) => rule);
  return { timeS: mechanisms[0]?.numbers?.travel?.timeS ?? null, rules };
}

describe("the fastest ratio that keeps every rule", () => {
  const STEPS = 240;
  const scan = (fields: string, excused: readonly string[] = []) =>
    Array.from({ length: STEPS + 1 }, (_, step) => {
      const ratio = 0.8 * (14 / 0.8) ** (step / STEPS);
      const { timeS, rules } = judged(hoist(ratio, fields));
      return { ratio, timeS, keeps: rules.every((rule) => excused.includes(rule)) };
    });
  const stepFactor = (14 / 0.8) ** (1 / STEPS);

  it.each([
    ["at the edge of a rule", '\n  within: "12 s",'],
    ["inside", ""],
    [
      "where protection opens in slow and in steep travels",
      '\n  protect: breaker({ holdCurrent: "1.4 A", trips: { at: "2.8 A", after: "6 s" } }),\n  within: "14 s",',
    ],
  ])("agrees with a dense scan: %s", (_, fields) => {
    const map = mapOf(analyseFixture(hoist(3, fields)));
    const dense = scan(fields, map.neverKept);
    const kept = dense.filter(({ keeps }) => keeps);
    expect(kept.length).toBeGreaterThan(3);
    const best = kept.reduce((one, other) => ((other.timeS ?? 1e9) < (one.timeS ?? 1e9) ? other : one));
    const { fastest } = map;
    if (fastest === null) throw new Error("there is a fastest one");
    // Between the neighbours of the scan's best; never slower than it.
    expect(Math.abs(Math.log(fastest.ratio / best.ratio))).toBeLessThan(1.01 * Math.log(stepFactor));
    expect(fastest.timeS ?? Number.NaN).toBeLessThanOrEqual((best.timeS ?? 0) * (1 + 1e-6));
    expect(judged(hoist(fastest.ratio, fields)).rules.filter((rule) => !map.neverKept.some((one) => one === rule))).toEqual([]);
    // The strip says of every scanned ratio what the analysis says, but right at its ends.
    const isNearEnd = (ratio: number) =>
      map.kept.some(({ from, to }) => [from, to].some((end) => Math.abs(Math.log(ratio / end)) < 1e-4));
    for (const { ratio, keeps } of dense) {
      if (isNearEnd(ratio) || ratio > (map.samples.at(-1)?.ratio ?? 0) || ratio < (map.samples[0]?.ratio ?? 0)) continue;
      expect({ ratio, keeps: map.kept.some(({ from, to }) => from <= ratio && ratio <= to) }).toEqual({ ratio, keeps });
    }
  });

  /**
   * Inertia matching: for a given motor torque a pure inertia is turned fastest where N = √(J_load/J_motor). Source: K. A. Pasch and
   * W. P. Seering, "On the Drive Systems for High-Performance Machines", ASME J. Mech. Trans. Autom. Des. 106 (1984), from memory.
   * It follows from α = N·T/(N²·J_motor + J_load); a current limit keeps the torque, and the speed of the line is never reached.
   */
  it.each([
    [0.09, "1e-4 kg*m^2", 30],
    [0.0049, "4 g*m^2", Math.sqrt(0.0049 / 4e-3)],
  ])("is √(J_load/J_motor) for a pure inertia of %d kg·m²", (loadKgM2, rotor, matched) => {
    const text = `import { arm, mechanism, motor, reduction } from "loadmark";
const quick = motor({ voltage: "12 V", noLoad: { speed: "60000 rpm", current: "0.1 A" }, stall: { torque: "1 N*m", current: "80 A" }, rotorInertia: "${rotor}", speedLossShare: 0 });
export const turntable = mechanism("turntable", {
  motor: quick,
  stages: [reduction(10, { efficiency: 1 })],
  load: arm({ mass: "0.001 kg", centreOfMass: "1 mm", inertia: "${loadKgM2} kg*m^2", slope: "0 deg", from: "0 deg", to: "5 deg" }),
  motorCurrentLimit: "8 A",
});`;
    const { fastest } = mapOf(analyseFixture(text));
    expect((fastest?.ratio ?? 0) / matched).toBeCloseTo(1, 2);
    // t = √(2·θ/α) at that ratio.
    const torqueNm = (8 - 0.1) * (1 / 79.9);
    const rotorKgM2 = loadKgM2 / matched ** 2;
    const alpha = (matched * torqueNm) / (matched ** 2 * rotorKgM2 + loadKgM2);
    expect((fastest?.timeS ?? 0) / Math.sqrt((2 * 5 * Math.PI) / 180 / alpha)).toBeCloseTo(1, 2);
  });

  it("is the one with the fastest output for a load without a travel", () => {
    const text = `${PRELUDE}export const reel = mechanism("reel", { motor: twelveVolt, stages: [reduction(2, { efficiency: 1 })], load: roller({ torque: "1 N*m" }) });`;
    const { fastest } = mapOf(analyseFixture(text));
    // ω_out = ω_0·(1 − T/(N·Ts))/N is greatest at N = 2·T/Ts = 1, where the motor is at its peak: the least that keeps the rule.
    expect(fastest?.ratio).toBeCloseTo(1, 3);
    expect(fastest?.outputRadPerS).toBeCloseTo((100 * Math.PI) / 30 / 2, 2);
  });
});

describe("the other marks", () => {
  it("put the best efficiency where the motor's torque is that of its best point", () => {
    const { bestEfficiency, samples } = mapOf(analyseFixture(hoist(3)));
    const best = samples.reduce((one, other) => ((other.motorEfficiency ?? 0) > (one.motorEfficiency ?? 0) ? other : one));
    expect(bestEfficiency?.motorEfficiency).toBe(best.motorEfficiency);
    // A motor whose loss grows with speed: η = (T·ω)/(V·I) with ω = ω0·(1 − x), I = I0 + (Is − I0)·x, x = T/Ts. Scanned by hand.
    const efficiency = (x: number) => (2 * x * ((100 * Math.PI) / 30) * (1 - x)) / (12 * (0.2 + 3.8 * x));
    const scanned = Array.from({ length: 9999 }, (_, step) => (step + 1) / 10_000).reduce((one, other) =>
      efficiency(other) > efficiency(one) ? other : one,
    );
    const outputNm = 6 * 9.80665 * 0.03;
    expect(bestEfficiency?.ratio).toBeCloseTo(outputNm / (0.9 * 2 * scanned), 2);
  });

  it("keep the ratio that is, with what it breaks", () => {
    const { now, samples } = mapOf(analyseFixture(hoist(1.2)));
    expect(now).toMatchObject({ ratio: 1.2, breaks: ["past-peak"] });
    expect(samples).toContain(now);
    expect(samples.map(({ ratio }) => ratio)).toEqual(samples.map(({ ratio }) => ratio).sort((one, other) => one - other));
  });

  it("excuse rules that no ratio keeps, and name them; not those without which it does not work", () => {
    const hot = PRELUDE.replace(
      'current: "4 A" } });',
      'current: "4 A" }, thermal: { windingToHousing: "3 K/W", housingToAmbient: "9 K/W", windingTime: "8 s", housingTime: "300 s", limit: "110 degC" } });',
    );
    const unprotected = mapOf(analyseFixture(hoist(3).replace(PRELUDE, hot)));
    expect(unprotected.neverKept).toEqual(["unprotected"]);
    expect(unprotected.kept.length).toBeGreaterThan(0);
    const late = mapOf(analyseFixture(hoist(3, '\n  within: "0.5 s",')));
    expect(late.neverKept).toEqual(["late"]);
    expect(late).toMatchObject({ kept: [], fastest: null });
  });

  it("judge ranges by their worst corner, as the findings do", () => {
    const ranged = (ratio: number) => hoist(ratio).replace('mass: "6 kg"', 'mass: between("4 kg", "7 kg")');
    const map = mapOf(analyseFixture(ranged(3)));
    // Past the peak below N = 2·m·g·r/(0.9·Ts): with 7 kg 2.289, with the middle of 5.5 kg 1.798.
    const edge = (2 * 7 * 9.80665 * 0.03) / (0.9 * 2);
    expect(map.middleOnly).toBe(false);
    expect(map.kept[0]?.from).toBeCloseTo(edge, 3);
    expect(judged(ranged(edge * 1.01)).rules).toEqual([]);
    expect(judged(ranged(edge * 0.99)).rules).toEqual(["past-peak"]);
    // The numbers are those of the middle.
    expect(map.now.stallShare).toBeCloseTo((5.5 * 9.80665 * 0.03) / (3 * 0.9 * 2), 9);
    const many = ranged(3).replace(
      'drumRadius: "30 mm", travel: "0.8 m"',
      'drumRadius: between("29 mm", "31 mm"), travel: between("0.7 m", "0.8 m"), frictionForce: between("0 N", "1 N")',
    );
    expect(mapOf(analyseFixture(many)).middleOnly).toBe(true);
  });

  it("leave out what is allowed or turned off", () => {
    const within = '\n  within: "12 s",';
    const lateSpans = (text: string) => mapOf(analyseFixture(text)).broken.find(({ rule }) => rule === "late");
    expect(lateSpans(hoist(3, within))).toBeDefined();
    expect(lateSpans(hoist(3, within, "// loadmark-allow late: nobody waits for it\n"))).toBeUndefined();
    expect(lateSpans(`//- loadmark.json\n{ "levels": { "late": "off" } }\n//- robot.ts\n${hoist(3, within)}`)).toBeUndefined();
  });

  it("hold stock to the strip, with the change that gives each ratio", () => {
    const text = hoist(3).replace("reduction(3, { efficiency: 0.9 })", "spur(20, 60, { efficiency: 0.9 })");
    const { stock, kept, anyRatio } = mapOf(analyseFixture(text));
    expect(anyRatio).toBe(false);
    expect(stock.length).toBeGreaterThan(50);
    for (const { ratio, words, keeps } of stock.filter((_, index) => index % 12 === 0)) {
      const [, driver, driven] = /^stage 1 with (\d+) and (\d+) teeth$/.exec(words) ?? [];
      expect(Number(driven) / Number(driver)).toBeCloseTo(ratio, 9);
      const nearEnd = kept.some(({ from, to }) => [from, to].some((end) => Math.abs(Math.log(ratio / end)) < 1e-4));
      if (!nearEnd) expect(judged(text.replace("20, 60", `${driver}, ${driven}`)).rules.length === 0).toBe(keeps);
    }
  });

  it("propose to write the quickest pair in stock, and the plain ratio in three digits", () => {
    const counts = [12, 16, 20, 24, 30, 36, 48, 60, 72];
    const text = `//- loadmark.json
{ "toothCounts": ${JSON.stringify(counts)} }
//- robot.ts
${hoist(3, '\n  within: "13 s",').replace("reduction(3, { efficiency: 0.9 })", "spur(20, 60, { efficiency: 0.9 })")}`;
    const { toWrite } = mapOf(analyseFixture(text));
    const all = counts.flatMap((driver) =>
      counts.flatMap((driven) => {
        const { timeS, rules } = judged(text.replace("20, 60", `${driver}, ${driven}`));
        return rules.length === 0 && timeS !== null ? [{ driver, driven, timeS }] : [];
      }),
    );
    const best = all.reduce((one, other) => (other.timeS < one.timeS ? other : one));
    expect(toWrite.fastest?.timeS).toBeCloseTo(best.timeS, 6);
    const [, driver, driven] = /^stage 1 with (\d+) and (\d+) teeth$/.exec(toWrite.fastest?.words ?? "") ?? [];
    expect(Number(driven) / Number(driver)).toBeCloseTo(best.driven / best.driver, 9);

    // Where it is the one that is written, nothing is left to write.
    expect(mapOf(analyseFixture(text.replace("20, 60", `${driver}, ${driven}`))).toWrite.fastest).toBeNull();

    const plain = mapOf(analyseFixture(hoist(3, '\n  within: "13 s",')));
    const [, written] = /^stage 1 with a ratio of ([\d.]+)$/.exec(plain.toWrite.fastest?.words ?? "") ?? [];
    expect(Number(written)).toBe(Number(Number(written).toPrecision(3)));
    expect(judged(hoist(Number(written), '\n  within: "13 s",')).rules).toEqual([]);
    expect((plain.toWrite.fastest?.timeS ?? 0) / (plain.fastest?.timeS ?? 1)).toBeLessThan(1.01);
  });

  it("hand back control after every ratio", () => {
    const analysis = analyseFixture(hoist(3));
    const [mechanism] = analysis.mechanisms;
    if (mechanism === undefined) throw new Error("no mechanism");
    const search = mapRatio(analysis, mechanism);
    let turns = 0;
    while (search.next().done !== true) turns += 1;
    expect(turns).toBeGreaterThan(64);
  });
});
