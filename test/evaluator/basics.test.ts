// biome-ignore-all lint/suspicious/noTemplateCurlyInString: the texts are code
/** What literals, operators and the functions of the language give. */
import { describe, expect, it } from "vitest";
import { loadTypeScript } from "../../extension/evaluator/typescript.js";
import { dataOf } from "./support/workspace.js";

describe("literals and operators", () => {
  it.each<[string, unknown]>([
    ["12", 12],
    ["1_000.5", 1000.5],
    ["0x10", 16],
    ["-3", -3],
    ['"4.6 A"', "4.6 A"],
    ["`plain`", "plain"],
    ["true", true],
    ["null", null],
    ["undefined", undefined],
    ["60 / 8", 7.5],
    ["2 ** 3 ** 2", 512],
    ["7 % 4 - 1", 2],
    ["1 << 4 | 3", 19],
    ["~5", -6],
    ["!0", true],
    ['"a" + 1 + true', "a1true"],
    ["`${2 * 3} kg`", "6 kg"],
    ["`${0.1 + 0.2} ${null} ${undefined}`", "0.30000000000000004 null undefined"],
    ["3 < 4 && 5 >= 5", true],
    ['"a" < "b"', true],
    ["0 || 7", 7],
    ["0 ?? 7", 0],
    ["null ?? 7", 7],
    ["1 > 2 ? 3 : 4", 4],
    ["(1, 2)", 2],
    ["typeof 1", "number"],
    ["void 0", undefined],
    ["Math.PI", Math.PI],
    ["Math.max(1, 2, ...[5, 3])", 5],
    ["Math.round(Math.sqrt(2) * 100) / 100", 1.41],
    ["Math.hypot(3, 4)", 5],
    ["Number.parseFloat('3.5 kg')", 3.5],
    ["Number('12')", 12],
    ["parseInt('ff', 16)", 255],
    ["String(12) + 'x'", "12x"],
    ["(12.345).toFixed(1)", "12.3"],
    ["[1, 2].length", 2],
    ["'abc'.length", 3],
    ["'abc'[1]", "b"],
    ["{}", {}],
    ["[1, ...[2, 3], 4]", [1, 2, 3, 4]],
    ["[...'ab']", ["a", "b"]],
    ["({ a: 1, 'b c': 2, 3: 4, ['x' + 1]: 5, ...{ a: 6, d: 7 } })", { a: 6, "b c": 2, 3: 4, x1: 5, d: 7 }],
    ["({ ...null, ...'hi', ...[7] })", { 0: 7, 1: "i" }],
    ["Object.keys({ b: 1, 2: 1, a: 1, 1: 1 })", ["1", "2", "b", "a"]],
    ["({ a: 1 } as const).a", 1],
    ["({ a: 1 } satisfies object).a", 1],
    ["(<number>5)!", 5],
    ["Object.freeze({ a: [1] }).a[0]", 1],
    ["{ a: 1 }.a", 1],
  ])("%s", (expression, value) => {
    expect(dataOf("", expression)).toEqual(value);
  });
});

it("loads the parser, however the runtime wraps it", async () => {
  const { createSourceFile } = await loadTypeScript();
  expect(createSourceFile("a.ts", "1 + 1;", 99).statements).toHaveLength(1);
});
