/** Calls in loops and helpers: one for each run. */
import { describe, expect, it } from "vitest";
import { evaluateFixture } from "./support/workspace.js";

/** Teeth of every gear, `?` for an unknown one; `open` runs are marked. */
function teethOf(fixture: string, file?: string): unknown[] {
  const { calls } = evaluateFixture(`//- main.ts\nimport { gear, pair, probe } from "gearbox";\n${fixture}`, file);
  return calls
    .filter(({ definition }) => definition === "gear")
    .map(({ built, open }) => `${built === undefined ? "?" : Reflect.get(built, "teeth")}${open === true ? " open" : ""}`);
}

describe("calls in loops and helpers", () => {
  it.each<[string, string, string[]]>([
    ["a loop over a list", "for (const t of [1, 2]) gear({ teeth: t });", ["1", "2"]],
    [
      "a loop over a constant",
      "const T = [1, 2] as const; for (const t of T) { const u = t * 10; gear({ teeth: u }); }",
      ["10", "20"],
    ],
    [
      "a destructuring loop",
      'for (const [n, { t = 5 }] of [["a", { t: 1 }], ["b", {}]] as const) gear({ name: n, teeth: t });',
      ["1", "5"],
    ],
    ["a loop over entries", "for (const [n, t] of Object.entries({ a: 1, b: 2 })) gear({ name: n, teeth: t });", ["1", "2"]],
    ["loops in loops", "for (const a of [1, 2]) for (const b of [10, 20]) gear({ teeth: a + b });", ["11", "21", "12", "22"]],
    ["a loop with a condition", "for (const t of [1, 2, 3]) { if (t === 2) continue; gear({ teeth: t }); }", ["1", "3"]],
    ["a loop that ends early", "for (const t of [1, 2, 3]) { if (t === 2) break; gear({ teeth: t }); }", ["1"]],
    [
      "a branch in a loop",
      "for (const t of [1, 2]) { if (t > 1) gear({ teeth: t }); else gear({ teeth: t * 10 }); }",
      ["2", "10"],
    ],
    ["a loop over something unknown", "declare const l: number[]; for (const t of l) gear({ teeth: t });", ["? open"]],
    ["an empty loop", "for (const t of [] as number[]) gear({ teeth: t });", ["? open"]],
    ["map", "const g = [1, 2].map((t) => gear({ teeth: t }));", ["1", "2"]],
    ["map with an index", "const g = ['a', 'b'].map((name, i) => gear({ name, teeth: i + 1 }));", ["1", "2"]],
    ["map with a name", "const make = (t: number) => gear({ teeth: t }); const g = [1, 2].map(make);", ["1", "2"]],
    ["forEach", "[1, 2].forEach((t) => { gear({ teeth: t }); });", ["1", "2"]],
    ["a helper", "const make = (t: number) => gear({ teeth: t }); make(1); const b = make(2);", ["1", "2"]],
    ["a hoisted helper", "make(1); function make(t: number) { return gear({ teeth: t }); }", ["1"]],
    ["a helper with a default", "function make(t = 7) { return gear({ teeth: t }); } make(); make(2);", ["7", "2"]],
    [
      "a helper in a helper",
      "function make(t: number) { return gear({ teeth: t }); } function two(t: number) { make(t); make(t + 1); } two(1); two(5);",
      ["1", "5", "2", "6"],
    ],
    ["a helper without parameters", "const make = () => gear({ teeth: 1 }); make(); make();", ["1"]],
    ["a helper that nobody calls", "const make = (t: number) => gear({ teeth: t });", ["? open"]],
    ["a helper called with something unknown", "const make = (t: number) => gear({ teeth: t }); make(Math.random());", ["?"]],
    [
      "a helper that calls itself",
      "function make(t: number): unknown { if (t === 0) return 0; gear({ teeth: t }); return make(t - 1); } make(2);",
      ["2", "1"],
    ],
    ["a method", "class A { make(t: number) { return gear({ teeth: t }); } }", ["? open"]],
    ["a function called at once", "((t: number) => gear({ teeth: t }))(3);", ["3"]],
    ["a switched-off branch of the file", "if (false) gear({ teeth: 1 });", ["1"]],
  ])("%s", (_name, code, teeth) => {
    expect(teethOf(code).sort()).toEqual([...teeth].sort());
  });

  it("keeps what a run built by identity", () => {
    const { calls } = evaluateFixture(`import { gear, pair } from "gearbox";
const gears = [1, 2].map((teeth) => gear({ teeth }));
const make = (teeth: number) => gear({ teeth });
const third = make(3);
pair(gears[1], third);`);
    const built = new Set(calls.filter(({ definition }) => definition === "gear").map((call) => call.built));
    const both = calls.find(({ definition }) => definition === "pair")?.built;
    expect(built.size).toBe(3);
    expect(built.has(Reflect.get(both ?? {}, "first"))).toBe(true);
    expect(built.has(Reflect.get(both ?? {}, "second"))).toBe(true);
    expect(both).toMatchObject({ first: { teeth: 2 }, second: { teeth: 3 } });
  });

  it("points an issue at the place that gave the number", () => {
    const fixture = `import { gear } from "gearbox";\nconst make = (teeth: number) => gear({ teeth });\nmake(4);\nmake(-5);`;
    const issues = evaluateFixture(fixture).calls.flatMap((call) => call.issues);
    expect(issues.map(({ span, source }) => [span, source].map((at) => at && fixture.slice(at.start, at.end)))).toEqual([
      ["teeth", "-5"],
    ]);
  });
});

describe("helpers in other files", () => {
  const fixture = `import { make } from "./make"; const a = make(1); for (const t of [2, 3]) make(t); pair(a, a);
//- make.ts
import { gear } from "gearbox";
const one = (t: number) => gear({ teeth: t * 10 });
export function make(t: number) { one(t); return gear({ teeth: t }); }
`;

  it("declare with the parameters of their callers", () => {
    expect(teethOf(fixture)).toEqual(expect.arrayContaining(["1", "10", "2", "20", "3", "30"]));
    expect(teethOf(fixture)).toHaveLength(6);
  });

  it("are open in their own file", () => {
    expect(teethOf(fixture, "/make.ts")).toEqual(["? open", "? open"]);
  });

  it("declare once where they have no parameters", () => {
    const bare = `import { make } from "./make"; pair(make(), make());
//- make.ts
import { gear } from "gearbox"; export const make = () => gear({ teeth: 4 });
`;
    expect(teethOf(bare)).toEqual([]);
    expect(teethOf(bare, "/make.ts")).toEqual(["4"]);
  });
});
