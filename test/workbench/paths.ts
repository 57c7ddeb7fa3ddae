// Where things are, from the repository's root, whether this runs from source or from a bundle under .cache. It creates
// nothing.

import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";

export const repositoryRoot = findRoot(import.meta.dirname);
export const workbenchFolder = join(repositoryRoot, "test/workbench");
export const cacheFolder = join(repositoryRoot, ".cache/workbench");
export const demoFolder = join(repositoryRoot, "test/demo");
/** A project that depends on the declarations, and holds none yet. */
export const newFolder = join(repositoryRoot, "test/fixtures/newProject");
/** A project in which nothing is declared. */
export const plainFolder = join(repositoryRoot, "test/fixtures/plainProject");

function findRoot(start: string): string {
  for (let folder = start; ; folder = dirname(folder)) {
    const manifest = join(folder, "package.json");
    if (existsSync(manifest) && JSON.parse(readFileSync(manifest, "utf8")).name === "loadmark") return folder;
    if (folder === dirname(folder)) throw new Error(`No repository root above ${start}.`);
  }
}
