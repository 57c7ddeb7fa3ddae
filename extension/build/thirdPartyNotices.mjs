// Collects the licences of the packages whose code ended up in the bundles, as those licences ask. It reads what esbuild
// says it bundled, so that a package that is only used for development is not named.

import { readdir, readFile } from "node:fs/promises";
import { join } from "node:path";
import { repositoryRoot } from "./repositoryRoot.mjs";

/**
 * @param {Iterable<string>} inputs bundled files, relative to the repository's root
 * @returns {Promise<string>} the text of the notices
 */
export async function writeNotices(inputs) {
  const folders = new Set();
  for (const input of inputs) {
    const folder = input.match(/^.*node_modules\/(?:@[^/]+\/)?[^/]+/)?.[0];
    if (folder) folders.add(folder);
  }
  const sections = await Promise.all([...folders].sort().map(describePackage));
  return ["Loadmark includes code of these packages.", ...sections].join(`\n\n${"-".repeat(80)}\n\n`);
}

/** @param {string} folder */
async function describePackage(folder) {
  const path = join(repositoryRoot, folder);
  const { name, version, license } = JSON.parse(await readFile(join(path, "package.json"), "utf8"));
  const files = (await readdir(path)).filter((file) => /^(licen[cs]e|notice|copyright|thirdparty)/i.test(file));
  const texts = await Promise.all(files.map((file) => readFile(join(path, file), "utf8")));
  return [`${name} ${version} (${license})`, ...texts.map((text) => text.trim())].join("\n\n");
}
