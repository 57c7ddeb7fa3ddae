// Shows the demo robot: prints its check, then opens it in a real VS Code with the extension loaded from this build. That
// is the desktop's `code` where it is installed, else a VS Code server of its own, which stays until Ctrl-C. With --print
// it ends after the print. It changes no setting of an editor that is already there.

import { spawnSync } from "node:child_process";
import { accessSync, constants } from "node:fs";
import { delimiter, join } from "node:path";
import { importTypeScript } from "./importTypeScript.mjs";
import { repositoryRoot } from "./repositoryRoot.mjs";

const demo = join(repositoryRoot, "test/demo");
const command = join(repositoryRoot, "dist/command.js");

printCheck();
if (!process.argv.includes("--print") && !openDesktop()) await openServer();

/** Findings are what the demo is for; only a check that could not run ends this. */
function printCheck() {
  const { status } = spawnSync(process.execPath, [command, "check", "test/demo"], {
    cwd: repositoryRoot,
    stdio: "inherit",
  });
  if (status !== 0 && status !== 1) process.exit(2);
}

/** @returns {boolean} whether it was opened */
function openDesktop() {
  if (!findOnPath(process.platform === "win32" ? "code.cmd" : "code")) return false;
  console.log("\nOpening the demo in VS Code with Loadmark loaded.");
  const args = [`--extensionDevelopmentPath=${repositoryRoot}`, demo, ...fileArguments()];
  const { status } = spawnSync("code", args, { stdio: "inherit", shell: process.platform === "win32" });
  if (status !== 0) console.log("VS Code could not be started that way.");
  return status === 0;
}

async function openServer() {
  console.log("\nOpening the demo in a VS Code server with Loadmark loaded.");
  try {
    const { serveDemo } = await importTypeScript("test/workbench/serveDemo.ts");
    await serveDemo(fileWithFinding());
  } catch (error) {
    console.error(`The VS Code server did not start: ${error instanceof Error ? error.message : String(error)}`);
    process.exitCode = 1;
  }
}

function fileArguments() {
  const file = fileWithFinding();
  return file ? ["--goto", file] : [];
}

/** The file with the worst to see, from the check's own report. */
function fileWithFinding() {
  const { stdout } = spawnSync(process.execPath, [command, "check", demo, "--format", "json"], {
    cwd: demo,
    encoding: "utf8",
  });
  try {
    /** @type {{ level: string, file: string }[]} */
    const findings = JSON.parse(stdout).findings;
    const worst = ["error", "warning"].map((level) => findings.find((finding) => finding.level === level));
    const file = worst.find((finding) => finding)?.file;
    return typeof file === "string" ? join(demo, file) : undefined;
  } catch {
    return undefined;
  }
}

/** @param {string} program */
function findOnPath(program) {
  return (process.env.PATH ?? "").split(delimiter).some((folder) => {
    try {
      accessSync(join(folder, program), constants.X_OK);
      return true;
    } catch {
      return false;
    }
  });
}
