/** What stands outside the text: lenses, symbols, the tree of mechanisms, the status. */
import { describe, expect, it } from "vitest";
import { codeLensesOf } from "../../extension/features/codeLenses.js";
import { documentSymbolsOf, workspaceSymbolsOf } from "../../extension/features/symbols.js";
import { analyseWithCursor } from "../support/cursorFixture.js";
import { handPoint, liftTorque, MOTOR, perCent, three } from "../support/handNumbers.js";
import { wholeStatus, wholeTree } from "../support/overview.js";

const FILE = "/robot/robot.ts";
const OUTPUT_NM = liftTorque(10, 0.05);

/** Four mechanisms: fine, past its peak, stalled, not to be known; two of them in a robot. */
const FOUR = `import { battery, lift, mechanism, motor, robot, spur } from "loadmark";
const slow = ${MOTOR};
const load = lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" });
const supply = battery({ openCircuit: "12 V", resistance: "0 ohm" });
export const calm = mechanism("calm hoist", { motor: slow, stages: [spur(20, 80)], load });
export const eager = mechanism("eager hoist", { motor: slow, stages: [spur(20, 60)], load });
export const stuck = mechanism("stuck hoist", { motor: slow, stages: [spur(20, 20)], load });
export const vague = mechanism("vague hoist", { motor: slow, stages: [spur(20, teeth())], load });
export default robot("tray mover", { supply, mechanisms: [calm, eager] });
`;

describe("codeLensesOf", () => {
  it("gives each mechanism one, with its verdict and numbers", () => {
    const lenses = codeLensesOf(analyseWithCursor(FOUR).analysis, FILE);
    const calm = handPoint(OUTPUT_NM, 4, 0.98);
    const eager = handPoint(OUTPUT_NM, 3, 0.98);
    const stuck = handPoint(OUTPUT_NM, 1, 0.98);
    expect(lenses.map(({ mechanism, title }) => [mechanism, title])).toEqual([
      ["calm hoist", `Fine: ${perCent(calm.share)} of stall, ${three(calm.currentA)} A, ${three(calm.outputRpm)} rpm`],
      [
        "eager hoist",
        `Past its peak of power: ${perCent(eager.share)} of stall, ${three(eager.currentA)} A, ${three(eager.outputRpm)} rpm`,
      ],
      ["stuck hoist", `Stalls: ${perCent(stuck.share)} of stall, 6 A`],
      ["vague hoist", "A value is not constant"],
    ]);
    expect(lenses.map(({ span }) => FOUR.slice(span.start, span.end))).toEqual(["calm", "eager", "stuck", "vague"]);
  });

  it("keeps its place while the declaration is half-typed", () => {
    const whole = `import { lift, mechanism, motor, spur } from "loadmark";
const hoist = mechanism("hoist", { motor: ${MOTOR.replaceAll("\n", " ")}, stages: [spur(20, 80)], load: lift({ mass: "10 kg", drumRadius: "5 cm", travel: "1 m" }) });
`;
    const start = whole.indexOf('mechanism("hoist"');
    const first = codeLensesOf(analyseWithCursor(whole).analysis, FILE)[0]?.span;
    expect(first).toBeDefined();
    for (let end = start + "mechanism(".length; end < whole.length; end += 3) {
      const lenses = codeLensesOf(analyseWithCursor(whole.slice(0, end)).analysis, FILE);
      expect({ end, spans: lenses.map(({ span }) => span) }).toEqual({ end, spans: [first] });
    }
  });
});

describe("symbols", () => {
  it("lists a file's declarations in order, each name inside its declaration", () => {
    const symbols = documentSymbolsOf(analyseWithCursor(FOUR).analysis, FILE);
    expect(symbols.map(({ kind, name }) => `${kind} ${name}`)).toEqual([
      "motor slow",
      "mechanism calm hoist",
      "mechanism eager hoist",
      "mechanism stuck hoist",
      "mechanism vague hoist",
      "robot tray mover",
    ]);
    for (const { span, selection } of symbols) {
      expect(span.start <= selection.start && selection.end <= span.end).toBe(true);
    }
    expect(symbols.slice(0, 2).map(({ span }) => FOUR.slice(span.start, span.end).split("(")[0])).toEqual([
      "slow = motor",
      "calm = mechanism",
    ]);
  });

  it("finds names by their letters in order, in every file", () => {
    const source = `//- a.ts\n${FOUR}//- b.ts\nimport { motor } from "loadmark";\nexport const steady = ${MOTOR};\n`;
    const { analysis } = analyseWithCursor(source);
    const named = (query: string): string[] => workspaceSymbolsOf(analysis, query).map(({ name }) => name);
    expect(named("stdy")).toEqual(["steady"]);
    expect(named("HOIST")).toHaveLength(4);
    expect(named("tsioh")).toEqual([]);
    expect(named("")).toHaveLength(7);
  });
});

describe("the tree of mechanisms", () => {
  it("puts mechanisms under their robot and the others apart", () => {
    const { robots, apart } = wholeTree(analyseWithCursor(FOUR).analysis);
    const share = (ratio: number): string => `${perCent(handPoint(OUTPUT_NM, ratio, 0.98).share)} of stall`;
    expect(robots.map(({ label, state, mechanisms }) => [label, state, mechanisms.map(({ name }) => name)])).toEqual([
      ["tray mover", "warning", ["calm hoist", "eager hoist"]],
    ]);
    const all = [...(robots[0]?.mechanisms ?? []), ...apart];
    expect(all.map(({ state, description }) => [state, description])).toEqual([
      ["fine", share(4)],
      ["warning", `${share(3)} · Past its peak of power`],
      ["error", `${share(1)} · Stalls`],
      ["warning", "A value is not constant"],
    ]);
    expect(all.map(({ stallShare }) => stallShare === null)).toEqual([false, false, false, true]);
    expect(all[0]?.stallShare).toBeCloseTo(handPoint(OUTPUT_NM, 4, 0.98).share, 12);
    expect(all.map(({ at }) => FOUR.slice(at.start, at.end))).toEqual(["calm", "eager", "stuck", "vague"]);
  });

  it("tells how a robot's load cycle fares, and nothing where it has none", () => {
    const cycle = FOUR.replace(
      "mechanisms: [calm, eager] }",
      'mechanisms: [calm, eager], loadCycle: [{ lasts: "9 s", moving: [calm, eager] }] }',
    ).replace('resistance: "0 ohm"', 'resistance: "0.5 ohm", mustStayAbove: "11 V"');
    const [robot] = wholeTree(analyseWithCursor(cycle).analysis).robots;
    // From standstill each motor is 12 V / 6 A; two of them behind 0.5 ohm take 12 V / (0.5 + 1) ohm.
    const lowestV = 12 - 0.5 * (12 / 1.5);
    expect(robot).toMatchObject({
      name: "tray mover",
      label: "tray mover",
      description: `lowest ${three(lowestV)} V · Pulls the supply too low`,
    });
    expect(robot?.tooltip).toBe(`Load cycle: Pulls the supply too low, lowest ${three(lowestV)} V, at most 8 A`);
    expect(wholeTree(analyseWithCursor(FOUR).analysis).robots[0]).toMatchObject({
      description: "",
      tooltip: expect.stringContaining("none is declared"),
    });
  });

  it("shows hostile names as plain text on one line", () => {
    const { robots, apart } = wholeTree(
      analyseWithCursor(FOUR.replace("calm hoist", "a\\n\u202Eb").replace("stuck hoist", "x".repeat(500))).analysis,
    );
    expect(robots[0]?.mechanisms[0]?.label).toBe("a b");
    expect(apart[0]?.label).toHaveLength(60);
    expect(apart[0]?.name).toHaveLength(500);
  });
});

describe("the status", () => {
  it("counts the worst", () => {
    expect(wholeStatus(analyseWithCursor(FOUR).analysis)).toEqual({
      text: "1 error",
      tooltip: "4 mechanisms, 1 robot, 1 error, 2 warnings",
      state: "error",
    });
    const line = (start: string): string => FOUR.split("\n").find((one) => one.startsWith(start)) ?? "";
    const without = FOUR.replace(line("export const stuck"), "").replace(line("export const vague"), "");
    expect(wholeStatus(analyseWithCursor(without).analysis)).toMatchObject({ text: "1 warning", state: "warning" });
    const fine = without.replace("spur(20, 60)", "spur(20, 90)");
    expect(wholeStatus(analyseWithCursor(fine).analysis)).toMatchObject({ text: "2 mechanisms fine", state: "fine" });
  });

  it("is absent where nothing is declared", () => {
    expect(wholeStatus(analyseWithCursor('import { motor } from "loadmark";\n').analysis)).toBeUndefined();
  });
});
