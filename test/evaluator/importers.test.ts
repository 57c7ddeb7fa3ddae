/** Exported objects, and the files that import them. */
import { describe, expect, it } from "vitest";
import { createImportIndex } from "../../extension/evaluator/importIndex.js";
import type { FileEvaluation } from "../../extension/evaluator/value.js";
import { indexed, makeEvaluator, rootOf, splitFiles } from "./support/workspace.js";

const CONSTANTS = `//- constants.ts
export const GEARS = { hoist: 40, in: { deep: 7 } };
//- main.ts
import { gear } from "gearbox"; import { GEARS } from "./constants"; gear({ teeth: GEARS.hoist });
`;

function outcomeOf({ calls }: FileEvaluation): unknown {
  const [call] = calls;
  const [part] = call?.unknowns ?? [];
  return part === undefined ? Reflect.get(call?.built ?? {}, "teeth") : rootOf(part).reason.code;
}

function outcome(fixture: string): unknown {
  return outcomeOf(makeEvaluator().evaluateFile("/main.ts", indexed(splitFiles(fixture))));
}

describe("an exported object", () => {
  it.each<[string, string]>([
    ["nobody else imports", ""],
    [
      "is only read",
      '//- other.ts\nimport { GEARS } from "./constants"; export const n = GEARS.hoist; setUp(GEARS.hoist); console.log(GEARS);\n',
    ],
    ["is read through a namespace", '//- other.ts\nimport * as c from "./constants"; setUp(c.GEARS.hoist);\n'],
    [
      "has a namesake that is changed",
      '//- other.ts\nimport { GEARS } from "./sub/constants"; GEARS.hoist = 5;\n//- sub/constants.ts\nexport const GEARS = { hoist: 1 };\n',
    ],
  ])("that %s counts", (_name, more) => {
    expect(outcome(CONSTANTS + more)).toBe(40);
  });

  it.each<[string, string]>([
    ["changed", 'import { GEARS } from "./constants"; GEARS.hoist = 5;'],
    ["changed under another name", 'import { GEARS as g } from "./constants.js"; g.hoist++;'],
    ["changed inside", 'import { GEARS } from "./constants"; const { in: i } = GEARS; i.deep = 5;'],
    ["given away", 'import { GEARS } from "./constants"; setUp(GEARS);'],
    ["changed through a namespace", 'import * as c from "./constants"; c.GEARS.hoist = 5;'],
    [
      "changed through a namespace that is taken apart",
      'import * as c from "./constants"; const { GEARS } = c; GEARS.hoist = 5;',
    ],
    ["given away with a namespace", 'import * as c from "./constants"; setUp(c);'],
    ["changed through require", 'const c = require("./constants"); c.GEARS.hoist = 5;'],
    ["changed through import()", 'const c = await import("./constants"); c.GEARS.hoist = 5;'],
    ["changed through import().then", 'import("./constants").then((c) => { c.GEARS.hoist = 5; });'],
    [
      "changed through a barrel",
      'import { GEARS } from "./barrel"; GEARS.hoist = 5;\n//- barrel.ts\nexport { GEARS } from "./constants";',
    ],
    ["changed through a star", 'import { GEARS } from "./barrel"; GEARS.hoist = 5;\n//- barrel.ts\nexport * from "./constants";'],
    [
      "changed through a renaming barrel",
      'import { G } from "./barrel"; G.hoist = 5;\n//- barrel.ts\nimport { GEARS } from "./constants"; export { GEARS as G };',
    ],
    [
      "changed through a barrel's namespace",
      'import { c } from "./barrel"; c.GEARS.hoist = 5;\n//- barrel.ts\nexport * as c from "./constants";',
    ],
  ])("that another file has %s is unknown", (_name, code) => {
    expect(outcome(`${CONSTANTS}//- other.ts\n${code}\n`)).toBe("mutated");
  });

  it("counts when it is frozen, whatever others do", () => {
    const other = '//- other.ts\nimport { GEARS } from "./constants"; setUp(GEARS);\n';
    expect(outcome(CONSTANTS.replace("} };", "} } as const;") + other)).toBe(40);
    expect(outcome(CONSTANTS.replace("{ hoist: 40, in: { deep: 7 } }", "Object.freeze({ hoist: 40 })") + other)).toBe(40);
  });

  it("without a name is followed as well", () => {
    const fixture = `//- gears.json\n{ "hoist": 40 }\n//- main.ts\nimport { gear } from "gearbox"; import g from "./gears.json"; gear({ teeth: g.hoist });\n`;
    expect(outcome(fixture)).toBe(40);
    expect(outcome(`${fixture}//- other.ts\nimport g from "./gears.json"; g.hoist = 3;\n`)).toBe("mutated");
    const byDefault = CONSTANTS.replace("export const GEARS =", "export default").replace("{ GEARS }", "GEARS");
    expect(outcome(byDefault)).toBe(40);
    expect(outcome(`${byDefault}//- other.ts\nimport G from "./constants"; G.hoist = 3;\n`)).toBe("mutated");
  });

  it.each<[string, string, string]>([
    ["in another", "export const ALL = { g: GEARS };", 'import { ALL } from "./constants"; ALL.g.hoist = 5;'],
    ["by default, in a literal", "export default { g: { h: GEARS } };", 'import all from "./constants"; all.g.h.hoist = 5;'],
    [
      "under a second name",
      "export const SAME = GEARS;",
      'import { GEARS, SAME } from "./constants"; GEARS.hoist; SAME.hoist = 5;',
    ],
    ["in a list", "export const ALL = [GEARS];", 'import { ALL } from "./constants"; ALL[0].hoist = 5;'],
  ])("that is handed out %s is followed", (_name, also, code) => {
    const fixture = CONSTANTS.replace("//- main.ts", `${also}\n//- main.ts`);
    expect(outcome(fixture)).toBe(40);
    expect(outcome(`${fixture}//- other.ts\n${code}\n`)).toBe("mutated");
  });

  it("of a file that is no ES module is followed", () => {
    const fixture = `//- main.ts\nconst { gear } = require("gearbox"); const { GEARS } = require("./constants.cjs"); gear({ teeth: GEARS.hoist });
//- constants.cjs
const GEARS = { hoist: 40 }; module.exports = { GEARS };
`;
    expect(outcome(fixture)).toBe(40);
    expect(outcome(`${fixture}//- other.ts\nimport { GEARS } from "./constants.cjs"; GEARS.hoist = 5;\n`)).toBe("mutated");
    expect(outcome(`${fixture}//- other.ts\nimport c from "./constants.cjs"; c.GEARS.hoist = 5;\n`)).toBe("mutated");
    expect(outcome(`${fixture}//- other.cjs\nconst c = require("./constants.cjs"); c.GEARS.hoist = 5;\n`)).toBe("mutated");
  });

  it("is unknown until the files that import it are", () => {
    const files = splitFiles(`${CONSTANTS}//- other.ts\nimport { GEARS } from "./constants"; GEARS.hoist;\n`);
    const evaluator = makeEvaluator();
    const read = (file: string) => files.get(file) ?? null;
    expect(outcomeOf(evaluator.evaluateFile("/main.ts", { read, importersOf: () => undefined }))).toBe("mutated");
    const halfRead = evaluator.evaluateFile("/main.ts", {
      read: (file) => (file === "/other.ts" ? undefined : read(file)),
      importersOf: (file) => (file === "/constants.ts" ? ["/other.ts"] : []),
    });
    expect(outcomeOf(halfRead)).toBe("mutated");
    expect(halfRead.wanted).toEqual(["/other.ts"]);
    expect(outcomeOf(evaluator.evaluateFile("/main.ts", indexed(files)))).toBe(40);
  });
});

describe("an exported object that others import by another name", () => {
  const tsconfig = (paths: string) => `//- tsconfig.json\n{ "compilerOptions": { "paths": ${paths} } }\n`;
  const changed = (specifier: string) => `//- other.ts\nimport { GEARS } from "${specifier}"; GEARS.hoist = 5;\n`;

  it.each<[string, string]>([
    ["a path alias", tsconfig('{ "numbers": ["./constants.ts"] }') + changed("numbers")],
    ["a path alias with a sign", tsconfig('{ "@constants": ["./constants.ts"] }') + changed("@constants")],
    ["a path alias with a gap", tsconfig('{ "our-*": ["./*"] }') + changed("our-constants")],
    [
      "an import name of its package",
      `//- package.json\n{ "name": "robot", "imports": { "#numbers": { "default": "./constants.ts" } } }\n${changed("#numbers")}`,
    ],
  ])("through %s is followed there", (_name, more) => {
    expect(outcome(CONSTANTS + more)).toBe("mutated");
    expect(outcome(CONSTANTS + more.replace(" = 5", ";"))).toBe(40);
  });

  it("through a package of the workspace is followed there", () => {
    const workspace = (
      use: string,
    ) => `${CONSTANTS.replaceAll("constants.ts", "core/src/index.ts").replace('"./constants"', '"./core/src/index"')}//- package.json
{ "workspaces": ["core", "app"] }
//- core/package.json
{ "name": "@team/numbers", "private": true, "exports": "./src/index.ts" }
//- node_modules/@team/numbers/package.json
{ "name": "@team/numbers", "private": true, "exports": "./src/index.ts" }
//- app/package.json
{ "name": "app", "dependencies": { "@team/numbers": "*" } }
//- app/other.ts
import { GEARS } from "@team/numbers"; ${use}
`;
    const result = (use: string) => {
      const files = splitFiles(workspace(use));
      files.set("/node_modules/@team/numbers/src/index.ts", files.get("/core/src/index.ts") ?? "");
      const canonical = (file: string) => file.replace("/node_modules/@team/numbers/", "/core/");
      return outcomeOf(makeEvaluator().evaluateFile("/main.ts", { ...indexed(files), canonical }));
    };
    expect(result("GEARS.hoist;")).toBe(40);
    expect(result("GEARS.hoist = 5;")).toBe("mutated");
  });

  it("is followed anew when the project's aliases change", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(CONSTANTS + tsconfig("{}") + changed("numbers"));
    expect(outcomeOf(evaluator.evaluateFile("/main.ts", indexed(files)))).toBe(40);
    files.set("/tsconfig.json", '{ "compilerOptions": { "paths": { "numbers": ["./constants.ts"] } } }');
    expect(outcomeOf(evaluator.evaluateFile("/main.ts", indexed(files)))).toBe("mutated");
  });

  it("waits for the project's configuration", () => {
    const files = splitFiles(CONSTANTS);
    const read = (file: string) => (file === "/tsconfig.json" ? undefined : (files.get(file) ?? null));
    const evaluation = makeEvaluator().evaluateFile("/main.ts", { read, importersOf: () => [] });
    expect(outcomeOf(evaluation)).toBe("mutated");
    expect(evaluation.wanted).toEqual(["/tsconfig.json"]);
  });
});

describe("an edit of another file that imports the object", () => {
  const fixture = `${CONSTANTS}//- other.ts\nimport { GEARS } from "./constants"; GEARS.hoist;\n`;

  it("changes nothing while it leaves the object alone", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(fixture);
    const before = evaluator.evaluateFile("/main.ts", indexed(files));
    files.set("/other.ts", 'import { GEARS } from "./constants"; setUp(GEARS.hoist + 1);');
    expect(evaluator.evaluateFile("/main.ts", indexed(files))).toBe(before);
  });

  it("makes it unknown as soon as it changes it, and known again after", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(fixture);
    const edits: [string, string | undefined, unknown][] = [
      ["/other.ts", 'import { GEARS } from "./constants"; GEARS.hoist = 3;', "mutated"],
      ["/other.ts", "export {};", 40],
      ["/third.ts", 'import { GEARS } from "./constants"; setUp(GEARS);', "mutated"],
      ["/third.ts", undefined, 40],
    ];
    expect(outcomeOf(evaluator.evaluateFile("/main.ts", indexed(files)))).toBe(40);
    for (const [file, text, expected] of edits) {
      if (text === undefined) files.delete(file);
      else files.set(file, text);
      expect(outcomeOf(evaluator.evaluateFile("/main.ts", indexed(files)))).toBe(expected);
    }
  });
});

describe("the index of imports", () => {
  it.each<[string, string]>([
    ['import { a } from "./constants.js";', "/src/constants.ts"],
    ["import './constants'", "/src/constants.mts"],
    ['export * from "../shared";', "/shared/index.ts"],
    ['import x from ".";', "/src/index.ts"],
    ['import x from "..";', "/index.ts"],
    ['const c = require("./gears.json");', "/src/gears.json"],
    ['await import("./constants")', "/src/constants.ts"],
    ['import { T } from "#teeth";', "/src/teeth.ts"],
    ['import { T } from "@team/teeth";', "/packages/teeth/src/index.ts"],
    ['import {\n  a,\n} from\n  "./constants";', "/src/constants.ts"],
  ])("finds %j", (text, file) => {
    const index = createImportIndex();
    index.set("/src/user.ts", text);
    index.set("/src/stranger.ts", 'import { b } from "./elsewhere";');
    expect(index.importersOf(file)).toEqual(["/src/user.ts"]);
    index.set("/src/user.ts", "export {};");
    expect(index.importersOf(file)).toEqual([]);
  });

  it("forgets a file", () => {
    const index = createImportIndex();
    index.set("/a.ts", 'import "./b";');
    index.delete("/a.ts");
    expect(index.importersOf("/b.ts")).toEqual([]);
  });

  it("says whether a text imports something else than before", () => {
    const index = createImportIndex();
    const text = 'import "./b"; export const n = 1;';
    expect([index.differs("/a.ts", text), index.set("/a.ts", text)]).toEqual([true, true]);
    const edited = text.replace("1", "2");
    expect([index.differs("/a.ts", edited), index.set("/a.ts", edited)]).toEqual([false, false]);
    expect(index.differs("/a.ts", 'import "./c";')).toBe(true);
    expect([index.delete("/a.ts"), index.delete("/a.ts")]).toEqual([true, false]);
  });

  it("hands out views that stay as they are, and the same one while nothing changes", () => {
    const index = createImportIndex();
    index.set("/a.ts", 'import "./b";');
    const early = index.capture();
    index.set("/a.ts", 'import "./b"; export {};');
    expect(index.capture()).toBe(early);
    index.set("/c.ts", 'import "./b";');
    index.delete("/a.ts");
    expect([...early.files()]).toEqual(["/a.ts"]);
    expect(early.importersOf("/b.ts")).toEqual(["/a.ts"]);
    expect(index.capture().importersOf("/b.ts")).toEqual(["/c.ts"]);
  });
});
