/** `loadmark.json`: the nearest one above a file sets the levels there. */

import { describe, expect, it } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import { analyseFixture, checkFindings, PRELUDE } from "../support/checkFindings.js";
import { parser as ts } from "../support/parser.js";

const hub = (name: string) =>
  `export const ${name} = mechanism("${name}", { motor: twelveVolt, stages: [], load: roller({ torque: "1.2 N*m" }) });`;

describe("project settings", () => {
  it("set the level of a rule, the nearest file alone", () => {
    checkFindings(`//- loadmark.json
{ "levels": { "past-peak": "error" } }
//- near/loadmark.json
{ "levels": { "stalls": "warning" } }
//- one.ts
${PRELUDE}${hub("one")}
//           ^^^ error past-peak: 1.2 N·m
//- near/two.ts
${PRELUDE}${hub("two")}
//           ^^^ warning past-peak: 1.2 N·m`);
  });

  it("turn a rule off", () => {
    checkFindings(`//- loadmark.json
{ "levels": { "past-peak": "off" } }
//- one.ts
${PRELUDE}${hub("one")}`);
  });

  it("give one finding in a broken file, and defaults elsewhere", () => {
    const { findings } = analyseFixture(`//- loadmark.json
{ "levels": { "past-peak": "loud" } }
//- one.ts
${PRELUDE}${hub("one")}
//- two.ts
${PRELUDE}${hub("two")}`);
    expect(findings.map(({ rule, level, at }) => [rule, level, at.file])).toEqual([
      ["bad-declaration", "error", "/robot/loadmark.json"],
      ["past-peak", "warning", "/robot/one.ts"],
      ["past-peak", "warning", "/robot/two.ts"],
    ]);
  });

  it("are asked for where the snapshot has not loaded them", () => {
    const text = PRELUDE + hub("one");
    const { wanted } = createAnalyser(ts).analyse(["/robot/one.ts"], {
      read: (file) => (file === "/robot/one.ts" ? text : undefined),
    });
    expect(wanted).toContain("/robot/loadmark.json");
    expect(wanted).toContain("/loadmark.json");
  });
});
