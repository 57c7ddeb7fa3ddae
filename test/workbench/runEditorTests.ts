// Runs all editor tests against one way of having the extension: run from the build, or installed from its package. One
// server and one browser serve the tests of the extension host and of the page. The caller prints and counts.

import { mkdir, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { bundleHostTests } from "./bundleHostTests.js";
import { bundleTests } from "./bundleTests.js";
import { bundleWorkerTests } from "./bundleWorkerTests.js";
import { RESULT_MARK } from "./host/resultMark.js";
import { runMocha } from "./mochaResults.js";
import { cacheFolder, demoFolder, plainFolder, workbenchFolder } from "./paths.js";
import type { TestResult } from "./results.js";
import { stageForBrowser } from "./stageExtension.js";
import { startWorkbench, type Workbench, type WorkbenchOptions } from "./workbench.js";

const HOST_TIMEOUT_MS = 10 * 60_000;
const PAGE_TEST_TIMEOUT_MS = 180_000;

export type EditorRun = Pick<WorkbenchOptions, "extensionMode" | "browser" | "vsix">;

export async function runEditorTests(run: EditorRun): Promise<TestResult[]> {
  const workbench = await startWorkbench({ workspace: demoFolder, ...run });
  try {
    return [
      ...(await runHost(workbench, "host", { workspace: demoFolder, tests: () => bundleHostTests("host") })),
      ...(await runHostWithGit(workbench)),
      ...(await runHost(workbench, "hostElsewhere", { workspace: plainFolder, tests: () => bundleHostTests("hostElsewhere") })),
      ...(run.extensionMode === "development" ? await runWorkerHost(workbench) : []),
      ...(await runPage(workbench, run.extensionMode)),
    ];
  } finally {
    await workbench.stop();
  }
}

/** Git is off for all others, whose folders lie in no repository. */
async function runHostWithGit(workbench: Workbench): Promise<TestResult[]> {
  workbench.changeSettings({ "git.enabled": true });
  try {
    return await runHost(workbench, "hostGit", { workspace: demoFolder, tests: () => bundleHostTests("hostGit") });
  } finally {
    workbench.changeSettings({});
  }
}

/** An installed extension runs where its host is; only a folder without the Node entry runs in the page's worker. */
async function runWorkerHost(workbench: Workbench): Promise<TestResult[]> {
  const staged = await stageForBrowser();
  try {
    const tests = () => bundleWorkerTests("hostWorker", staged.folder);
    return await runHost(workbench, "hostWorker", { workspace: demoFolder, tests, extension: staged.folder });
  } finally {
    await staged.remove();
  }
}

interface HostRun {
  readonly workspace: string;
  readonly tests: () => Promise<string>;
  readonly extension?: string;
}

async function runHost(workbench: Workbench, name: string, { workspace, tests, extension }: HostRun): Promise<TestResult[]> {
  const results: TestResult[] = [];
  const log: string[] = [];
  const onLog = (line: string) => {
    const at = line.indexOf(RESULT_MARK);
    if (at < 0) log.push(line);
    else results.push(JSON.parse(line.slice(at + RESULT_MARK.length)));
  };
  try {
    const exitCode = await workbench.runHostTests({
      workspace,
      extension,
      tests: await tests(),
      emptyExtension: await makeEmptyExtension(),
      onLog,
      timeoutMs: HOST_TIMEOUT_MS,
    });
    const explained = exitCode === 0 || results.some(({ failure }) => failure !== undefined);
    if (!explained) throw new Error(`They ended with exit code ${exitCode}.`);
    if (results.length === 0) throw new Error("No tests ran.");
  } catch (error) {
    const hostLog = `${workbench.logFile}.${name}`;
    await writeFile(hostLog, log.join("\n"));
    const message = error instanceof Error ? error.message : String(error);
    const failure = `${message}\nThe last log line: ${log.at(-1)}\nAll of the log: ${hostLog} and ${workbench.logFile}`;
    results.push({ title: `the tests in the extension host (${name})`, failure });
  }
  return results;
}

/** A test run in the extension host starts from some extension's folder; the installed one has none in the work tree. */
async function makeEmptyExtension(): Promise<string> {
  const folder = join(cacheFolder, "empty-extension");
  await mkdir(folder, { recursive: true });
  const manifest = { name: "empty", publisher: "loadmark", version: "0.0.0", engines: { vscode: "*" } };
  await writeFile(join(folder, "package.json"), JSON.stringify(manifest));
  return folder;
}

async function runPage(workbench: Workbench, mode: string): Promise<TestResult[]> {
  const entry = JSON.stringify(join(workbenchFolder, "page/session.js"));
  const path = await bundleTests({
    folder: join(workbenchFolder, "page"),
    format: "esm",
    writeEntry: (files) => `export { useWorkbench } from ${entry};\nexport const testFiles = ${files};\n`,
  });
  const { useWorkbench, testFiles } = await import(`${pathToFileURL(path).href}?${mode}`);
  useWorkbench(workbench);
  const { default: Mocha } = await import("mocha");
  const results: TestResult[] = [];
  await runMocha({
    Mocha,
    files: testFiles,
    timeoutMs: PAGE_TEST_TIMEOUT_MS,
    retries: 1,
    onResult: (result) => results.push(result),
    onFailure: (title) => takePicture(workbench, `${mode} ${title}`),
  });
  if (results.length === 0) results.push({ title: "the tests in the page", failure: "No tests ran." });
  return results;
}

async function takePicture(workbench: Workbench, title: string): Promise<string> {
  const path = join(cacheFolder, "failures", `${title.replaceAll(/[^\w]+/g, "-")}.png`);
  await workbench.page.screenshot({ path });
  return `The editor then: ${path}`;
}
