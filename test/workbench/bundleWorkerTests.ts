// Bundles a folder's tests into the one module that a VS Code calls in a browser's worker, where there is neither Node nor
// mocha. It runs nothing.

import { readdir } from "node:fs/promises";
import { join } from "node:path";
import { build } from "esbuild";
import { repositoryRoot, workbenchFolder } from "./paths.js";

/**
 * `folder`: its name beside this file. Gives the bundle's path, inside the extension's folder: VS Code runs tests in the host of the
 * extension that they lie in.
 */
export async function bundleWorkerTests(folder: string, extension: string): Promise<string> {
  const place = join(workbenchFolder, folder);
  const names = (await readdir(place)).filter((name) => name.endsWith(".test.ts")).sort();
  const imports = names.map((name, index) => `import { tests as tests${index} } from "./${name}";`).join("\n");
  const all = names.map((_, index) => `tests${index}`).join(", ");
  const path = join(extension, "dist/workerTests.cjs");
  await build({
    absWorkingDir: repositoryRoot,
    stdin: {
      contents: `${imports}\nimport { runWorkerTests } from "./runWorkerTests.js";\nexport const run = () => runWorkerTests([${all}]);\n`,
      resolveDir: place,
      loader: "ts",
    },
    outfile: path,
    bundle: true,
    external: ["vscode"],
    platform: "browser",
    format: "cjs",
    target: "es2023",
    logLevel: "error",
  });
  return path;
}
