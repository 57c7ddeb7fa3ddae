// Runs the tests of the chart's page: the built page in a Chromium, under its real policy, with a stand-in for the editor.
// The tests of the panel in a real editor are others (page/).

import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { chromium } from "playwright-core";
import { bundleTests } from "./bundleTests.js";
import { startChartHost } from "./chartPage/chartHost.js";
import { CHROMIUM_FLAGS } from "./chromium.js";
import { runMocha } from "./mochaResults.js";
import { workbenchFolder } from "./paths.js";
import type { TestResult } from "./results.js";

const TEST_TIMEOUT_MS = 90_000;

/** `executablePath`: the browser's, see getChromium. */
export async function runChartPageTests(executablePath: string): Promise<TestResult[]> {
  const entry = JSON.stringify(join(workbenchFolder, "chartPage/session.js"));
  const path = await bundleTests({
    folder: join(workbenchFolder, "chartPage"),
    format: "esm",
    writeEntry: (files) => `export { useChartHost } from ${entry};\nexport const testFiles = ${files};\n`,
  });
  const { useChartHost, testFiles } = await import(pathToFileURL(path).href);
  const browser = await chromium.launch({ executablePath, args: CHROMIUM_FLAGS });
  const host = await startChartHost(browser);
  const results: TestResult[] = [];
  try {
    useChartHost(host);
    const { default: Mocha } = await import("mocha");
    await runMocha({ Mocha, files: testFiles, timeoutMs: TEST_TIMEOUT_MS, onResult: (result) => results.push(result) });
  } finally {
    await host.stop();
    await browser.close();
  }
  return results;
}
