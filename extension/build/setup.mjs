// Makes a fresh clone ready to run: checks Node, installs the locked packages and builds. It uses Node's own modules
// only, since it runs before anything is installed, and skips the install when node_modules is already in step with
// the lock file. It installs nothing outside the clone; the editor for the tests is fetched when first needed.

import { existsSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { repositoryRoot } from "./repositoryRoot.mjs";
import { runNpm } from "./runQuietly.mjs";
import { takeStep } from "./takeStep.mjs";

const OLDEST_NODE = { major: 20, minor: 19 };

try {
  await takeStep(`Node ${process.versions.node}`, checkNode);
  if (isInstalled()) console.log("  packages: already installed as locked");
  else
    await takeStep("installing the locked packages", () =>
      runNpm(["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"], repositoryRoot),
    );
  await takeStep("building", async () => {
    const { bundle } = await import("./bundle.mjs");
    await bundle();
  });
} catch (error) {
  console.error(`Set-up stopped: ${error instanceof Error ? error.message : String(error)}`);
  // Not process.exit: a build that is still running would be cut off, loudly.
  process.exitCode = 1;
}

function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
  if (major > OLDEST_NODE.major || (major === OLDEST_NODE.major && minor >= OLDEST_NODE.minor)) return;
  throw new Error(`Node ${OLDEST_NODE.major}.${OLDEST_NODE.minor} or newer is needed, this is ${process.versions.node}.`);
}

/** npm keeps what it really installed in node_modules/.package-lock.json; packages for other platforms may be absent. */
function isInstalled() {
  const record = join(repositoryRoot, "node_modules", ".package-lock.json");
  if (!existsSync(record)) return false;
  const wanted = readPackages(join(repositoryRoot, "package-lock.json"));
  const installed = readPackages(record);
  const places = new Set([...Object.keys(wanted), ...Object.keys(installed)]);
  places.delete("");
  return [...places].every((place) => {
    const want = wanted[place];
    const have = installed[place];
    if (!have) return want?.optional === true;
    return (
      want !== undefined &&
      want.version === have.version &&
      want.integrity === have.integrity &&
      existsSync(join(repositoryRoot, place))
    );
  });
}

/**
 * @typedef {{ version?: string, integrity?: string, optional?: boolean }} LockedPackage
 * @param {string} lockFile
 * @returns {Record<string, LockedPackage>}
 */
function readPackages(lockFile) {
  return JSON.parse(readFileSync(lockFile, "utf8")).packages;
}
