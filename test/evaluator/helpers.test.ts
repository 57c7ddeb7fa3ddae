// biome-ignore-all lint/suspicious/noTemplateCurlyInString: the texts are code
/** Helpers and list methods: each value is known, and is what the running program has. */
import { describe, expect, it } from "vitest";
import { checkValue } from "./support/run.js";
import { unknownOf } from "./support/workspace.js";

describe("helpers", () => {
  it.each<[string, string, string, unknown]>([
    ["one expression", "const inches = (n: number) => n * 25.4;", "inches(2)", 50.8],
    ["function with text", "function metres(n: number) { return `${n} m`; }", "metres(2)", "2 m"],
    ["two arguments", "const ratioOf = (a: number, b: number) => b / a;", "ratioOf(16, 40)", 2.5],
    ["generic, typed", "function id<T>(x: T): T { return x as T; }", "id<number>(3)", 3],
    ["with a type for this", "function f(this: unknown, n: number) { return n * 2; }", "f(3)", 6],
    ["rest", "const sum = (...n: number[]) => n.reduce((a, b) => a + b, 0);", "sum(1, 2, ...[3, 4])", 10],
    [
      "conditions",
      "function f(n: number) { if (n > 2) { return 'big'; } else if (n > 1) return 'mid'; return 'small'; }",
      "[f(1), f(2), f(3)]",
      ["small", "mid", "big"],
    ],
    ["constants inside", "function f(n: number) { const a = n * 2; const { b } = { b: a + 1 }; return b; }", "f(4)", 9],
    ["itself", "const fact = (n: number): number => (n <= 1 ? 1 : n * fact(n - 1));", "fact(6)", 720],
    ["around another", "const a = (n: number) => n + 1; const b = (n: number) => a(n) * 2;", "b(3)", 8],
    ["given a helper", "const twice = (f: (n: number) => number, n: number) => f(f(n));", "twice((n) => n * 3, 2)", 18],
    ["made by a helper", "const times = (k: number) => (n: number) => n * k;", "times(3)(4)", 12],
    ["imported", 'import { mm } from "./mm";\n//- mm.ts\nconst K = 10; export const mm = (cm: number) => cm * K;', "mm(4)", 40],
    [
      "in an object",
      "const units = { mm(cm: number) { return cm * 10; }, m: (cm: number) => cm / 100 };",
      "units.mm(4) + units.m(100)",
      41,
    ],
    ["gives nothing back", "function f(n: number) { const a = n; }", "f(1)", undefined],
    ["calls something on the way", "function f(n: number) { Math.abs(n); return n; }", "f(1)", 1],
  ])("%s", (_name, fixture, expression, expected) => {
    checkValue(fixture, expression, expected);
  });

  it.each<[string, string, string, string, RegExp]>([
    ["endless", "const f = (n: number): number => f(n + 1);", "f(1)", "too-deep", /too many steps/],
    ["exponential", "const f = (n: number): number => (n < 2 ? n : f(n - 1) + f(n - 2));", "f(29)", "too-deep", /too many steps/],
    [
      "looping",
      "function f(n: number) { let s = 0; for (let i = 0; i < n; i++) s += i; return s; }",
      "f(3)",
      "unsupported",
      /is not followed inside a function/,
    ],
    ["async arrow", "const f = async () => 1;", "f()", "unsupported", /gives its value later/],
    ["given a variable's value", "function f() { return 1; } var f: any = () => 2;", "f()", "not-const", /another value later/],
    ["async", "async function f() { return 1; }", "f()", "unsupported", /gives its value later/],
    ["generator", "function* f() { yield 1; }", "f()", "unsupported", /gives its value later/],
    ["throwing", "function f(n: number) { if (n > 0) throw new Error(); return n; }", "f(1)", "unsupported", /throws an error/],
    [
      "depending on the caller",
      "function f(this: { n: number }) { return this.n; }",
      "f()",
      "unsupported",
      /depends on the caller/,
    ],
    ["reassigned", "let f = () => 1; f = () => 2;", "f()", "not-const", /gets another value later/],
    ["parameter", "function f(n: number) { return n; } const g = f;", "f(Math.random())", "call", /Math\.random/],
  ])("%s is unknown", (_name, code, expression, root, message) => {
    const found = unknownOf(code, expression);
    expect(found.codes.at(-1)).toBe(root);
    expect(found.message).toMatch(message);
  });
});

describe("lists", () => {
  it.each<[string, unknown]>([
    ["[1, 2, 3].map((n, i) => n * i)", [0, 2, 6]],
    ["[1, 2, 3].filter((n) => n % 2)", [1, 3]],
    ["[[16, 40], [12, 60]].map(([a, b]) => b / a)", [2.5, 5]],
    ["[[16, 40], [12, 60]].reduce((total, [a, b]) => (total * b) / a, 1)", 12.5],
    ["[5, 1, 3].reduce((a, b) => Math.max(a, b))", 5],
    ["['a', 'b'].reduceRight((s, c) => s + c, '')", "ba"],
    ["[3, 1, 2].sort((a, b) => a - b)", [1, 2, 3]],
    ["[10, 9, 1].sort()", [1, 10, 9]],
    ["[3, 1, 2].toSorted((a, b) => b - a)", [3, 2, 1]],
    ["[1, 2].reverse()", [2, 1]],
    ["['10', '11'].map(Number)", [10, 11]],
    ["[1, 4].map(Math.sqrt)", [1, 2]],
    ["[1, 2].concat([3], 4)", [1, 2, 3, 4]],
    ["[1, 2, 3].slice(-2).join('/')", "2/3"],
    ["[1, 2].find((n) => n > 1)", 2],
    ["[1, 2].find((n) => n > 5)", undefined],
    ["[1, 2].findIndex((n) => n > 1)", 1],
    ["[1, 2].some((n) => n > 1) && [1, 2].every((n) => n > 0)", true],
    ["[1, [2]].flatMap((n) => n)", [1, 2]],
    ["Array.from({ length: 3 }, (_, i) => i * i)", [0, 1, 4]],
    ["Object.entries({ a: 1, b: 2 }).map(([k, v]) => k + v)", ["a1", "b2"]],
    ["Object.fromEntries([['a', 1]].map(([k, v]) => [k, v]))", { a: 1 }],
    ["[1, 2].at(-1)", 2],
    ["[1, 2].includes(2)", true],
    ["'a,b'.split(',').map((s) => s.toUpperCase())", ["A", "B"]],
  ])("%s", (expression, expected) => {
    checkValue("", expression, expected);
  });

  it.each<[string, string]>([
    ["['1', '2'].map(parseInt)[1]", "unsupported"],
    ["[1, 2].reduce(Math.max)", "unsupported"],
    ["[].reduce((a, b) => a)", "unsupported"],
    ["Object.freeze([2, 1]).sort()", "unsupported"],
    ["[1, 2].map((n) => n * Math.random())[0]", "call"],
    ["[1, 2].filter(() => Math.random() > 0.5)", "call"],
    ["[{}, {}].sort()", "unsupported"],
    ["[1].unheardOf()", "no-such-property"],
    ["[1, 2].toLocaleString()", "unsupported"],
  ])("%s is unknown", (expression, root) => {
    expect(unknownOf("", expression).codes.at(-1)).toBe(root);
  });
});
