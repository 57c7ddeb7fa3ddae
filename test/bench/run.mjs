// @ts-check
// `npm run bench`: builds, then prints the sections of the bench; name sections as arguments to run only those.

import { bundle } from "../../extension/build/bundle.mjs";
import { importTypeScript } from "../../extension/build/importTypeScript.mjs";
import { makePackages } from "../../extension/build/package.mjs";
import { takeStep } from "../../extension/build/takeStep.mjs";

await takeStep("building", bundle);
/** @type {{ sections: Record<string, { title: string, run: (host: object) => Promise<void> }> }} */
const { sections } = await importTypeScript("test/bench/index.ts");
const asked = process.argv.slice(2);
const unknown = asked.filter((name) => !(name in sections));
if (unknown.length > 0) {
  console.error(`There is no section ${unknown.join(", ")}; the sections are ${Object.keys(sections).join(", ")}.`);
  process.exit(2);
}
for (const [name, { title, run }] of Object.entries(sections)) {
  if (asked.length > 0 && !asked.includes(name)) continue;
  console.log(`\n== ${title}`);
  await run({ makePackages });
}
process.exit(0);
