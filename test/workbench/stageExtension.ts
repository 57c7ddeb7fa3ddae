// Lays the built extension into a folder of its own, to be run from there. The repository itself would do, but the VS
// Code server is installed inside it, and VS Code takes any theme below the extension under development for that
// extension's, and forces it upon the user.

import { cp } from "node:fs/promises";
import { join } from "node:path";
import { repositoryRoot } from "./paths.js";
import { makeTemporaryFolder, type TemporaryFolder } from "./temporaryFolder.js";

const PARTS = ["package.json", "README.md", "dist"];

export async function stageExtension(): Promise<TemporaryFolder> {
  const staged = makeTemporaryFolder("extension");
  for (const part of PARTS) await cp(join(repositoryRoot, part), join(staged.folder, part), { recursive: true });
  return staged;
}
