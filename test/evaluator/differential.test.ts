/** Whatever the evaluator claims to know must be what Node computes when the program really runs. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Value } from "../../extension/evaluator/value.js";
import { program, type Statement } from "./support/programs.js";
import { findDifference, isKnownThrough, runStatements } from "./support/run.js";
import { makeEvaluator, snapshotOf } from "./support/workspace.js";

const RUNS = Number(process.env.EVALUATOR_RUNS ?? 250);

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
    expect(claims / values).toBeGreaterThan(0.5);
  }, 600_000);
});
