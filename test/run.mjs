// @ts-check
// Everything that must hold, in one run: types, lint and format, the tests in Node, and the editor tests in a real VS
// Code, against the build and against the installed package. It prints each part's outcome and ends with one line of
// counts. Name parts as arguments to run only those. Set-up is not its work: `npm test` does that first.

import { spawn } from "node:child_process";
import { mkdir, readFile, rm } from "node:fs/promises";
import { join } from "node:path";
import { importTypeScript } from "../extension/build/importTypeScript.mjs";
import { makePackages } from "../extension/build/package.mjs";
import { repositoryRoot } from "../extension/build/repositoryRoot.mjs";

/**
 * @typedef {import("./workbench/results.js").TestResult} TestResult
 * @typedef {import("./workbench/results.js").PartResult} PartResult
 */

const cache = join(repositoryRoot, ".cache");

/** @type {Record<string, { title: string, run: () => Promise<PartResult> }>} */
const parts = {
  types: {
    title: "type check",
    run: () => runCheck("type check", ["node_modules/typescript/bin/tsc", "-b", "extension", "webview", "test"]),
  },
  lint: {
    title: "lint and format",
    run: () => runCheck("lint and format", ["node_modules/@biomejs/biome/bin/biome", "check", "."]),
  },
  unit: { title: "tests in Node", run: runUnitTests },
  chart: { title: "tests of the chart's page in a browser", run: runChartPage },
  development: { title: "tests in VS Code, extension run from the build", run: () => runEditor("development") },
  installed: { title: "tests in VS Code, extension installed from its package", run: () => runEditor("installed") },
};

const asked = process.argv.slice(2);
const unknown = asked.filter((name) => !(name in parts));
if (unknown.length > 0) {
  console.error(`There is no part ${unknown.join(", ")}; the parts are ${Object.keys(parts).join(", ")}.`);
  process.exit(2);
}

// An exit, unlike a signal's own end, lets a running editor be taken down.
for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.once(signal, () => process.exit(130));

let passed = 0;
let failed = 0;
/** @type {string[]} */
const notRun = [];
for (const [name, { title, run }] of Object.entries(parts)) {
  if (asked.length > 0 && !asked.includes(name)) continue;
  console.log(`\n== ${title}`);
  const start = performance.now();
  const result = await runPart(title, run);
  const seconds = ((performance.now() - start) / 1000).toFixed(1);
  if ("notRun" in result) {
    notRun.push(`${title}: ${result.notRun}`);
    console.log(`could not run: ${result.notRun}`);
    continue;
  }
  for (const { title: test, firstTry } of result.tests)
    if (firstTry !== undefined) console.log(`PASSED ON THE SECOND TRY ${test}\n${indent(firstTry)}`);
  const failures = result.tests.filter(({ failure }) => failure !== undefined);
  for (const { title: test, failure } of failures) console.log(`FAILED ${test}\n${indent(failure ?? "")}`);
  console.log(`${result.tests.length - failures.length} passed, ${failures.length} failed (${seconds} s)`);
  passed += result.tests.length - failures.length;
  failed += failures.length;
}

console.log("");
for (const line of notRun) console.log(`Not run: ${line}`);
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed > 0 || passed === 0 ? 1 : 0);

/**
 * A part that breaks or finds nothing to test has failed.
 * @param {string} title
 * @param {() => Promise<PartResult>} run
 * @returns {Promise<PartResult>}
 */
async function runPart(title, run) {
  try {
    const result = await run();
    if ("notRun" in result || result.tests.length > 0) return result;
    return { tests: [{ title, failure: "No tests were found." }] };
  } catch (error) {
    return { tests: [{ title, failure: error instanceof Error ? (error.stack ?? error.message) : String(error) }] };
  }
}

/**
 * One tool that passes or fails as a whole.
 * @param {string} title
 * @param {string[]} args
 * @returns {Promise<PartResult>}
 */
async function runCheck(title, args) {
  const { status, output } = await runNode(args);
  return { tests: [status === 0 ? { title } : { title, failure: output }] };
}

/** @returns {Promise<PartResult>} */
async function runUnitTests() {
  const report = join(cache, "unit.json");
  await rm(report, { force: true });
  const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${report}`];
  const vitest = ["node_modules/vitest/vitest.mjs", "run", "--config", "test/vitest.config.ts", ...reporters];
  const { status, output } = await runNode(vitest);
  const { testResults } = JSON.parse(await readFile(report, "utf8").catch(() => '{"testResults":[]}'));
  /** @type {TestResult[]} */
  const tests = testResults.flatMap(describeFile);
  if (status === 0) return { tests };
  // Vitest's own words hold the differences, which its report for programs leaves out.
  console.log(output.slice(Math.max(0, output.search(/^.*Failed (Tests|Suites)/m))));
  const explained = tests.some(({ failure }) => failure !== undefined);
  return { tests: explained ? tests : [...tests, { title: "vitest", failure: output }] };
}

/**
 * @param {{ name: string, status: string, message: string, assertionResults: { fullName: string, status: string, failureMessages: string[] }[] }} file
 * @returns {TestResult[]}
 */
function describeFile({ name, status, message, assertionResults }) {
  const file = name.replace(`${repositoryRoot}/`, "");
  const tests = assertionResults.map((test) => {
    const title = `${file}: ${test.fullName}`;
    if (test.status === "passed") return { title };
    return {
      title,
      failure: test.status === "failed" ? firstLine(test.failureMessages) : `The test was not run (${test.status}).`,
    };
  });
  const broken = status === "failed" && !assertionResults.some((test) => test.status === "failed");
  return broken ? [...tests, { title: file, failure: message }] : tests;
}

/** @returns {Promise<PartResult>} */
async function runChartPage() {
  const { getChromium, runChartPageTests } = await importTypeScript("test/workbench/index.ts");
  const chromium = await getChromium();
  return "missing" in chromium ? { notRun: chromium.missing } : { tests: await runChartPageTests(chromium.path) };
}

/**
 * @param {"development" | "installed"} extensionMode
 * @returns {Promise<PartResult>}
 */
async function runEditor(extensionMode) {
  const { getChromium, runEditorTests } = await importTypeScript("test/workbench/index.ts");
  const chromium = await getChromium();
  if ("missing" in chromium) return { notRun: chromium.missing };
  const vsix = extensionMode === "installed" ? (await makePackages(join(cache, "packages"))).vsix : undefined;
  return { tests: await runEditorTests({ extensionMode, browser: chromium.path, vsix }) };
}

/**
 * @param {string[]} args
 * @returns {Promise<{ status: number | null, output: string }>}
 */
async function runNode(args) {
  await mkdir(cache, { recursive: true });
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, args, {
      cwd: repositoryRoot,
      stdio: ["ignore", "pipe", "pipe"],
      env: { ...process.env, NO_COLOR: "1" },
    });
    let output = "";
    for (const stream of [child.stdout, child.stderr]) {
      stream.on("data", (chunk) => {
        output += chunk;
      });
    }
    child.on("error", reject);
    child.on("close", (status) => resolve({ status, output: output.trim() }));
  });
}

/** @param {string[]} messages */
function firstLine(messages) {
  return messages[0]?.split("\n")[0] ?? "";
}

/** @param {string} text */
function indent(text) {
  return text.replaceAll(/^/gm, "    ");
}
