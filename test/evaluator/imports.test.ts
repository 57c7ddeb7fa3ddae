/** Names that come from other files, and definitions by whatever name. */
import { describe, expect, it } from "vitest";
import { dataOf, evaluateFixture, unknownOf } from "./support/workspace.js";

describe("imports between files", () => {
  it.each<[string, string, string, unknown]>([
    ["named", `import { A } from "./c";\n//- c.ts\nexport const A = 5;`, "A", 5],
    ["renamed", `import { A as B } from "./c.js";\n//- c.ts\nexport const A = 5;`, "B", 5],
    ["default of an expression", `import x from "./c";\n//- c.ts\nexport default { a: 5 } as const;`, "x.a", 5],
    ["default of a name", `import x from "./c";\n//- c.ts\nconst a = 5; export default a;`, "x", 5],
    ["default under a name", `import { default as x } from "./c";\n//- c.ts\nexport { a as default }; const a = 5;`, "x", 5],
    ["namespace", `import * as c from "./c";\n//- c.ts\nexport const A = 5;`, "c.A", 5],
    ["namespace spread", `import * as c from "./c";\n//- c.ts\nexport const A = 5, B = 6;`, "({ ...c })", { A: 5, B: 6 }],
    ["re-export", `import { A } from "./b";\n//- b.ts\nexport { A } from "./c";\n//- c.ts\nexport const A = 5;`, "A", 5],
    [
      "renaming re-export",
      `import { B } from "./b";\n//- b.ts\nexport { A as B } from "./c";\n//- c.ts\nexport const A = 5;`,
      "B",
      5,
    ],
    [
      "star",
      `import { A } from "./b";\n//- b.ts\nexport * from "./d"; export * from "./c";\n//- c.ts\nexport const A = 5;\n//- d.ts\n`,
      "A",
      5,
    ],
    [
      "star under a name",
      `import { c } from "./b";\n//- b.ts\nexport * as c from "./c";\n//- c.ts\nexport const A = 5;`,
      "c.A",
      5,
    ],
    [
      "import then export",
      `import { A } from "./b";\n//- b.ts\nimport { A } from "./c"; export { A };\n//- c.ts\nexport const A = 5;`,
      "A",
      5,
    ],
    [
      "own name before star",
      `import { A } from "./b";\n//- b.ts\nexport * from "./c"; export const A = 6;\n//- c.ts\nexport const A = 5;`,
      "A",
      6,
    ],
    ["text name", `import { "a-b" as A } from "./c";\n//- c.ts\nconst A = 5; export { A as "a-b" };`, "A", 5],
    ["folder", `import { A } from "./lib";\n//- lib/index.ts\nexport const A = 5;`, "A", 5],
    ["upwards", `import { A } from "../c";\n//- c.ts\nexport const A = 5;`, "A", 5],
    ["mjs is mts", `import { A } from "./c.mjs";\n//- c.mts\nexport const A = 5;`, "A", 5],
    ["cjs is cts", `import { A } from "./c.cjs";\n//- c.cts\nexport const A = 5;`, "A", 5],
    ["tsx", `import { A } from "./c.js";\n//- c.tsx\nexport const A = 5; const x = <b>{A}</b>;`, "A", 5],
    ["js", `import { A } from "./c";\n//- c.js\nexport const A = 5;`, "A", 5],
    ["import equals", `import c = require("./c");\n//- c.ts\nexport = { A: 5 } as const;`, "c.A", 5],
    [
      "ring of files",
      `import { A } from "./c";\nexport const Z = 1;\n//- c.ts\nimport { Z } from "./main"; export const A = Z + 1;`,
      "A",
      2,
    ],
    [
      "types beside values",
      `import { type T, A } from "./c"; import type { U } from "./d";\n//- c.ts\nexport const A = 5;`,
      "A",
      5,
    ],
  ])("%s", (_name, fixture, expression, value) => {
    const placed = fixture.includes("../c") ? `//- sub/main.ts\n${fixture}` : `//- main.ts\n${fixture}`;
    expect(dataOf(placed, expression)).toEqual(value);
  });

  it.each<[string, string, string, string[], RegExp]>([
    [
      "no such export",
      `import { TETH } from "./c";\n//- c.ts\nexport const TEETH = 5;`,
      "TETH",
      ["depends", "no-such-export"],
      /c\.ts` exports no `TETH`; did you mean `TEETH`/,
    ],
    [
      "no such file",
      `import { A } from "./gone";\n`,
      "A",
      ["depends", "unresolved-import"],
      /`\.\/gone` does not lead to a file/,
    ],
    ["package", `import { A } from "lodash";\n`, "A", ["depends", "unresolved-import"], /`lodash` is a package/],
    [
      "hop that failed",
      `import { A } from "./b";\n//- b.ts\nexport { A } from "./gone";`,
      "A",
      ["depends", "depends", "unresolved-import"],
      /gone/,
    ],
    [
      "two stars",
      `import { A } from "./b";\n//- b.ts\nexport * from "./c"; export * from "./d";\n//- c.ts\nexport const A = 5;\n//- d.ts\nexport const A = 6;`,
      "A",
      ["depends", "depends", "no-such-export"],
      /from two files/,
    ],
    ["out of the root", `import { A } from "../../../c";\n`, "A", ["depends", "unresolved-import"], /leads out/],
  ])("%s is unknown", (_name, fixture, expression, codes, message) => {
    const found = unknownOf(fixture, expression);
    expect(found.codes).toEqual(codes);
    expect(found.message).toMatch(message);
  });
});

describe("recognising definitions", () => {
  it.each<[string, string, number]>([
    ["named", `import { gear } from "gearbox"; gear({ teeth: 1 });`, 1],
    ["aliased", `import { gear as g } from "gearbox"; g({ teeth: 1 });`, 1],
    ["namespace", `import * as lm from "gearbox"; lm.gear({ teeth: 1 });`, 1],
    ["default namespace", `import lm from "gearbox"; lm.gear({ teeth: 1 });`, 1],
    ["through a barrel", `import { gear } from "./b"; gear({ teeth: 1 });\n//- b.ts\nexport * from "gearbox";`, 1],
    ["through a renaming barrel", `import { g } from "./b"; g({ teeth: 1 });\n//- b.ts\nexport { gear as g } from "gearbox";`, 1],
    [
      "through a namespace of a barrel",
      `import { box } from "./b"; box.gear({ teeth: 1 });\n//- b.ts\nexport * as box from "gearbox";`,
      1,
    ],
    ["by a constant", `import * as lm from "gearbox"; const { gear: g } = lm; const h = g; h({ teeth: 1 });`, 1],
    ["shadowed", `import { gear } from "gearbox"; function f(gear: (x: unknown) => void) { gear({ teeth: 1 }); }`, 0],
    ["of another module", `import { gear } from "elsewhere"; gear({ teeth: 1 });`, 0],
    ["as a type only", `import type { gear } from "gearbox"; gear({ teeth: 1 });`, 0],
    [
      "everywhere",
      `import { gear } from "gearbox";
      class A { static a = gear({ teeth: 1 }); b = gear({ teeth: 2 }); c() { return gear({ teeth: 3 }); } static { gear({ teeth: 4 }); } }
      { const d = () => { if (A) gear({ teeth: 5 }); }; }
      export default gear({ teeth: 6 });`,
      6,
    ],
  ])("%s", (_name, fixture, count) => {
    const { calls } = evaluateFixture(fixture);
    expect(calls.map(({ definition, built }) => [definition, built !== undefined])).toEqual(Array(count).fill(["gear", true]));
  });

  it("lists calls by position, the outer before the inner", () => {
    const { calls } = evaluateFixture(
      `import { gear, pair } from "gearbox"; pair(gear({ teeth: 1 }), gear({ teeth: 2 })); gear({ teeth: 3 });`,
    );
    expect(calls.map(({ definition, built }) => [definition, Reflect.get(built ?? {}, "teeth")])).toEqual([
      ["pair", undefined],
      ["gear", 1],
      ["gear", 2],
      ["gear", 3],
    ]);
  });
});

describe("files that are not ES modules", () => {
  it.each<[string, string, string, unknown]>([
    ["one value", "const c = require('./c');\n//- c.cjs\nmodule.exports = { A: 5 };", "c.A", 5],
    ["names", "const { A } = require('./c.cjs');\n//- c.cjs\nexports.A = 5; module.exports.B = 6;", "A", 5],
    [
      "a name kept in a constant",
      "const c = require('./c.cjs');\n//- c.cjs\nconst G = { hoist: 40 }; module.exports = { G };",
      "c.G.hoist",
      40,
    ],
    ["imported by name", "import { A } from './c.cjs';\n//- c.cjs\nmodule.exports = { A: 5 };", "A", 5],
    ["imported by default", "import c from './c.cjs';\n//- c.cjs\nmodule.exports = { A: 5 };", "c.A", 5],
    ["a member at once", "const A = require('./c.cjs').A;\n//- c.cjs\nexports.A = 5;", "A", 5],
  ])("%s", (_name, fixture, expression, value) => {
    expect(dataOf(`//- main.js\n${fixture}`, expression)).toEqual(value);
  });

  it.each<[string, string, RegExp]>([
    ["given twice", "exports.A = 5; exports.A = 6;", /gives `A` more than one value/],
    ["given in a branch", "if (x) exports.A = 5;", /gives `A` more than one value/],
    ["mistyped", "exports.AB = 5;", /did you mean `AB`/],
  ])("%s is unknown", (_name, code, message) => {
    expect(unknownOf(`//- main.js\nimport { A } from './c.cjs';\n//- c.cjs\n${code}`, "A").message).toMatch(message);
  });

  it("recognise definitions", () => {
    const { calls } = evaluateFixture(
      "//- main.cjs\nconst { gear } = require('gearbox'); const box = require('gearbox'); gear({ teeth: 1 }); box.gear({ teeth: 2 });",
    );
    expect(calls.map(({ built }) => built !== undefined)).toEqual([true, true]);
  });
});

describe("what a file passes on", () => {
  it.each<[string, string, string[] | undefined]>([
    ["a star", 'export * from "gearbox"; export * from "./c";', ["gearbox", "/c.ts"]],
    ["names", 'export { gear } from "gearbox"; export { A as B } from "./c";', ["gearbox", "/c.ts"]],
    ["a namespace", 'export * as g from "gearbox";', ["gearbox"]],
    [
      "imported names",
      'import { gear } from "gearbox"; import c from "./c"; export { gear }; export default c;',
      ["gearbox", "/c.ts"],
    ],
    ["nothing of what it merely uses", 'import { gear } from "gearbox"; export const g = gear({ teeth: 4 });', undefined],
    ["no types", 'export type { T } from "./c";', undefined],
    ["nothing that is not there", 'export * from "./nowhere";', undefined],
  ])("%s", (_name, code, files) => {
    const evaluation = evaluateFixture(`${code}\n//- c.ts\nexport const A = 5; export default A;\n`);
    expect(evaluation.passesOn?.toSorted()).toEqual(files?.toSorted());
  });
});
