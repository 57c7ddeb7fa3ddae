/** `check --against`: what moved since a commit, in a repository of its own. */
import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";

const COMMAND = path.join(import.meta.dirname, "../../dist/command.js");
const folder = mkdtempSync(path.join(tmpdir(), "loadmark-against-"));

const robot = (driven: number, name = "hub") => `import { mechanism, motor, roller, spur } from "loadmark";
const m = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
export const hub = mechanism("${name}", { motor: m, stages: [spur(20, ${driven}, { efficiency: 1 })], load: roller({ torque: "0.8 N*m" }) });
`;

function git(...args: string[]): void {
  const identity = ["-c", "user.name=test", "-c", "user.email=test@example.invalid", "-c", "commit.gpgsign=false"];
  execFileSync("git", [...identity, ...args], { cwd: folder, stdio: "ignore" });
}

function run(...args: string[]): { readonly status: number; readonly stdout: string; readonly stderr: string } {
  try {
    return {
      status: 0,
      stdout: execFileSync(process.execPath, [COMMAND, "check", ".", ...args], { cwd: folder, encoding: "utf8", stdio: "pipe" }),
      stderr: "",
    };
  } catch (error) {
    return error as { readonly status: number; readonly stdout: string; readonly stderr: string };
  }
}

beforeAll(() => {
  git("init", "--quiet");
  writeFileSync(path.join(folder, "robot.ts"), robot(20));
  git("add", ".");
  git("commit", "--quiet", "--message", "first");
});

afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe("check --against", () => {
  it("says so when nothing moved", () => {
    writeFileSync(path.join(folder, "robot.ts"), robot(20));
    expect(run("--against", "HEAD")).toMatchObject({ status: 0, stdout: "No mechanism's numbers moved against HEAD.\n" });
  });

  // 0.8 N·m of 2 N·m is 40 % at a ratio of 1, 32 % at 1.25.
  it("tells the numbers that moved, as text and as a table", () => {
    writeFileSync(path.join(folder, "robot.ts"), robot(25));
    expect(run("--against", "HEAD").stdout).toMatch(
      /^hub\n {2}ratio +1 → 1\.25 \(\+25 %\)\n {2}share of stall +40 % → 32 % \(−20 %\)$/m,
    );
    expect(run("--against", "HEAD", "--format", "markdown").stdout).toContain("| hub | share of stall | 40 % | 32 % (−20 %) |");
  });

  it("leaves out what moved by less than is asked for", () => {
    writeFileSync(path.join(folder, "robot.ts"), robot(25));
    const { stdout } = run("--against", "HEAD", "--moved-by", "22");
    expect(stdout).toContain("ratio");
    expect(stdout).not.toContain("share of stall");
  });

  // Two hubs of 20 teeth; one gets 25 (share of stall 40 % → 32 %), the other 21: 40/1.05 = 38.1 %, a change of 4.8 %.
  const two = (first: number, second: number) =>
    `${robot(first)}${robot(second, "rim").split("\n").slice(2).join("\n").replace("export const hub", "export const rim")}`;

  it("tells every mechanism that moved by more than the share, and no other, in both forms", () => {
    writeFileSync(path.join(folder, "robot.ts"), two(20, 20));
    git("commit", "--quiet", "--all", "--message", "two");
    writeFileSync(path.join(folder, "robot.ts"), two(25, 21));
    const all = run("--against", "HEAD").stdout;
    expect(all).toMatch(/^hub$/m);
    expect(all).toMatch(/^rim\n {2}ratio +1 → 1\.05 \(\+5 %\)\n {2}share of stall +40 % → 38 % \(−4\.8 %\)$/m);
    const table = run("--against", "HEAD", "--format", "markdown").stdout.trimEnd().split("\n");
    expect(table.slice(0, 2)).toEqual(["| mechanism | number | HEAD | now |", "| --- | --- | ---: | ---: |"]);
    expect(table.slice(2).map((row) => row.split(" | ").slice(0, 2).join())).toEqual(
      expect.arrayContaining(["| hub,ratio", "| hub,share of stall", "| hub,current", "| rim,ratio", "| rim,share of stall"]),
    );
    for (const args of [[], ["--format", "markdown"]]) {
      const { stdout } = run("--against", "HEAD", "--moved-by", "6", ...args);
      expect(stdout).toContain("hub");
      expect(stdout).not.toContain("rim");
    }
    git("reset", "--quiet", "--hard", "HEAD~1");
  });

  it("compares with the texts of the commit in every file, whichever holds the number", () => {
    const gears = (teeth: number) => `export const DRIVEN = ${teeth};\n`;
    const user = `import { DRIVEN } from "./gears.js";\n${robot(20).replace("spur(20, 20,", "spur(20, DRIVEN,")}`;
    writeFileSync(path.join(folder, "robot.ts"), user);
    writeFileSync(path.join(folder, "gears.ts"), gears(20));
    git("add", ".");
    git("commit", "--quiet", "--all", "--message", "a constant");
    writeFileSync(path.join(folder, "gears.ts"), gears(25));
    expect(run("--against", "HEAD").stdout).toMatch(/^hub\n {2}ratio +1 → 1\.25 \(\+25 %\)$/m);
    expect(run("--against", "HEAD~1").stdout).toMatch(/^hub\n {2}ratio +1 → 1\.25 \(\+25 %\)$/m);
    git("reset", "--quiet", "--hard", "HEAD~1");
  });

  it("says so where a number cannot be known on one side, and writes no name as markup", () => {
    writeFileSync(path.join(folder, "robot.ts"), robot(20).replace("spur(20, 20,", "spur(20, Math.random() * 40,"));
    expect(run("--against", "HEAD").stdout).toMatch(/^hub: its numbers cannot be known on one side$/m);
    writeFileSync(path.join(folder, "robot.ts"), robot(20, "a|b *c*"));
    expect(run("--against", "HEAD", "--format", "markdown").stdout).toContain("| a\\|b \\*c\\* | new | | |");
  });

  it("tells of mechanisms that are new or gone", () => {
    writeFileSync(path.join(folder, "robot.ts"), robot(20, "wheel"));
    const { stdout } = run("--against", "HEAD");
    expect(stdout).toMatch(/^wheel: new$/m);
    expect(stdout).toMatch(/^hub: gone$/m);
  });

  it("cannot run against what is not a commit", () => {
    expect(run("--against", "no-such-thing")).toMatchObject({ status: 2, stdout: "" });
    expect(run("--against", "no-such-thing").stderr).toContain('"no-such-thing" is not a commit');
    expect(run("--against", "--output=x").status).toBe(2);
    expect(run("--format", "markdown").stderr).toContain("markdown goes with --against");
  });
});
