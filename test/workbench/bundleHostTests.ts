// Bundles a folder's tests of the extension host into the one module that a VS Code calls, be it the server's or the
// desktop's.

import { join } from "node:path";
import { bundleTests } from "./bundleTests.js";
import { workbenchFolder } from "./paths.js";

/** `folder`: its name beside this file. */
export function bundleHostTests(folder: string): Promise<string> {
  const entry = JSON.stringify(join(workbenchFolder, "host/runHostTests.js"));
  const writeEntry = (files: string) =>
    `import { runHostTests } from ${entry};\nexport const run = () => runHostTests(${files});\n`;
  return bundleTests({ folder: join(workbenchFolder, folder), format: "cjs", writeEntry });
}
