/** The probe on the torque axis: the point by the motor's line, and the number in the code that brings the mechanism there. */
import { describe, expect, it } from "vitest";
import { createAnalyser } from "../../../extension/analysis/analyser.js";
import { withEdits } from "../../../extension/analysis/writeChange.js";
import { type Probe, probeAt, probeEdits } from "../../../extension/features/charts/probe.js";
import { readFixture } from "../../support/fixture.js";
import { gearedRobot } from "../../support/gearedRobot.js";
import { handPoint, liftTorque, MOTOR, SHEET } from "../../support/handNumbers.js";
import { parser as ts } from "../../support/parser.js";

const LOAD_NM = liftTorque(10, 0.05);

function open(source: string) {
  const { files, snapshot } = readFixture(source);
  const { analyse } = createAnalyser(ts);
  const analysis = analyse([...files.keys()], snapshot);
  return {
    analysis,
    probe(torqueNm: number): Probe {
      const found = probeAt(analysis, "hoist", torqueNm, analyse);
      if (found === undefined) throw new Error("There is no probe.");
      return found;
    },
    /** The texts with the probe written to them. */
    written(torqueNm: number): Map<string, string> {
      const changed = withEdits(snapshot, probeEdits(analysis, "hoist", torqueNm) ?? []);
      return new Map([...files.keys()].map((file) => [file, String(changed.read(file))]));
    },
  };
}

function single(stages: string): string {
  return `import { chain, lift, mechanism, motor, planetary, reduction, spur } from "loadmark";
const slow = ${MOTOR};
export const hoist = mechanism("hoist", { motor: slow, stages: [${stages}], load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }) });
`;
}

describe("a probe", () => {
  it("answers with the point on the line, and with standstill beyond it", () => {
    const { probe } = open(single("spur(20, 80)"));
    const { point } = probe(0.9);
    const share = 0.9 / SHEET.stallNm;
    expect(point.speedRadPerS).toBeCloseTo((SHEET.noLoadRpm * Math.PI * (1 - share)) / 30, 9);
    expect(point.currentA).toBeCloseTo(SHEET.noLoadA + (SHEET.stallA - SHEET.noLoadA) * share, 9);
    expect(point.stalls).toBe(false);
    expect(probe(3.5).point).toMatchObject({ stalls: true, speedRadPerS: 0 });
  });

  it("finds the driven gear whose ratio asks for that torque, and tells what comes of it", () => {
    const { probe, written } = open(single("spur(20, 80)"));
    // Wanted are LOAD / (0.98 · i) = 0.9 N·m: i = 5.56, with 20 teeth driving 111.
    const driven = Math.round((20 * LOAD_NM) / (0.98 * 0.9));
    const { change, cannot } = probe(0.9);
    expect(cannot).toBeNull();
    expect(change?.words).toBe(`stage 1 with 20 and ${driven} teeth`);
    const hand = handPoint(LOAD_NM, driven / 20, 0.98);
    expect(change?.needed.torqueNm).toBeCloseTo(hand.motorNm, 9);
    expect(change?.needed.currentA).toBeCloseTo(hand.currentA, 9);
    expect(change?.needed.stallShare).toBeCloseTo(hand.share, 9);
    expect(change?.ratio).toBeCloseTo(driven / 20, 12);
    expect(change?.others).toEqual([]);
    expect([...written(0.9).values()][0]).toBe(single(`spur(20, ${driven})`));
  });

  it("writes a constant where that is declared, and names what else it changes", () => {
    const { probe, written } = open(
      `${gearedRobot({})}//- second.ts
import { lift, mechanism, spur } from "loadmark";
import { WHEEL } from "./gearing.js";
import { slow } from "./motors.js";
export const second = mechanism("second", { motor: slow, stages: [spur(20, WHEEL)], load: lift({ mass: "2 kg", drumRadius: "50 mm", travel: "0.8 m" }) });
`,
    );
    const driven = Math.round((20 * LOAD_NM) / (0.98 * 1.5));
    expect(probe(1.5).change?.others).toEqual(["second"]);
    expect(written(1.5).get("/robot/gearing.ts")).toContain(`WHEEL = ${driven};`);
  });

  it("writes a plain ratio in three digits", () => {
    const { written } = open(single("reduction(4, { efficiency: 1 })"));
    const ratio = Number((LOAD_NM / 0.7).toPrecision(3));
    expect([...written(0.7).values()][0]).toBe(single(`reduction(${ratio}, { efficiency: 1 })`));
  });

  it("takes the stage that comes nearest", () => {
    const { probe } = open(single("spur(20, 40), reduction(2, { efficiency: 1 })"));
    expect(probe(0.777).change?.words).toMatch(/^stage 2 with a ratio of/);
  });

  it("keeps to the stock that the project names", () => {
    const { probe } = open(`//- loadmark.json
{ "toothCounts": [20, 60, 80, 100, 120] }
//- robot.ts
${single("spur(20, 80)")}`);
    expect(probe(0.9).change?.words).toBe("stage 1 with 20 and 120 teeth");
  });

  it("says why nothing can be written", () => {
    expect(open(single("")).probe(0.9).cannot).toContain("no stage");
    expect(open(single("reduction(between(3, 5))").replace("chain,", "between,")).probe(0.9).cannot).toContain(
      "No stage has a ratio",
    );
    expect(open(single("planetary(20, 60)")).probe(0.9).cannot).toContain("No stage has a ratio");
    expect(open(single("spur(20, 80)")).probe(0).cannot).toContain("No ratio");
  });
});
