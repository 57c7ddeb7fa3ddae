/** Quick fixes, each applied to the text and analysed again: the finding that it names is gone. */

import { describe, expect, it } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import { proposalsFor } from "../../extension/analysis/propose.js";
import { findingsTouching, type QuickFix, quickFixesAt } from "../../extension/features/quickFixes.js";
import { analyseWithCursor } from "../support/cursorFixture.js";
import { MOTOR } from "../support/handNumbers.js";
import { parser as ts } from "../support/parser.js";

interface Offered {
  readonly fixes: readonly QuickFix[];
  /** All files after the only edit of a fix. */
  readonly apply: (fix: QuickFix) => ReadonlyMap<string, string>;
}

function offeredIn(source: string): Offered {
  const { analysis, cursor, files } = analyseWithCursor(source);
  return {
    fixes: quickFixesAt(analysis, cursor.file, cursor.offset, cursor.offset),
    apply({ edits }) {
      const changed = new Map(files);
      for (const { file, start, end, newText } of edits) {
        const text = changed.get(file) ?? "";
        changed.set(file, text.slice(0, start) + newText + text.slice(end));
      }
      return changed;
    },
  };
}

/** Rules that still complain; a lift that may run back is only worth knowing. */
function findingsOf(files: ReadonlyMap<string, string>): string[] {
  const source = [...files].map(([file, text]) => `//- ${file.replace("/robot/", "")}\n${text}`).join("");
  const { findings } = analyseWithCursor(source).analysis;
  return findings.filter(({ level }) => level !== "information").map(({ rule }) => rule);
}

/** The one mending fix at the cursor, applied: the line that it changed; nothing may be complained of any more. */
function mended(source: string): string {
  const { fixes, apply } = offeredIn(source);
  const [fix, ...more] = fixes.filter(({ kind }) => kind === "mend");
  if (fix === undefined || more.length > 0) throw new Error(`${more.length + (fix ? 1 : 0)} fixes are offered.`);
  const files = apply(fix);
  expect(findingsOf(files)).toEqual([]);
  const [edit] = fix.edits;
  const text = files.get(edit?.file ?? "") ?? "";
  return (text.slice(0, edit?.start).split("\n").at(-1) ?? "") + (text.slice(edit?.start).split("\n")[0] ?? "");
}

function robot(motor = MOTOR, stages = "spur(20, 80)", before = ""): string {
  return `import { lift, mechanism, motor, spur } from "loadmark";
export const slow = ${motor};
${before}export const hoist = mechanism("hoist", {
  motor: slow,
  stages: [${stages}],
  load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }),
});
`;
}

describe("a mistyped word", () => {
  it.each([
    ["a unit", robot(MOTOR.replace('"12 V"', '"12 v/*|*/"')), '  voltage: "12 V",'],
    ["a unit in single quotes", robot(MOTOR.replace('"12 V"', "'12 v/*|*/'")), "  voltage: '12 V',"],
    ["a missing space", robot(MOTOR.replace('"12 V"', '"12V/*|*/"')), '  voltage: "12 V",'],
    ["a field", robot(MOTOR.replace("voltage", "volt/*|*/tage")), '  voltage: "12 V",'],
    ["an inner field", robot(MOTOR.replace("torque", "torq/*|*/e")), '  stall: { torque: "3 N*m", current: "6 A" },'],
    [
      "a property of a constant",
      robot(MOTOR, "spur(T.pinion, T.whe/*|*/l)", "const T = { pinion: 20, wheel: 80 } as const;\n"),
      "  stages: [spur(T.pinion, T.wheel)],",
    ],
  ])("%s is put right", (_, source, line) => {
    expect(mended(source)).toBe(line);
  });

  it("is put right where it was written, in another file", () => {
    const source = `//- sizes.ts
export const VOLTAGE = "12 v";
//- robot.ts
import { VOLTAGE } from "./sizes.js";
${robot(MOTOR.replace('"12 V"', "VOLT/*|*/AGE"))}`;
    expect(mended(source)).toBe('export const VOLTAGE = "12 V";');
  });

  it("is put right in an allowance", () => {
    const before = "// loadmark-allow past-pe/*|*/ek: seen to work, at the end.here\n";
    expect(mended(robot(MOTOR, "spur(20, 60)", before))).toBe("// loadmark-allow past-peak: seen to work, at the end.here");
  });

  it("is left to the user inside an expression", () => {
    const source = robot(MOTOR.replace('"12 V"', "`$" + "{6 * 2} v/*|*/`"));
    expect(offeredIn(source).fixes).toEqual([]);
  });

  it("is not guessed where nothing is near", () => {
    expect(offeredIn(robot(MOTOR.replace('"12 V"', '"12 elbows/*|*/"'))).fixes).toEqual([]);
  });
});

describe("an allowance", () => {
  const pastPeak = (source: string) => source.replace("spur(20, 80)", "spur(20, 60)");

  function allowed(source: string): { readonly fix: QuickFix; readonly text: string; readonly rules: readonly string[] } {
    const { fixes, apply } = offeredIn(source);
    const fix = fixes.find(({ kind, finding }) => kind === "allow" && finding.rule === "past-peak");
    if (fix === undefined || fixes.at(-1)?.kind !== "allow") throw new Error("No allowance is offered, or not last.");
    const files = apply(fix);
    return { fix, text: files.get(fix.edits[0]?.file ?? "") ?? "", rules: findingsOf(files) };
  }

  it("is offered last, stands above the mechanism and silences the finding", () => {
    const source = pastPeak(robot()).replace("const hoist", "const ho/*|*/ist");
    const { fix, text, rules } = allowed(source);
    expect(text).toContain('\n// loadmark-allow past-peak: reason\nexport const hoist = mechanism("hoist", {');
    expect(rules).toEqual([]);
    expect(fix.title).toBe('Allow "past-peak" for this mechanism');
  });

  it("marks the reason, which is the user's to write", () => {
    const { fix } = allowed(pastPeak(robot()).replace("const hoist", "const ho/*|*/ist"));
    const { start = 0, end = 0 } = fix.placeholder ?? {};
    expect(fix.edits[0]?.newText.slice(start, end)).toBe("reason");
  });

  it.each([
    [
      "in a class, with its indent",
      "class Robot {\n    ho/*|*/ist = mechanism(",
      "\n    // loadmark-allow past-peak: reason\n    hoist = mechanism(",
    ],
    ["in an object", "const all = {\n\tho/*|*/ist: mechanism(", "\n\t// loadmark-allow past-peak: reason\n\thoist: mechanism("],
    [
      "below other comments",
      "// Lifts.\nexport const ho/*|*/ist = mechanism(",
      "// Lifts.\n// loadmark-allow past-peak: reason\nexport const hoist = mechanism(",
    ],
    [
      "with its name on another line",
      "export const ho/*|*/ist =\n  mechanism(",
      "\n// loadmark-allow past-peak: reason\nexport const hoist =\n  mechanism(",
    ],
  ])("stands above the mechanism %s", (_, declaration, expected) => {
    const end = declaration.startsWith("class") ? ");\n}" : declaration.startsWith("const all") ? "),\n};" : ");";
    const source = pastPeak(robot())
      .replace("export const hoist = mechanism(", declaration)
      .replace(/\);\n$/, `${end}\n`);
    const { text, rules } = allowed(source);
    expect(text).toContain(expected);
    expect(rules).toEqual([]);
  });

  it("keeps the file's line breaks", () => {
    const source = pastPeak(robot()).replace("const hoist", "const ho/*|*/ist").replaceAll("\n", "\r\n");
    const { text } = allowed(source);
    expect(text).toContain("// loadmark-allow past-peak: reason\r\nexport const hoist");
  });

  it("is not offered for what the code says wrongly", () => {
    expect(offeredIn(robot(MOTOR, "spur(20, teeth/*|*/())")).fixes.filter(({ kind }) => kind === "allow")).toEqual([]);
    expect(offeredIn(robot(MOTOR, "spur(20, 0/*|*/)")).fixes.filter(({ kind }) => kind === "allow")).toEqual([]);
  });

  it("is not offered elsewhere", () => {
    expect(offeredIn(pastPeak(robot()).replace("import {", "im/*|*/port {")).fixes).toEqual([]);
  });
});

describe("proposals", () => {
  const asked = (source: string) => {
    const { analysis, cursor } = analyseWithCursor(source);
    const { analyse } = createAnalyser(ts);
    const proposals = findingsTouching(analysis, cursor.file, cursor.offset, cursor.offset).flatMap((finding) =>
      proposalsFor(analysis, finding, analyse),
    );
    return quickFixesAt(analysis, cursor.file, cursor.offset, cursor.offset, proposals);
  };

  it("stand before the allowance, each with what it predicts and what gets worse", () => {
    const fixes = asked(robot(MOTOR, "spur(20, 60)").replace("const hoist", "const ho/*|*/ist"));
    const kinds = fixes.map(({ kind }) => kind);
    expect(kinds.indexOf("allow")).toBeGreaterThan(kinds.lastIndexOf("propose"));
    expect(kinds).toContain("propose");
    expect(fixes[0]?.title).toMatch(/^Stage 1 with \d+ and \d+ teeth: ratio [\d.]+, \d+ % of stall, [\d.]+ A per motor/);
  });

  it("tell the nearest miss, which changes nothing, where nothing in stock helps", () => {
    const settings = '//- loadmark.json\n{ "toothCounts": [16, 18, 20] }\n//- robot.ts\n';
    const heavy = robot(MOTOR, "spur(16, 18)").replace('"10 kg"', '"90 kg"').replace("const hoist", "const ho/*|*/ist");
    const misses = asked(settings + heavy).filter(({ finding, kind }) => finding.rule === "stalls" && kind === "propose");
    expect(misses).toMatchObject([{ title: expect.stringMatching(/^Nothing in stock clears it; nearest: /), edits: [] }]);
  });

  it("for a robot come with an allowance above it", () => {
    const source = `import { battery, lift, mechanism, motor, robot, spur } from "loadmark";
const pack = battery({ openCircuit: "12 V", resistance: "100 mohm", mustStayAbove: "10.5 V" });
const load = lift({ mass: "5 kg", drumRadius: "20 mm", travel: "0.4 m" });
const left = mechanism("left", { motor: ${MOTOR}, stages: [spur(20, 80)], load });
const right = mechanism("right", { motor: ${MOTOR}, motorCount: 2, stages: [spur(20, 80)], load });
export const mo/*|*/ver = robot("mover", { supply: pack, mechanisms: [left, right], loadCycle: [{ lasts: "4 s", moving: [left, right] }] });
`;
    const fixes = asked(source).filter(({ finding }) => finding.rule === "sags");
    expect(fixes[0]?.title).toMatch(/^"(left|right)" in a step of its own behind step 1, [\d.]+ s: supply down to /);
    const last = fixes.at(-1);
    expect(last).toMatchObject({ kind: "allow", title: 'Allow "sags" for this robot' });
    expect(last?.edits[0]?.newText).toBe("// loadmark-allow sags: reason\n");
  });
});
