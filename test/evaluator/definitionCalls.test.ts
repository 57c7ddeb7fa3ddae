// biome-ignore-all lint/suspicious/noTemplateCurlyInString: the texts are code
/** Calls to definitions: places of issues, unknown arguments, what is built, names and comments. */
import { describe, expect, it } from "vitest";
import type { DefinitionCall, FileEvaluation, Span } from "../../extension/evaluator/value.js";
import { evaluateFixture, splitFiles } from "./support/workspace.js";

/** `file: characters` of a span in the fixture. */
function show(fixture: string, span: Span | undefined): string | undefined {
  const text = span && splitFiles(fixture).get(span.file)?.slice(span.start, span.end);
  return span && `${span.file === "/main.ts" ? "" : `${span.file}: `}${text}`;
}

function issuesOf(fixture: string): (string | undefined)[][] {
  const { calls } = evaluateFixture(fixture);
  return calls.flatMap(({ issues }) =>
    issues.map(({ message, span, source }) => [message, show(fixture, span), show(fixture, source)]),
  );
}

function only({ calls }: FileEvaluation): DefinitionCall {
  expect(calls).toHaveLength(1);
  return calls[0] as DefinitionCall;
}

describe("an issue finds its characters", () => {
  const head = `import { gear } from "gearbox";\n`;
  it.each<[string, string, (string | undefined)[]]>([
    ["a literal", "gear({ teeth: -3 });", ["bad teeth", "-3", undefined]],
    ["a constant", "const T = -3; gear({ teeth: T });", ["bad teeth", "T", "-3"]],
    ["a constant of a constant", "const S = -3; const T = S; gear({ teeth: T });", ["bad teeth", "T", "-3"]],
    [
      "an import",
      'import { T } from "./c"; gear({ teeth: T });\n//- c.ts\nexport const T = -3;',
      ["bad teeth", "T", "/c.ts: -3"],
    ],
    ["a property", "const G = { hoist: -3 }; gear({ teeth: G.hoist });", ["bad teeth", "G.hoist", "-3"]],
    ["an element", "const G = [5, -3]; gear({ teeth: G[1] });", ["bad teeth", "G[1]", "-3"]],
    ["an element by a constant", "const G = [5, -3]; const I = 1; gear({ teeth: G[I] });", ["bad teeth", "G[I]", "-3"]],
    ["a spread", "const G = { teeth: -3 }; gear({ ...G });", ["bad teeth", "...G", "-3"]],
    ["a whole object elsewhere", "const G = { teeth: -3 }; gear(G);", ["bad teeth", "G", "-3"]],
    ["shorthand", "const teeth = -3; gear({ teeth });", ["bad teeth", "teeth", "-3"]],
    ["arithmetic with one literal elsewhere", "const T = 3; gear({ teeth: T / 2 });", ["bad teeth", "T / 2", "3"]],
    ["arithmetic with two", "const T = 3, S = 2; gear({ teeth: T / S });", ["bad teeth", "T / S", undefined]],
    ["a choice", "const B = true, T = -3; gear({ teeth: B ? T : 5 });", ["bad teeth", "B ? T : 5", "-3"]],
    ["a template", "const T = 3; gear({ teeth: `${T} mm` });", ["bad teeth", "`${T} mm`", "3"]],
    ["a helper", "const f = (n: number) => -n; const T = 3; gear({ teeth: f(T) });", ["bad teeth", "f(T)", "3"]],
    ["a destructured name", "const { a: T } = { a: -3 }; gear({ teeth: T });", ["bad teeth", "T", "-3"]],
    ["a mistyped field", "gear({ teeth: 3, nmae: 1 });", ["unknown field nmae", "nmae", undefined]],
    ["a mistyped field in a spread", "const G = { teeth: 3, nmae: 1 }; gear({ ...G });", ["unknown field nmae", "...G", "nmae"]],
    ["a mistyped field elsewhere", "const G = { teeth: 3, nmae: 1 }; gear(G);", ["unknown field nmae", "G", "nmae"]],
    ["a missing field", "gear({});", ["teeth missing", "gear", undefined]],
    ["a missing argument", "gear();", ["no options", "gear", undefined]],
    ["a spread argument", "const A = [{ teeth: -3 }] as const; gear(...A);", ["bad teeth", "...A", "-3"]],
    [
      "a property of a built object",
      "const g = gear({ teeth: 3 }); gear({ teeth: g.double / 4 });",
      ["bad teeth", "g.double / 4", "3"],
    ],
  ])("%s", (_name, code, expected) => {
    expect(issuesOf(head + code)).toEqual([expected]);
  });

  it("keeps the source inside the value's own expression out", () => {
    expect(issuesOf(`${head}gear({ teeth: 3 / 2 });`)).toEqual([["bad teeth", "3 / 2", undefined]]);
  });

  it("names the callee behind a namespace", () => {
    const fixture = `import * as g from "gearbox";\ng.gear({});`;
    expect(issuesOf(fixture)).toEqual([["teeth missing", "gear", undefined]]);
  });
});

describe("unknown and refused arguments", () => {
  const head = `import { gear, pair } from "gearbox";\n`;

  it("drops the issues of what is unknown, and keeps the others", () => {
    const fixture = `${head}gear({ teeth: Math.random(), nmae: 1 });`;
    const call = only(evaluateFixture(fixture));
    expect(call.issues.map(({ message }) => message)).toEqual(["unknown field nmae"]);
    expect(call.unknowns.map(({ reason, origin }) => [reason.code, show(fixture, origin.span)])).toEqual([
      ["call", "Math.random()"],
    ]);
    expect(call.built).toBeUndefined();
  });

  it("locates an unknown in the call, with the chain to its root", () => {
    const fixture = `${head}const G = { teeth: readTeeth() };\ndeclare function readTeeth(): number;\ngear(G);`;
    const [part] = only(evaluateFixture(fixture)).unknowns;
    expect(show(fixture, part?.origin.span)).toBe("G");
    expect(show(fixture, part?.cause?.origin.span)).toBe("readTeeth()");
  });

  it("keeps users of a refused call silent, and says whom they wait for", () => {
    const { calls } = evaluateFixture(`${head}const a = gear({ teeth: -1 }); const b = gear({ teeth: 1 }); pair(a, b);`);
    const [refused, , user] = calls;
    expect(refused?.issues).toHaveLength(1);
    expect(user).toMatchObject({ issues: [], unknowns: [], waitsFor: [refused] });
    expect(user?.built).toBeUndefined();
  });

  it("keeps users of a call with an unknown silent", () => {
    const { calls } = evaluateFixture(`${head}pair(gear({ teeth: Math.random() }), gear({ teeth: 1 }));`);
    expect(calls[0]).toMatchObject({ definition: "pair", issues: [], unknowns: [], waitsFor: [calls[1]] });
    expect(calls[1]?.unknowns).toHaveLength(1);
  });

  it("reports a wrong neighbour of a refused call", () => {
    const { calls } = evaluateFixture(`${head}pair(gear({ teeth: -1 }), 5);`);
    expect(calls[0]?.issues.map(({ message, path }) => [message, path])).toEqual([["not a gear", [1]]]);
  });

  it("has no issues where a spread keeps the number of arguments open", () => {
    const call = only(evaluateFixture(`${head}declare const rest: [object];\ngear(...rest);`));
    expect(call).toMatchObject({ issues: [], unknowns: [{ reason: { code: "depends" } }] });
  });
});

describe("what is built", () => {
  const head = `import { gear, pair } from "gearbox";\n`;

  it("is one object however often it is mentioned", () => {
    const { calls } = evaluateFixture(
      `${head}const a = gear({ teeth: 1 }); const b = a; pair(a, b); pair(b, { ...{ x: a } }.x);`,
    );
    const [made, first, second] = calls.map(({ built }) => built);
    expect(first).toEqual({ first: made, second: made });
    expect(Reflect.get(first ?? {}, "first")).toBe(made);
    expect(Reflect.get(second ?? {}, "second")).toBe(made);
  });

  it("gives its properties, with the argument's origin where it has one", () => {
    const fixture = `${head}const a = gear({ teeth: 7, name: "x" }); gear({ teeth: a.teeth, name: a.name }); gear({ teeth: a.double });`;
    const [, copy, twice] = evaluateFixture(fixture).calls;
    expect(copy?.built).toMatchObject({ teeth: 7, name: "x" });
    expect(twice?.built).toMatchObject({ teeth: 14 });
    const [options] = copy?.args ?? [];
    const teeth = options?.known === true && options.data.kind === "object" ? options.data.entries.get("teeth") : undefined;
    expect(teeth?.origin.from.map(({ span }) => show(fixture, span))).toEqual(["7"]);
  });

  it.each<[string, string | undefined]>([
    ["const hoist = gear({ teeth: 1 });", "hoist"],
    ["export const hoist = Object.freeze(gear({ teeth: 1 }) as unknown);", "hoist"],
    ["const all = { hoist: gear({ teeth: 1 }) };", "hoist"],
    ["const all = { 'hoist': gear({ teeth: 1 }) };", "hoist"],
    ["class A { static readonly hoist = gear({ teeth: 1 }); }", "hoist"],
    ["class A { #hoist = gear({ teeth: 1 }); }", "#hoist"],
    ["class A { hoist; constructor() { this.hoist = gear({ teeth: 1 }); } }", "hoist"],
    ["let hoist; hoist = gear({ teeth: 1 });", "hoist"],
    ["export default gear({ teeth: 1 });", undefined],
    ["const all = [gear({ teeth: 1 })];", undefined],
  ])("knows the name in %s", (code, name) => {
    const fixture = head + code;
    const { binding } = only(evaluateFixture(fixture));
    expect(binding?.name).toBe(name);
    if (binding !== undefined) expect(show(fixture, binding.span)?.replaceAll("'", "")).toBe(name);
  });

  it.each<[string, string[]]>([
    ["// one\n/* two */\nconst a = gear({ teeth: 1 });", ["// one", "/* two */"]],
    ["// far\n\n// near\nconst a = gear({ teeth: 1 });", ["// near"]],
    ["const b = 1; // behind\nconst a = gear({ teeth: 1 });", []],
    ["// above\nexport default gear({ teeth: 1 });", ["// above"]],
    ["// outer\nconst all = {\n  // inner\n  a: gear({ teeth: 1 }),\n};", ["// inner"]],
    ["// outer\nconst all = { a: gear({ teeth: 1 }) };", ["// outer"]],
    ["// outer\nconst all = [\n  // inner\n  gear({ teeth: 1 }),\n];", ["// inner"]],
    ["class A {\n  // inner\n  static a = gear({ teeth: 1 });\n}", ["// inner"]],
    ["function f() {\n  // inner\n  return gear({ teeth: 1 });\n}", ["// inner"]],
    ["const b = 1;\n// last\n", []],
  ])("hands on the comments right above: %j", (code, comments) => {
    const withCall = code.includes("gear(") ? code : `${code}\nconst a = gear({ teeth: 1 });`;
    expect(only(evaluateFixture(head + withCall)).leadingComments.map(({ text }) => text)).toEqual(comments);
  });
});
