// Gives a test a copy of a workspace folder to edit, with the project's declarations beside it as an npm install would
// lay them, so that TypeScript resolves them outside the repository too. The original is never opened.

import { cp, mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { basename, join } from "node:path";
import { repositoryRoot } from "./paths.js";

export interface FolderCopy {
  readonly folder: string;
  remove(): Promise<void>;
}

export async function copyFolder(source: string): Promise<FolderCopy> {
  const parent = await mkdtemp(join(tmpdir(), "loadmark-workspace-"));
  const remove = () => rm(parent, { recursive: true, force: true, maxRetries: 5 });
  try {
    const folder = join(parent, basename(source));
    await cp(source, folder, { recursive: true, filter: (path) => basename(path) !== "node_modules" });
    await layPackage(join(folder, "node_modules/loadmark"));
    return { folder, remove };
  } catch (error) {
    await remove();
    throw error;
  }
}

async function layPackage(installed: string): Promise<void> {
  await cp(join(repositoryRoot, "package.json"), join(installed, "package.json"));
  await cp(join(repositoryRoot, "dist/declarations"), join(installed, "dist/declarations"), { recursive: true });
}
