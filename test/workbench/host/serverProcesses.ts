// The processes of the product's server below this extension host, asked of the operating system: what an extension says
// about itself would prove less.

import { execFile } from "node:child_process";
import { promisify } from "node:util";

const PATIENCE_MS = 10_000;

export async function serverProcesses(): Promise<number[]> {
  const all = await (process.platform === "win32" ? listOnWindows() : list());
  return all.filter(({ parent, command }) => parent === process.pid && command.includes("server.cjs")).map(({ pid }) => pid);
}

/** Waits until there is exactly one, and that is accepted. */
export async function waitForServer(accept: (pid: number) => boolean): Promise<number> {
  const end = Date.now() + PATIENCE_MS;
  for (;;) {
    const all = await serverProcesses();
    const [only] = all;
    if (only !== undefined && all.length === 1 && accept(only)) return only;
    if (Date.now() > end) throw new Error(`There was no such server process but ${JSON.stringify(all)}.`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

interface Process {
  readonly pid: number;
  readonly parent: number;
  readonly command: string;
}

async function list(): Promise<Process[]> {
  const { stdout } = await promisify(execFile)("ps", ["-A", "-ww", "-o", "pid=,ppid=,args="], { maxBuffer: 1 << 24 });
  return stdout.split("\n").flatMap((line) => {
    const [, pid, parent, command] = /^\s*(\d+)\s+(\d+)\s+(.*)$/.exec(line) ?? [];
    return command === undefined ? [] : [{ pid: Number(pid), parent: Number(parent), command }];
  });
}

async function listOnWindows(): Promise<Process[]> {
  const query = "ConvertTo-Json @(Get-CimInstance Win32_Process | Select-Object ProcessId, ParentProcessId, CommandLine)";
  const { stdout } = await promisify(execFile)("powershell", ["-NoProfile", "-Command", query], { maxBuffer: 1 << 26 });
  const all: { ProcessId: number; ParentProcessId: number; CommandLine: string | null }[] = JSON.parse(stdout);
  return all.map(({ ProcessId, ParentProcessId, CommandLine }) => ({
    pid: ProcessId,
    parent: ParentProcessId,
    command: CommandLine ?? "",
  }));
}
