/** Whatever the evaluator claims to know must be what Node computes when the program really runs. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Value } from "../../extension/evaluator/value.js";
import { program, type Statement } from "./support/programs.js";
import { findDifference, isKnownThrough, runFiles, runStatements } from "./support/run.js";
import { indexed, makeEvaluator, snapshotOf } from "./support/workspace.js";

const RUNS = Number(process.env.EVALUATOR_RUNS ?? 120);

function claim(statements: readonly Statement[]): Map<string, Value> {
  const names = statements.flatMap((each) => each.names);
  const text = `import { probe } from "gearbox";\n${statements.map((each) => each.text).join("\n")}\n${names.map((name) => `probe("${name}", ${name});`).join("\n")}\n`;
  const { calls, problem } = makeEvaluator().evaluateFile("/main.ts", snapshotOf(new Map([["/main.ts", text]])));
  expect(problem).toBeUndefined();
  expect(calls).toHaveLength(names.length);
  return new Map(names.map((name, index) => [name, calls[index]?.args[1] as Value]));
}

describe("claims against the running program", () => {
  it("are never wrong over generated programs, and are not just few", () => {
    let claims = 0;
    let values = 0;
    fc.assert(
      fc.property(program, (statements) => {
        const claimed = claim(statements);
        const actual = runStatements(statements);
        for (const [name, value] of claimed) {
          // A line that throws, and those after it, have no values to compare.
          if (!actual.has(name)) continue;
          expect(findDifference(value, actual.get(name), name)).toBeUndefined();
          values++;
          if (isKnownThrough(value)) claims++;
        }
      }),
      { numRuns: RUNS, seed: 20_260_501 },
    );
    expect(values).toBeGreaterThan(RUNS * 2);
    // A good part of the programs changes its objects, which are then rightly unknown.
    expect(claims / values).toBeGreaterThan(0.4);
  }, 600_000);

  it("are never wrong over programs in two files", () => {
    let claims = 0;
    fc.assert(
      fc.property(program, fc.nat({ max: 14 }), (statements, cut) => {
        const { files, names } = splitProgram(statements, cut);
        const { calls, problem } = makeEvaluator().evaluateFile("/main.ts", indexed(files));
        expect(problem).toBeUndefined();
        const actual = runFiles(files);
        for (const [index, name] of names.entries()) {
          const value = calls[index]?.args[1] as Value;
          if (!actual.has(name)) continue;
          expect(findDifference(value, actual.get(name), name)).toBeUndefined();
          if (isKnownThrough(value)) claims++;
        }
      }),
      { numRuns: RUNS, seed: 20_260_504 },
    );
    expect(claims).toBeGreaterThan(RUNS);
  }, 600_000);
});

/** The first statements go to a file of their own, whose names the rest imports; each name is probed at the end. */
function splitProgram(
  statements: readonly Statement[],
  cut: number,
): { readonly files: Map<string, string>; readonly names: readonly string[] } {
  // The compiler keeps other files from writing to what is `as const`, and these programs pass no compiler.
  const open = statements.map(({ text, names }) => ({ text: text.replaceAll(" as const", ""), names }));
  const [before, after] = [open.slice(0, cut), open.slice(cut)];
  const lib = before.map(({ text }) => text.replaceAll(/^(const|let|var|enum|function|class) /gm, "export $1 ")).join("\n");
  const declared = [...lib.matchAll(/^export (?:enum|function|class) (\w+)/gm)].map(([, name]) => name);
  const names = statements.flatMap((each) => each.names);
  const imported = [...before.flatMap((each) => each.names), ...declared].join(", ");
  // Only its own file can give an imported name another value.
  // One file at a time, a compiler doesn't count on from an imported constant.
  const counted = (text: string): string => text.replace(/^enum .*$/m, (line) => line.replaceAll(/ ([BE]),/g, " $1 = 9,"));
  const main = after.map(({ text }) => counted(text).replace(/^try \{ try \{ eval; .*$/, ";")).join("\n");
  const probes = names.map((name) => `probe("${name}", ${name});`).join("\n");
  const head = `import { probe } from "gearbox";\nimport { ${imported} } from "./lib";\n`;
  const files = new Map([
    ["/main.ts", `${head}${main}\n${probes}\n`],
    ["/lib.ts", `${lib}\n`],
  ]);
  return { files, names };
}
