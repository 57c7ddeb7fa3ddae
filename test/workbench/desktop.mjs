// Runs the extension host's tests in desktop VS Code, for machines that reach its download; npm test runs the same
// modules in a VS Code server. The tests of the page need that server, and are not run here.

import { join } from "node:path";
import { runTests } from "@vscode/test-electron";
import { bundle } from "../../extension/build/bundle.mjs";
import { importTypeScript } from "../../extension/build/importTypeScript.mjs";
import { repositoryRoot } from "../../extension/build/repositoryRoot.mjs";
import { takeStep } from "../../extension/build/takeStep.mjs";

try {
  await takeStep("building", bundle);
  const { prepareDesktopTests } = await importTypeScript("test/workbench/prepareDesktopTests.ts");
  for (const { extensionTestsPath, copy } of await prepareDesktopTests()) {
    try {
      await runTests({
        cachePath: join(repositoryRoot, ".vscode-test"),
        extensionDevelopmentPath: repositoryRoot,
        extensionTestsPath,
        extensionTestsEnv: { LOADMARK_TEST_OUTPUT: "readable" },
        launchArgs: [copy.folder, "--disable-extensions", "--disable-workspace-trust"],
      });
    } finally {
      await copy.remove();
    }
  }
} catch (error) {
  console.error(`The tests in desktop VS Code did not pass: ${error instanceof Error ? error.message : String(error)}`);
  process.exitCode = 1;
}
