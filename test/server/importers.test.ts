/** The session with the real analysis, over files that import each other: who changes an object, who calls a helper, what comes later. */

import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import { type Result, Session, TYPING_DELAY_MS } from "../../extension/server/session.js";
import { createMemoryFiles } from "../support/memoryFiles.js";
import { parser as ts } from "../support/parser.js";

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

function start(disk: Readonly<Record<string, string>>, links: Readonly<Record<string, string>> = {}) {
  const files = createMemoryFiles(disk);
  // A linked folder holds what it leads to; its files are found under both names.
  const throughLinks = (file: string) => {
    const link = Object.keys(links).find((one) => file.startsWith(`${one}/`));
    return link === undefined ? file : links[link] + file.slice(link.length);
  };
  const host = {
    ...files,
    readFile: (file: string) => files.readFile(throughLinks(file)),
    realPath: throughLinks,
  };
  const engine = createAnalyser(ts);
  const results: Result[] = [];
  const errors: unknown[] = [];
  const session = new Session({
    host,
    loadEngine: async () => engine,
    onResult: (result) => results.push(result),
    onError: (_what, error) => errors.push(error),
  });
  const settle = async () => {
    await vi.advanceTimersByTimeAsync(TYPING_DELAY_MS);
    expect(errors).toEqual([]);
  };
  /** Each mechanism with its ratio, `?` where that is not known. */
  const mechanisms = () =>
    results.at(-1)?.analysis.mechanisms.map(({ name, numbers }) => `${name} ${numbers?.ratio ?? "?"}`) ?? [];
  const findings = () =>
    results.at(-1)?.analysis.findings.filter(({ rule }) => rule === "not-constant" || rule === "bad-declaration") ?? [];
  return { files, session, settle, mechanisms, findings, results };
}

const whole = (text: string) => [{ text }];
const SHEET =
  'motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } })';
const LIBRARY = 'import { mechanism, motor, roller, spur } from "loadmark";\n';
const ROLLER = 'roller({ torque: "0.2 N*m" })';
const ROBOT = `${LIBRARY}import { GEARS } from "./gears";
export const hub = mechanism("hub", { motor: ${SHEET}, stages: [spur(10, GEARS.driven)], load: ${ROLLER} });
`;
const GEARS = "export const GEARS = { driven: 30 };\n";
const CHANGES = 'import { GEARS } from "./gears";\nGEARS.driven = 50;\n';
const PROJECT = { "/w/robot.ts": ROBOT, "/w/gears.ts": GEARS };

describe("an object that other files may change", () => {
  it("is not known until the workspace is read", async () => {
    const { session, settle, mechanisms, findings } = start(PROJECT);
    session.open("file:///w/robot.ts", 1, ROBOT);
    await settle();
    expect(mechanisms()).toEqual(["hub ?"]);
    expect(
      findings()
        .map(({ message }) => message)
        .join(),
    ).toContain("not all files are read yet");
    await session.setFolders(["/w"]);
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
    expect(findings()).toEqual([]);
  });

  it("is not known where a file does that nobody opened, until it no longer does", async () => {
    const { session, settle, mechanisms, files } = start({ ...PROJECT, "/w/tuning.ts": CHANGES });
    await session.setFolders(["/w"]);
    await settle();
    expect(mechanisms()).toEqual(["hub ?"]);
    files.texts.set("/w/tuning.ts", CHANGES.replace("GEARS.driven = 50", "export const tuned = GEARS.driven + 1"));
    await session.handleFileEvents([{ file: "/w/tuning.ts", kind: "changed" }]);
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
  });

  it("follows unsaved text, and the disk again after closing", async () => {
    const { session, settle, mechanisms, results } = start({ ...PROJECT, "/w/tuning.ts": "export {};\n" });
    await session.setFolders(["/w"]);
    session.open("file:///w/tuning.ts", 1, "export {};\n");
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
    session.change("file:///w/tuning.ts", 2, whole(CHANGES));
    await settle();
    expect(mechanisms()).toEqual(["hub ?"]);
    const count = results.length;
    await session.close("file:///w/tuning.ts");
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
    session.open("file:///w/other.ts", 1, 'import { readFile } from "node:fs";\n');
    await settle();
    const before = results.length;
    expect(before).toBeGreaterThan(count);
    session.change("file:///w/other.ts", 2, whole('import { readFile } from "node:fs";\nreadFile;\n'));
    await settle();
    expect(results).toHaveLength(before);
  });

  it("is changed again when an edited document that did not is closed unsaved", async () => {
    const { session, settle, mechanisms } = start({ ...PROJECT, "/w/tuning.ts": CHANGES });
    await session.setFolders(["/w"]);
    session.open("file:///w/tuning.ts", 1, CHANGES);
    session.change("file:///w/tuning.ts", 2, whole("export {};\n"));
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
    await session.close("file:///w/tuning.ts");
    await settle();
    expect(mechanisms()).toEqual(["hub ?"]);
  });

  it("follows files and folders that come and go", async () => {
    const { session, settle, mechanisms, files } = start(PROJECT);
    await session.setFolders(["/w"]);
    await settle();
    const tuning = CHANGES.replace("./gears", "../gears");
    for (const [file, event] of [
      ["/w/tuning.ts", "/w/tuning.ts"],
      ["/w/sub/tuning.ts", "/w/sub"],
    ] as const) {
      files.texts.set(file, file === event ? CHANGES : tuning);
      await session.handleFileEvents([{ file: event, kind: "created" }]);
      await settle();
      expect(mechanisms()).toEqual(["hub ?"]);
      files.texts.delete(file);
      await session.handleFileEvents([{ file: event, kind: "deleted" }]);
      await settle();
      expect(mechanisms()).toEqual(["hub 3"]);
    }
  });

  it("counts what the project leaves out as little as the command does", async () => {
    const { session, settle, mechanisms, files } = start({
      ...PROJECT,
      "/w/loadmark.json": '{ "leaveOut": ["old"] }',
      "/w/old/tuning.ts": CHANGES.replace("./gears", "../gears"),
    });
    await session.setFolders(["/w"]);
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
    files.texts.set("/w/loadmark.json", "{}");
    await session.handleFileEvents([{ file: "/w/loadmark.json", kind: "changed" }]);
    await settle();
    expect(mechanisms()).toEqual(["hub ?"]);
  });

  it("keeps what is saved apart from what is not", async () => {
    const { session, settle } = start(PROJECT);
    await session.setFolders(["/w"]);
    session.open("file:///w/tuning.ts", 1, CHANGES);
    await settle();
    const snapshot = session.texts.capture();
    expect(snapshot.importersOf?.("/w/gears.ts", [])).toEqual(["/w/robot.ts", "/w/tuning.ts"]);
    expect(snapshot.saved.importersOf?.("/w/gears.ts", [])).toEqual(["/w/robot.ts"]);
    expect(session.texts.capture().saved).toBe(snapshot.saved);
    session.change("file:///w/tuning.ts", 2, whole(""));
    expect(session.texts.capture().importersOf?.("/w/gears.ts", [])).toEqual(["/w/robot.ts"]);
    expect(snapshot.importersOf?.("/w/gears.ts", [])).toEqual(["/w/robot.ts", "/w/tuning.ts"]);
  });
});

describe("a file that does not name the library", () => {
  const KIT = `${LIBRARY}export * from "loadmark";
export const sheet = ${SHEET};
export const make = (name: string, driven: number) => mechanism(name, { motor: sheet, stages: [spur(10, driven)], load: ${ROLLER} });
`;

  it("declares through a helper and a barrel, also while it is typed", async () => {
    const { session, settle, mechanisms, findings } = start({
      "/w/kit.ts": KIT,
      "/w/left.ts": 'import { make } from "./kit";\nexport const left = make("left", 20);\n',
    });
    await session.setFolders(["/w"]);
    await settle();
    expect(mechanisms()).toEqual(["left 2"]);
    session.open("file:///w/right.ts", 1, "");
    session.change(
      "file:///w/right.ts",
      2,
      whole(`import { mechanism, roller, sheet, spur } from "./kit";
export const right = mechanism("right", { motor: sheet, stages: [spur(10, 40)], load: ${ROLLER} });
`),
    );
    await settle();
    expect(mechanisms()).toEqual(["left 2", "right 4"]);
    expect(findings()).toEqual([]);
  });
});

describe("a file that is looked for in vain", () => {
  it.each([
    ["a file", "/w/gears.ts", "/w/gears.ts"],
    ["a folder, told of alone", "/w/gears/index.ts", "/w/gears"],
  ])("is followed when it comes as %s", async (_name, file, event) => {
    const { session, settle, mechanisms, findings, files } = start({ "/w/robot.ts": ROBOT });
    await session.setFolders(["/w"]);
    await settle();
    expect(findings().map(({ rule }) => rule)).toEqual(["not-constant"]);
    files.texts.set(file, GEARS);
    await session.handleFileEvents([{ file: event, kind: "created" }]);
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
    expect(findings()).toEqual([]);
  });

  it("is followed when it is a project's configuration", async () => {
    const { session, settle, mechanisms, files } = start({
      "/w/src/robot.ts": ROBOT.replace("./gears", "@/gears"),
      "/w/src/gears.ts": GEARS,
    });
    await session.setFolders(["/w"]);
    await settle();
    expect(mechanisms()).toEqual(["hub ?"]);
    files.texts.set("/w/tsconfig.json", '{ "compilerOptions": { "paths": { "@/*": ["./src/*"] } } }');
    await session.handleFileEvents([{ file: "/w/tsconfig.json", kind: "created" }]);
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
  });
});

describe("a package that the workspace links", () => {
  it.each(["/w/node_modules/@team/kit", "/w/packages/arm/node_modules/@team/kit"])("counts once below %s", async (link) => {
    const kit = '{ "name": "@team/kit", "private": true, "main": "src/index.ts" }';
    const { session, settle, mechanisms, findings } = start(
      {
        "/w/package.json": '{ "workspaces": ["packages/*"] }',
        "/w/packages/kit/package.json": kit,
        "/w/packages/kit/src/index.ts": `${LIBRARY}export const hub = mechanism("hub", { motor: ${SHEET}, stages: [spur(10, 30)], load: ${ROLLER} });\n`,
        "/w/packages/arm/package.json": '{ "name": "@team/arm", "private": true }',
        "/w/packages/arm/main.ts": `import { battery, robot } from "loadmark";
import { hub } from "@team/kit";
export default robot("carrier", { supply: battery({ openCircuit: "12 V", resistance: "50 mohm" }), mechanisms: [hub] });
`,
      },
      { [link]: "/w/packages/kit" },
    );
    await session.setFolders(["/w"]);
    await settle();
    expect(mechanisms()).toEqual(["hub 3"]);
    expect(findings()).toEqual([]);
  });
});
