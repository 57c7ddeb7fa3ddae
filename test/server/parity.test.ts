/** Editor and command tell the same findings, to the character: over the demo, the fixtures, and a corpus of damaged robots. */
import { execFile } from "node:child_process";
import path from "node:path";
import { beforeAll, describe, expect, it } from "vitest";
import { DiagnosticSeverity } from "vscode-languageserver/node";
import type { ReportedFinding } from "../../extension/report/report.js";
import { buildCommand, buildServer } from "../support/builtServer.js";
import { drawFrom, mutate, readSources } from "../support/mutate.js";
import { type ServerClient, startServerClient } from "../support/serverClient.js";
import { whenJudged } from "../support/whenJudged.js";

const TEST = path.join(import.meta.dirname, "..");
const DAMAGED_ROBOTS = 5;
const BUDGET_MS = 60_000;

let server: string;
let command: string;

beforeAll(async () => {
  [server, command] = await Promise.all([buildServer("parity"), buildCommand("parity")]);
}, 120_000);

describe("editor and command", () => {
  it.each<[string, () => Readonly<Record<string, string>>, number]>([
    ["the demo", () => readSources(path.join(TEST, "demo")), 5],
    ["the fixtures", () => readSources(path.join(TEST, "fixtures")), 1],
    ["damaged robots", damagedRobots, 40],
    ["settings that change levels and leave folders out", settledRobot, 3],
  ])(
    "agree on %s",
    async (_, filesOf, atLeast) => {
      const client = await startServerClient({ server, files: filesOf() });
      try {
        const told = await tellInEditor(client);
        const reported = await tellInCommand(client.folder);
        expect(reported.length).toBeGreaterThanOrEqual(atLeast);
        expect(told).toEqual(reported.sort());
        expect(client.errors).toEqual([]);
      } finally {
        await client.stop();
      }
    },
    120_000,
  );
});

/** Robots of their own folder each, some with a file that is left out or levels of their own. */
function damagedRobots(): Record<string, string> {
  const demo = Object.entries(readSources(path.join(TEST, "demo"))).filter(([name]) => name.endsWith(".ts"));
  const files: Record<string, string> = {};
  for (let robot = 0; robot < DAMAGED_ROBOTS; robot++) {
    const draw = drawFrom(7000 + robot);
    const damaged = draw(demo.length);
    demo.forEach(([name, text], index) => {
      files[`robot${robot}/${name}`] = index === damaged || draw(6) === 0 ? mutate(text, draw) : text;
    });
  }
  return files;
}

function settledRobot(): Record<string, string> {
  const files: Record<string, string> = {};
  for (const [name, text] of Object.entries(readSources(path.join(TEST, "demo")))) {
    files[`here/${name}`] = text;
    files[`spare/old/${name}`] = text;
    files[`broken/${name}`] = text;
  }
  files["loadmark.json"] = '{ "levels": { "past-peak": "error", "backdrives": "off" }, "leaveOut": ["spare/old"] }';
  files["broken/loadmark.json"] = '{ "levels": { "past-peak": "loud" } }';
  return files;
}

/** A finding as one line, in places that count from 1. */
function lineOf(finding: Omit<ReportedFinding, "mechanism">): string {
  const at = (one: Omit<ReportedFinding["related"][number], "message">) =>
    `${one.file}:${one.line}:${one.column}-${one.endLine}:${one.endColumn}`;
  const related = finding.related.map((one) => ` | ${at(one)} ${one.message}`).join("");
  return `${at(finding)} ${finding.level} ${finding.rule}: ${finding.message}${related}`;
}

async function tellInEditor(client: ServerClient): Promise<string[]> {
  const levels = { [DiagnosticSeverity.Error]: "error", [DiagnosticSeverity.Warning]: "warning" };
  await whenJudged(client, BUDGET_MS);
  const latest = new Map(client.published.map((one) => [one.uri, one.diagnostics]));
  const fileOf = (uri: string) =>
    decodeURIComponent(uri)
      .replace(`${decodeURIComponent(client.uri(""))}/`, "")
      .replace(/^\/+/, "");
  const rangeOf = (
    uri: string,
    { start, end }: { start: { line: number; character: number }; end: { line: number; character: number } },
  ) => ({
    file: fileOf(uri),
    line: start.line + 1,
    column: start.character + 1,
    endLine: end.line + 1,
    endColumn: end.character + 1,
  });
  const lines = [...latest].flatMap(([uri, diagnostics]) =>
    diagnostics.map(({ range, severity, code, message, relatedInformation = [] }) =>
      lineOf({
        ...rangeOf(uri, range),
        level: levels[severity as 1 | 2] ?? "information",
        rule: String(code),
        // A line for each sentence is the one thing that the editor's form changes.
        message: String(message).replaceAll("\n", " "),
        related: relatedInformation.map((one) => ({ message: one.message, ...rangeOf(one.location.uri, one.location.range) })),
      }),
    ),
  );
  return lines.sort();
}

function tellInCommand(folder: string): Promise<string[]> {
  return new Promise((resolve, reject) => {
    const args = [command, "check", folder, "--format", "json", "--fail-on", "never"];
    execFile(process.execPath, args, { maxBuffer: 1 << 28, timeout: 100_000 }, (error, stdout, stderr) => {
      if (error !== null) reject(new Error(`${error.message}\n${stderr}`));
      else resolve((JSON.parse(stdout) as { readonly findings: readonly ReportedFinding[] }).findings.map(lineOf));
    });
  });
}
