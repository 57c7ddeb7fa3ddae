// How long the client takes to load and activate where nothing uses the declarations, each time in a process of its own.

import { execFileSync } from "node:child_process";
import { join } from "node:path";
import { repositoryRoot } from "../workbench/paths.js";
import { type Spread, spreadOf } from "./spread.js";

/** ms. */
export function measureActivation(rounds: number): Spread {
  const script = join(repositoryRoot, "test/bench/activateOnce.mjs");
  const once = () => Number(execFileSync(process.execPath, [script], { encoding: "utf8" }));
  return spreadOf(Array.from({ length: rounds }, once));
}
