// What a desktop VS Code needs to run the extension host's tests: their bundle and a copy of the demo to open. Starting
// it is desktop.mjs's work.

import { join } from "node:path";
import { bundleHostTests } from "./bundleHostTests.js";
import { copyFolder } from "./folderCopy.js";
import { demoFolder, workbenchFolder } from "./paths.js";

export async function prepareDesktopTests() {
  const path = await bundleHostTests(join(workbenchFolder, "host"));
  return { extensionTestsPath: path, copy: await copyFolder(demoFolder) };
}
