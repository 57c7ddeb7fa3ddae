// Finds a Chromium for the tests, or gets one: Debian's package where this runs as root on Debian, else the browser that
// playwright downloads. It says what it does, and where nothing works it gives the reason instead of a path.

import { spawn } from "node:child_process";
import { accessSync, constants, existsSync, readFileSync } from "node:fs";
import { delimiter, join } from "node:path";
import { chromium } from "playwright-core";
import { takeStep } from "../../extension/build/takeStep.mjs";
import { repositoryRoot } from "./paths.js";

const NAMES = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable", "chrome"];

export type ChromiumSearch = { readonly path: string } | { readonly missing: string };

export async function getChromium(): Promise<ChromiumSearch> {
  const found = findChromium();
  if (found) return { path: found };
  const [step, ...commands] = isRootOnDebian()
    ? [
        "installing Debian's chromium package",
        ["apt-get", "update"],
        ["apt-get", "install", "--yes", "--no-install-recommends", "chromium"],
      ]
    : [
        "downloading a Chromium with playwright",
        [process.execPath, join(repositoryRoot, "node_modules/playwright-core/cli.js"), "install", "chromium"],
      ];
  try {
    await takeStep(`no Chromium found: ${step}`, async () => {
      for (const command of commands) await run(command as string[]);
    });
  } catch (error) {
    return { missing: `no Chromium was found, and ${step} failed: ${error instanceof Error ? error.message : error}` };
  }
  const got = findChromium();
  return got ? { path: got } : { missing: `no Chromium was found, even after ${step}` };
}

function findChromium(): string | undefined {
  const onPath = (process.env.PATH ?? "").split(delimiter).flatMap((folder) => NAMES.map((name) => join(folder, name)));
  const candidates = [...onPath, "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome", chromium.executablePath()];
  return candidates.find(isExecutable);
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
  return (
    /^ID(_LIKE)?=.*\bdebian\b/m.test(readFileSync("/etc/os-release", "utf8")) &&
    !/^ID=ubuntu/m.test(readFileSync("/etc/os-release", "utf8"))
  );
}

function run([program = "", ...args]: string[]): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      stdio: ["ignore", "pipe", "pipe"],
      env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
    });
    let output = "";
    child.stdout.on("data", (chunk) => {
      output += chunk;
    });
    child.stderr.on("data", (chunk) => {
      output += chunk;
    });
    child.on("error", reject);
    child.on("close", (code) =>
      code === 0
        ? resolve()
        : reject(new Error(`"${program} ${args.join(" ")}" gave exit status ${code}: ${output.slice(-500).trim()}`)),
    );
  });
}
