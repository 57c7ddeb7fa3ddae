// Runs mocha over test modules and reports each test's outcome as it ends, in the extension host as well as in Node. A
// skipped test counts as a failure, because no test here may be skipped.

import type { TestResult } from "./results.js";

export interface MochaRun {
  /** Mocha's class: the extension host and Node load it each in their way. */
  readonly Mocha: typeof Mocha;
  /** Each import defines its tests. */
  readonly files: readonly (() => Promise<unknown>)[];
  readonly timeoutMs: number;
  /** How often a failed test is tried again. Only for tests that drive the editor by mouse: it may draw anew under a click. */
  readonly retries?: number;
  readonly onResult: (result: TestResult) => void;
  /** What to add to a failure, such as where its picture is. */
  readonly onFailure?: ((title: string) => Promise<string>) | undefined;
}

export async function runMocha({ Mocha, files, timeoutMs, retries = 0, onResult, onFailure }: MochaRun): Promise<void> {
  const mocha = new Mocha({ ui: "bdd", timeout: timeoutMs, retries, reporter: class {} as never });
  mocha.suite.emit("pre-require", globalThis, "", mocha);
  for (const load of files) await load();
  const notes = new Map<string, string>();
  if (onFailure) {
    mocha.suite.afterEach(async function noteFailure() {
      const test = this.currentTest;
      if (test?.state === "failed") notes.set(test.fullTitle(), await onFailure(test.fullTitle()));
    });
  }
  await new Promise<void>((resolve) => {
    const failures: TestResult[] = [];
    const runner = mocha.run(() => {
      // Failures wait until their notes are there.
      for (const { title, failure } of failures)
        onResult({ title, failure: [failure, notes.get(title)].filter(Boolean).join("\n") });
      resolve();
    });
    const firstTries = new Map<string, string>();
    runner.on("retry", (test, error) => firstTries.set(test.fullTitle(), describe(error)));
    runner.on("pass", (test) => onResult({ title: test.fullTitle(), firstTry: firstTries.get(test.fullTitle()) }));
    runner.on("pending", (test) => onResult({ title: test.fullTitle(), failure: "The test was skipped." }));
    runner.on("fail", (test, error) => failures.push({ title: test.fullTitle(), failure: describe(error) }));
  });
}

function describe(error: unknown): string {
  if (!(error instanceof Error)) return String(error);
  return error.stack?.includes(error.message) ? error.stack : `${error.message}\n${error.stack ?? ""}`;
}
