// Bundles every *.test.ts of a folder behind one entry, so that no test file has to be listed by hand and none is
// forgotten. It runs nothing.

import { readdir } from "node:fs/promises";
import { basename, join } from "node:path";
import { build } from "esbuild";
import { cacheFolder, repositoryRoot } from "./paths.js";

export interface BundleOptions {
  readonly folder: string;
  readonly format: "cjs" | "esm";
  /** The entry's source, given an expression for the array of functions that each import one test file. */
  readonly writeEntry: (testFiles: string) => string;
}

/** Gives the bundle's path. */
export async function bundleTests({ folder, format, writeEntry }: BundleOptions): Promise<string> {
  const names = (await readdir(folder)).filter((name) => name.endsWith(".test.ts")).sort();
  const imports = names.map((name) => `() => import("./${name}")`);
  // The extension says that each is what it is, whatever the nearest package.json says.
  const path = join(cacheFolder, `${basename(folder)}.${format === "cjs" ? "cjs" : "mjs"}`);
  await build({
    absWorkingDir: repositoryRoot,
    stdin: { contents: writeEntry(`[${imports.join(", ")}]`), resolveDir: folder, loader: "ts" },
    outfile: path,
    bundle: true,
    packages: "external",
    platform: "node",
    format,
    // A CommonJS module has no such property, but knows its folder by another name.
    define: format === "cjs" ? { "import.meta.dirname": "__dirname" } : {},
    target: "node20",
    sourcemap: "inline",
    logLevel: "error",
  });
  return path;
}
