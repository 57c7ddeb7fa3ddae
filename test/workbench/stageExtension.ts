// Lays the built extension into a folder of its own, to be run from there. The repository itself would do, but the VS
// Code server is installed inside it, and VS Code takes any theme below the extension under development for that
// extension's, and forces it upon the user.

import { cp, readFile, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { repositoryRoot } from "./paths.js";
import { makeTemporaryFolder, type TemporaryFolder } from "./temporaryFolder.js";

const PARTS = ["package.json", "README.md", "dist"];

export async function stageExtension(): Promise<TemporaryFolder> {
  const staged = makeTemporaryFolder("extension");
  for (const part of PARTS) await cp(join(repositoryRoot, part), join(staged.folder, part), { recursive: true });
  return staged;
}

/**
 * The same without what a Node host would load, nor the wish to run beside the files: in a window with a remote host, only that
 * brings it into the page's worker. Where there is no remote host, as on the web, the wish changes nothing.
 */
export async function stageForBrowser(): Promise<TemporaryFolder> {
  const staged = await stageExtension();
  const manifest = join(staged.folder, "package.json");
  const { main: _main, extensionKind: _kind, ...rest } = JSON.parse(await readFile(manifest, "utf8"));
  await writeFile(manifest, JSON.stringify(rest));
  return staged;
}
