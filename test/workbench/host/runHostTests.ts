// What the extension host runs: all test modules of this folder with mocha. In the workbench of the tests each outcome
// is a marked log line that the page passes on; in desktop VS Code it is a readable line and an error at the end.

import { runMocha } from "../mochaResults.js";
import type { TestResult } from "../results.js";
import { RESULT_MARK } from "./resultMark.js";

const TEST_TIMEOUT_MS = 90_000;

export async function runHostTests(files: readonly (() => Promise<unknown>)[]): Promise<void> {
  const { default: Mocha } = await import("mocha");
  const readable = process.env.LOADMARK_TEST_OUTPUT === "readable";
  const results: TestResult[] = [];
  const onResult = (result: TestResult) => {
    results.push(result);
    console.log(readable ? describe(result) : `${RESULT_MARK}${JSON.stringify(result)}`);
  };
  await runMocha({ Mocha, files, timeoutMs: TEST_TIMEOUT_MS, onResult });
  const failed = results.filter(({ failure }) => failure !== undefined).length;
  if (readable) console.log(`${results.length - failed} passed, ${failed} failed`);
  if (failed > 0 || results.length === 0) throw new Error(results.length === 0 ? "No tests ran." : `${failed} tests failed.`);
}

function describe({ title, failure }: TestResult): string {
  return failure === undefined ? `  passed  ${title}` : `  FAILED  ${title}\n${failure}`;
}
