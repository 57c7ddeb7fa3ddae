// The product's server beside TypeScript's own on the same files, turn by turn in one run, so that a busy machine slows both.

import { execFileSync } from "node:child_process";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { repositoryRoot } from "../workbench/paths.js";
import { LanguageServer } from "./languageServer.js";
import { residentMB } from "./processMemory.js";
import { type Spread, spreadOf } from "./spread.js";
import { TsServer } from "./tsserver.js";
import type { BenchWorkspace } from "./workspace.js";

/** Milliseconds and megabytes of both. */
export interface Beside {
  /** Ours to all findings of the workspace, theirs to the semantic diagnostics of a few open files. */
  readonly opening: Pair;
  /** The same with every file open that has findings, so that both tell of the same files. */
  readonly openingOfSame: Pair;
  readonly editInMechanism: Pair;
  readonly editOfConstant: Pair;
  readonly memory: Pair;
  readonly findings: number;
}

export interface Pair {
  readonly ours: Spread;
  readonly theirs: Spread;
}

export interface Rounds {
  readonly openings: number;
  readonly edits: number;
}

export async function measureBeside(workspace: BenchWorkspace, { openings, edits }: Rounds): Promise<Beside> {
  const expected = countFindings(workspace.folder);
  const opening = { ours: [] as number[], theirs: [] as number[] };
  const openingOfSame = { ours: [] as number[], theirs: [] as number[] };
  const memory = { ours: [] as number[], theirs: [] as number[] };
  const inMechanism = { ours: [] as number[], theirs: [] as number[] };
  const ofConstant = { ours: [] as number[], theirs: [] as number[] };
  const told = [...expected.keys()].map((uri) => fileURLToPath(uri));
  // Every start but the first finds what the engine compiled.
  const first = await openOurs(workspace, told, expected);
  await first.server.stop();
  for (let round = 0; round < openings; round++) {
    const oursOfSame = await openOurs(workspace, told, expected);
    openingOfSame.ours.push(oursOfSame.ms);
    await oursOfSame.server.stop();
    const theirsOfSame = await openTheirs(told);
    openingOfSame.theirs.push(theirsOfSame.ms);
    theirsOfSame.server.stop();
    const ours = await openOurs(workspace, openFiles(workspace), expected);
    opening.ours.push(ours.ms);
    const theirs = await openTheirs(openFiles(workspace));
    opening.theirs.push(theirs.ms);
    await editBoth(workspace.mechanism, [workspace.mechanism.path], inMechanism);
    await editBoth(workspace.constants, workspace.constants.users, ofConstant);
    memory.ours.push(residentMB(ours.server.process));
    memory.theirs.push(residentMB(theirs.server.process));
    await ours.server.stop();
    theirs.server.stop();

    async function editBoth(
      file: BenchWorkspace["mechanism"],
      shown: readonly string[],
      into: { ours: number[]; theirs: number[] },
    ) {
      for (let edit = 0; edit < edits; edit++) {
        const number = file.numberAt(round * edits + edit);
        into.ours.push(
          await timed(async () => {
            const done = ours.server.published(shown);
            ours.server.edit(file, number);
            await done;
          }),
        );
        // Neither works on in the other's time.
        await ours.server.whenQuiet();
        into.theirs.push(
          await timed(async () => {
            theirs.server.edit(file, number);
            await theirs.server.semanticDiagnostics(shown);
          }),
        );
        await theirs.server.whenQuiet();
      }
    }
  }
  const pair = ({ ours, theirs }: { ours: number[]; theirs: number[] }): Pair => ({
    ours: spreadOf(ours),
    theirs: spreadOf(theirs),
  });
  return {
    opening: pair(opening),
    openingOfSame: pair(openingOfSame),
    editInMechanism: pair(inMechanism),
    editOfConstant: pair(ofConstant),
    memory: pair(memory),
    findings: [...expected.values()].reduce((sum, count) => sum + count, 0),
  };
}

/** From the start of the process until every finding of the workspace has been told. */
async function openOurs(workspace: BenchWorkspace, files: readonly string[], expected: ReadonlyMap<string, number>) {
  const start = performance.now();
  const server = new LanguageServer();
  const all = server.until(() => [...expected].every(([uri, count]) => server.findings.get(uri)?.length === count));
  await server.start(workspace.folder);
  for (const path of files) server.open(path);
  await all;
  const ms = performance.now() - start;
  await server.whenQuiet();
  return { server, ms };
}

/** From the start of the process until the semantic diagnostics of the files. */
async function openTheirs(files: readonly string[]) {
  const start = performance.now();
  const server = new TsServer();
  for (const path of files) server.open(path);
  const errors = await server.semanticDiagnostics(files);
  if (errors > 0) throw new Error(`TypeScript finds ${errors} errors in the bench's own workspace.`);
  const ms = performance.now() - start;
  await server.whenQuiet();
  return { server, ms };
}

function openFiles({ mechanism, constants }: BenchWorkspace): string[] {
  return [...new Set([mechanism.path, constants.path, ...constants.users])];
}

/** By address, as the command finds them. */
function countFindings(folder: string): Map<string, number> {
  const command = join(repositoryRoot, "dist/command.js");
  const args = [command, "check", folder, "--format", "json", "--fail-on", "never"];
  const report: { readonly findings: readonly { readonly file: string }[] } = JSON.parse(
    execFileSync(process.execPath, args, { encoding: "utf8", maxBuffer: 1 << 28 }),
  );
  const counts = new Map<string, number>();
  for (const { file } of report.findings) {
    const uri = `file://${folder}/${file}`;
    counts.set(uri, (counts.get(uri) ?? 0) + 1);
  }
  if (counts.size === 0) throw new Error("The bench's workspace has no findings.");
  return counts;
}

async function timed(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return performance.now() - start;
}
