// The bench: prints how fast and how large the product is, as ratios against what an editor runs anyway, measured in this one run.
// Numbers wobble with the machine; the ratios less. It asserts nothing: it is read by people.

import { join } from "node:path";
import { cacheFolder } from "../workbench/paths.js";
import { type Beside, measureBeside, type Pair } from "./beside.js";
import { tellNumber, tellRatio, tellSpread } from "./spread.js";
import { writeWorkspace } from "./workspace.js";

export const sections: Record<string, { readonly title: string; readonly run: () => Promise<void> }> = {
  editor: { title: "beside TypeScript's server", run: benchBeside },
};

async function benchBeside(): Promise<void> {
  const small = await besideOf(200, { openings: 4, edits: 25 });
  const large = await besideOf(2000, { openings: 1, edits: 25 });
  console.log("\n  growth from 200 to 2,000 files, ours and TypeScript's:");
  const growth = (what: string, of: (one: Beside) => Pair) =>
    console.log(
      `  ${what}: ${tellNumber(of(large).ours.median / of(small).ours.median)} and ${tellNumber(of(large).theirs.median / of(small).theirs.median)} times`,
    );
  growth("opening", (one) => one.opening);
  growth("edit in a mechanism's file", (one) => one.editInMechanism);
  growth("edit of a shared constant", (one) => one.editOfConstant);
  growth("memory", (one) => one.memory);
}

async function besideOf(files: number, rounds: Parameters<typeof measureBeside>[1]): Promise<Beside> {
  const workspace = await writeWorkspace(join(cacheFolder, `../bench/workspace${files}`), files);
  const beside = await measureBeside(workspace, rounds);
  console.log(
    `\n  ${workspace.files} files, ${workspace.lines} lines, a quarter declare mechanisms; ${beside.findings} findings`,
  );
  tell("opening", beside.opening, "ms", 1 / 5);
  tell("edit in a mechanism's file", beside.editInMechanism, "ms", 1 / 4);
  tell("edit of a constant that five files use", beside.editOfConstant, "ms", 1 / 4);
  tell("memory", beside.memory, "MB", 1 / 4);
  return beside;
}

function tell(what: string, { ours, theirs }: Pair, unit: string, bar: number): void {
  console.log(`  ${what}: ours ${tellSpread(ours, unit)}, TypeScript's ${tellSpread(theirs, unit)}`);
  console.log(`  ${tellRatio("as a ratio", ours.median / theirs.median, bar)}`);
}
