/** Mechanisms that shared helpers, loops and barrels declare: each once, by its own name, with its own findings. */

import { describe, expect, it } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { Analysis } from "../../extension/analysis/analysis.js";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";
import { readFixture } from "../support/fixture.js";
import { parser as ts } from "../support/parser.js";

/** As a host does it: the files that name the library are the roots. */
function analyseAsHost(text: string): Analysis {
  const { files, snapshot } = readFixture(text);
  const roots = [...files].filter(([, content]) => content.includes("loadmark")).map(([file]) => file);
  return createAnalyser(ts).analyse(roots, snapshot);
}

function namesOf({ mechanisms }: Analysis): string[] {
  return mechanisms.map(({ name, numbers }) => `${name}${numbers === undefined ? " unknown" : ""}`);
}

const ROLL = '{ motor: twelveVolt, stages: [], load: roller({ torque: "0.2 N*m" }) }';

const HELPER = `//- make.ts
${PRELUDE}export const make = (name: string, torque: \`\${number} N*m\`) =>
  mechanism(name, { motor: twelveVolt, stages: [], load: roller({ torque }) });
`;

describe("a helper that other files call", () => {
  it("declares what they ask for, and has no finding of its own", () => {
    const analysis = analyseAsHost(`${HELPER}//- main.ts
import { make } from "./make";
export const left = make("left", "0.2 N*m");
//- second.ts
import { make } from "./make.js";
for (const name of ["near", "far"] as const) make(name, "0.3 N*m");
`);
    expect(namesOf(analysis)).toEqual(["left", "near", "far"]);
    expect(analysis.findings).toEqual([]);
  });

  it("has each finding by the name of its own mechanism", () => {
    const { findings } = checkFindings(`//- make.ts
${PRELUDE}export const make = (name: string, torque: \`\${number} N*m\`) =>
  mechanism(name, { motor: twelveVolt, stages: [], load: roller({ torque }) });
  //        ^^^^ warning past-peak: left: Past its peak of power: each motor gives 1.2
  //        ^^^^ warning past-peak: right: Past its peak of power: each motor gives 1.5
//- main.ts
import { make } from "./make";
export const left = make("left", "1.2 N*m");
export const right = make("right", "1.5 N*m");
export const fine = make("fine", "0.2 N*m");
`);
    expect(findings.map(({ mechanism }) => mechanism)).toEqual(["left", "right"]);
  });

  it("tells a mistake of its own once, however often it is called", () => {
    checkFindings(`//- make.ts
${PRELUDE}export const make = (name: string) => mechanism(name, { motor: twelveVolt, stags: [], load: roller({ torque: "1 N*m" }) });
//                                                                         ^^^^^ error bad-declaration: stags
//- main.ts
import { make } from "./make";
make("left");
make("right");
`);
  });

  it("passes through helpers and barrels in between", () => {
    const analysis = analyseAsHost(`${HELPER}//- pair.ts
import { make } from "./make";
export const makePair = (name: string) => [make(\`\${name} left\`, "0.2 N*m"), make(\`\${name} right\`, "0.2 N*m")];
//- index.ts
export * from "./pair";
//- robot/main.ts
import { makePair } from "../index.js";
export const arms = makePair("arm");
`);
    expect(namesOf(analysis)).toEqual(["arm left", "arm right"]);
    expect(analysis.findings).toEqual([]);
  });

  it("without parameters declares once, whoever calls it", () => {
    const analysis = analyseAsHost(`//- make.ts
${PRELUDE}export const build = () => mechanism("hub", ${ROLL});
//- main.ts
import { build } from "./make"; import {} from "loadmark"; build();
//- second.ts
import { build } from "./make"; import {} from "loadmark"; build();
`);
    expect(namesOf(analysis)).toEqual(["hub"]);
    expect(analysis.findings).toEqual([]);
  });

  it("that nobody calls says what is not known", () => {
    const analysis = analyseAsHost(HELPER);
    expect(namesOf(analysis)).toEqual(["mechanism unknown"]);
    expect(analysis.findings.map(({ rule }) => rule)).toEqual(["not-constant", "not-constant"]);
  });

  it("keeps what is open where a caller knows no more", () => {
    const analysis = analyseAsHost(`${HELPER}//- main.ts
import { make } from "./make";
export const left = make("left", readTorque());
`);
    expect(namesOf(analysis)).toEqual(["left unknown"]);
    expect(analysis.findings.map(({ rule }) => rule)).toEqual(["not-constant"]);
  });

  it("is evaluated anew only where something changed", () => {
    const { files, snapshot } = readFixture(`${HELPER}//- main.ts
import { make } from "./make";
export const left = make("left", "0.2 N*m");
//- alone.ts
${PRELUDE}export const hub = mechanism("hub", ${ROLL});
`);
    const { analyse } = createAnalyser(ts);
    const before = analyse([...files.keys()], snapshot);
    const same = analyse([...files.keys()], { ...snapshot });
    const edited = new Map(files).set("/robot/main.ts", (files.get("/robot/main.ts") ?? "").replace("0.2", "0.3"));
    const after = analyse([...files.keys()], { ...snapshot, read: (file) => edited.get(file) ?? null });
    const kept = (one: Analysis) =>
      [...one.files].filter(([file, each]) => each === before.files.get(file)).map(([file]) => file);
    expect(kept(same)).toEqual(["/robot/alone.ts", "/robot/main.ts", "/robot/make.ts"]);
    expect(kept(after)).toEqual(["/robot/alone.ts"]);
  });

  it("stands in the order of files and positions", () => {
    const analysis = analyseAsHost(`//- a.ts
import { make } from "./make";
export const late = make("late", "0.2 N*m");
//- b.ts
${PRELUDE}export const middle = mechanism("middle", ${ROLL});
${HELPER}export const last = mechanism("last", ${ROLL});
`);
    expect(namesOf(analysis)).toEqual(["middle", "late", "last"]);
    for (const [file, { calls }] of analysis.files) for (const { span } of calls) expect(span.file).toBe(file);
  });
});

describe("a loop", () => {
  it("gives each mechanism its own name and finding", () => {
    const { findings, mechanisms } = checkFindings(`${PRELUDE}
for (const [name, torque] of [["left", "1.2 N*m"], ["right", "1.5 N*m"], ["fine", "0.2 N*m"]] as const) {
  mechanism(name, { motor: twelveVolt, stages: [], load: roller({ torque }) });
  //        ^^^^ warning past-peak: left: Past its peak of power: each motor gives 1.2
  //        ^^^^ warning past-peak: right: Past its peak of power: each motor gives 1.5
}
`);
    expect(mechanisms.map(({ name }) => name)).toEqual(["left", "right", "fine"]);
    expect(findings.map(({ mechanism }) => mechanism)).toEqual(["left", "right"]);
  });

  it("tells of a name that it gives twice", () => {
    checkFindings(`${PRELUDE}
for (const torque of ["0.1 N*m", "0.2 N*m"] as const) {
  mechanism("same", { motor: twelveVolt, stages: [], load: roller({ torque }) });
  //        ^^^^^^ error bad-declaration: same
}
`);
  });
});

describe("builders that come through another file", () => {
  it.each<[string, string]>([
    ["by a star", 'export * from "loadmark";'],
    ["by name", 'export { mechanism, motor as twelve, roller } from "loadmark";'],
    ["imported and exported", 'import { mechanism, motor, roller } from "loadmark"; export { mechanism, motor, roller };'],
    ["in two steps", 'export * from "./deep";\n//- deep.ts\nexport * from "loadmark";'],
  ])("%s", (_name, barrel) => {
    const analysis = analyseAsHost(`//- kit.ts
${barrel}
//- motors.ts
${PRELUDE}export const sheet = twelveVolt;
//- main.ts
import { mechanism, roller } from "./kit.js";
import { sheet } from "./motors.js";
export const hub = mechanism("hub", { motor: sheet, stages: [], load: roller({ torque: "1.2 N*m" }) });
//- stranger.ts
import { hub } from "./kit.js";
`);
    expect(namesOf(analysis)).toEqual(["hub"]);
    expect(analysis.findings.map(({ rule, at }) => `${rule} ${at.file}`)).toEqual(["past-peak /robot/main.ts"]);
  });

  it("by an alias of another name", () => {
    const analysis = analyseAsHost(`//- tsconfig.json
{ "compilerOptions": { "paths": { "parts": ["./kit.ts"] } } }
//- kit.ts
export * from "loadmark";
//- main.ts
import { mechanism, motor, roller } from "parts";
const sheet = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
export const hub = mechanism("hub", { motor: sheet, stages: [], load: roller({ torque: "0.2 N*m" }) });
`);
    expect(namesOf(analysis)).toEqual(["hub"]);
  });

  it("are looked for no further than where they lead", () => {
    const analysis = analyseAsHost(`${HELPER.replace("make =", "unused =")}//- main.ts
import { unused } from "./make";
//- other.ts
import "./main";
`);
    expect([...analysis.files.keys()]).toEqual(["/robot/main.ts", "/robot/make.ts"]);
  });
});
