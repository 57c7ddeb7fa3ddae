/** What changed since the last commit, from the built server: a client that knows commits, and clients that do not. */
import { fileURLToPath } from "node:url";
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import type { CodeLens, Hover, MarkupContent } from "vscode-languageserver/node";
import { COMMIT_MOVED, type CommittedText, READ_COMMITTED } from "../../extension/protocol/committed.js";
import { buildServer } from "../support/builtServer.js";
import { three } from "../support/handNumbers.js";
import { type ServerClient, startServerClient } from "../support/serverClient.js";
import { FINE, gears, PAST_PEAK, SWING_ARM } from "../support/swingArm.js";

vi.setConfig({ testTimeout: 30_000 });

let server: string;
let client: ServerClient;
/** What was asked of the client, by the names of files. */
let asked: string[];

beforeAll(async () => {
  server = await buildServer("committed");
}, 60_000);
afterEach(async () => {
  expect(client.errors).toEqual([]);
  await client.stop();
});

type Commit = Record<string, string> | null;

/** A client whose last commit is what `commit` gives now. */
async function start(files: Readonly<Record<string, string>>, commit?: () => Commit): Promise<void> {
  client = await startServerClient({ server, files, commands: ["loadmark.showChart"] });
  asked = [];
  if (commit === undefined) return;
  client.connection.onRequest(READ_COMMITTED, ({ uris }: { uris: string[] }): CommittedText[] | null => {
    asked.push(...uris);
    const texts = commit();
    return texts && uris.map((uri) => textOf(fileURLToPath(uri), texts));
  });
}

function textOf(file: string, texts: Readonly<Record<string, string>>): CommittedText {
  if (!file.startsWith(client.folder)) return { kind: "outside" };
  const text = texts[file.slice(client.folder.length + 1)];
  return text === undefined ? { kind: "absent" } : { kind: "text", text };
}

async function hover(file: string, text: string): Promise<string> {
  const answer = await client.connection.sendRequest<Hover | null>("textDocument/hover", {
    textDocument: { uri: client.uri(file) },
    position: client.at(file, text, 1),
  });
  return answer === null ? "" : (answer.contents as MarkupContent).value;
}

async function lens(): Promise<CodeLens> {
  const [first] = await client.connection.sendRequest<CodeLens[]>("textDocument/codeLens", {
    textDocument: { uri: client.uri("robot.ts") },
  });
  if (first === undefined) throw new Error("There is no lens.");
  return client.connection.sendRequest<CodeLens>("codeLens/resolve", first);
}

/** Asks until the lens says it: it is told of what was looked for with its first answer. */
async function lensSaying(words: string): Promise<CodeLens> {
  for (let turn = 0; turn < 100; turn++) {
    const now = await lens();
    if (now.command?.title.includes(words)) return now;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error(`No lens says "${words}".`);
}

/** The arm's current by the sheet's line: I = I0 + (Is − I0)·T/Ts, through spur teeth that pass 0.98. */
function currentThrough(driven: number): string {
  const torqueNm = (9.80665 * 0.3) / ((driven / 16) * 0.98);
  return three(0.3 + (4 - 0.3) * (torqueNm / 2.4));
}

const CHANGE = `current ${currentThrough(FINE)} → ${currentThrough(PAST_PEAK)} A`;
const files = (driven: number) => ({ "robot.ts": SWING_ARM, "gears.ts": gears(driven) });

describe("since the last commit", () => {
  it("a hover tells what an edit that is not saved changed, on the mechanism and on the constant", async () => {
    await start(files(FINE), () => files(FINE));
    await client.open("gears.ts");
    expect(await hover("robot.ts", "swing =")).not.toContain("since the last commit");
    await client.retype("gears.ts", `${FINE}`, `${PAST_PEAK}`);
    expect(await hover("robot.ts", "swing =")).toMatch(
      new RegExp(`\n${CHANGE}, share of stall 42 → 83 %, .*since the last commit`),
    );
    expect(await hover("gears.ts", "DRIVEN")).toContain(`swing arm: ${CHANGE} since the last commit`);
  });

  it("a lens tells it too, from the first edit that is already saved, and stays where it is", async () => {
    await start(files(PAST_PEAK), () => files(FINE));
    await client.open("robot.ts");
    const before = await lens();
    const after = await lensSaying(`· ${CHANGE} since the last commit`);
    expect(after.range).toEqual(before.range);
    expect(after.command?.title).toMatch(/^Past its peak of power: 83 % of stall, /);
  });

  it("nothing is asked for before somebody looks, and nothing twice while the commit stays", async () => {
    await start(files(PAST_PEAK), () => files(FINE));
    await client.open("gears.ts");
    await client.waitForRules("robot.ts", ["past-peak"]);
    expect(asked).toEqual([]);
    expect(await hover("robot.ts", "swing =")).toContain(CHANGE);
    const first = asked.length;
    expect(new Set(asked).size).toBe(first);
    await client.retype("gears.ts", `${PAST_PEAK}`, `${FINE}`);
    expect(await hover("robot.ts", "swing =")).not.toContain("since the last commit");
    expect(asked).toHaveLength(first);
  });

  it("all is looked for anew when the commit moves", async () => {
    let commit = files(FINE);
    await start(files(PAST_PEAK), () => commit);
    await client.open("robot.ts");
    await lensSaying(CHANGE);
    const refreshes = () => client.said.filter(({ method }) => method === "workspace/codeLens/refresh").length;
    const before = refreshes();
    commit = files(PAST_PEAK);
    await client.connection.sendNotification(COMMIT_MOVED);
    expect(await hover("robot.ts", "swing =")).not.toContain("since the last commit");
    expect(refreshes()).toBeGreaterThan(before);
    expect((await lens()).command?.title).not.toContain("since the last commit");
  });

  it("a mechanism that is not in it is new", async () => {
    await start(files(FINE), () => ({ "gears.ts": gears(FINE) }));
    await client.open("robot.ts");
    expect(await hover("robot.ts", "swing =")).toContain("New since the last commit.");
  });

  it.each([
    ["a client that does not know commits", undefined],
    ["a workspace without a commit", () => null],
  ])("%s shows nothing of it", async (_, commit) => {
    await start(files(PAST_PEAK), commit);
    await client.open("robot.ts");
    const shown = await hover("robot.ts", "swing =");
    expect(shown).toContain("Past its peak of power");
    expect(shown).not.toContain("last commit");
    expect((await lens()).command?.title).not.toContain("last commit");
  });

  it("half-typed code keeps the last result and its comparison", async () => {
    await start(files(PAST_PEAK), () => files(FINE));
    await client.open("gears.ts");
    expect(await hover("robot.ts", "swing =")).toContain(CHANGE);
    await client.retype("gears.ts", `${PAST_PEAK};`, "");
    expect(await hover("robot.ts", "swing =")).not.toContain("since the last commit");
    await client.retype("gears.ts", "DRIVEN = ", `DRIVEN = ${PAST_PEAK};`);
    expect(await hover("robot.ts", "swing =")).toContain(CHANGE);
  });
});
