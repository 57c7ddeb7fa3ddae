/** Proposals for a whole robot: staggered steps and limited currents, each applied to the texts and checked again. */
import { array, assert, constantFrom, integer, property, record, subarray } from "fast-check";
import { describe, expect, it } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { Analysis, Finding } from "../../extension/analysis/analysis.js";
import type { Proposal } from "../../extension/analysis/proposal.js";
import { proposalsFor } from "../../extension/analysis/propose.js";
import { withEdits } from "../../extension/analysis/writeChange.js";
import { analyseFixture } from "../support/checkFindings.js";
import { parser as ts } from "../support/parser.js";

const HEAD = `import { battery, breaker, lift, mechanism, motor, reduction, robot, roller } from "loadmark";
const twelveVolt = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
`;

/** Four stalled motors of 3 ohm are 0.75 ohm: alone 12·0.75/(0.75 + 0.1) = 10.59 V, both together 12·0.375/0.475 = 9.474 V. */
const sagging = (loadCycle: string, more = "") => `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "100 mohm", mustStayAbove: "10 V" });
const load = lift({ mass: "5 kg", drumRadius: "20 mm", travel: "0.4 m" });
const one = mechanism("one", { motor: twelveVolt, motorCount: 4, stages: [reduction(4, { efficiency: 1 })], load });
const two = mechanism("two", { motor: twelveVolt, motorCount: 4, stages: [reduction(4, { efficiency: 1 })], load });
${more}export const mover = robot("mover", { supply: pack, mechanisms: [one, two], loadCycle: ${loadCycle}, cycles: 3 });`;

/** Two rollers of 1 N·m: 2.1 A each. */
const tripping = (hold: string, loadCycle: string) => `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "0 ohm" });
const drum = mechanism("drum", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }) });
const reel = mechanism("reel", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }) });
export const mover = robot("mover", {
  supply: pack,
  mechanisms: [drum, reel],
  shared: [{ protect: breaker({ holdCurrent: "${hold}", trips: { at: "8 A", after: "5 s" } }), feeds: [drum, reel] }],
  loadCycle: ${loadCycle},
});`;

interface Offered {
  readonly analysis: Analysis;
  readonly finding: Finding;
  readonly proposals: readonly Proposal[];
  /** The file after a proposal, and what is then found but information. */
  apply(proposal: Proposal): { readonly text: string; readonly rules: readonly string[] };
}

function offeredFor(text: string, rule: string): Offered {
  const analysis = analyseFixture(text);
  const finding = analysis.findings.find((one) => one.rule === rule && one.robot !== undefined);
  if (finding === undefined) throw new Error(`no ${rule} here: ${analysis.findings.map((one) => one.rule).join(", ")}`);
  return {
    analysis,
    finding,
    proposals: proposalsFor(analysis, finding, createAnalyser(ts).analyse),
    apply({ edits }) {
      const snapshot = withEdits(analysis.snapshot, edits);
      const { findings } = createAnalyser(ts).analyse([...analysis.files.keys()], snapshot);
      const rules = findings.filter(({ level }) => level !== "information").map((one) => one.rule);
      return { text: snapshot.read("/robot/robot.ts") ?? "", rules };
    },
  };
}

describe("proposals for a supply that sags", () => {
  it("stagger the step in which two move at once, with the new lowest voltage", () => {
    const { proposals, apply } = offeredFor(
      sagging(`[
    { lasts: "4 s" },
    { lasts: "4 s", moving: [one, two] },
  ]`),
      "sags",
    );
    const [first] = proposals;
    expect(first?.summary).toMatch(/^"one" in a step of its own behind step 2, 4 s: supply down to 10\.6 V instead of 9\.47 V/);
    expect(first?.summary).toContain("Worse: cycle 12 s instead of 8 s.");
    // The second starts while the first is held: a little below the 10.59 V of one alone.
    if (first?.robot == null) throw new Error("nothing about the robot is proposed");
    expect(first.predicted.lowestVoltageV).toBeGreaterThan(10.5);
    expect(first.predicted.lowestVoltageV).toBeLessThan((12 * 0.75) / 0.85);
    expect(first.predicted.cycleS).toBe(12);
    expect(first && apply(first).text).toContain(`
    { lasts: "4 s", moving: [two] },
    { lasts: "4 s", moving: [one], holding: [two] },
  ]`);
    expect(proposals.map((one) => apply(one).rules)).toEqual(proposals.map(() => []));
  });

  it("move one into a step that is there, where it is held nowhere", () => {
    const { proposals, apply } = offeredFor(sagging('[{ lasts: "4 s" }, { lasts: "4 s", moving: [one, two] }]'), "sags");
    const shifted = proposals.find(({ summary }) => summary.startsWith('"one" in step 1 instead of step 2'));
    expect(shifted?.predicted).toMatchObject({ lowestVoltageV: expect.closeTo((12 * 0.75) / 0.85, 6), cycleS: 8 });
    expect(shifted && apply(shifted).text).toContain('[{ lasts: "4 s", moving: [one] }, { lasts: "4 s", moving: [two] }]');
    const held = offeredFor(sagging('[{ lasts: "4 s", holding: [one, two] }, { lasts: "4 s", moving: [one, two] }]'), "sags");
    expect(held.proposals.some(({ summary }) => summary.includes("instead of step"))).toBe(false);
  });

  it("limit one current no further than is needed", () => {
    const { proposals, apply } = offeredFor(sagging('[{ lasts: "4 s", moving: [one, two] }]'), "sags");
    const limited = proposals.filter(({ summary }) => summary.includes("motor current limit"));
    expect(limited.map(({ summary }) => summary.split(":")[0])).toEqual([
      expect.stringMatching(/^A motor current limit of [\d.]+ A for "one"$/),
      expect.stringMatching(/^A motor current limit of [\d.]+ A for "two"$/),
    ]);
    for (const one of limited) {
      const { text, rules } = apply(one);
      expect(rules).toEqual([]);
      // The next higher limit that was to be tried, a twentieth of the stall current more, is not enough.
      const amperes = Number(/motorCurrentLimit: "([\d.]+) A"/.exec(text)?.[1]);
      const stallA = 12 / (3 + 4 * 0.1);
      const higher = analyseFixture(text.replace(`"${amperes} A"`, `"${amperes + stallA * 0.06} A"`));
      expect(higher.findings.some(({ rule }) => rule === "sags")).toBe(true);
    }
  });

  it("keep up what was held while it waits, and what turns on into the next step", () => {
    const { proposals, apply } = offeredFor(
      sagging('[{ lasts: "4 s", moving: [one] }, { lasts: "4 s", moving: [one, two] }]'),
      "sags",
    );
    const own = proposals.find(({ summary }) => summary.startsWith('"one" in a step of its own behind step 2'));
    expect(own && apply(own).text).toContain(
      '{ lasts: "4 s", moving: [two], holding: [one] }, { lasts: "4 s", moving: [one], holding: [two] }]',
    );
  });

  it("give a step a list of its own where it shares one with other steps, and keep the names that the code uses", () => {
    const { proposals, apply } = offeredFor(
      sagging(
        '[\n  { lasts: "4 s", moving: BOTH }, // both at once\n  { lasts: "2 s" },\n]',
        "const all = { left: one };\nconst BOTH = [all.left, two];\n",
      ),
      "sags",
    );
    const own = proposals.find(({ summary }) => summary.includes("in a step of its own"));
    const text = own === undefined ? "" : apply(own).text;
    expect(text).toContain("const BOTH = [all.left, two];");
    expect(text).toMatch(
      /\{ lasts: "4 s", moving: \[two\] \},\n {2}\{ lasts: "4 s", moving: \[one\], holding: \[two\] \}, \/\/ both at once/,
    );
    expect(own && apply(own).rules).toEqual([]);
  });

  it("keep line breaks and quotes as they are", () => {
    const source = sagging("[\n  { lasts: '4 s', moving: [one, two] },\n]").replaceAll("\n", "\r\n");
    const { proposals, apply } = offeredFor(source, "sags");
    const own = proposals.find(({ summary }) => summary.includes("in a step of its own"));
    expect(own && apply(own).text).toContain(
      "  { lasts: '4 s', moving: [two] },\r\n  { lasts: '4 s', moving: [one], holding: [two] },\r\n]",
    );
  });

  it("leave a cycle alone that is not written out, and limit a current all the same", () => {
    const { proposals, apply } = offeredFor(sagging("[one].map(() => ({ lasts: '4 s', moving: [one, two] }))"), "sags");
    expect(proposals.length).toBeGreaterThan(0);
    for (const one of proposals) {
      expect(one.edits.every(({ newText }) => newText.includes("motorCurrentLimit"))).toBe(true);
      expect(apply(one).rules).toEqual([]);
    }
  });

  it("shorten the run to what the charge lasts for", () => {
    const { proposals, apply } = offeredFor(
      `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "0 ohm", capacity: "1 A*h" });
const drum = mechanism("drum", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }), supply: pack });
export const mover = robot("mover", { supply: pack, mechanisms: [drum], loadCycle: [{ lasts: "36 s", moving: [drum] }], cycles: 100 });`,
      "sags",
    );
    // 2.1 A for 36 s are 21 mA·h a cycle: 47 cycles for 1 A·h.
    expect(proposals.map(({ edits }) => edits.map(({ newText }) => newText))).toEqual([["47"]]);
    expect(proposals.map((one) => apply(one).rules)).toEqual([[]]);
  });
});

describe("proposals for shared protection that opens", () => {
  it("stagger the step, with the margin that is left", () => {
    const { proposals, apply } = offeredFor(tripping("3 A", '[{ lasts: "30 s", moving: [drum, reel] }]'), "trips");
    const [first] = proposals;
    expect(first && apply(first).text).toContain('[{ lasts: "30 s", moving: [reel] }, { lasts: "30 s", moving: [drum] }]');
    // 2.1 A all the time, no rest between: θ = 0.49·(1 − e^(−60/τ)), τ = 5/ln(64/55).
    const theta = (2.1 / 3) ** 2 * (1 - Math.exp((-60 * Math.log(64 / 55)) / 5));
    expect(first?.predicted).toMatchObject({ tripMargin: expect.closeTo(1 - theta, 5), tripsAfterS: null });
    expect(proposals.map((one) => apply(one).rules)).toEqual(proposals.map(() => []));
  });

  it("never touch the protection", () => {
    for (const { edits } of offeredFor(tripping("3 A", '[{ lasts: "30 s", moving: [drum, reel] }]'), "trips").proposals)
      for (const { newText } of edits) expect(newText).not.toMatch(/breaker|fuse|ptc|hold(Current|s)|trips|rating/i);
  });

  it("tell the nearest miss where nothing helps", () => {
    const { proposals } = offeredFor(tripping("0.5 A", '[{ lasts: "300 s", moving: [drum, reel] }]'), "trips");
    expect(proposals).toHaveLength(1);
    expect(proposals[0]?.edits).toEqual([]);
    expect(proposals[0]?.summary).toMatch(/^No change of the load cycle or of one current clears it\. Nearest: /);
  });
});

describe("proposals for heat over the cycles", () => {
  it("rest longer, no longer than is needed", () => {
    const text = `${HEAD}
const warm = motor({
  voltage: "12 V",
  noLoad: { speed: "100 rpm", current: "0.2 A" },
  stall: { torque: "2 N*m", current: "4 A" },
  thermal: { windingToHousing: "3 K/W", housingToAmbient: "6 K/W", windingTime: "10 s", housingTime: "600 s", limit: "90 degC" },
});
const pack = battery({ openCircuit: "12 V", resistance: "0 ohm" });
const hoist = mechanism("hoist", { motor: warm, stages: [], load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "0.8 m" }), protect: breaker({ holdCurrent: "3 A", trips: { at: "3.5 A", after: "0.5 s" } }) });
export const mover = robot("mover", { supply: pack, mechanisms: [hoist], loadCycle: [{ lasts: "9 s", moving: [hoist] }], cycles: 400 });`;
    const { proposals, apply, finding } = offeredFor(text, "overheats");
    const rest = proposals.find(({ summary }) => summary.startsWith("A rest of"));
    expect(rest && apply(rest).rules).not.toContain(finding.rule);
    expect(rest && apply(rest).text).toMatch(/\[\{ lasts: "9 s", moving: \[hoist\] \}, \{ lasts: "\d+ s" \}\]/);
  });
});

describe("proposals for random robots", () => {
  const step = (names: readonly string[]) =>
    record({ lasts: integer({ min: 2, max: 12 }), moving: subarray([...names], { minLength: 1 }) });
  const names = ["one", "two", "reel"];
  const robots = record({
    massKg: integer({ min: 2, max: 9 }),
    count: constantFrom(1, 2, 4),
    floorV: constantFrom(9, 9.5, 10, 10.5, 11),
    holdA: integer({ min: 2, max: 12 }),
    steps: array(step(names), { minLength: 1, maxLength: 4 }),
    cycles: integer({ min: 1, max: 4 }),
  });

  it("clear their finding and bring nothing new at its level", () => {
    const tried = { proposals: 0, findings: 0, staggered: 0, limited: 0 };
    assert(
      property(robots, ({ massKg, count, floorV, holdA, steps, cycles }) => {
        const text = `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "120 mohm", mustStayAbove: "${floorV} V" });
const load = lift({ mass: "${massKg} kg", drumRadius: "20 mm", travel: "0.3 m" });
const one = mechanism("one", { motor: twelveVolt, motorCount: ${count}, stages: [reduction(4)], load });
const two = mechanism("two", { motor: twelveVolt, motorCount: ${count}, stages: [reduction(3)], load });
const reel = mechanism("reel", { motor: twelveVolt, motorCount: 2, stages: [], load: roller({ torque: "0.8 N*m" }) });
export const mover = robot("mover", {
  supply: pack,
  mechanisms: [one, two, reel],
  shared: [{ protect: breaker({ holdCurrent: "${holdA} A", trips: { at: "${2 * holdA} A", after: "6 s" } }), feeds: [one, two, reel] }],
  loadCycle: [
${steps.map(({ lasts, moving }) => `    { lasts: "${lasts} s", moving: [${moving.join(", ")}] },`).join("\n")}
  ],
  cycles: ${cycles},
});`;
        const analysis = analyseFixture(text);
        const before = levelsOf(analysis.findings);
        for (const finding of analysis.findings.filter(({ robot }) => robot !== undefined)) {
          tried.findings += 1;
          for (const { edits, summary } of proposalsFor(analysis, finding, createAnalyser(ts).analyse)) {
            if (edits.length === 0) continue;
            const after = createAnalyser(ts).analyse(["/robot/robot.ts"], withEdits(analysis.snapshot, edits));
            const gone = after.findings.filter((one) => keyOf(one) === keyOf(finding) && rank(one) >= rank(finding));
            expect({ summary, gone }).toEqual({ summary, gone: [] });
            const newcomers = after.findings.filter(
              (one) => rank(one) >= rank(finding) && rank(one) > (before.get(keyOf(one)) ?? -1),
            );
            expect({ summary, newcomers }).toEqual({ summary, newcomers: [] });
            expect(after.robots[0]?.numbers).toBeDefined();
            tried.proposals += 1;
            tried.staggered += Number(summary.includes("step of its own"));
            tried.limited += Number(summary.includes("current limit"));
          }
        }
      }),
      { seed: 11, numRuns: 25 },
    );
    expect(tried.proposals).toBeGreaterThan(20);
    expect(tried.staggered).toBeGreaterThan(5);
    expect(tried.limited).toBeGreaterThan(5);
  });
});

function rank({ level }: Finding): number {
  return ["information", "warning", "error"].indexOf(level);
}

function keyOf({ rule, mechanism, robot }: Finding): string {
  return `${rule} ${mechanism} ${robot?.name} ${robot?.subject}`;
}

function levelsOf(findings: readonly Finding[]): Map<string, number> {
  const levels = new Map<string, number>();
  for (const one of findings) levels.set(keyOf(one), Math.max(levels.get(keyOf(one)) ?? -1, rank(one)));
  return levels;
}
