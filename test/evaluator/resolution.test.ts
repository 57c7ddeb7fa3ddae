/** Files found by alias, by a package's own names, in a workspace, and JSON. */
import { describe, expect, it } from "vitest";
import type { FileEvaluation, Snapshot } from "../../extension/evaluator/value.js";
import { dataOf, makeEvaluator, splitFiles, unknownOf } from "./support/workspace.js";

/** Loads what is wanted round by round, as a host would, and counts. */
function load(
  fixture: string,
  file: string,
  more: Partial<Snapshot> = {},
): { readonly result: FileEvaluation; readonly rounds: number; readonly asked: string[] } {
  const files = splitFiles(fixture);
  const loaded = new Map<string, string | null>([[file, files.get(file) ?? null]]);
  const evaluator = makeEvaluator();
  for (let rounds = 1; rounds < 40; rounds++) {
    const result = evaluator.evaluateFile(file, { read: (name) => loaded.get(name), ...more });
    if (result.wanted.length === 0) return { result, rounds, asked: [...loaded.keys()] };
    for (const name of result.wanted) {
      expect(loaded.has(name), `${name} is asked for twice`).toBe(false);
      loaded.set(name, files.get(name) ?? null);
    }
  }
  throw new Error("It never stops asking.");
}

function teethOf(fixture: string, file: string): { readonly teeth: unknown; readonly rounds: number; readonly asked: number } {
  const { result, rounds, asked } = load(fixture, file);
  return { teeth: Reflect.get(result.calls[0]?.built ?? {}, "teeth"), rounds, asked: asked.length };
}

const USE = (specifier: string): string =>
  `import { gear } from "gearbox"; import { T } from "${specifier}"; gear({ teeth: T });\n`;

describe("path aliases", () => {
  it.each<[string, string]>([
    ["in the nearest configuration", '//- tsconfig.json\n{ "compilerOptions": { "paths": { "@/*": ["./src/*"] } } }'],
    [
      "with comments and trailing commas",
      '//- tsconfig.json\n{ /* all */ "compilerOptions": { "paths": { "@/*": ["./src/*"], }, }, }',
    ],
    [
      "extended",
      '//- tsconfig.json\n{ "extends": "./base.json" }\n//- base.json\n{ "compilerOptions": { "paths": { "@/*": ["./src/*"] } } }',
    ],
    ["from a base address", '//- tsconfig.json\n{ "compilerOptions": { "baseUrl": ".", "paths": { "@/*": ["src/*"] } } }'],
    [
      "in a project that is referred to",
      '//- tsconfig.json\n{ "files": [], "references": [{ "path": "./tsconfig.app.json" }] }\n//- tsconfig.app.json\n{ "compilerOptions": { "paths": { "@/*": ["./src/*"] } } }',
    ],
    [
      "beside an installed base",
      '//- tsconfig.json\n{ "extends": "@tsconfig/node20/tsconfig.json", "compilerOptions": { "paths": { "@/*": ["./src/*"] } } }',
    ],
  ])("%s", (_name, config) => {
    const fixture = `//- src/arm/main.ts\n${USE("@/shared/teeth.js")}${config}\n//- src/shared/teeth.ts\nexport const T = 40;\n`;
    const { teeth, rounds, asked } = teethOf(fixture, "/src/arm/main.ts");
    expect(teeth).toBe(40);
    expect(rounds).toBeLessThanOrEqual(6);
    expect(asked).toBeLessThan(25);
  });

  it("follow an edit of the configuration", () => {
    const files = splitFiles(
      `//- main.ts\n${USE("@/teeth")}//- tsconfig.json\n{ "compilerOptions": { "paths": { "@/*": ["./a/*"] } } }\n//- a/teeth.ts\nexport const T = 1;\n//- b/teeth.ts\nexport const T = 2;\n`,
    );
    const evaluator = makeEvaluator();
    const read = (name: string) => files.get(name) ?? null;
    const teeth = () => Reflect.get(evaluator.evaluateFile("/main.ts", { read }).calls[0]?.built ?? {}, "teeth");
    expect(teeth()).toBe(1);
    files.set("/tsconfig.json", '{ "compilerOptions": { "paths": { "@/*": ["./b/*"] } } }');
    expect(teeth()).toBe(2);
    files.set("/tsconfig.json", "{ broken");
    expect(teeth()).toBeUndefined();
  });

  it("are found below addresses as well", () => {
    const root = "vscode-vfs://github/o/r";
    const files = new Map([
      [`${root}/src/main.ts`, USE("@/teeth")],
      [`${root}/tsconfig.json`, '{ "compilerOptions": { "paths": { "@/*": ["./src/*"] } } }'],
      [`${root}/src/teeth.ts`, "export const T = 7;"],
    ]);
    const { calls } = makeEvaluator().evaluateFile(`${root}/src/main.ts`, { read: (name) => files.get(name) ?? null });
    expect(calls[0]?.built).toMatchObject({ teeth: 7 });
  });
});

describe("packages", () => {
  it.each<[string, string, string]>([
    [
      "own names",
      "#teeth",
      '//- package.json\n{ "name": "robot", "imports": { "#teeth": "./src/teeth.js" } }\n//- src/teeth.ts\nexport const T = 40;',
    ],
    [
      "own names with a star",
      "#shared/teeth.js",
      '//- package.json\n{ "name": "robot", "imports": { "#shared/*": "./src/*" } }\n//- src/teeth.ts\nexport const T = 40;',
    ],
  ])("by %s", (_name, specifier, rest) => {
    const { teeth, asked } = teethOf(`//- src/main.ts\n${USE(specifier)}${rest}\n`, "/src/main.ts");
    expect(teeth).toBe(40);
    expect(asked).toBeLessThan(25);
  });

  const LINKED = `//- packages/arm/src/main.ts
${USE("@team/teeth")}//- packages/arm/package.json
{ "name": "@team/arm" }
//- package.json
{ "private": true, "workspaces": ["packages/*"] }
//- node_modules/@team/teeth/package.json
{ "name": "@team/teeth", "private": true, "exports": "./src/index.ts" }
//- node_modules/@team/teeth/src/index.ts
export { T } from "./inner.js";
//- node_modules/@team/teeth/src/inner.ts
export const T = 40;
`;

  it("of the same workspace", () => {
    const { teeth, asked } = teethOf(LINKED, "/packages/arm/src/main.ts");
    expect(teeth).toBe(40);
    expect(asked).toBeLessThan(25);
  });

  it("of the same workspace, under their own names", () => {
    const moved =
      LINKED.replaceAll("//- node_modules/@team/teeth/src", "//- packages/teeth/src") +
      "//- node_modules/@team/teeth/src/index.ts\nexport {};\n";
    const canonical = (file: string): string => file.replace("/node_modules/@team/", "/packages/");
    const { result } = load(moved, "/packages/arm/src/main.ts", { canonical });
    expect(result.calls[0]?.built).toMatchObject({ teeth: 40 });
    expect(result.dependencies).toContain("/packages/teeth/src/inner.ts");
  });

  it.each<[string, string]>([
    ["in no workspace", "lodash"],
    ["of the runtime", "node:fs"],
    ["without a scope's second half", "@team"],
  ])("that are installed, %s, are not looked for", (_name, specifier) => {
    const { result, asked } = load(
      `//- a/b/c/main.ts\n${USE(specifier)}//- node_modules/lodash/index.ts\nexport const T = 1;\n`,
      "/a/b/c/main.ts",
    );
    expect(result.calls[0]?.unknowns).toHaveLength(1);
    expect(asked.filter((file) => file.includes("node_modules"))).toEqual([]);
    expect(asked.length).toBeLessThan(12);
  });

  it("that are compiled are not read", () => {
    const compiled =
      LINKED.replace("./src/index.ts", "./dist/index.js").replace('"private": true, "exports"', '"exports"') +
      "//- node_modules/@team/teeth/dist/index.js\nexport const T = 1;\n";
    expect(teethOf(compiled, "/packages/arm/src/main.ts").teeth).toBeUndefined();
  });
});

describe("JSON files", () => {
  const json = `//- gears.json
{ "hoist": { "teeth": 40, "list": [1, -2.5] }, "name": "x" }
`;

  it.each<[string, string, unknown]>([
    ['import gears from "./gears.json";', "gears.hoist.teeth", 40],
    ['import gears from "./gears.json" with { type: "json" };', "gears.hoist.list[1]", -2.5],
    ['import * as gears from "./gears.json";', "gears.name", "x"],
    ['import { hoist } from "./gears.json";', "hoist.teeth", 40],
    ['import gears = require("./gears.json");', "gears.hoist.teeth", 40],
    ['const gears = require("./gears.json");', "gears.hoist.teeth", 40],
  ])("%s %s", (code, expression, expected) => {
    expect(dataOf(`${code}\n${json}`, expression)).toEqual(expected);
  });

  it("are where an issue comes from", () => {
    const fixture = `import { gear } from "gearbox"; import g from "./gears.json"; gear({ teeth: g.hoist.list[1] });\n${json}`;
    const { result } = load(`//- main.ts\n${fixture}`, "/main.ts");
    const [issue] = result.calls[0]?.issues ?? [];
    expect(issue?.source?.file).toBe("/gears.json");
    expect(splitFiles(json).get("/gears.json")?.slice(issue?.source?.start, issue?.source?.end)).toBe("-2.5");
  });

  it("are unknown when something writes to them, or they are broken", () => {
    expect(unknownOf(`import g from "./gears.json"; g.hoist.teeth = 5;\n${json}`, "g.hoist.teeth").codes).toContain("mutated");
    expect(unknownOf('import g from "./g.json";\n//- g.json\n{ "teeth": }', "g.teeth").codes.at(-1)).toBe("missing");
    expect(unknownOf('import g from "./g.json";\n//- g.json\n', "g.teeth").codes.at(-1)).toBe("no-such-export");
  });
});
