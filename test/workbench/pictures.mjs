// @ts-check
// Makes the README's pictures: npm run pictures. The list of them is shots.ts.

import { bundle } from "../../extension/build/bundle.mjs";
import { importTypeScript } from "../../extension/build/importTypeScript.mjs";
import { takeStep } from "../../extension/build/takeStep.mjs";

// An exit, unlike a signal's own end, lets a running editor be taken down.
for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.once(signal, () => process.exit(130));

try {
  await takeStep("building", bundle);
  const { takePictures } = await importTypeScript("test/workbench/takePictures.ts");
  await takePictures();
} catch (error) {
  console.error(`The pictures were not all made: ${error instanceof Error ? error.message : String(error)}`);
  process.exitCode = 1;
}
