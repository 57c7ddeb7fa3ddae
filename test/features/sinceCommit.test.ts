/** How a change since the last commit is told, against what the hand works out for both. */
import { describe, expect, it } from "vitest";
import type { AnalysedMechanism } from "../../extension/analysis/analysis.js";
import { codeLensesOf } from "../../extension/features/codeLenses.js";
import { movedSince, sinceCommitLine } from "../../extension/features/sinceCommit.js";
import { analyseFixture } from "../support/checkFindings.js";
import { handPoint, liftTime, liftTorque, MOTOR, perCent, three } from "../support/handNumbers.js";

function hoist(driven: number, mass = "10 kg"): AnalysedMechanism {
  return analysed(driven, mass).mechanism;
}

function analysed(driven: number, mass = "10 kg") {
  const analysis = analyseFixture(`import { lift, mechanism, motor, spur } from "loadmark";
export const hoist = mechanism("hoist", {
  motor: ${MOTOR},
  stages: [spur(20, ${driven}, { efficiency: 1 })],
  load: lift({ mass: ${JSON.stringify(mass)}, drumRadius: "50 mm", travel: "0.8 m" }),
});`);
  const [mechanism] = analysis.mechanisms;
  if (mechanism === undefined) throw new Error("no mechanism");
  return { analysis, mechanism };
}

const at = (ratio: number) => handPoint(liftTorque(10, 0.05), ratio, 1);

describe("what changed since the last commit", () => {
  it("is told with the unit once, the current first", () => {
    const [now, before] = [hoist(80), hoist(120)];
    const time = (ratio: number) => three(liftTime(10, 0.05, 0.8, ratio, 1));
    expect(movedSince(() => before, now)).toEqual([
      `current ${three(at(6).currentA)} → ${three(at(4).currentA)} A`,
      `share of stall ${Math.round(at(6).share * 100)} → ${perCent(at(4).share)}`,
      `travel ${time(6)} → ${time(4)} s`,
      "ratio 6 → 4",
    ]);
    expect(sinceCommitLine(() => before, now)).toMatch(/^current .* A, share of stall .*, ratio 6 → 4 since the last commit$/);
  });

  it("keeps both units where they differ", () => {
    // 1 kg asks 0.49 N·m at the drum; at 1:4 that is 0.123 N·m of 3, 0.3 + 5.7·0.041 A = 533 mA.
    expect(movedSince(() => hoist(80, "1 kg"), hoist(80))[0]).toBe(`current 533 mA → ${three(at(4).currentA)} A`);
  });

  it("tells of a travel that no longer arrives", () => {
    expect(movedSince(() => hoist(80), hoist(20))).toContainEqual(expect.stringMatching(/^travel [\d.]+ s → never arrives$/));
  });

  it("is silent where nothing moved, where nothing is known, and where a side has no numbers", () => {
    const now = hoist(80);
    expect(sinceCommitLine(() => hoist(80), now)).toBeUndefined();
    expect(sinceCommitLine(() => undefined, now)).toBeUndefined();
    const unknown = { ...now };
    Reflect.deleteProperty(unknown, "numbers");
    expect(sinceCommitLine(() => unknown, now)).toBeUndefined();
    expect(sinceCommitLine(() => now, unknown)).toBeUndefined();
  });

  it("says of a mechanism that it is new", () => {
    expect(sinceCommitLine(() => null, hoist(80))).toBe("New since the last commit.");
  });

  it("stands at the end of the lens, and moves no lens", () => {
    const { analysis } = analysed(80);
    const [plain] = codeLensesOf(analysis, "/robot/robot.ts");
    const [lens] = codeLensesOf(analysis, "/robot/robot.ts", () => hoist(120));
    expect(lens?.span).toEqual(plain?.span);
    expect(lens?.title).toBe(
      `${plain?.title} · current ${three(at(6).currentA)} → ${three(at(4).currentA)} A since the last commit`,
    );
    const [fresh] = codeLensesOf(analysis, "/robot/robot.ts", () => null);
    expect(fresh?.title).toBe(plain?.title);
  });
});
