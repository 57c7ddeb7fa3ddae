// Runs named tests one after the other in a browser's worker and reports each as a marked log line. It asserts first that this
// is a worker, since a run in Node would pass and prove nothing.

import { RESULT_MARK } from "../host/resultMark.js";
import type { TestResult } from "../results.js";

export type WorkerTests = Readonly<Record<string, () => Promise<void>>>;

const TEST_TIMEOUT_MS = 90_000;

export async function runWorkerTests(groups: readonly WorkerTests[]): Promise<void> {
  const all = [["the host is a browser's worker", checkIsWorker] as const, ...groups.flatMap((tests) => Object.entries(tests))];
  let failed = 0;
  for (const [name, test] of all) {
    const failure = await outcomeOf(test);
    if (failure !== undefined) failed += 1;
    const title = `in a browser's worker: ${name}`;
    const result: TestResult = failure === undefined ? { title } : { title, failure };
    console.log(`${RESULT_MARK}${JSON.stringify(result)}`);
  }
  if (failed > 0) throw new Error(`${failed} tests failed.`);
}

async function checkIsWorker(): Promise<void> {
  const { importScripts, process } = globalThis as { importScripts?: unknown; process?: { versions?: { node?: string } } };
  if (typeof importScripts !== "function") throw new Error("There is no importScripts.");
  if (process?.versions?.node !== undefined) throw new Error("This is Node.");
}

async function outcomeOf(test: () => Promise<void>): Promise<string | undefined> {
  let timer: ReturnType<typeof setTimeout> | undefined;
  try {
    const late = new Promise<never>((_, reject) => {
      timer = setTimeout(() => reject(new Error(`It took more than ${TEST_TIMEOUT_MS / 1000} s.`)), TEST_TIMEOUT_MS);
    });
    await Promise.race([test(), late]);
    return undefined;
  } catch (error) {
    return error instanceof Error ? (error.stack ?? error.message) : String(error);
  } finally {
    clearTimeout(timer);
  }
}
