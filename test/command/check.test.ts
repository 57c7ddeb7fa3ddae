/** The built command as a terminal and a CI job use it. */
import { execFile } from "node:child_process";
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, describe, expect, it } from "vitest";

const ROOT = path.join(import.meta.dirname, "../..");
const COMMAND = path.join(ROOT, "dist/command.js");
const PUMP = path.join(ROOT, "test/fixtures/pump");
const folder = mkdtempSync(path.join(tmpdir(), "loadmark-command-"));

afterAll(() => rmSync(folder, { recursive: true, force: true }));

interface Ran {
  readonly status: number;
  readonly stdout: string;
  readonly stderr: string;
}

function run(args: readonly string[], cwd = ROOT): Promise<Ran> {
  return new Promise((resolve) => {
    execFile(process.execPath, [COMMAND, ...args], { cwd, timeout: 60_000, maxBuffer: 1 << 26 }, (error, stdout, stderr) => {
      resolve({ status: typeof error?.code === "number" ? error.code : error === null ? 0 : -1, stdout, stderr });
    });
  });
}

describe("exit status", () => {
  it("is 1 for findings at or above the level asked for, 0 below it", async () => {
    expect((await run(["check", PUMP])).status).toBe(1);
    expect((await run(["check", PUMP, "--fail-on", "never"])).status).toBe(0);
    const fine = write("fine/robot.ts", FINE);
    expect((await run(["check", fine])).status).toBe(0);
    expect((await run(["check", fine, "--fail-on", "information"])).status).toBe(1);
  });

  it.each([
    [["check", "no-such-folder"], /there is no "no-such-folder"/],
    [["check"], /check needs a file or folder/],
    [["check", ".", "--format", "xml"], /"xml" is not a format/],
    [["check", ".", "--fail-on", "panic"], /"panic" is not a level/],
    [["check", ".", "--colour"], /--colour/],
    [["inspect", "."], /"inspect" is not a command/],
    [[], /say what to do/],
  ])("is 2 with a reason for %j", async (args, says) => {
    const { status, stderr, stdout } = await run(args);
    expect(status).toBe(2);
    expect(stderr).toMatch(says);
    expect(stdout).toBe("");
  });

  it("is 2 where no file mentions the declarations", async () => {
    write("empty/plain.ts", "export const N = 1;\n");
    const { status, stderr } = await run(["check", path.join(folder, "empty")]);
    expect(status).toBe(2);
    expect(stderr).toMatch(/no file in .* mentions "loadmark"/);
  });
});

describe("the JSON report", () => {
  it("keeps its form: fields, order, places, and numbers to the last printed digit", async () => {
    const { stdout } = await run(["check", PUMP, "--format", "json"]);
    const golden = JSON.parse(readFileSync(path.join(import.meta.dirname, "pump.report.json"), "utf8"));
    expect(JSON.parse(stdout)).toEqual(golden);
    expect(Object.keys(JSON.parse(stdout))).toEqual(Object.keys(golden));
  });

  it("does not depend on where it is started, and names no absolute path", async () => {
    const [here, there] = [
      await run(["check", PUMP, "--format", "json"]),
      await run(["check", PUMP, "--format", "json"], folder),
    ];
    expect(there.stdout).toBe(here.stdout);
    expect(here.stdout).not.toContain(ROOT);
  });

  it("counts lines and columns from 1", async () => {
    const report = JSON.parse((await run(["check", PUMP, "--format", "json"])).stdout);
    const stalls = report.findings.find(({ rule }: { readonly rule: string }) => rule === "stalls");
    // `export const lever = …` is line 13 of pump.ts; its name starts at column 14.
    expect(stalls).toMatchObject({ mechanism: "lever", file: "pump.ts", line: 13, column: 14, endLine: 13, endColumn: 19 });
  });

  it("holds null where nothing can be known, and says why", async () => {
    write("unknown/robot.ts", FINE.replace('"0.2 N*m"', "torqueOf()"));
    const { status, stdout } = await run(["check", path.join(folder, "unknown"), "--format", "json"]);
    expect(status).toBe(0);
    const [mechanism] = JSON.parse(stdout).mechanisms;
    expect(mechanism).toMatchObject({ name: "hub", ratio: null, hardest: null, travel: null });
    expect(mechanism.notChecked.join()).toMatch(/^Nothing: /);
    expect(JSON.parse(stdout).findings.map(({ rule }: { readonly rule: string }) => rule)).toEqual(["not-constant"]);
  });
});

describe("the text", () => {
  it("tells findings with their places, a table per mechanism, and the cautions", async () => {
    const { stdout } = await run(["check", "."], PUMP);
    expect(stdout).toContain("pump.ts:13:14  error  stalls");
    expect(stdout).toMatch(/^lever \(pump\.ts\)$/m);
    expect(stdout).toMatch(/^2 mechanisms: 1 error, 1 warning, 1 for information\.$/m);
    expect(stdout).toContain("Estimates, not a safety assessment.");
    expect(stdout).not.toContain("way out");
    expect((await run(["check", ".", "--propose"], PUMP)).stdout).toMatch(/way out: Stage 1 with \d+ and \d+ teeth/);
  });

  it("keeps names from the source from steering the terminal", async () => {
    write("hostile/robot.ts", FINE.replace('"hub"', '"a\\u001b[31m\\u202eb"'));
    const { stdout } = await run(["check", path.join(folder, "hostile")]);
    expect(stdout).toContain("a\\u001b[31m\\u202eb");
    for (const character of ["\u001b", "\u202e"]) expect(stdout).not.toContain(character);
  });
});

describe("which files are read", () => {
  it("leaves out installed packages, build output, dot folders, and what the settings name", async () => {
    const names = ["node_modules/x", "dist", ".hidden", "old", "src"];
    for (const name of names) write(`many/${name}/robot.ts`, FINE.replace('"hub"', JSON.stringify(`hub in ${name}`)));
    write("many/loadmark.json", '{ "leaveOut": ["old"] }');
    const { stdout } = await run(["check", path.join(folder, "many"), "--format", "json"]);
    expect(JSON.parse(stdout).mechanisms.map(({ name }: { readonly name: string }) => name)).toEqual(["hub in src"]);
  });

  it("reads one file with what it imports", async () => {
    const { stdout } = await run(["check", path.join(PUMP, "pump.ts"), "--format", "json"]);
    expect(JSON.parse(stdout).mechanisms).toHaveLength(2);
  });
});

const FINE = `import { breaker, mechanism, motor, roller } from "loadmark";
const m = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
export const hub = mechanism("hub", { motor: m, stages: [], load: roller({ torque: "0.2 N*m", speed: "85 rpm" }) });
`;

/** Writes a file below the test's folder, and gives its path. */
function write(name: string, text: string): string {
  const file = path.join(folder, name);
  mkdirSync(path.dirname(file), { recursive: true });
  writeFileSync(file, text);
  return file;
}
