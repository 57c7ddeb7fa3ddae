// Makes the two packages from a fresh build: the extension (.vsix) and the npm package that robot code imports (.tgz),
// and holds them to their size budgets. It publishes nothing.

import { mkdir, readFile, rm, stat } from "node:fs/promises";
import { join, relative, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { bundle } from "./bundle.mjs";
import { repositoryRoot } from "./repositoryRoot.mjs";
import { runNpm, runQuietly } from "./runQuietly.mjs";
import { takeStep } from "./takeStep.mjs";

/** Largest sizes in bytes. */
const LARGEST = { client: 550_000, vsix: 2_500_000 };

if (process.argv[1] && resolve(process.argv[1]) === fileURLToPath(import.meta.url)) {
  try {
    const { vsix, tgz } = await makePackages(repositoryRoot);
    for (const file of [vsix, tgz]) console.log(`${relative(repositoryRoot, file)}: ${inKilobytes(await sizeOf(file))}`);
  } catch (error) {
    console.error(`Packaging stopped: ${error instanceof Error ? error.message : String(error)}`);
    process.exitCode = 1;
  }
}

/**
 * @param {string} folder where the packages go
 * @returns {Promise<{ vsix: string, tgz: string }>} their paths
 */
export async function makePackages(folder) {
  const { name, version } = JSON.parse(await readFile(join(repositoryRoot, "package.json"), "utf8"));
  const vsix = join(folder, `${name}-${version}.vsix`);
  const tgz = join(folder, `${name}-${version}.tgz`);
  await mkdir(folder, { recursive: true });
  await takeStep("building", bundle);
  await takeStep("packing the extension", async () => {
    await rm(vsix, { force: true });
    const script = "node_modules/@vscode/vsce/vsce";
    const flags = ["--no-dependencies", "--allow-missing-repository", "--no-rewrite-relative-links"];
    await runQuietly(process.execPath, [script, "package", ...flags, "--out", vsix], { folder: repositoryRoot });
  });
  await takeStep("packing the npm package", () =>
    runNpm(["pack", "--ignore-scripts", "--loglevel=error", "--pack-destination", folder], repositoryRoot),
  );
  await refuseAbove("dist/client.cjs", join(repositoryRoot, "dist/client.cjs"), LARGEST.client);
  await refuseAbove("The packed extension", vsix, LARGEST.vsix);
  return { vsix, tgz };
}

/**
 * @param {string} what
 * @param {string} file
 * @param {number} largest
 */
async function refuseAbove(what, file, largest) {
  const size = await sizeOf(file);
  if (size > largest) throw new Error(`${what} has ${inKilobytes(size)}, more than ${inKilobytes(largest)}.`);
}

/** @param {string} file */
async function sizeOf(file) {
  return (await stat(file)).size;
}

/** @param {number} bytes */
function inKilobytes(bytes) {
  return `${Math.ceil(bytes / 1000)} kB`;
}
