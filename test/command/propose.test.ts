/** `check --propose` and the proposals of the report: ways out of findings about mechanisms and robots, and nearest misses, from the built command. */
import { execFileSync } from "node:child_process";
import { mkdtempSync, realpathSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { buildCommand } from "../support/builtServer.js";

const folder = realpathSync(mkdtempSync(path.join(tmpdir(), "loadmark-propose-")));
let command: string;

beforeAll(async () => {
  command = await buildCommand("propose");
}, 60_000);
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function run(files: Readonly<Record<string, string>>, ...args: string[]): string {
  for (const [name, text] of Object.entries(files)) writeFileSync(path.join(folder, name), text);
  const words = [command, "check", folder, "--fail-on", "never", ...args];
  try {
    return execFileSync(process.execPath, words, { encoding: "utf8" });
  } finally {
    for (const name of Object.keys(files)) rmSync(path.join(folder, name));
  }
}

const HEAD = `import { battery, lift, mechanism, motor, reduction, robot, spur } from "loadmark";
const sheet = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
`;
const HOIST = (kilograms: number, stages: string) => `${HEAD}export const hoist = mechanism("hoist", {
  motor: sheet,
  stages: [${stages}],
  load: lift({ mass: "${kilograms} kg", drumRadius: "50 mm", travel: "1 m" }),
});
`;
/** 12·0.375/0.475 = 9.47 V with both, 12·0.75/0.85 = 10.59 V with one: see the rules' own tests. */
const MOVER = `${HEAD}const pack = battery({ openCircuit: "12 V", resistance: "100 mohm", mustStayAbove: "10 V" });
const load = lift({ mass: "5 kg", drumRadius: "20 mm", travel: "0.4 m" });
const left = mechanism("left", { motor: sheet, motorCount: 4, stages: [reduction(4, { efficiency: 1 })], load });
const right = mechanism("right", { motor: sheet, motorCount: 4, stages: [reduction(4, { efficiency: 1 })], load });
export const mover = robot("mover", { supply: pack, mechanisms: [left, right], loadCycle: [{ lasts: "4 s", moving: [left, right] }] });
`;

describe("ways out in a terminal", () => {
  it("stand below their finding, and only when they are asked for", () => {
    const files = { "robot.ts": HOIST(10, "spur(16, 60, { efficiency: 1 })") };
    const told = run(files, "--propose");
    expect(told).toMatch(
      /past-peak\n {4}Past its peak[^\n]*(\n {4}[^\n]*)*\n {4}way out: Stage 1 with (12 and 60|16 and 80) teeth: ratio 5 instead of 3\.75/,
    );
    expect(run(files)).not.toContain("way out");
  });

  it("say whom else they touch", () => {
    const shared = HOIST(10, "spur(PINION, WHEEL, { efficiency: 1 })").replace(
      "const sheet",
      "const PINION = 16;\nconst WHEEL = 60;\nconst sheet",
    );
    const other =
      'export const lid = mechanism("lid", { motor: sheet, stages: [spur(PINION, WHEEL)], load: lift({ mass: "1 kg", drumRadius: "20 mm", travel: "0.2 m" }) });\n';
    expect(run({ "robot.ts": shared + other }, "--propose")).toMatch(
      /way out: [^\n]* Also changes lid \(ratio [\d.]+ instead of 3\.75, /,
    );
  });

  it("tell the nearest miss where nothing in stock helps", () => {
    const files = { "robot.ts": HOIST(90, "spur(16, 18)"), "loadmark.json": '{ "toothCounts": [16, 18, 20] }' };
    expect(run(files, "--propose")).toMatch(/\n {4}no way out: Nothing in stock clears it\. Nearest: \w/);
  });

  it("tell those for a robot with the new lowest voltage", () => {
    const told = run({ "robot.ts": MOVER }, "--propose");
    expect(told).toMatch(/way out: "left" in a step of its own behind step 1, 4 s: supply down to 10\.6 V instead of 9\.47 V/);
    expect(told).toMatch(/way out: A motor current limit of [\d.]+ A for "left": supply down to 10\.\d+ V/);
  });

  it("come with the cautions, and never with a bigger fuse or breaker", () => {
    const told = run({ "robot.ts": MOVER }, "--propose");
    expect(told).toMatch(/not a safety assessment/i);
    for (const line of told.split("\n").filter((one) => one.includes("way out")))
      expect(line).not.toMatch(/breaker|fuse|rating/i);
  });
});

describe("proposals in the report", () => {
  it("name the robot or the mechanism, what is predicted, and edits by lines and columns", () => {
    const { proposals } = JSON.parse(run({ "robot.ts": MOVER }, "--format", "json"));
    const [stagger] = proposals.filter(({ robot }: { robot: string | null }) => robot === "mover");
    expect(stagger).toMatchObject({ mechanism: null, robot: "mover", rule: "sags", touches: [] });
    expect(stagger.predicted.lowestVoltageV).toBeGreaterThan(10.5);
    expect(stagger.predicted).toMatchObject({ tripMargin: null, tripsAfterS: null, cycleS: 8, cyclesDone: 1 });
    expect(stagger.edits[0]).toMatchObject({ file: "robot.ts", line: 7 });
    const text = MOVER.split("\n")[6] ?? "";
    const replaced = stagger.edits.map(({ column, endColumn }: { column: number; endColumn: number }) =>
      text.slice(column - 1, endColumn - 1),
    );
    expect(replaced).toContain("[left, right]");
  });
});
