/** `loadmark check <file or folder>`: the headless check. Exit status: 0 fine, 1 findings at or above `--fail-on`, 2 it could not run. */
import { readFileSync } from "node:fs";
import { check } from "./check.js";
import { parseCommandLine, USAGE } from "./commandLine.js";

const line = parseCommandLine(process.argv.slice(2));
if (line.kind === "refused") {
  process.stderr.write(`loadmark: ${line.message}\n\n${USAGE}`);
  process.exitCode = 2;
} else if (line.kind === "help") {
  process.stdout.write(USAGE);
} else if (line.kind === "version") {
  const manifest: { readonly version: string } = JSON.parse(readFileSync(new URL("../package.json", import.meta.url), "utf8"));
  process.stdout.write(`${manifest.version}\n`);
} else {
  try {
    const { output, complaint, status } = await check(line);
    if (complaint !== undefined) process.stderr.write(`loadmark: ${complaint}\n`);
    process.stdout.write(output);
    process.exitCode = status;
  } catch (error) {
    process.stderr.write(`loadmark: the check could not run: ${error instanceof Error ? error.message : String(error)}\n`);
    process.exitCode = 2;
  }
}
