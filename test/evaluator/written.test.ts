// biome-ignore-all lint/suspicious/noTemplateCurlyInString: the texts are code
/** What people write around their constants: each value is known, and is what the running program has. */
import { describe, expect, it } from "vitest";
import { checkValue } from "./support/run.js";
import { dataOf, unknownOf } from "./support/workspace.js";

describe("enums", () => {
  it.each<[string, string, string, unknown]>([
    ["counted", "enum E { A, B, C }", "[E.A, E.B, E.C]", [0, 1, 2]],
    ["counted on", "enum E { A = 5, B, C = 9, D }", "[E.B, E.D]", [6, 10]],
    ["text", 'enum E { A = "a", B = "b" }', "E.A + E.B", "ab"],
    ["mixed", 'enum E { A = 1, B = "b" }', "[E.A, E.B]", [1, "b"]],
    [
      "calculated",
      "const X = 3; enum E { A = X * 2, B = 1 << 3, C = A | B, D = E.A + 1, F = Math.max(1, 2) }",
      "[E.A, E.B, E.C, E.D, E.F]",
      [6, 8, 14, 7, 2],
    ],
    ["counted on from a name", "const X = 3; enum E { A = X, B }", "E.B", 4],
    ["merged", "enum E { A = 1 } enum E { B = A + 1, C = E.A + 2 }", "[E.A, E.B, E.C]", [1, 2, 3]],
    ["const", "const enum E { A = 4, B }", "E.A + E.B", 9],
    ["from another enum", "enum F { X = 7 } enum E { A = F.X, B }", "E.B", 8],
    ["looked up by text", "enum E { A = 4 }", 'E["A"]', 4],
    ["looked up backwards", "enum E { A = 4 }", "E[4]", "A"],
    [
      "as an object",
      "enum E { B = 2, A = 1 }",
      "Object.entries(E)",
      [
        ["1", "A"],
        ["2", "B"],
        ["B", 2],
        ["A", 1],
      ],
    ],
    ["with quoted names", "enum E { 'a-b' = 3, C }", "E['a-b'] + E.C", 7],
    ["in a template", 'enum E { A = "kg" } const M = `${20} ${E.A}`;', "M", "20 kg"],
    ["long", `enum E { ${Array.from({ length: 60 }, (_, index) => `M${index}`).join(", ")} }`, "E.M59", 59],
    ["imported", 'import { E } from "./e";\n//- e.ts\nexport enum E { A = 3, B }', "E.B", 4],
    ["through a namespace", 'import * as e from "./e";\n//- e.ts\nexport enum E { A = 3, B }', "e.E.B", 4],
  ])("%s", (_name, fixture, expression, expected) => {
    checkValue(fixture, expression, expected);
  });

  it("counts on from an imported member", () => {
    // The compiler works this out over files, but not one file at a time, so that it can't be run here.
    expect(dataOf('import { X, Y } from "./x"; enum E { A = X, B = Y, C }\n//- x.ts\nexport const X = 0, Y = 1;', "E.C")).toBe(2);
  });

  it.each<[string, string, string, RegExp]>([
    ["ambient", "declare enum E { A, B = 2 }", "ambient", /declared without a value/],
    ["ambient const", "declare const enum E { A }", "ambient", /declared without a value/],
    ["counted on from text", 'enum E { B = "b", A }', "unsupported", /counts on from a member that is calculated/],
    ["counted on from a call", "enum E { B = Math.max(1, 2), A }", "unsupported", /calculated/],
    ["mistyped", "enum E { AB = 1 }", "no-such-property", /did you mean `AB`/],
    ["in a circle", "enum E { A = B, B = A }", "cycle", /in terms of itself/],
  ])("%s is unknown", (_name, code, root, message) => {
    const found = unknownOf(code, "E.A");
    expect(found.codes.at(-1)).toBe(root);
    expect(found.message).toMatch(message);
  });
});

describe("destructuring", () => {
  it.each<[string, string, string, unknown]>([
    ["names", "const { a, b: c } = { a: 1, b: 2 };", "[a, c]", [1, 2]],
    ["defaults", "const { a = 5, b = 6 } = { a: 1 } as { a?: number; b?: number };", "[a, b]", [1, 6]],
    ["rest", "const { a, ...r } = { a: 1, b: 2, c: 3 };", "r", { b: 2, c: 3 }],
    ["nested", "const { a: { b: [, c] } } = { a: { b: [1, 2] } };", "c", 2],
    ["lists", "const [a, , b = 7, ...r] = [1, 2, undefined, 4, 5];", "[a, b, r]", [1, 7, [4, 5]]],
    ["texts", "const [a, b] = '😀x';", "[a, b]", ["😀", "x"]],
    ["computed", "const K = 'x'; const { [K]: a } = { x: 3 };", "a", 3],
    ["of an import", 'import { G } from "./g"; const { a } = G;\n//- g.ts\nexport const G = { a: 8 };', "a", 8],
    ["exported", 'import { a } from "./g";\n//- g.ts\nexport const { a } = { a: 8 };', "a", 8],
    ["a default by another name", "const { a, b = a * 2 } = { a: 4 } as { a: number; b?: number };", "b", 8],
    ["parameters", "const f = ({ a, b = 2 }: { a: number; b?: number }, [c]: number[] = [9]) => a + b + c;", "f({ a: 1 })", 12],
  ])("%s", (_name, fixture, expression, expected) => {
    checkValue(fixture, expression, expected);
  });

  it("of a missing name is unknown", () => {
    expect(unknownOf("const { teth } = { teeth: 1 };", "teth").message).toMatch(/did you mean `teeth`/);
  });
});

describe("optional chaining", () => {
  it.each<[string, string, string, unknown]>([
    ["there", "const a = { b: { c: 1 } } as { b?: { c: number } };", "a.b?.c", 1],
    ["not there", "const a = {} as { b?: { c: number } };", "a.b?.c ?? 7", 7],
    ["cut short", "const a = { b: null } as { b: null | { c: { d: number } } };", "a.b?.c.d", undefined],
    ["cut short only inside its brackets", "const a = { b: { c: { d: 3 } } } as { b?: { c: { d: number } } };", "(a.b?.c)!.d", 3],
    ["element", "const a = undefined as number[] | undefined;", "a?.[0]", undefined],
    ["call", "const a = [1, 2] as number[] | undefined;", "a?.map((x) => x * 2)", [2, 4]],
    ["skipped call", "const a = null as number[] | null;", "a?.map((x) => x * 2)", undefined],
  ])("%s", (_name, fixture, expression, expected) => {
    checkValue(fixture, expression, expected);
  });
});

describe("classes", () => {
  it.each<[string, string, string, unknown]>([
    ["static readonly", "class A { static readonly TEETH = 48; }", "A.TEETH", 48],
    [
      "static by another",
      "class A { static readonly N = 4; static readonly M = A.N * 2; static readonly K = this.N + 1; }",
      "[A.M, A.K]",
      [8, 5],
    ],
    ["static, never written", "class A { static TEETH = 48; }", "A.TEETH", 48],
    ["private static", "class A { static #N = 4; static readonly M = A.#N * 2; }", "A.M", 8],
    ["inherited", "class A { static readonly N = 4; } class B extends A { static readonly M = B.N + 1; }", "[B.N, B.M]", [4, 5]],
    ["instance", "class A { readonly n = 4; readonly m = this.n * 2; }", "new A().m", 8],
    ["static method", "class A { static twice(n: number) { return n * 2; } }", "A.twice(4)", 8],
    ["class expression", "const A = class { static readonly N = 4; };", "A.N", 4],
    ["imported", 'import { A } from "./a";\n//- a.ts\nexport class A { static readonly N = 4; }', "A.N", 4],
    ["default import", 'import A from "./a";\n//- a.ts\nexport default class A { static readonly N = 4; }', "A.N", 4],
    [
      "list that is only read",
      "class A { static readonly L = [1, 2]; } const n = A.L.map((x) => x * 2);",
      "[A.L[0], n[1]]",
      [1, 4],
    ],
    ["object of fields", "class A { static readonly G = { hoist: 40 } as const; }", "A.G.hoist", 40],
  ])("%s", (_name, fixture, expression, expected) => {
    checkValue(fixture, expression, expected);
  });

  it("reads fields in its own calls", () => {
    const code =
      'import { probe } from "gearbox"; class A { readonly n = 4; private k = 5; #j = 6; constructor() { probe(this.n, this.k, this.#j); } }';
    expect(dataOf(`${code} const shown = 1;`, "shown")).toBe(1);
  });

  it.each<[string, string, string, string, RegExp]>([
    ["written static", "class A { static N = 4; } A.N = 5;", "A.N", "not-const", /gets another value later/],
    ["exported static without readonly", "export class A { static N = 4; }", "A.N", "not-const", /is not `readonly`/],
    [
      "written in the constructor",
      "class A { readonly n: number = 4; constructor() { this.n = 5; } } const a = new A();",
      "a.n",
      "unsupported",
      /runs a constructor/,
    ],
    ["changed inside", "class A { static readonly G = { x: 1 }; } A.G.x = 2;", "A.G.x", "mutated", /`A\.G\.x = 2` changes it/],
    ["pushed to", "class A { static readonly L = [1]; } A.L.push(2);", "A.L", "mutated", /`A\.L\.push\(2\)` changes it/],
    ["given away", "class A { static readonly G = { x: 1 }; } setUp(A.G);", "A.G.x", "mutated", /`setUp\(A\.G\)` may change it/],
    [
      "taken apart and changed",
      "class A { static readonly G = { x: 1 }; } const { G } = A; G.x = 2;",
      "A.G.x",
      "mutated",
      /changes it/,
    ],
    [
      "exported and open to change",
      "export class A { static readonly G = { x: 1 }; }",
      "A.G.x",
      "mutated",
      /other files may change/,
    ],
    ["decorated", "class A { @config static readonly N = 4; }", "A.N", "unsupported", /decorator/],
    ["in a decorated class", "@config class A { static readonly N = 4; }", "A.N", "unsupported", /decorator/],
    [
      "written by a calculated name",
      "class A { static readonly N = 4; static { this[key()] = 5; } }",
      "A.N",
      "not-const",
      /another value later/,
    ],
    [
      "written by assign",
      "class A { static readonly N = 4; } Object.assign(A, { N: 5 });",
      "A.N",
      "not-const",
      /another value later/,
    ],
    ["getter", "class A { static get N() { return 4; } }", "A.N", "unsupported", /each time it is read/],
    ["mistyped", "class A { static readonly TEETH = 4; }", "A.TETH", "unsupported", /is not followed/],
    ["without a value", "class A { static readonly N: number; }", "A.N", "parameter", /gets its value when the program runs/],
    [
      "made by someone else",
      "declare class Motor { n: number } const a = new Motor();",
      "a.n",
      "call",
      /`new Motor\(\)` is made when the program runs/,
    ],
  ])("%s is unknown", (_name, code, expression, root, message) => {
    const found = unknownOf(code, expression);
    expect(found.codes.at(-1)).toBe(root);
    expect(found.message).toMatch(message);
  });
});

describe("namespaces", () => {
  it("give their constants", () => {
    checkValue("namespace Gear { export const T = 40; export const U = T * 2; }", "Gear.U", 80);
  });
});

describe("shadowing", () => {
  it.each<[string, string, string, unknown]>([
    ["a block's own name", "const a = 1; { const a = 2; } ", "a", 1],
    ["a parameter", "const a = 1; const f = (a: number) => a + 1;", "f(5)", 6],
    ["a name inside a helper", "const a = 1; function f() { const a = 2; return a; }", "f() + a", 3],
    ["a hoisted function", "const a = f(); function f() { return 3; }", "a", 3],
    ["a name of the language", "const f = (Math: { PI: number }) => Math.PI;", "f({ PI: 3 })", 3],
    ["undefined by another name", "const f = (undefined: number) => undefined;", "f(4)", 4],
    ["a default that sees the outside", "const x = 1; function f(a = x) { const x = 2; return a; }", "f()", 1],
    ["a function's own name", "const f = function g(n: number): number { return n > 2 ? n : g(n + 1); };", "f(0)", 3],
    ["a loop's name", "const t = 1; for (const t of [2, 3]) { t; }", "t", 1],
    ["closures of a loop's elements", "const fs = [1, 2].map((n) => () => n);", "fs[1]()", 2],
  ])("%s", (_name, fixture, expression, expected) => {
    checkValue(fixture, expression, expected);
  });
});
