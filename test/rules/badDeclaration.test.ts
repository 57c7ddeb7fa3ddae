import { describe, expect, it } from "vitest";
import { analyseFixture, checkFindings, PRELUDE } from "../support/checkFindings.js";

/** A second mechanism, to see that the rest of the file is still analysed. */
const REST = `
export const rest = mechanism("rest", { motor: twelveVolt, stages: [], load: roller({ torque: "1.2 N*m" }) });
//           ^^^^ warning past-peak: 1.2 N·m`;

describe("bad-declaration: exactly one located finding each, the rest of the file still analysed", () => {
  it.each([
    ["an unknown unit", 'lift({ mass: "20 stones", drumRadius: "40 mm", travel: "1 m" })', '"20 stones"', "not a known unit"],
    ["a mistyped unit", 'lift({ mass: "20 kgg", drumRadius: "40 mm", travel: "1 m" })', '"20 kgg"', 'did you mean "20 kg"?'],
    [
      "a wrong dimension",
      'lift({ mass: "20 V", drumRadius: "40 mm", travel: "1 m" })',
      '"20 V"',
      "is a voltage; here goes a mass",
    ],
    ["a negative mass", 'lift({ mass: "-20 kg", drumRadius: "40 mm", travel: "1 m" })', '"-20 kg"', "must be more than 0"],
    ["a plain number", 'lift({ mass: 20, drumRadius: "40 mm", travel: "1 m" })', "20", "Here goes a mass"],
    ["a typo", 'lift({ mas: "2 kg", drumRadius: "40 mm", travel: "1 m" })', "mas", 'did you mean "mass"?'],
    ["a missing field", 'lift({ mass: "2 kg", drumRadius: "40 mm" })', "lift", 'needs the field "travel"'],
    ["an unknown field", 'lift({ mass: "2 kg", drumRadius: "40 mm", travel: "1 m", colour: "red" })', "colour", "not a field"],
    ["an arm too long", 'arm({ mass: "2 kg", centreOfMass: "40 m", from: "0 deg", to: "9 deg" })', '"40 m"', "impossible"],
    ["no argument", "lift()", "lift", "missing an argument"],
  ])("%s", (_, load, marked, says) => {
    const line = `  load: ${load},`;
    const column = line.indexOf(marked, "  load: ".length);
    checkFindings(`${PRELUDE}
export const hoist = mechanism("hoist", {
  motor: twelveVolt,
  stages: [spur(16, 40)],
${line}
//${" ".repeat(column - 2)}${"^".repeat(marked.length)} error bad-declaration: ${says}
});${REST}`);
  });

  it.each([
    ["zero teeth", "spur(0, 40)", "0", "whole number from 1, not 0"],
    ["an efficiency above one", "spur(16, 40, { efficiency: 1.2 })", "1.2", "at most 1"],
    ["half a tooth", "spur(16, 40.5)", "40.5", "not 40.5"],
    ["a missing argument", "spur(16)", "spur", "driven gear's teeth"],
  ])("%s", (_, stage, marked, says) => {
    const line = `  stages: [${stage}],`;
    const column = line.indexOf(marked);
    checkFindings(`${PRELUDE}
export const hoist = mechanism("hoist", {
  motor: twelveVolt,
${line}
//${" ".repeat(column - 2)}${"^".repeat(marked.length)} error bad-declaration: ${says}
  load: roller({ torque: "1 N*m" }),
});${REST}`);
  });

  it("points at the use and relates the literal that the value came from", () => {
    const { findings } = checkFindings(`${PRELUDE}
const MASS = "20 V";
const shared = { mass: MASS, travel: "1 m" } as const;
export const hoist = mechanism("hoist", { motor: twelveVolt, stages: [], load: lift({ ...shared, drumRadius: "40 mm" }) });
//                                                                                    ^^^^^^^^^ error bad-declaration: is a voltage`);
    expect(findings[0]?.related).toHaveLength(1);
  });

  it("tells a name that is used twice, at the second use", () => {
    const { findings } = checkFindings(`${PRELUDE}
export const one = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }) });
export const two = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }) });
//                           ^^^^^ error bad-declaration: The name "hub" is used by another mechanism`);
    expect(findings[0]?.related).toHaveLength(1);
  });

  it("keeps what uses a bad declaration silent", () => {
    checkFindings(`${PRELUDE}
const wrong = motor({ voltage: "12 A", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
//                             ^^^^^^ error bad-declaration: is a current; here goes a voltage
export const one = mechanism("one", { motor: wrong, stages: [], load: roller({ torque: "9 N*m" }) });
export const two = mechanism("two", { motor: wrong, stages: [], load: roller({ torque: "9 N*m" }) });`);
  });

  it("tells of a value that is not written yet, at the place where it goes", () => {
    const text = `${PRELUDE}
export const hub = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: }) });${REST}`;
    const { findings } = analyseFixture(text);
    expect(findings.map(({ rule, message }) => [rule, message])).toEqual([
      ["bad-declaration", "Nothing is written here yet."],
      ["past-peak", expect.stringContaining("1.2 N·m")],
    ]);
    expect(text.slice((findings[0]?.at.start ?? 0) - "torque:".length)).toMatch(/^torque: \}/);
  });

  it.each([
    ["an open call", 'export const hub = mechanism("hub", { motor: twelveVolt, stages: [spur(16, '],
    ["an open string", 'export const hub = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*'],
    ["an open object", 'export const hub = mechanism("hub", { motor: twelveVolt, stages: [],'],
    ["a lone word", "export const hub = mechanism("],
  ])("half-typed code at the end of a file, %s, leaves what stands above it", (_, tail) => {
    const { findings } = analyseFixture(`${PRELUDE}${REST}\n${tail}`);
    const told = findings.map(({ rule }) => rule);
    expect(told.filter((rule) => rule === "past-peak")).toHaveLength(1);
    expect(told.filter((rule) => rule === "bad-declaration")).toHaveLength(1);
  });
});
