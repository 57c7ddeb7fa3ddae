// biome-ignore-all lint/suspicious/noTemplateCurlyInString: the texts are code
/** No text, however broken, deep or large, makes the evaluator throw, and what is whole beside it is still read. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { FileEvaluation } from "../../extension/evaluator/value.js";
import { evaluateFixture, makeEvaluator, plain, snapshotOf, splitFiles } from "./support/workspace.js";

const ROBOT = `import * as box from "gearbox";
import { gear, pair } from "gearbox";
import type { Later } from "./later";
import gears, { RATIO as R } from "./shared/gears.js";

enum Axis { Lift = 1, Arm, Name = "arm" }
const { hoist: { teeth = 40, ...more }, list: [first, ...others] } = gears;
export const inches = (n: number): number => n * 25.4;
class Arm<T> { static readonly TEETH = 48; readonly driven = Arm.TEETH * 2; #own = this.driven; make() { return gear({ teeth: this.#own }); } }
// allowance
export const lift = gear({ teeth: Math.round(inches(2)) + first!, name: \`\${Axis.Name} \${R?.toFixed(1) ?? "none"}\` });
const all = [[16, 40], [12, 60]].map(([a, b], i) => gear({ teeth: a + b + i }));
for (const [name, t] of Object.entries({ left: 3, right: 4 } as const)) { if (name === "none") continue; box.gear({ teeth: t, name }); }
export default pair(lift, all[others.length - 1] as Later) satisfies object;
function build(t = teeth) { const u = t * 2; if (u > 3) return gear({ teeth: u }); return { ...more }; }
build(); build(1);
let counter = 0; counter++; var old = counter;
label: for (;;) { break label; }
`;
const GEARS = `const list = [1, 2, 3];
export const RATIO = list.reduce((a, b) => a * b, 1) / 2;
export default { hoist: { teeth: 40, spare: [1, { deep: true }] }, list } as const;
`;

function evaluateBroken(main: string, gears = GEARS): FileEvaluation {
  const files = new Map([
    ["/main.ts", main],
    ["/shared/gears.ts", gears],
  ]);
  const evaluation = makeEvaluator().evaluateFile("/main.ts", snapshotOf(files));
  for (const { args, span, callee, issues, unknowns } of evaluation.calls) {
    args.forEach(plain);
    for (const each of [callee, ...issues.map((issue) => issue.span), ...unknowns.map(({ origin }) => origin.span)]) {
      expect(each.file).toBe(span.file);
      expect(each.start).toBeGreaterThanOrEqual(span.start);
      expect(each.end).toBeLessThanOrEqual(span.end);
    }
  }
  return evaluation;
}

describe("a whole file", () => {
  it("is read", () => {
    const { calls, problem } = evaluateBroken(ROBOT);
    expect(problem).toBeUndefined();
    expect(calls.map(({ built }) => Reflect.get(built ?? {}, "teeth"))).toEqual([96, 52, 56, 73, 3, 4, undefined, 80]);
  });
});

describe("broken text", () => {
  it("cut anywhere", () => {
    for (let at = 0; at <= ROBOT.length; at += 3) expect(evaluateBroken(ROBOT.slice(0, at)).problem).toBeUndefined();
    for (let at = 0; at <= GEARS.length; at += 2) expect(evaluateBroken(ROBOT, GEARS.slice(at)).problem).toBeUndefined();
  }, 60_000);

  it("with pieces lost, doubled, swapped and garbled", () => {
    const place = fc.nat({ max: ROBOT.length });
    const edit = fc.oneof(
      fc.tuple(place, fc.nat({ max: 30 })).map(
        ([at, length]) =>
          (text: string) =>
            text.slice(0, at) + text.slice(at + length),
      ),
      fc.tuple(place, fc.nat({ max: 60 })).map(
        ([at, length]) =>
          (text: string) =>
            text.slice(0, at + length) + text.slice(at),
      ),
      fc
        .tuple(
          place,
          fc.constantFrom(
            "(",
            ")",
            "{",
            "}",
            "[",
            "]",
            "`",
            "${",
            "'",
            "/*",
            "//",
            "<",
            "=>",
            "...",
            "?.",
            "=",
            ",",
            "\0",
            "\u2028",
            "\uD800",
          ),
        )
        .map(
          ([at, piece]) =>
            (text: string) =>
              text.slice(0, at) + piece + text.slice(at),
        ),
      fc.tuple(place, fc.string({ maxLength: 8 })).map(
        ([at, piece]) =>
          (text: string) =>
            text.slice(0, at) + piece + text.slice(at),
      ),
      fc
        .tuple(fc.constantFrom("{", "(", "[", "const", "gear", "=", "."), fc.constantFrom("}", ")", "let", "", ";", "class "))
        .map(
          ([from, to]) =>
            (text: string) =>
              text.replaceAll(from, to),
        ),
    );
    fc.assert(
      fc.property(fc.array(edit, { minLength: 1, maxLength: 5 }), (edits) => {
        const text = edits.reduce((before, change) => change(before), ROBOT);
        expect(evaluateBroken(text).problem).toBeUndefined();
        expect(
          evaluateBroken(
            ROBOT,
            edits.reduce((before, change) => change(before), GEARS),
          ).problem,
        ).toBeUndefined();
      }),
      { numRuns: Number(process.env.EVALUATOR_RUNS ?? 100), seed: 20_260_502 },
    );
  }, 600_000);

  it("leaves what is whole beside it alone", () => {
    const { calls } = evaluateFixture(`import { gear } from "gearbox";
export const a = gear({ teeth: 5 });
export const b = gear({ teeth: });
export const c = gear({ teeth: 6 });
const d = gear({ teeth: 7`);
    expect(
      calls.map(({ built, unknowns, issues }) => [
        Reflect.get(built ?? {}, "teeth"),
        unknowns.map(({ reason }) => reason.code),
        issues.length,
      ]),
    ).toEqual([
      [5, [], 0],
      [undefined, ["missing"], 0],
      [6, [], 0],
      [7, [], 0],
    ]);
  });
});

describe("deep and large text", () => {
  const head = 'import { gear, probe } from "gearbox";\n';
  const last = ({ calls }: FileEvaluation): unknown =>
    plain(
      calls.at(-1)?.args[0] ?? {
        known: true,
        data: { kind: "primitive", value: "none" },
        origin: { kind: "literal", span: { file: "", start: 0, end: 0 }, from: [] },
      },
    );
  const many = (count: number, make: (index: number) => string): string =>
    Array.from({ length: count }, (_, index) => make(index)).join("");

  it.each<[string, string]>([
    ["brackets", `probe(${"(".repeat(10_000)}1${")".repeat(10_000)});`],
    ["lists", `probe(${"[".repeat(10_000)}${"]".repeat(10_000)});`],
    ["blocks", `${"{".repeat(10_000)}probe(1);${"}".repeat(10_000)}`],
    ["calls", `probe(${"f(".repeat(10_000)}${")".repeat(10_000)});`],
    ["open brackets", `probe(${"([{".repeat(5_000)}`],
    ["functions", `${"() => (".repeat(5_000)}`],
  ])("nested %s make the file unreadable", (_name, text) => {
    const { calls, problem } = evaluateFixture(head + text);
    expect(calls).toEqual([]);
    expect(problem?.reason.code).toBe("too-deep");
  });

  it.each<[string, string]>([
    ["sums", `probe(0${"+1".repeat(10_000)});`],
    ["choices", `probe(${"false ? 1 : ".repeat(900)}2);`],
    ["accesses", `const a = {}; probe(a${".b".repeat(10_000)});`],
    ["calls of calls", `const f = () => f; probe(f${"()".repeat(5_000)});`],
    ["names of names", `const a0 = 1;\n${many(5_000, (index) => `const a${index + 1} = a${index};\n`)}probe(a5000);`],
    [
      "sums of names",
      `const a0 = 1;\n${many(5_000, (index) => `const a${index + 1} = a${index} + a${index};\n`)}probe(a5000 * 0);`,
    ],
    [
      "lists of lists of names",
      `const a0 = [1];\n${many(200, (index) => `const a${index + 1} = [a${index}, a${index}];\n`)}probe([...a200, ...a200].flatMap((x) => x).join());`,
    ],
    [
      "doubling lists",
      `const a0 = [1, 2];\n${many(60, (index) => `const a${index + 1} = [...a${index}, ...a${index}];\n`)}probe(a60.length);`,
    ],
    [
      "doubling texts",
      `const a0 = "ab";\n${many(60, (index) => `const a${index + 1} = a${index} + a${index};\n`)}probe(a60.length);`,
    ],
    ["a helper that never ends", "const f = (n: number): number => f(n + 1) + f(n + 2); probe(f(0));"],
    [
      "helpers that call each other",
      "const f = (n: number): number => g(n); const g = (n: number): number => f(n); probe(f(0));",
    ],
    ["a long list", `probe([${many(20_000, (index) => `${index},`)}]);`],
    [
      "endless growth in a method",
      'probe([1, 2, 3].flatMap((x) => "x".repeat(19000).split("")).flatMap((x) => [x, x, x, x]).length);',
    ],
  ])("of %s becomes an unknown", (_name, text) => {
    const evaluation = evaluateFixture(head + text);
    expect(evaluation.problem).toBeUndefined();
    expect(last(evaluation)).toMatch(/^unknown: (too-deep|unsupported|no-such-property)/);
  });

  it.each<[string, string, unknown]>([
    ["a long object", `const o = { ${many(5_000, (index) => `k${index}: ${index},`)} }; probe(o.k4999);`, 4999],
    ["many names", `${many(5_000, (index) => `const a${index} = ${index} * 2;\n`)}probe(a4999);`, 9998],
    [
      "a chain of names, each asked for in order",
      `const a0 = 1;\n${many(2_000, (index) => `const a${index + 1} = a${index} + 1; probe(a${index + 1});\n`)}`,
      2001,
    ],
    ["a sum over a list", `probe([${many(3_000, () => "1,")}].reduce((a, b) => a + b, 0));`, 3000],
    ["many members", `enum E { ${many(3_000, (index) => `M${index},`)} } probe(E.M2999);`, 2999],
  ])("of %s is read", (_name, text, expected) => {
    const evaluation = evaluateFixture(head + text);
    expect(evaluation.problem).toBeUndefined();
    expect(last(evaluation)).toBe(expected);
  });

  it("of aliases in a ring ends", () => {
    const evaluation = evaluateFixture(
      `//- main.ts\n${head}import { a } from "./b"; const x = y, y = x; probe(a, x);\n//- b.ts\nexport * from "./c"; export { a } from "./c";\n//- c.ts\nexport * from "./b"; export { a } from "./b";\n`,
    );
    expect(evaluation.problem).toBeUndefined();
    expect(last(evaluation)).toMatch(/^unknown/);
  });

  it("with a hundred thousand lines is read", () => {
    const files = splitFiles(`//- main.ts\n${head}import { T } from "./data"; gear({ teeth: T });\n`);
    files.set(
      "/data.ts",
      `export const T = 40;\n${"export const unused = { a: [1, 2, 3] };\n".repeat(50_000)}${"// nothing\n".repeat(50_000)}`,
    );
    const { calls } = makeEvaluator().evaluateFile("/main.ts", snapshotOf(files));
    expect(calls[0]?.built).toMatchObject({ teeth: 40 });
  }, 60_000);
});
