/** Notes beside the code: what they say, where they stand, and that they stay short. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { inlayHintsIn, LONGEST_LABEL } from "../../extension/features/inlayHints.js";
import { analyseWithCursor } from "../support/cursorFixture.js";
import { handPoint, liftTorque, MOTOR, perCent, three } from "../support/handNumbers.js";

/** The source with each hint's label in brackets behind the characters that it stands behind. */
function withHints(source: string, file = "/robot/robot.ts"): string {
  const { analysis, files } = analyseWithCursor(source);
  const text = files.get(file) ?? "";
  const hints = inlayHintsIn(analysis, file, 0, text.length);
  return hints.reduceRight((shown, { offset, label }) => `${shown.slice(0, offset)}[${label}]${shown.slice(offset)}`, text);
}

function hoist(stages: string, rest = ""): string {
  return `import { lift, mechanism, motor, reduction, spur } from "loadmark";
const slow = ${MOTOR};
export const hoist = mechanism("hoist", { motor: slow, stages: ${stages}, load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }), ${rest} });
`;
}

const OUTPUT_NM = liftTorque(10, 0.05);

describe("inlayHintsIn", () => {
  it("gives torque and speed behind each stage, and the share of stall at the name", () => {
    const shown = withHints(hoist("[spur(20, 40), reduction(2, { efficiency: 0.9 })]"));
    const hand = handPoint(OUTPUT_NM, 4, 0.98 * 0.9);
    expect(shown).toContain(`mechanism("hoist"[${perCent(hand.share)} of stall], {`);
    // Three digits where they fit into 16 characters, else two.
    const two = (value: number): string => String(Number(value.toPrecision(2)));
    expect(shown).toContain(`spur(20, 40)[${two(hand.motorNm * 2 * 0.98)} N·m ${two(hand.motorRpm / 2)} rpm]`);
    expect(shown).toContain(`reduction(2, { efficiency: 0.9 })[${three(OUTPUT_NM)} N·m ${three(hand.outputRpm)} rpm]`);
  });

  it("counts the torque of all motors", () => {
    expect(withHints(hoist("[spur(20, 40)]", "motorCount: 2"))).toContain(`spur(20, 40)[${three(OUTPUT_NM)} N·m `);
  });

  it("says that it stalls", () => {
    const shown = withHints(hoist("[spur(20, 20)]"));
    expect(shown).toContain('mechanism("hoist"[stalls], {');
    expect(shown).toContain("spur(20, 20)[4.9 N·m stall]");
  });

  it("stands where a stage is used, not where it is declared", () => {
    const source = hoist("[pair]").replace("export", "const pair = spur(20, 80);\nexport");
    const shown = withHints(source);
    expect(shown).toContain("stages: [pair[");
    expect(shown).toContain("const pair = spur(20, 80);");
  });

  it("stands in the file that holds the text", () => {
    const source = `//- stages.ts
import { spur } from "loadmark";
export const stages = [spur(20, 80)];
//- hoist.ts
import { lift, mechanism, motor } from "loadmark";
import { stages } from "./stages.js";
export const hoist = mechanism("hoist", { motor: ${MOTOR}, stages, load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }) });
`;
    expect(withHints(source, "/robot/stages.ts")).toContain("[spur(20, 80)[4.9 N·m 17.5 rpm]]");
    expect(withHints(source, "/robot/hoist.ts").match(/\[/g)).toHaveLength(1);
  });

  it("says nothing of what cannot be known", () => {
    const source = hoist("[spur(20, 40 * Math.random())]");
    expect(withHints(source)).toBe(analyseWithCursor(source).files.get("/robot/robot.ts"));
  });

  it("keeps to the range that is asked for", () => {
    const { analysis, files } = analyseWithCursor(hoist("[spur(20, 80)]"));
    const text = files.get("/robot/robot.ts") ?? "";
    const at = text.indexOf("spur(20, 80)") + "spur(20, 80)".length;
    expect(inlayHintsIn(analysis, "/robot/robot.ts", at, at).map(({ offset }) => offset)).toEqual([at]);
    expect(inlayHintsIn(analysis, "/robot/robot.ts", 0, at - 1)).toHaveLength(1);
  });

  it("keeps hostile names out of the tooltip's way", () => {
    const { analysis } = analyseWithCursor(hoist("[spur(20, 80)]").replace('"hoist"', '"a\\n\u202Eb"'));
    for (const { tooltip } of inlayHintsIn(analysis, "/robot/robot.ts", 0, 1e6)) expect(tooltip).toMatch(/^a b: /);
  });

  it(`never gives a label longer than ${LONGEST_LABEL} characters`, () => {
    const positive = fc.double({ min: 1e-9, max: 1e9, noNaN: true });
    let seen = 0;
    fc.assert(
      fc.property(positive, positive, positive, fc.integer({ min: 1, max: 9999 }), (stall, rpm, mass, driven) => {
        const source = hoist(`[spur(17, ${driven})]`)
          .replace('"3 N*m"', `"${stall} N*m"`)
          .replace('"120 rpm"', `"${rpm} rpm"`)
          .replace('"10 kg"', `"${mass} kg"`);
        const { analysis } = analyseWithCursor(source);
        for (const { label } of inlayHintsIn(analysis, "/robot/robot.ts", 0, 1e6)) {
          seen += 1;
          expect(label.length).toBeLessThanOrEqual(LONGEST_LABEL);
          expect(label).not.toMatch(/NaN|Infinity|undefined|null/);
        }
      }),
      { numRuns: 60, seed: 7 },
    );
    expect(seen).toBeGreaterThan(30);
  });
});
