// biome-ignore-all lint/suspicious/noTemplateCurlyInString: the texts are code
/** What cannot be known, why it says so, and what it leaves alone. */
import { describe, expect, it } from "vitest";
import { dataOf, unknownOf } from "./support/workspace.js";

describe("what cannot be known", () => {
  it.each<[string, string, string, string, RegExp]>([
    ["reassigned let", "let a = 1; a = 2;", "a", "not-const", /`a` is declared with `let` and gets another value later/],
    ["exported let", "export let a = 1;", "a", "not-const", /declared with `let`/],
    ["counted var", "var a = 1; for (;;) a++;", "a", "not-const", /`var`/],
    ["repeated var", "var a = 1; var a = 2;", "a", "not-const", /`var`/],
    ["var in a branch", "if (Math.random() > 0.5) { var a = 1; }", "a", "not-const", /`var`/],
    ["var before its line", "const b = a + 1; var a = 1;", "b", "not-const", /before its line/],
    ["destructured over", "let a = 1; ({ a } = { a: 2 });", "a", "not-const", /`let`/],
    ["loop over", "let a = 1; for (a of [2]) ;", "a", "not-const", /`let`/],
    ["mutated", "const a = { x: 1 }; a.x = 2;", "a.x", "mutated", /`a\.x = 2` changes it/],
    ["deleted", "const a = { x: 1 }; delete a.x;", "a.x", "mutated", /`delete a\.x` changes it/],
    ["incremented", "const a = { x: 1 }; a['x']++;", "a.x", "mutated", /changes it/],
    ["assigned into", "const a = { x: 1 }; Object.assign(a, { x: 2 });", "a.x", "mutated", /changes it/],
    ["pushed", "const a = [1]; a.push(2);", "a[0]", "mutated", /`a\.push\(2\)` changes it/],
    ["sorted", "const a = [2, 1]; a.sort();", "a[0]", "mutated", /changes it/],
    ["given away", "const a = { x: 1 }; setUp(a);", "a.x", "mutated", /`setUp\(a\)` may change it/],
    ["cycle", "const a = b + 1; const b = a + 1;", "a", "cycle", /`a` is defined in terms of itself/],
    [
      "cycle through files",
      'import { b } from "./b"; export const a = b + 1;\n//- b.ts\nimport { a } from "./main"; export const b = a + 1;',
      "a",
      "cycle",
      /defined in terms of itself/,
    ],
    [
      "unknown call",
      "declare function read(): number; const a = read();",
      "a * 2",
      "ambient",
      /`read` is declared without a value/,
    ],
    ["random", "const a = Math.random();", "a", "call", /`Math\.random` gives another value each time/],
    ["environment", "const a = Number(process.env.TEETH);", "a", "ambient", /`process` exists only when the program runs/],
    ["clock", "const a = Date.now();", "a", "ambient", /`Date`/],
    ["ambient", "declare const a: number;", "a", "ambient", /`a` is declared without a value/],
    ["not a number", "const n = 0; const a = 1 / n;", "a", "not-a-number", /`1 \/ n` gives Infinity/],
    ["root of a negative", "const a = Math.sqrt(-1);", "a", "not-a-number", /gives NaN/],
    ["NaN", "", "NaN", "not-a-number", /NaN/],
    ["failed conversion", "", "Number('abc')", "not-a-number", /gives NaN/],
    ["text as number", "const s = '3';", "s * 2", "unsupported", /`s \* 2` calculates with a value that is not a number/],
    ["sign on text", "", "+'3'", "unsupported", /not a number/],
    ["bigint", "", "10n", "unsupported", /bigint/],
    ["missing name", "", "teeth", "no-such-name", /`teeth` is not declared here/],
    ["mistyped name", "const driven = 40;", "drivn", "no-such-name", /did you mean `driven`/],
    [
      "missing property",
      "const g = { hoist: 40 };",
      "g.hoits",
      "no-such-property",
      /`g\.hoits` does not exist; did you mean `hoist`/,
    ],
    ["missing element", "const g = [1, 2];", "g[2]", "no-such-property", /`g\[2\]` does not exist: the list has 2 elements/],
    ["property of undefined", "const g = undefined;", "g.a", "unsupported", /reads a property of undefined/],
    ["missing member of Math", "", "Math.PIE", "no-such-property", /did you mean `PI`/],
    ["half-typed", "const a = ;", "a", "missing", /Nothing is written here yet/],
    ["half-typed access", "const g = { a: 1 }; const b = g.;", "b", "missing", /Nothing/],
    ["without a value", "const a;", "a", "missing", /`a` has no value yet/],
    ["too long a text", "const a = 'x'.repeat(20000); const b = a + a;", "b", "too-deep", /very long text/],
    ["getter", "const a = { get x() { return 1; } };", "a.x", "unsupported", /each time it is read/],
    ["prototype", "const a = { __proto__: { x: 1 } };", "a", "unsupported", /prototype/],
    ["awaited", "const a = await 1;", "a", "unsupported", /is not followed/],
    ["assignment", "let b = 1;", "(b = 2)", "unsupported", /assigns/],
    ["objects compared", "const a = {};", "a === {}", "unsupported", /whole object/],
    ["holes", "", "[1, , 2]", "unsupported", /leaves an element out/],
    ["unknown condition", "const a = Math.random() > 0.5 ? 1 : 2;", "a", "call", /Math\.random/],
  ])("%s", (_name, code, expression, root, message) => {
    const found = unknownOf(code, expression);
    expect(found.codes.at(-1)).toBe(root);
    expect(found.message).toMatch(message);
  });

  it("shortens what it quotes, on one line", () => {
    const { message } = unknownOf("", `1 /\n  (0 * (${"1234567890 + ".repeat(5)} 1))`);
    expect(message).toBe("`1 / (0 * (1234567890 + 1234567890 + 123…` gives Infinity.");
  });

  it("tells the chain down to the root", () => {
    expect(unknownOf("const a = Math.random(); const b = a + 1; const c = { d: b };", "c.d").codes).toEqual([
      "depends",
      "depends",
      "depends",
      "depends",
      "call",
    ]);
  });
});

describe("what an unknown does not spoil", () => {
  it.each<[string, string, unknown]>([
    ["const a = { x: Math.random(), y: 2 };", "a.y", 2],
    ["const a = [Math.random(), 2];", "a[1]", 2],
    ["const a = true || Math.random();", "a", true],
    ["const a = false && Math.random();", "a", false],
    ["const a = 1 ?? Math.random();", "a", 1],
    ["const a = true ? 3 : Math.random();", "a", 3],
    ["let a = 3;", "a", 3],
    ["var a = 3;", "a", 3],
    ["const a: { x: number; y?: number } = { x: 1 };", "a.y ?? 7", 7],
    ["const a = { x: 1 };", "a.y === undefined", true],
  ])("%s %s", (code, expression, value) => {
    expect(dataOf(code, expression)).toEqual(value);
  });
});

describe("objects that nothing changes", () => {
  it.each<[string, string]>([
    ["reading parts", "const a = { x: 1 }; setUp(a.x); const b = a.x + 1; `${a.x}`; if (a) console.log(a);"],
    ["frozen and given away", "const a = Object.freeze({ x: 1 }); setUp(a);"],
    ["const and given away", "const a = { x: 1 } as const; setUp(a);"],
    ["given to a definition", "import { gear } from 'gearbox'; const a = { x: 1 }; gear(a);"],
    ["given to a harmless helper", "const a = { x: 1 }; const f = (o: { x: number }) => o.x * 2; f(a);"],
    ["a copy changed", "const a = { x: 1 }; const b = { ...a }; b.x = 2;"],
    ["a copied list changed", "const a = { x: 1, l: [1] }; a.l.slice().sort(); [...a.l].push(2);"],
    ["another property of a holder", "const a = { x: 1 }; const h = { a, n: 0 }; h.n = 2; setUp(h.n);"],
    ["visited", "const a = { x: 1, l: [1, 2] }; a.l.forEach((n) => console.log(n)); for (const n of a.l) setUp(n);"],
  ])("%s", (_name, code) => {
    expect(dataOf(code, "a.x")).toBe(1);
  });

  it.each<[string, string]>([
    ["through another name", "const a = { x: 1 }; const b = a; b.x = 2;"],
    ["inside", "const a = { x: 1, in: { y: 1 } }; const b = a.in; b.y = 2;"],
    ["destructured", "const a = { x: 1, in: { y: 1 } }; const { in: b } = a; b.y = 2;"],
    ["through a helper", "const a = { x: 1 }; function f(o: { x: number }) { o.x = 2; } f(a);"],
    [
      "through a helper in another file",
      "import { f } from './f'; const a = { x: 1 }; f(a);\n//- f.ts\nexport const f = (o: { x: number }) => { o.x = 2; };",
    ],
    ["through a holder", "const a = { x: 1 }; const h = { a }; h.a.x = 2;"],
    ["through a list", "const a = { x: 1 }; const l = [a]; l[0].x = 2;"],
    ["in a callback", "const a = { x: 1, l: [{ y: 1 }] }; a.l.forEach((e) => { e.y = 2; });"],
    ["in a loop", "const a = { x: 1, l: [{ y: 1 }] }; for (const e of a.l) e.y = 2;"],
    ["through what a function gives back", "const a = { x: 1 }; const f = () => a; f().x = 2;"],
    ["through map", "const a = { x: 1 }; [1].map(() => a)[0].x = 2;"],
    ["through a pushed list", "const a = { x: 1 }; const l: unknown[] = []; l.push(a); setUp(l);"],
    ["through an assignment", "const a = { x: 1 }; let b; b = a; b.x = 2;"],
    ["by a made thing", "const a = { x: 1 }; new Robot(a);"],
    ["frozen on the outside only", "const a = Object.freeze({ x: 1, in: { y: 1 } }); setUp(a);"],
    ["a shallow copy's inside", "const a = { x: 1, in: { y: 1 } }; const b = { ...a }; b.in.y = 2;"],
    ["in an import's user", "import { g } from './g'; const a = g; g.x = 2;\n//- g.ts\nexport const g = { x: 1 };"],
    ["a default in a parameter", "const a = { x: 1 }; function f(o = a) { o.x = 2; }"],
    ["through arguments", "const a = { x: 1 }; function f(o: object) { arguments[0].x = 2; } f(a);"],
    ["in a function nobody calls", "const a = { x: 1 }; () => { a.x = 2; };"],
  ])("changed %s", (_name, code) => {
    expect(unknownOf(code, "a.x").codes).toContain("mutated");
  });
});
