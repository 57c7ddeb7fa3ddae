import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { READING_PATIENCE_MS, TYPING_DELAY_MS } from "../../extension/server/session.js";
import { startSession as start, whole } from "../support/startSession.js";

const IMPORT = 'import {} from "loadmark";\n';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

describe("a session", () => {
  it("loads no engine while no file mentions the declarations", async () => {
    const { session, settle, loadEngine, files } = start({ "/w/a.ts": "export const a = 1;", "/w/b.ts": "finding: never" });
    await session.setFolders(["/w"]);
    session.open("file:///w/a.ts", 1, "export const a = 2;");
    await settle();
    expect(files.reads).toEqual(["/w/a.ts", "/w/b.ts"]);
    expect(loadEngine).not.toHaveBeenCalled();
  });

  it("finds files of the workspace, open or not", async () => {
    const { session, settle, messages } = start({
      "/w/a.ts": `${IMPORT}finding: one`,
      "/w/deep/b.mts": `${IMPORT}finding: two`,
      "/w/node_modules/p/c.ts": `${IMPORT}finding: installed`,
      "/w/.cache/d.ts": `${IMPORT}finding: hidden`,
      "/w/types.d.ts": `${IMPORT}finding: typed`,
      "/w/notes.md": `${IMPORT}finding: prose`,
      "/w/other.ts": "finding: unrelated",
    });
    await session.setFolders(["/w"]);
    await settle();
    expect(messages().sort()).toEqual(["/w/a.ts one", "/w/deep/b.mts two"]);
  });

  it("reaches the importer of an edited constant, unsaved text first, and the disk again after closing", async () => {
    const { session, settle, messages } = start({
      "/w/robot.ts": `${IMPORT}import {} from "./constants.ts"`,
      "/w/constants.ts": "finding: saved",
    });
    await session.setFolders(["/w"]);
    await settle();
    expect(messages()).toEqual(["/w/robot.ts saved"]);
    session.open("file:///w/constants.ts", 1, "finding: saved");
    session.change("file:///w/constants.ts", 2, whole("finding: unsaved"));
    await settle();
    expect(messages()).toEqual(["/w/robot.ts unsaved"]);
    await session.close("file:///w/constants.ts");
    await settle();
    expect(messages()).toEqual(["/w/robot.ts saved"]);
  });

  it("analyses once after a burst of typing, and keeps the last result until then", async () => {
    const { session, settle, engine, messages, results } = start();
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: a`);
    await settle();
    engine.runs.count = 0;
    for (let version = 2; version < 12; version += 1) {
      session.change("file:///w/a.ts", version, whole(`${IMPORT}finding: a${version}`));
      await settle(TYPING_DELAY_MS - 1);
    }
    expect(engine.runs.count).toBe(0);
    expect(messages()).toEqual(["/w/a.ts a"]);
    await settle(1);
    expect(messages()).toEqual(["/w/a.ts a11"]);
    expect(engine.runs.count).toBe(1);
    expect(results.at(-1)?.snapshot.versions.get("/w/a.ts")).toBe(11);
  });

  it("waits with an opened document for a workspace that is read at once, and no longer than that", async () => {
    const { session, settle, messages, results } = start({ "/w/a.ts": `${IMPORT}finding: a`, "/w/b.ts": `${IMPORT}finding: b` });
    const reading = session.setFolders(["/w"]);
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: a`);
    await reading;
    await settle(0);
    expect(messages().sort()).toEqual(["/w/a.ts a", "/w/b.ts b"]);
    expect(results).toHaveLength(1);
    await settle();
    expect(results).toHaveLength(1);
  });

  it("tells of open documents first where reading the workspace takes long", async () => {
    const { session, settle, messages, files } = start({ "/w/a.ts": `${IMPORT}finding: a`, "/w/b.ts": `${IMPORT}finding: b` });
    files.beforeRead = (file) => new Promise((resolve) => setTimeout(resolve, file === "/w/b.ts" ? 2000 : 10));
    const reading = session.setFolders(["/w"]);
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: a`);
    await settle(READING_PATIENCE_MS - 1);
    expect(messages()).toEqual([]);
    await settle(50);
    expect(messages()).toEqual(["/w/a.ts a"]);
    await settle(2000);
    await reading;
    await settle();
    expect(messages().sort()).toEqual(["/w/a.ts a", "/w/b.ts b"]);
  });

  it("analyses at once on saving", async () => {
    const { session, settle, messages } = start();
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: a`);
    await settle();
    session.change("file:///w/a.ts", 2, whole(`${IMPORT}finding: b`));
    session.save();
    await settle(0);
    expect(messages()).toEqual(["/w/a.ts b"]);
  });

  it("does nothing while nothing changes", async () => {
    const { session, settle, engine, files } = start({ "/w/a.ts": `${IMPORT}finding: a` });
    await session.setFolders(["/w"]);
    await settle();
    const before = { runs: engine.runs.count, reads: files.reads.length };
    session.save();
    await settle(60_000);
    expect({ runs: engine.runs.count, reads: files.reads.length }).toEqual(before);
    expect(vi.getTimerCount()).toBe(0);
  });

  it("does nothing for documents that the result does not rest on", async () => {
    const { session, settle, engine, messages } = start({ "/w/a.ts": `${IMPORT}import {} from "./b.ts"`, "/w/b.ts": "" });
    await session.setFolders(["/w"]);
    await settle();
    engine.runs.count = 0;
    session.open("file:///w/other.ts", 1, "export const a = 1;");
    session.change("file:///w/other.ts", 2, whole("export const a = 2;"));
    await session.close("file:///w/other.ts");
    await settle();
    expect(engine.runs.count).toBe(0);
    session.open("file:///w/other.ts", 1, "export const a = 1;");
    session.change("file:///w/other.ts", 2, whole(`${IMPORT}finding: other`));
    await settle();
    expect(messages()).toEqual(["/w/other.ts other"]);
    session.change("file:///w/other.ts", 3, whole(""));
    await settle();
    expect(messages()).toEqual([]);
    session.open("file:///w/b.ts", 1, "finding: b");
    await settle();
    expect(messages()).toEqual(["/w/a.ts b"]);
  });

  it("lives on after a failed analysis, and says what failed", async () => {
    const { session, settle, messages, errors } = start();
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: a`);
    await settle();
    session.change("file:///w/a.ts", 2, whole(`${IMPORT}CRASH`));
    await settle();
    expect(errors).toHaveLength(1);
    expect(messages()).toEqual(["/w/a.ts a"]);
    session.change("file:///w/a.ts", 3, whole(`${IMPORT}finding: b`));
    await settle();
    expect(messages()).toEqual(["/w/a.ts b"]);
  });

  it("tries again after the engine could not be loaded", async () => {
    const { session, settle, messages, loadEngine } = start();
    loadEngine.mockRejectedValueOnce(new Error("not there"));
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: a`);
    await settle();
    session.change("file:///w/a.ts", 2, whole(`${IMPORT}finding: b`));
    await settle();
    expect(messages()).toEqual(["/w/a.ts b"]);
  });

  it("gives those who ask the result of the newest text, or the last one in time", async () => {
    const { session, settle } = start();
    await session.setFolders([]);
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: a`);
    const first = session.whenCurrent(1000);
    await settle();
    expect((await first)?.analysis.findings[0]?.message).toBe("a");
    session.change("file:///w/a.ts", 2, whole(`${IMPORT}finding: b`));
    const early = session.whenCurrent(TYPING_DELAY_MS / 2);
    const patient = session.whenCurrent(1000);
    await settle();
    expect((await early)?.analysis.findings[0]?.message).toBe("a");
    expect((await patient)?.analysis.findings[0]?.message).toBe("b");
  });

  it("lets those who ask wait for a workspace that is still being read", async () => {
    const { session, settle, files } = start({ "/w/a.ts": `${IMPORT}finding: a`, "/w/b.ts": "export {};" });
    files.beforeRead = () => new Promise((resolve) => setTimeout(resolve, 500));
    void session.setFolders(["/w"]);
    session.open("file:///w/b.ts", 1, "export {};");
    await settle();
    const asked = session.whenCurrent(2000);
    await settle(1000);
    expect((await asked)?.analysis.findings[0]?.message).toBe("a");
  });

  it("keeps few texts after an import was typed letter by letter", async () => {
    const { session, settle } = start();
    session.open("file:///w/a.ts", 1, IMPORT);
    for (let version = 2; version < 1500; version += 1) {
      session.change("file:///w/a.ts", version, whole(`${IMPORT}import {} from "./file${version}.ts"`));
      await settle();
    }
    expect(session.texts.diskSize).toBeLessThan(600);
  });
});
