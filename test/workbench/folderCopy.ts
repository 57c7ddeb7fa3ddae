// Gives a test a copy of a workspace folder to edit. The folder above it is laid out like a project that has installed
// the npm package, so that TypeScript resolves the declarations there as in the repository. The original is never opened.

import { cp, readFile, writeFile } from "node:fs/promises";
import { basename, join } from "node:path";
import { repositoryRoot } from "./paths.js";
import { makeTemporaryFolder, type TemporaryFolder } from "./temporaryFolder.js";

export async function copyFolder(source: string): Promise<TemporaryFolder> {
  const { folder: parent, remove } = makeTemporaryFolder("workspace");
  const folder = join(parent, basename(source));
  await cp(source, folder, { recursive: true, filter: (path) => basename(path) !== "node_modules" });
  await layProject(parent);
  return { folder, remove };
}

async function layProject(folder: string): Promise<void> {
  const manifest = join(repositoryRoot, "package.json");
  const { name, version } = JSON.parse(await readFile(manifest, "utf8"));
  await writeFile(
    join(folder, "package.json"),
    JSON.stringify({ private: true, type: "module", dependencies: { [name]: version } }),
  );
  const installed = join(folder, "node_modules", name);
  await cp(manifest, join(installed, "package.json"));
  await cp(join(repositoryRoot, "dist/declarations"), join(installed, "dist/declarations"), { recursive: true });
}
