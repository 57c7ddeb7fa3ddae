// Hands the running workbench to the test modules of this folder. The run sets it once before it starts them; each test
// opens its own copy of the workspace through it.

import type { Workbench } from "../workbench.js";

let current: Workbench | undefined;

export function useWorkbench(workbench: Workbench): void {
  current = workbench;
}

export function workbench(): Workbench {
  if (!current) throw new Error("The tests of the page are started by test/run.mjs, which starts the workbench first.");
  return current;
}
