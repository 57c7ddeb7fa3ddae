// The bench: prints how fast and how large the product is, as ratios against what an editor runs anyway, measured in this one run.
// Numbers wobble with the machine; the ratios less. It asserts nothing: it is read by people.

import { readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { cacheFolder, repositoryRoot } from "../workbench/paths.js";
import { measureActivation } from "./activation.js";
import { measureAnalyses } from "./analysis.js";
import { type Beside, measureBeside, type Pair } from "./beside.js";
import { measureCharts } from "./charts.js";
import { measureProposals } from "./proposals.js";
import { soak } from "./soak.js";
import { tellNumber, tellRatio, tellSpread } from "./spread.js";
import { measureTravels } from "./travel.js";
import { writeWorkspace } from "./workspace.js";

export interface BenchHost {
  /** Packs the product into a folder and gives the paths. */
  readonly makePackages: (folder: string) => Promise<{ readonly vsix: string; readonly tgz: string }>;
}

export const sections: Record<string, { readonly title: string; readonly run: (host: BenchHost) => Promise<void> }> = {
  model: { title: "one mechanism", run: benchModel },
  proposals: { title: "what clears a finding", run: benchProposals },
  editor: { title: "beside TypeScript's server", run: benchBeside },
  client: { title: "activation and sizes", run: benchClient },
  charts: { title: "the chart of a robot's load cycle", run: benchCharts },
  soak: { title: "10,000 edits", run: benchSoak },
};

const benchFolder = join(cacheFolder, "../bench");

async function benchModel(): Promise<void> {
  const travels = measureTravels(270);
  for (const { name, ours, odex, mathjs } of travels) {
    const rest = mathjs === undefined ? "" : `, mathjs ${tellSpread(mathjs, "ms")}`;
    console.log(`  travel of the ${name}: ours ${tellSpread(ours, "ms")}, odex ${tellSpread(odex, "ms")}${rest}`);
    console.log(`  ${tellRatio("over odex", ours.median / odex.median, 1)}`);
    if (mathjs !== undefined) console.log(`  ${tellRatio("over mathjs", ours.median / mathjs.median, 1 / 50)}`);
  }
  for (const { name, without, with: whole, sensitivities } of measureAnalyses(100)) {
    console.log(`  ${name}: from text to findings ${tellSpread(without, "ms")}`);
    console.log(`    with ${sensitivities} sensitivities: ${tellSpread(whole, "ms")}, bar 5 ms: ${tellBar(whole.median, 5)}`);
  }
}

async function benchProposals(): Promise<void> {
  for (const { name, time, candidatesPerSecond, found } of measureProposals(15)) {
    const bar = name.startsWith("a robot") ? "" : `, bar 100 ms: ${tellBar(time.median, 100)}`;
    console.log(
      `  ${name}: ${tellSpread(time, "ms")} to ${found} proposals, ${tellNumber(candidatesPerSecond)} candidates/s${bar}`,
    );
  }
}

async function benchCharts(): Promise<void> {
  const { mechanisms, cycleS, moments, kilobytes, simulation, chart, page } = await measureCharts(15);
  console.log(
    `  ${mechanisms} mechanisms, a load cycle of ${tellNumber(cycleS)} s: simulated in ${tellSpread(simulation, "ms")}`,
  );
  console.log(`  its chart of ${moments} moments, ${tellNumber(kilobytes)} kB, with the simulation: ${tellSpread(chart, "ms")}`);
  if (page === undefined) {
    console.log("  not drawn: there is no browser");
    return;
  }
  for (const [what, time] of [
    ["a new result, checked and drawn", page.message],
    ["a zoom", page.zoom],
    ["a step of the cursor", page.cursor],
  ] as const) {
    console.log(`  ${what}: ${tellSpread(time, "ms")}, bar 50 ms: ${tellBar(time.median, 50)}`);
  }
}

async function benchClient({ makePackages }: BenchHost): Promise<void> {
  const activation = measureActivation(9);
  console.log(
    `  loading and activating the client: ${tellSpread(activation, "ms")}, bar 50 ms: ${tellBar(activation.median, 50)}`,
  );
  const { vsix } = await makePackages(join(benchFolder, "packages"));
  const kilobytes = (file: string) => statSync(join(repositoryRoot, file)).size / 1000;
  for (const name of [
    "client.cjs",
    "client.web.cjs",
    "server.main.cjs",
    "server.web.js",
    "command.js",
    "webview/main.js",
    "typescript.js",
  ]) {
    const packed = gzipSync(readFileSync(join(repositoryRoot, "dist", name))).length / 1000;
    const bar = name.startsWith("client") ? `, bar 550 kB: ${tellBar(kilobytes(`dist/${name}`), 550)}` : "";
    console.log(`  ${name}: ${tellNumber(kilobytes(`dist/${name}`))} kB, ${tellNumber(packed)} kB packed${bar}`);
  }
  const size = statSync(vsix).size / 1e6;
  console.log(`  the packed extension: ${tellNumber(size)} MB, bar 2.5 MB: ${tellBar(size, 2.5)}`);
}

async function benchSoak(): Promise<void> {
  const workspace = await writeWorkspace(join(benchFolder, "workspace200"), 200);
  await soak(workspace, 10_000, 10, ({ edits, memoryMB, msAnEdit }) =>
    console.log(`  after ${edits} edits: ${tellNumber(memoryMB)} MB${edits === 0 ? "" : `, ${tellNumber(msAnEdit)} ms an edit`}`),
  );
}

function tellBar(value: number, bar: number): string {
  return value <= bar ? "holds" : "DOES NOT HOLD";
}

async function benchBeside(): Promise<void> {
  const small = await besideOf(200, { openings: 4, edits: 60 }, true);
  const large = await besideOf(2000, { openings: 1, edits: 25 }, false);
  console.log("\n  growth from 200 to 2,000 files, ours and TypeScript's:");
  const growth = (what: string, of: (one: Beside) => Pair) =>
    console.log(
      `  ${what}: ${tellNumber(of(large).ours.median / of(small).ours.median)} and ${tellNumber(of(large).theirs.median / of(small).theirs.median)} times`,
    );
  growth("opening", (one) => one.openingOfSame);
  growth("edit in a mechanism's file", (one) => one.editInMechanism);
  growth("edit of a shared constant", (one) => one.editOfConstant);
  growth("memory", (one) => one.memory);
}

/** The bars are those of the smaller workspace; for the larger one its growth is what counts. */
async function besideOf(files: number, rounds: Parameters<typeof measureBeside>[1], hasBars: boolean): Promise<Beside> {
  const workspace = await writeWorkspace(join(benchFolder, `workspace${files}`), files);
  const beside = await measureBeside(workspace, rounds);
  console.log(
    `\n  ${workspace.files} files, ${workspace.lines} lines, a quarter declare mechanisms; ${beside.findings} findings`,
  );
  const bar = (share: number) => (hasBars ? share : undefined);
  tell("opening, all findings beside the diagnostics of the files that have findings", beside.openingOfSame, "ms", bar(1 / 5));
  tell("opening, all findings beside the diagnostics of six files alone", beside.opening, "ms", undefined);
  tell("edit in a mechanism's file", beside.editInMechanism, "ms", bar(1 / 4));
  tell("edit of a constant that five files use", beside.editOfConstant, "ms", bar(1 / 4));
  tell("memory", beside.memory, "MB", bar(1 / 4));
  return beside;
}

function tell(what: string, { ours, theirs }: Pair, unit: string, bar: number | undefined): void {
  console.log(`  ${what}: ours ${tellSpread(ours, unit)}, TypeScript's ${tellSpread(theirs, unit)}`);
  console.log(`  ${tellRatio("as a ratio", ours.median / theirs.median, bar)}`);
}
