// Loads a TypeScript module that plain Node cannot run by itself (the workbench harness and its tests): bundles it with
// its relative imports into .cache/scripts and imports that. Packages stay outside and resolve from the repository's
// node_modules. Product code is built by bundle.mjs, not by this.

import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { build } from "esbuild";
import { repositoryRoot } from "./repositoryRoot.mjs";

/**
 * @param {string} entry path from the repository's root
 * @returns {Promise<any>} the module's exports
 */
export async function importTypeScript(entry) {
  const outfile = join(repositoryRoot, ".cache/scripts", `${entry.replaceAll(/[^\w-]+/g, "-")}.mjs`);
  await build({
    absWorkingDir: repositoryRoot,
    entryPoints: [join(repositoryRoot, entry)],
    outfile,
    bundle: true,
    packages: "external",
    platform: "node",
    format: "esm",
    target: "node20",
    sourcemap: "inline",
    logLevel: "error",
  });
  return import(pathToFileURL(outfile).href);
}
