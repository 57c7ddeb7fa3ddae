// Lays the built extension into a folder of its own, to be run from there. The repository itself would do, but the VS
// Code server is installed inside it, and VS Code takes any theme below the extension under development for that
// extension's, and forces it upon the user.

import { cp, mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { repositoryRoot } from "./paths.js";

const PARTS = ["package.json", "README.md", "dist"];

export interface StagedExtension {
  readonly folder: string;
  remove(): Promise<void>;
}

export async function stageExtension(): Promise<StagedExtension> {
  const folder = await mkdtemp(join(tmpdir(), "loadmark-extension-"));
  for (const part of PARTS) await cp(join(repositoryRoot, part), join(folder, part), { recursive: true });
  return { folder, remove: () => rm(folder, { recursive: true, force: true, maxRetries: 5 }) };
}
