import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import type { CodeLens, CompletionItem, Hover, InlayHint, MarkupContent, WorkspaceSymbol } from "vscode-languageserver/node";
import { buildServer } from "../support/builtServer.js";
import { type ClientOptions, type ServerClient, startServerClient } from "../support/serverClient.js";
import { FINE, gears, PAST_PEAK, STALLS, SWING_ARM } from "../support/swingArm.js";

vi.setConfig({ testTimeout: 30_000 });

let server: string;
let client: ServerClient;

beforeAll(async () => {
  server = await buildServer("answers");
}, 60_000);
afterEach(async () => {
  expect(client.errors).toEqual([]);
  await client.stop();
});

async function start(files: Readonly<Record<string, string>>, options: Partial<ClientOptions> = {}): Promise<ServerClient> {
  client = await startServerClient({ server, files, ...options });
  return client;
}

const robot = (driven: number) => ({ "robot.ts": SWING_ARM, "gears.ts": gears(driven) });
const document = (file: string) => ({ uri: client.uri(file) });
const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

async function hover(file: string, text: string): Promise<{ text: string; range: Hover["range"] } | null> {
  const answer = await client.connection.sendRequest<Hover | null>("textDocument/hover", {
    textDocument: document(file),
    position: client.at(file, text, 1),
  });
  return answer && { text: (answer.contents as MarkupContent).value, range: answer.range };
}

const WHOLE = { start: { line: 0, character: 0 }, end: { line: 999, character: 0 } };

function hints(file: string): Promise<InlayHint[]> {
  return client.connection.sendRequest("textDocument/inlayHint", { textDocument: document(file), range: WHOLE });
}

function lenses(file: string): Promise<CodeLens[]> {
  return client.connection.sendRequest("textDocument/codeLens", { textDocument: document(file) });
}

const count = (method: string) => client.said.filter((one) => one.method === method).length;

describe("hovers", () => {
  it("tell what a gear constant in another file does to the mechanism that it feeds", async () => {
    await start(robot(PAST_PEAK));
    await client.open("gears.ts");
    const shown = await hover("gears.ts", "DRIVEN");
    expect(shown?.text).toContain("swing arm");
    // 2.4 N·m · 24/16 · 0.98 (the customary efficiency of a spur stage) at stall, against 1 kg · 9.80665 m/s² · 0.3 m.
    expect(shown?.text).toContain("2.94 N·m of 3.53 N·m");
    expect(shown?.range).toEqual({ start: client.at("gears.ts", "DRIVEN"), end: client.at("gears.ts", " = ") });
  });

  it("are about the text of now, right after an edit", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    await client.retype("gears.ts", "export", "\n\nexport");
    await client.retype("gears.ts", `${FINE}`, `${STALLS}`);
    expect((await hover("gears.ts", "DRIVEN"))?.text).toContain("Stalls");
  });

  it("answer with nothing where nothing is known", async () => {
    await start(robot(FINE));
    await client.open("robot.ts");
    expect(await hover("robot.ts", "import")).toBeNull();
    const nowhere = { textDocument: { uri: "file:///nowhere.ts" }, position: { line: 7, character: 7 } };
    expect(await client.connection.sendRequest("textDocument/hover", nowhere)).toBeNull();
  });

  /** The first result may take longer than the server makes a hover wait. */
  const shownHover = (file: string, text: string) =>
    vi.waitFor(
      async () => {
        const shown = await hover(file, text);
        if (shown === null || shown === undefined) throw new Error("no hover yet");
        return shown;
      },
      { timeout: 60_000, interval: 200 },
    );

  it("link only to commands that the client has", async () => {
    await start(robot(FINE));
    await client.open("robot.ts");
    expect((await shownHover("robot.ts", "swing =")).text).not.toContain("command:");
    await client.stop();
    await start(robot(FINE), { commands: ["loadmark.reveal"] });
    await client.open("robot.ts");
    const { text } = await shownHover("robot.ts", "swing =");
    expect([...text.matchAll(/\]\(command:([\w.]+)\?/g)].map(([, command]) => command)).toEqual(["loadmark.reveal"]);
  });

  it("lead to places that can be found", async () => {
    await start(robot(FINE), { commands: ["loadmark.reveal"] });
    await client.open("robot.ts");
    const { text } = await shownHover("robot.ts", "swing =");
    const [, encoded = ""] = /command:loadmark\.reveal\?([^)]*)\)/.exec(text) ?? [];
    const [query] = JSON.parse(decodeURIComponent(encoded));
    await client.retype("robot.ts", "import", "\nimport");
    const place = await client.connection.sendRequest("loadmark/findPlace", query);
    expect(place).toEqual({
      uri: client.uri("robot.ts"),
      range: { start: client.at("robot.ts", "sheet ="), end: client.at("robot.ts", " = motor") },
    });
    expect(await client.connection.sendRequest("loadmark/findPlace", { file: 7 })).toBeNull();
    expect(await client.connection.sendRequest("loadmark/findPlace", { file: "/x", start: 0, end: 1 })).toBeNull();
  });
});

describe("inlay hints", () => {
  it("move along with the text until the next result, and are asked for anew only when they differ", async () => {
    await start(robot(FINE));
    await client.open("robot.ts");
    const before = await hints("robot.ts");
    expect(before.length).toBeGreaterThan(0);
    expect(before.map(({ label }) => label)).toContainEqual(expect.stringContaining("of stall"));
    await pause(300);
    const refreshes = count("workspace/inlayHint/refresh");
    await client.retype("robot.ts", "import", "\nimport");
    const moved = before.map((hint) => ({ ...hint, position: { ...hint.position, line: hint.position.line + 1 } }));
    expect(await hints("robot.ts")).toEqual(moved);
    await pause(400);
    expect(await hints("robot.ts")).toEqual(moved);
    expect(count("workspace/inlayHint/refresh")).toBe(refreshes);
    await client.write("gears.ts", gears(PAST_PEAK));
    await client.waitForRules("robot.ts", ["past-peak"]);
    expect(await hints("robot.ts")).not.toEqual(moved);
    await vi.waitFor(() => expect(count("workspace/inlayHint/refresh")).toBe(refreshes + 1));
  });

  it("are limited or off by the settings", async () => {
    await start(robot(FINE), { settings: { hints: "warningsOnly" } });
    await client.open("robot.ts");
    expect(await hints("robot.ts")).toEqual([]);
    await client.write("gears.ts", gears(PAST_PEAK));
    await client.waitForRules("robot.ts", ["past-peak"]);
    expect((await hints("robot.ts")).length).toBeGreaterThan(0);
    await client.stop();
    await start(robot(PAST_PEAK), { settings: { hints: "off", codeLens: false } });
    await client.open("robot.ts");
    expect(await hints("robot.ts")).toEqual([]);
    expect(await lenses("robot.ts")).toEqual([]);
  });

  it("follow settings that are changed, without another analysis", async () => {
    const settings = { hints: "off" };
    await start(robot(FINE), { settings });
    await client.open("robot.ts");
    expect(await hints("robot.ts")).toEqual([]);
    const published = client.published.length;
    settings.hints = "all";
    await client.connection.sendNotification("workspace/didChangeConfiguration", { settings: null });
    expect((await hints("robot.ts")).length).toBeGreaterThan(0);
    expect(count("workspace/inlayHint/refresh")).toBeGreaterThan(0);
    expect(client.published.length).toBe(published);
  });
});

describe("code lenses", () => {
  it("stand above each mechanism at once, and say how it is when asked", async () => {
    await start(robot(PAST_PEAK), { commands: ["loadmark.showChart"] });
    await client.open("robot.ts");
    const [lens, ...more] = await lenses("robot.ts");
    expect(more).toEqual([]);
    expect(lens?.range.start).toEqual(client.at("robot.ts", "swing ="));
    expect(lens?.command).toBeUndefined();
    const resolved = await client.connection.sendRequest<CodeLens>("codeLens/resolve", lens);
    expect(resolved.command?.title).toContain("83 % of stall");
    expect(resolved.command).toMatchObject({ command: "loadmark.showChart", arguments: ["swing arm"] });
  });

  it("stay while code is half typed", async () => {
    await start(robot(FINE));
    await client.open("robot.ts");
    await client.waitForRules("robot.ts", []);
    await lenses("robot.ts");
    for (const [text, half] of [
      ['"1 kg"', ""],
      ["spur(16, DRIVEN)", "spur(16, "],
      ['mechanism("swing arm", {', 'mechanism("swing arm", '],
    ] as const) {
      await client.retype("robot.ts", text, half);
      expect(await lenses("robot.ts")).toHaveLength(1);
      await pause(400);
      expect(await lenses("robot.ts")).toHaveLength(1);
    }
  });
});

describe("completions", () => {
  it("offer units inside a quantity, and nothing elsewhere", async () => {
    await start(robot(FINE));
    await client.open("robot.ts");
    const complete = (text: string, into: number) =>
      client.connection.sendRequest<CompletionItem[]>("textDocument/completion", {
        textDocument: document("robot.ts"),
        position: client.at("robot.ts", text, into),
      });
    const units = await complete('"2.4 N*m"', 5);
    expect(units.map(({ label }) => label)).toContain("N*m");
    expect(units[0]?.textEdit).toMatchObject({ range: { start: client.at("robot.ts", "N*m") } });
    expect(await complete("import", 3)).toEqual([]);
    await client.retype("robot.ts", '"2.4 N*m"', '"2.4 "');
    expect((await complete('"2.4 "', 5)).map(({ label }) => label)).toContain("N*m");
  });
});

describe("what the view shows", () => {
  it("is told with each change", async () => {
    await start({
      ...robot(PAST_PEAK),
      "whole.ts":
        'import { battery, robot } from "loadmark";\nimport { swing } from "./robot.js";\nexport default robot("swinger", { supply: battery({ openCircuit: "12 V", resistance: "0.1 ohm" }), mechanisms: [swing] });\n',
    });
    await client.waitForRules("robot.ts", ["past-peak"]);
    const place = {
      uri: client.uri("robot.ts"),
      range: { start: client.at("robot.ts", "swing ="), end: client.at("robot.ts", " = mechanism") },
    };
    await vi.waitFor(() => expect(client.lastState()?.robots).toHaveLength(1));
    expect(client.lastState()).toMatchObject({
      robots: [{ label: "swinger", standing: "warning", mechanisms: [{ name: "swing arm", standing: "warning", place }] }],
      apart: [],
      status: { text: "1 warning", standing: "warning" },
    });
    await client.remove("whole.ts");
    await vi.waitFor(() => expect(client.lastState()).toMatchObject({ robots: [], apart: [{ name: "swing arm" }] }));
    await client.remove("robot.ts");
    await vi.waitFor(() => expect(client.lastState()).toEqual({ robots: [], apart: [], status: null }));
  });
});

describe("symbols", () => {
  it("find mechanisms and motors by their letters", async () => {
    await start(robot(FINE));
    const symbols = await client.connection.sendRequest<WorkspaceSymbol[]>("workspace/symbol", { query: "swarm" });
    expect(symbols).toMatchObject([
      {
        name: "swing arm",
        containerName: "mechanism",
        location: { uri: client.uri("robot.ts"), range: { start: client.at("robot.ts", "swing =") } },
      },
    ]);
  });
});
