// Resident memory of another process, in megabytes, as the operating system tells it.

import { execFileSync } from "node:child_process";

export function residentMB({ pid }: { readonly pid?: number | undefined }): number {
  const kilobytes = Number(execFileSync("ps", ["-o", "rss=", "-p", String(pid)], { encoding: "utf8" }));
  return kilobytes / 1024;
}
