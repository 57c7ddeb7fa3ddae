// What a desktop VS Code needs to run the extension host's tests: for each run their bundle and a copy of the folder to
// open. Starting it is desktop.mjs's work.

import { bundleHostTests } from "./bundleHostTests.js";
import { copyFolder } from "./folderCopy.js";
import { demoFolder, plainFolder } from "./paths.js";

export function prepareDesktopTests() {
  return Promise.all([prepare("host", demoFolder), prepare("hostElsewhere", plainFolder)]);
}

async function prepare(tests: string, workspace: string) {
  return { extensionTestsPath: await bundleHostTests(tests), copy: await copyFolder(workspace) };
}
