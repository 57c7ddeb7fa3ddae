/** A session and the files around it: what comes, goes and is left out. */
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { startSession as start } from "../support/startSession.js";

const IMPORT = 'import {} from "loadmark";\n';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

describe("a session's files", () => {
  it("follows files that are created, changed, renamed and deleted", async () => {
    const { session, settle, messages, files } = start({ "/w/a.ts": `${IMPORT}import {} from "./late.ts"` });
    await session.setFolders(["/w"]);
    await settle();
    expect(messages()).toEqual([]);
    files.texts.set("/w/late.ts", "finding: came");
    await session.handleFileEvents([{ file: "/w/late.ts", kind: "created" }]);
    await settle();
    expect(messages()).toEqual(["/w/a.ts came"]);
    files.texts.set("/w/late.ts", "finding: changed");
    await session.handleFileEvents([{ file: "/w/late.ts", kind: "changed" }]);
    await settle();
    expect(messages()).toEqual(["/w/a.ts changed"]);
    files.texts.set("/w/b.ts", files.texts.get("/w/a.ts") ?? "");
    files.texts.delete("/w/a.ts");
    await session.handleFileEvents([
      { file: "/w/b.ts", kind: "created" },
      { file: "/w/a.ts", kind: "deleted" },
    ]);
    await settle();
    expect(messages()).toEqual(["/w/b.ts changed"]);
    files.texts.delete("/w/b.ts");
    await session.handleFileEvents([{ file: "/w/b.ts", kind: "deleted" }]);
    await settle();
    expect(messages()).toEqual([]);
  });

  it("believes the disk, not the order of the events", async () => {
    const { session, settle, messages, files } = start({ "/w/a.ts": `${IMPORT}finding: old` });
    await session.setFolders(["/w"]);
    await settle();
    files.texts.set("/w/a.ts", `${IMPORT}finding: new`);
    await session.handleFileEvents([
      { file: "/w/a.ts", kind: "created" },
      { file: "/w/a.ts", kind: "deleted" },
    ]);
    await settle();
    expect(messages()).toEqual(["/w/a.ts new"]);
  });

  it("takes the later of two reads of one file, whichever ends first", async () => {
    const { session, settle, messages, files } = start({ "/w/a.ts": `${IMPORT}finding: first` });
    await session.setFolders(["/w"]);
    await settle();
    let letGo = () => {};
    files.beforeRead = () =>
      new Promise<void>((resolve) => {
        letGo = resolve;
      });
    const slow = session.handleFileEvents([{ file: "/w/a.ts", kind: "changed" }]);
    files.beforeRead = async () => {};
    files.texts.set("/w/a.ts", `${IMPORT}finding: second`);
    await session.handleFileEvents([{ file: "/w/a.ts", kind: "changed" }]);
    letGo();
    await slow;
    await settle();
    expect(messages()).toEqual(["/w/a.ts second"]);
  });

  it("follows folders that come and go with one event for all that they hold", async () => {
    const { session, settle, messages, files } = start({ "/w/sub/a.ts": `${IMPORT}finding: a` });
    await session.setFolders(["/w"]);
    await settle();
    files.texts.delete("/w/sub/a.ts");
    await session.handleFileEvents([{ file: "/w/sub", kind: "deleted" }]);
    await settle();
    expect(messages()).toEqual([]);
    files.texts.set("/w/moved/a.ts", `${IMPORT}finding: a`);
    await session.handleFileEvents([{ file: "/w/moved", kind: "created" }]);
    await settle();
    expect(messages()).toEqual(["/w/moved/a.ts a"]);
  });

  it("keeps the text of an open document whose file is gone, until it is closed", async () => {
    const { session, settle, messages, files } = start({ "/w/a.ts": `${IMPORT}finding: a` });
    await session.setFolders(["/w"]);
    session.open("file:///w/a.ts", 1, `${IMPORT}finding: mine`);
    files.texts.delete("/w/a.ts");
    await session.handleFileEvents([{ file: "/w/a.ts", kind: "deleted" }]);
    await settle();
    expect(messages()).toEqual(["/w/a.ts mine"]);
    await session.close("file:///w/a.ts");
    await settle();
    expect(messages()).toEqual([]);
  });

  it("checks an open document outside of the workspace, and an unsaved one", async () => {
    const { session, settle, messages } = start();
    session.open("file:///elsewhere/a.ts", 1, `${IMPORT}finding: a`);
    session.open("untitled:Untitled-1", 1, `${IMPORT}finding: b`);
    session.open("file:///elsewhere/node_modules/p/c.ts", 1, `${IMPORT}finding: c`);
    await settle();
    expect(messages().sort()).toEqual(["/elsewhere/a.ts a", "untitled:Untitled-1 b"]);
  });

  it("leaves out the folders that the nearest settings name, also when those are edited", async () => {
    const { session, settle, messages, files } = start({
      "/w/loadmark.json": '{ "leaveOut": ["./old/"] }',
      "/w/old/a.ts": `${IMPORT}finding: a`,
      "/w/older.ts": `${IMPORT}finding: b`,
    });
    await session.setFolders(["/w"]);
    await settle();
    expect(messages()).toEqual(["/w/older.ts b"]);
    files.texts.set("/w/loadmark.json", "{}");
    await session.handleFileEvents([{ file: "/w/loadmark.json", kind: "changed" }]);
    await settle();
    expect(messages()).toEqual(["/w/older.ts b", "/w/old/a.ts a"].sort());
  });

  it("forgets a workspace folder that is taken away", async () => {
    const { session, settle, messages } = start({ "/v/a.ts": `${IMPORT}finding: a`, "/w/b.ts": `${IMPORT}finding: b` });
    await session.setFolders(["/v", "/w"]);
    await settle();
    expect(messages().sort()).toEqual(["/v/a.ts a", "/w/b.ts b"]);
    await session.setFolders(["/w"]);
    await settle();
    expect(messages()).toEqual(["/w/b.ts b"]);
  });
});
