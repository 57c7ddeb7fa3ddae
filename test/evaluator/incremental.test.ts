/** What an edit costs, and that what is kept is never out of date. */
import fc from "fast-check";
import { describe, expect, it, vi } from "vitest";
import type { FileEvaluation, Snapshot } from "../../extension/evaluator/value.js";
import { parser as ts } from "../support/parser.js";
import { indexed, makeEvaluator, plain, snapshotOf, splitFiles } from "./support/workspace.js";

const FIXTURE = `//- a.ts
import { gear } from "gearbox"; import { T } from "./shared"; export const a = gear({ teeth: T });
//- b.ts
import { gear } from "gearbox"; export const b = gear({ teeth: 9 });
//- shared.ts
export { T } from "./constants";
//- constants.ts
export const T = 40;
`;

function teethOf({ calls }: FileEvaluation): unknown[] {
  return calls.map(({ built }) => Reflect.get(built ?? {}, "teeth"));
}

describe("an edit", () => {
  it("reaches the files that depend on it, and no other", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(FIXTURE);
    const before = {
      a: evaluator.evaluateFile("/a.ts", snapshotOf(files)),
      b: evaluator.evaluateFile("/b.ts", snapshotOf(files)),
    };
    expect(evaluator.evaluateFile("/a.ts", snapshotOf(files))).toBe(before.a);
    files.set("/constants.ts", "export const T = 41;");
    const after = {
      a: evaluator.evaluateFile("/a.ts", snapshotOf(files)),
      b: evaluator.evaluateFile("/b.ts", snapshotOf(files)),
    };
    expect(teethOf(before.a)).toEqual([40]);
    expect(teethOf(after.a)).toEqual([41]);
    expect(after.b).toBe(before.b);
  });

  it("parses only what has changed", () => {
    const parse = vi.fn(ts.createSourceFile);
    const evaluator = makeEvaluator({ ...ts, createSourceFile: parse });
    const files = splitFiles(FIXTURE);
    evaluator.evaluateFile("/a.ts", snapshotOf(files));
    expect(parse.mock.calls.map(([file]) => file)).toEqual(["/a.ts", "/shared.ts", "/constants.ts"]);
    parse.mockClear();
    files.set("/constants.ts", "export const T = 41;");
    evaluator.evaluateFile("/a.ts", snapshotOf(files));
    expect(parse.mock.calls.map(([file]) => file)).toEqual(["/constants.ts"]);
  });

  it("in a file that is imported again after a while is seen then", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(FIXTURE);
    const importing = files.get("/a.ts") ?? "";
    expect(teethOf(evaluator.evaluateFile("/a.ts", snapshotOf(files)))).toEqual([40]);
    files.set("/a.ts", "export {};");
    evaluator.evaluateFile("/a.ts", snapshotOf(files));
    files.set("/constants.ts", "export const T = 41;");
    evaluator.evaluateFile("/a.ts", snapshotOf(files));
    files.set("/a.ts", importing);
    expect(teethOf(evaluator.evaluateFile("/a.ts", snapshotOf(files)))).toEqual([41]);
  });

  it("in a ring of files reaches all of it", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(`//- a.ts
import { gear } from "gearbox"; import { C } from "./b"; export const A = 1; gear({ teeth: C });
//- b.ts
import { A } from "./a"; import { D } from "./d"; export const C = A + D;
//- d.ts
export const D = 1;
`);
    expect(teethOf(evaluator.evaluateFile("/a.ts", snapshotOf(files)))).toEqual([2]);
    files.set("/d.ts", "export const D = 5;");
    evaluator.evaluateFile("/b.ts", snapshotOf(files));
    expect(teethOf(evaluator.evaluateFile("/a.ts", snapshotOf(files)))).toEqual([6]);
  });

  it("is the same as starting anew, after any order of edits", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(FIXTURE);
    const steps: [string, string | undefined][] = [
      ["/constants.ts", "export const T = 1;"],
      ["/shared.ts", "export const T = 2;"],
      ["/shared.ts", undefined],
      ["/shared.ts", 'export * from "./constants";'],
      ["/constants.ts", undefined],
      ["/constants.ts", "export const T = Math.random();"],
      ["/constants.ts", "export const T = 7;"],
    ];
    for (const [file, text] of steps) {
      if (text === undefined) files.delete(file);
      else files.set(file, text);
      // A file in between may be evaluated by itself before those that use it.
      for (const name of ["/shared.ts", "/b.ts", "/a.ts"]) {
        const kept = evaluator.evaluateFile(name, snapshotOf(files));
        const fresh = makeEvaluator().evaluateFile(name, snapshotOf(files));
        expect(kept).toEqual(fresh);
      }
    }
  });

  it("forgets a file that is gone", () => {
    const evaluator = makeEvaluator();
    const files = splitFiles(FIXTURE);
    evaluator.evaluateFile("/a.ts", snapshotOf(files));
    files.delete("/constants.ts");
    evaluator.forget("/constants.ts");
    const { calls, missing } = evaluator.evaluateFile("/a.ts", snapshotOf(files));
    expect(calls[0]?.unknowns).toHaveLength(1);
    expect(missing).toContain("/constants.ts");
  });
});

describe("any order of edits", () => {
  /** Texts that each file may have; `undefined` for no file. */
  const texts: Readonly<Record<string, readonly (string | undefined)[]>> = {
    "/a.ts": [
      'import { gear } from "gearbox"; import { T, O } from "./b"; export const A = T + 1; gear({ teeth: O.x }); gear({ teeth: A });',
      'import { gear } from "gearbox"; import * as b from "./b"; export const A = 2; gear({ teeth: b.T }); b.O.x;',
      'import { make } from "./c"; import { O } from "./b"; export const A = 3; make(O.x); make(A);',
    ],
    "/b.ts": [
      'export { T } from "./c"; export { O } from "./c";',
      'export * from "./c";',
      'import { A } from "./a"; export const T = 5; export const O = { x: A };',
      "export const T = ;",
      undefined,
    ],
    "/c.ts": [
      'import { gear } from "gearbox"; export const T = 7; export const O = { x: 9 }; export const make = (teeth: number) => gear({ teeth });',
      'import { gear } from "gearbox"; import { A } from "./a"; export const T = A * 2; export const O = { x: T }; export function make(n: number) { return gear({ teeth: n + 1 }); }',
      "export const T = 7; export const O = { x: 1 } as const;",
      undefined,
    ],
    "/d.ts": [
      'import { O } from "./c"; O.x = 3;',
      'import { O } from "./b"; console.log(O.x);',
      'import { O } from "./b"; setUp(O);',
      "export {};",
    ],
  };
  const edit = fc
    .constantFrom(...Object.entries(texts))
    .chain(([file, choices]) => fc.tuple(fc.constant(file), fc.constantFrom(...choices)));
  const step = fc.tuple(edit, fc.subarray(Object.keys(texts)));

  it("gives what starting anew gives", () => {
    fc.assert(
      fc.property(fc.array(step, { minLength: 2, maxLength: 12 }), fc.boolean(), fc.boolean(), (steps, isIndexed, isTold) => {
        const evaluator = makeEvaluator();
        const tell = tellChanges();
        const files = new Map<string, string>();
        for (const [file, [text = ""]] of Object.entries(texts)) files.set(file, text);
        for (const [[file, text], asked] of steps) {
          if (text === undefined) files.delete(file);
          else files.set(file, text);
          const bare = isIndexed ? indexed(new Map(files)) : snapshotOf(new Map(files));
          const snapshot = isTold ? tell(bare, file, isIndexed) : bare;
          for (const each of asked) {
            const [kept, fresh] = [evaluator, makeEvaluator()].map((one) => one.evaluateFile(each, snapshot));
            expect(summary(kept)).toEqual(summary(fresh));
          }
        }
      }),
      { numRuns: Number(process.env.EVALUATOR_RUNS ?? 150), seed: 20_260_503 },
    );
  }, 600_000);

  /** Snapshots whose host knows which files changed since each; not where who imports whom may have changed too. */
  function tellChanges(): (bare: Snapshot, edited: string, isIndexed: boolean) => Snapshot {
    const edits: string[] = [];
    const moments = new Map<Snapshot["read"], number>();
    return (bare, edited, isIndexed) => {
      edits.push(edited);
      moments.set(bare.read, edits.length);
      const between = (one: Snapshot, other: Snapshot) => {
        const [before, after] = [moments.get(one.read), moments.get(other.read)];
        return before === undefined || after === undefined || isIndexed ? undefined : new Set(edits.slice(before, after));
      };
      return { ...bare, changes: { between } };
    };
  }

  /** All but the words of a chain of causes, which may begin at another link of a cycle. */
  function summary(evaluation: FileEvaluation | undefined): unknown {
    return evaluation?.calls.map(({ definition, span, built, issues, unknowns, open }) => [
      definition,
      span,
      built,
      issues,
      unknowns.map(({ origin }) => origin.span),
      open,
    ]);
  }
});

describe("what the snapshot lacks", () => {
  /** Loads what is wanted, round by round, as a host would. */
  function loadAll(all: ReadonlyMap<string, string>): { readonly rounds: string[][]; readonly result: FileEvaluation } {
    const loaded = new Map<string, string | null>([["/a.ts", all.get("/a.ts") ?? null]]);
    const evaluator = makeEvaluator();
    const snapshot = (): Snapshot => ({ read: (file) => loaded.get(file) });
    const rounds: string[][] = [];
    for (;;) {
      const result = evaluator.evaluateFile("/a.ts", snapshot());
      if (result.wanted.length === 0) return { rounds, result };
      rounds.push([...result.wanted]);
      for (const file of result.wanted) loaded.set(file, all.get(file) ?? null);
    }
  }

  it("is wanted, hop by hop, with nothing asked for twice", () => {
    const { rounds, result } = loadAll(splitFiles(FIXTURE));
    expect(rounds).toEqual([["/shared.ts"], ["/constants.ts"]]);
    expect(teethOf(result)).toEqual([40]);
    expect(result.dependencies).toEqual(["/a.ts", "/shared.ts", "/constants.ts"]);
  });

  it("is asked for in at most two rounds a file", () => {
    const { rounds, result } = loadAll(splitFiles(FIXTURE.replace("shared.ts", "shared/index.mts")));
    expect(rounds.map((round) => round.length)).toEqual([1, 17, 1, 17]);
    expect(result.calls[0]?.unknowns[0]?.reason.code).toBe("depends");
  });

  it("is unknown for now", () => {
    const snapshot: Snapshot = { read: (file) => (file === "/a.ts" ? splitFiles(FIXTURE).get(file) : undefined) };
    const { calls, wanted } = makeEvaluator().evaluateFile("/a.ts", snapshot);
    expect(wanted).toEqual(["/shared.ts"]);
    expect(calls[0]?.unknowns.map(plain)).toEqual(["unknown: unresolved-import"]);
  });

  it("may be the file itself", () => {
    const evaluator = makeEvaluator();
    expect(evaluator.evaluateFile("/x.ts", { read: () => undefined })).toMatchObject({
      calls: [],
      wanted: ["/x.ts"],
      missing: [],
    });
    expect(evaluator.evaluateFile("/x.ts", { read: () => null })).toMatchObject({ calls: [], wanted: [], missing: ["/x.ts"] });
  });

  it("is joined to addresses as well", () => {
    const files = new Map([
      ["vscode-vfs://github/o/r/src/a.ts", 'import { gear } from "gearbox"; import { T } from "../c"; gear({ teeth: T });'],
      ["vscode-vfs://github/o/r/c.ts", "export const T = 3;"],
    ]);
    expect(teethOf(makeEvaluator().evaluateFile("vscode-vfs://github/o/r/src/a.ts", snapshotOf(files)))).toEqual([3]);
  });
});
