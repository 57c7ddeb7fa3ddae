/** What lies around the checked files: who imports them, and packages that a workspace links. */
import { execFile } from "node:child_process";
import { mkdirSync, mkdtempSync, realpathSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { projectFolderOf } from "../../extension/command/projectFolder.js";

const COMMAND = path.join(import.meta.dirname, "../../dist/command.js");
let folder: string;

beforeEach(() => {
  folder = realpathSync(mkdtempSync(path.join(tmpdir(), "loadmark-around-")));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

function write(files: Readonly<Record<string, string>>): void {
  for (const [name, text] of Object.entries(files)) {
    mkdirSync(path.dirname(path.join(folder, name)), { recursive: true });
    writeFileSync(path.join(folder, name), text);
  }
}

interface Report {
  readonly mechanisms: readonly { readonly name: string; readonly file: string; readonly ratio: number | null }[];
  readonly findings: readonly { readonly rule: string; readonly file: string; readonly message: string }[];
}

function check(name: string): Promise<Report> {
  return new Promise((resolve, reject) => {
    const args = [COMMAND, "check", path.join(folder, name), "--format", "json", "--fail-on", "never"];
    execFile(process.execPath, args, { timeout: 60_000 }, (error, stdout) => {
      if (error === null) resolve(JSON.parse(stdout));
      else reject(error);
    });
  });
}

const SHEET =
  'motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } })';
const LIBRARY = 'import { mechanism, motor, roller, spur } from "loadmark";\n';
const ROBOT = `${LIBRARY}import { GEARS } from "./gears.js";
export const hub = mechanism("hub", { motor: ${SHEET}, stages: [spur(10, GEARS.driven)], load: roller({ torque: "0.2 N*m" }) });
`;
const GEARS = "export const GEARS = { driven: 30 };\n";
const CHANGES = 'import { GEARS } from "../src/gears.js";\nGEARS.driven = 50;\n';

describe("an object that a file outside of what is checked changes", () => {
  it.each(["src", "src/robot.ts"])("is not known, whether %s is checked or all", async (checked) => {
    write({ "package.json": "{}", "src/robot.ts": ROBOT, "src/gears.ts": GEARS });
    expect((await check(checked)).mechanisms.map(({ ratio }) => ratio)).toEqual([3]);
    write({ "tuning/night.ts": CHANGES });
    for (const name of [checked, "."]) {
      const { mechanisms, findings } = await check(name);
      expect(mechanisms.map(({ ratio }) => ratio)).toEqual([null]);
      expect(findings.map(({ rule }) => rule)).toEqual(["not-constant"]);
    }
  });

  it("counts where the project leaves that file out", async () => {
    write({
      "loadmark.json": '{ "leaveOut": ["tuning"] }',
      "src/robot.ts": ROBOT,
      "src/gears.ts": GEARS,
      "tuning/night.ts": CHANGES,
    });
    expect((await check(".")).mechanisms.map(({ ratio }) => ratio)).toEqual([3]);
  });
});

describe("files that do not name the library", () => {
  it("declare through a helper or a barrel", async () => {
    write({
      "kit.ts": `${LIBRARY}export * from "loadmark";
export const sheet = ${SHEET};
export const make = (name: string) => mechanism(name, { motor: sheet, stages: [], load: roller({ torque: "0.2 N*m" }) });
`,
      "arms/left.ts": 'import { make } from "../kit.js";\nexport const left = make("left");\n',
      "arms/right.ts":
        'import { mechanism, roller, sheet } from "../kit.js";\nexport const right = mechanism("right", { motor: sheet, stages: [], load: roller({ torque: "0.1 N*m" }) });\n',
    });
    const { mechanisms, findings } = await check(".");
    expect(mechanisms.map(({ name, file }) => `${name} ${file}`)).toEqual(["right arms/right.ts", "left kit.ts"]);
    expect(findings.filter(({ rule }) => rule === "not-constant" || rule === "bad-declaration")).toEqual([]);
  });
});

describe("a package that the workspace links", () => {
  beforeEach(() => {
    write({
      "package.json": '{ "workspaces": ["packages/*"] }',
      "packages/kit/package.json": '{ "name": "@team/kit", "private": true, "main": "src/index.ts" }',
      "packages/kit/src/index.ts": `${LIBRARY}export const hub = mechanism("hub", { motor: ${SHEET}, stages: [], load: roller({ torque: "0.2 N*m" }) });\n`,
      "packages/arm/package.json": '{ "name": "@team/arm", "private": true }',
      "packages/arm/src/main.ts": `import { battery, robot } from "loadmark";
import { hub } from "@team/kit";
export default robot("carrier", { supply: battery({ openCircuit: "12 V", resistance: "50 mohm" }), mechanisms: [hub] });
`,
    });
  });

  it.each([
    ["at the top", "node_modules/@team"],
    ["in the package that uses it", "packages/arm/node_modules/@team"],
  ])("counts under one name when it is linked %s", async (_name, links) => {
    mkdirSync(path.join(folder, links), { recursive: true });
    symlinkSync(path.join(folder, "packages/kit"), path.join(folder, links, "kit"), "junction");
    symlinkSync(folder, path.join(folder, "..", `${path.basename(folder)}-link`), "junction");
    try {
      for (const name of [".", `../${path.basename(folder)}-link`, "packages/arm/src/main.ts"]) {
        const { mechanisms, findings } = await check(name);
        expect(mechanisms.map((one) => one.name)).toEqual(["hub"]);
        expect(mechanisms[0]?.file).toMatch(
          name.endsWith(".ts") ? /^\.\.\/\.\.\/kit\/src\/index\.ts$/ : /^packages\/kit\/src\/index\.ts$/,
        );
        expect(findings.filter(({ rule }) => rule === "bad-declaration" || rule === "not-constant")).toEqual([]);
      }
    } finally {
      rmSync(path.join(folder, "..", `${path.basename(folder)}-link`));
    }
  });
});

describe("a link to a file", () => {
  it("counts where it leads out of what is checked, and not twice where it does not", async () => {
    write({
      "in/robot.ts": ROBOT,
      "in/gears.ts": GEARS,
      "out/robot.ts": ROBOT.replace('"hub"', '"other"').replace("./gears", "../in/gears"),
    });
    symlinkSync(path.join(folder, "in/robot.ts"), path.join(folder, "in/again.ts"));
    symlinkSync(path.join(folder, "out/robot.ts"), path.join(folder, "in/other.ts"));
    const { mechanisms, findings } = await check("in");
    expect(mechanisms.map(({ name, file }) => `${name} ${file}`)).toEqual(["other other.ts", "hub robot.ts"]);
    expect(findings.filter(({ rule }) => rule === "bad-declaration")).toEqual([]);
  });
});

describe("the folder of the project", () => {
  it.each([
    ["the nearest that is marked", { "a/tsconfig.json": "{}", "a/b/c/x.ts": "" }, "a/b/c", "a"],
    ["the workspace around it", { "package.json": '{ "workspaces": [] }', "a/package.json": "{}" }, "a", "."],
    [
      "the workspace that a file of its own marks",
      { "pnpm-workspace.yaml": "", "package.json": "{}", "a/package.json": "{}" },
      "a",
      ".",
    ],
    ["itself where a manifest is broken", { "a/package.json": "{ no" }, "a", "a"],
  ])("is %s", (_name, files, from, expected) => {
    write(files);
    expect(projectFolderOf(path.join(folder, from))).toBe(path.join(folder, expected));
  });
});
