// Finds a Chromium for the tests, or gets one: Debian's package where this runs as root on Debian, else the browser that
// playwright downloads. It says what it does, and where nothing works it gives the reason instead of a path.

import { accessSync, constants, existsSync, readFileSync } from "node:fs";
import { delimiter, join } from "node:path";
import { chromium } from "playwright-core";
import { runQuietly } from "../../extension/build/runQuietly.mjs";
import { takeStep } from "../../extension/build/takeStep.mjs";
import { repositoryRoot } from "./paths.js";

const NAMES = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable", "chrome"];
const MAC_CHROME = "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome";

/** Quiet, and as root too. */
export const CHROMIUM_FLAGS = [
  ...(process.getuid?.() === 0 ? ["--no-sandbox"] : []),
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

export type ChromiumSearch = { readonly path: string } | { readonly missing: string };

export async function getChromium(): Promise<ChromiumSearch> {
  const found = findChromium();
  if (found) return { path: found };
  const tried: string[] = [];
  for (const [name, get] of waysToGet()) {
    try {
      await takeStep(`no Chromium found, ${name}`, get);
    } catch {
      // What went wrong has been printed by then.
    }
    const got = findChromium();
    if (got) return { path: got };
    tried.push(name);
  }
  return { missing: `no Chromium was found, and there was none after ${tried.join(" and ")}` };
}

function waysToGet(): [name: string, get: () => Promise<void>][] {
  const fromPlaywright = () =>
    run(process.execPath, join(repositoryRoot, "node_modules/playwright-core/cli.js"), "install", "chromium");
  const ways: [string, () => Promise<void>][] = [["downloading one with playwright", fromPlaywright]];
  if (isRootOnDebian()) ways.unshift(["installing Debian's package", installFromDebian]);
  return ways;
}

async function installFromDebian(): Promise<void> {
  await run("apt-get", "update");
  await run("apt-get", "install", "--yes", "--no-install-recommends", "chromium");
}

async function run(program: string, ...args: string[]): Promise<void> {
  await runQuietly(program, args, { folder: repositoryRoot, env: { DEBIAN_FRONTEND: "noninteractive" } });
}

function findChromium(): string | undefined {
  const onPath = (process.env.PATH ?? "").split(delimiter).flatMap((folder) => NAMES.map((name) => join(folder, name)));
  return [...onPath, MAC_CHROME, chromium.executablePath()].find(isExecutable);
}

function isExecutable(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

function isRootOnDebian(): boolean {
  if (process.getuid?.() !== 0 || !existsSync("/etc/os-release")) return false;
  return /^ID="?debian"?$/m.test(readFileSync("/etc/os-release", "utf8"));
}
