// Starts and stops a VS Code server on a free loopback port, with data of its own in a fresh folder. It knows nothing of
// pages or tests: it gives the address of a folder opened in it.

import { type ChildProcess, execFile, spawn } from "node:child_process";
import { randomBytes } from "node:crypto";
import { createWriteStream, mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { promisify } from "node:util";
import { type InstalledWorkbench, installWorkbench } from "./install.js";
import { cacheFolder } from "./paths.js";
import { makeTemporaryFolder } from "./temporaryFolder.js";

const START_TIMEOUT_MS = 60_000;

export interface ServerOptions {
  readonly settings: Readonly<Record<string, unknown>>;
  /** A packed extension to install, as a person would. */
  readonly vsix?: string | undefined;
  /** Names the log file. */
  readonly name: string;
  /** How long a lost page may come back, in seconds; else hours, as for a laptop that sleeps. */
  readonly reconnectWithinS?: number | undefined;
}

export interface OpenOptions {
  readonly folder: string;
  readonly openFile?: string | undefined;
  /** An extension run from its folder. */
  readonly extension?: string | undefined;
  /** A module whose `run` tests in the extension host. */
  readonly extensionTests?: string | undefined;
}

export interface WorkbenchServer {
  readonly logFile: string;
  address(options: OpenOptions): string;
  writeSettings(settings: Readonly<Record<string, unknown>>): void;
  stop(): Promise<void>;
}

export async function startServer({ settings, vsix, name, reconnectWithinS }: ServerOptions): Promise<WorkbenchServer> {
  const installed = await installWorkbench();
  const { folder: data, remove } = makeTemporaryFolder("editor");
  const userFolder = join(data, "data/User");
  const writeSettings = (values: Readonly<Record<string, unknown>>) => {
    mkdirSync(userFolder, { recursive: true });
    writeFileSync(join(userFolder, "settings.json"), JSON.stringify(values, undefined, 2));
  };
  writeSettings(settings);
  if (vsix) await installExtension(installed, vsix, data);
  mkdirSync(cacheFolder, { recursive: true });
  const logFile = join(cacheFolder, `${name}.log`);
  const token = randomBytes(16).toString("hex");
  const grace = reconnectWithinS === undefined ? [] : ["--reconnection-grace-time", String(reconnectWithinS)];
  const child = launch(installed, ["--connection-token", token, "--server-data-dir", data, ...grace], logFile);
  const killOnExit = () => killGroup(child, "SIGKILL");
  process.once("exit", killOnExit);
  const stop = async () => {
    await end(child);
    process.off("exit", killOnExit);
    await remove();
  };
  try {
    const port = await waitForPort(child, logFile);
    return { logFile, writeSettings, stop, address: (options) => addressOf(port, token, options) };
  } catch (error) {
    await stop();
    throw error;
  }
}

async function installExtension({ node, server }: InstalledWorkbench, vsix: string, data: string): Promise<void> {
  const args = [server, "--install-extension", vsix, "--server-data-dir", data, "--accept-server-license-terms"];
  const { stdout, stderr } = await promisify(execFile)(node, args);
  if (!stdout.includes("was successfully installed"))
    throw new Error(`The extension ${vsix} was not installed: ${stdout}${stderr}`);
}

function launch({ node, server }: InstalledWorkbench, own: readonly string[], logFile: string): ChildProcess {
  const where = ["--host", "127.0.0.1", "--port", "0"];
  const how = [
    "--accept-server-license-terms",
    "--telemetry-level",
    "off",
    "--disable-workspace-trust",
    "--enable-smoke-test-driver",
  ];
  // A group of its own, so that the extension hosts that it starts can be ended with it.
  const child = spawn(node, [server, ...where, ...how, ...own], {
    stdio: ["ignore", "pipe", "pipe"],
    detached: process.platform !== "win32",
  });
  const log = createWriteStream(logFile);
  child.stdout.pipe(log, { end: false });
  child.stderr.pipe(log, { end: false });
  child.once("exit", (status, signal) => log.end(`The server ended with ${signal ?? `exit status ${status}`}.\n`));
  return child;
}

function waitForPort(child: ChildProcess, logFile: string): Promise<number> {
  return new Promise((resolve, reject) => {
    const fail = (why: string) => reject(new Error(`The VS Code server ${why}; its log is ${logFile}.`));
    const timer = setTimeout(() => fail(`did not start within ${START_TIMEOUT_MS / 1000} s`), START_TIMEOUT_MS);
    let output = "";
    child.stdout?.on("data", (chunk) => {
      output += chunk;
      const port = /listening on (\d+)/.exec(output)?.[1];
      if (!port) return;
      clearTimeout(timer);
      resolve(Number(port));
    });
    child.once("exit", (code) => {
      clearTimeout(timer);
      fail(`ended with exit status ${code}`);
    });
  });
}

function addressOf(port: number, token: string, { folder, openFile, extension, extensionTests }: OpenOptions): string {
  const remote = (path: string) =>
    `vscode-remote://127.0.0.1:${port}${path.startsWith("/") ? "" : "/"}${path.replaceAll("\\", "/")}`;
  const payload: [string, string][] = [];
  if (extension) payload.push(["extensionDevelopmentPath", remote(extension)]);
  if (extensionTests) payload.push(["extensionTestsPath", remote(extensionTests)]);
  if (openFile) payload.push(["openFile", remote(openFile)]);
  const query = new URLSearchParams({ tkn: token, folder });
  if (payload.length > 0) query.set("payload", JSON.stringify(payload));
  return `http://127.0.0.1:${port}/?${query}`;
}

function killGroup(child: ChildProcess, signal: NodeJS.Signals): void {
  if (child.pid === undefined) return;
  try {
    if (process.platform === "win32") child.kill(signal);
    else process.kill(-child.pid, signal);
  } catch {
    // It has already ended.
  }
}

async function end(child: ChildProcess): Promise<void> {
  if (child.exitCode === null && child.signalCode === null) {
    const ended = new Promise((resolve) => child.once("exit", resolve));
    killGroup(child, "SIGTERM");
    const timer = setTimeout(() => killGroup(child, "SIGKILL"), 5000);
    await ended;
    clearTimeout(timer);
  }
  // Extension hosts may outlive the server that started them.
  killGroup(child, "SIGKILL");
}
