/** Quick fixes as a client gets them: their edits, and what comes of them. */
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import type { CodeAction } from "vscode-languageserver/node";
import { buildServer } from "../support/builtServer.js";
import { type ClientOptions, type ServerClient, startServerClient } from "../support/serverClient.js";
import { FINE, gears, PAST_PEAK, STALLS, SWING_ARM } from "../support/swingArm.js";

vi.setConfig({ testTimeout: 30_000 });

let server: string;
let client: ServerClient;

beforeAll(async () => {
  server = await buildServer("quick-fixes");
}, 60_000);
afterEach(async () => {
  expect(client.errors).toEqual([]);
  await client.stop();
});

async function start(files: Readonly<Record<string, string>>, options: Partial<ClientOptions> = {}): Promise<void> {
  client = await startServerClient({ server, files, ...options });
}

const robot = (driven: number) => ({ "robot.ts": SWING_ARM, "gears.ts": gears(driven) });

describe("quick fixes", () => {
  const actions = async (file: string, text: string, into = 1) => {
    const position = client.at(file, text, into);
    return client.connection.sendRequest<CodeAction[]>("textDocument/codeAction", {
      textDocument: { uri: client.uri(file) },
      range: { start: position, end: position },
      context: { diagnostics: client.findings(file) },
    });
  };

  it("mend the word that was meant, and name the finding", async () => {
    await start({ "robot.ts": SWING_ARM.replace("centreOfMass", "centerOfMass"), "gears.ts": gears(FINE) });
    await client.open("robot.ts");
    const [finding] = await client.waitForRules("robot.ts", ["bad-declaration"]);
    const [action] = await actions("robot.ts", "centerOfMass");
    expect(action).toMatchObject({ kind: "quickfix", diagnostics: [{ message: finding?.message }] });
    expect(action?.edit?.documentChanges).toEqual([
      {
        textDocument: { uri: client.uri("robot.ts"), version: 1 },
        edits: [
          {
            range: { start: client.at("robot.ts", "centerOfMass"), end: client.at("robot.ts", "centerOfMass", 12) },
            newText: "centreOfMass",
          },
        ],
      },
    ]);
  });

  it("propose other gears where they are declared, and what is proposed clears the finding", async () => {
    await start(robot(PAST_PEAK));
    await client.open("robot.ts");
    await client.open("gears.ts");
    await client.waitForRules("robot.ts", ["past-peak"]);
    const proposed = (await actions("robot.ts", "swing =")).find(({ title }) => title.startsWith("Stage "));
    expect(proposed?.title).toMatch(/^Stage 1 with \d+ and \d+ teeth: ratio [\d.]+, \d+ % of stall, /);
    const [change] = proposed?.edit?.documentChanges ?? [];
    if (change === undefined || !("textDocument" in change)) throw new Error("nothing to change");
    expect(change.textDocument.uri).toBe(client.uri("gears.ts"));
    const lines = client.text("gears.ts").split("\n");
    for (const edit of change.edits) {
      if (!("newText" in edit)) throw new Error("not plain text");
      const { start: from, end: to } = edit.range;
      lines[from.line] = `${lines[from.line]?.slice(0, from.character)}${edit.newText}${lines[from.line]?.slice(to.character)}`;
    }
    await client.retype("gears.ts", client.text("gears.ts"), lines.join("\n"));
    await client.waitForRules("robot.ts", []);
  });

  it("tell the nearest miss, which changes nothing and leads to the map of all ratios, where nothing in stock helps", async () => {
    const files = {
      ...robot(STALLS),
      "robot.ts": SWING_ARM.replace('"1 kg"', '"60 kg"'),
      "loadmark.json": '{ "toothCounts": [16, 18] }',
    };
    await start(files, { commands: ["loadmark.showRatioMap"] });
    await client.open("robot.ts");
    await client.waitForRules("robot.ts", ["stalls"]);
    const miss = (await actions("robot.ts", "swing =")).find(({ title }) => title.startsWith("Nothing in stock clears it"));
    expect(miss?.title).toMatch(/; nearest: /);
    expect(miss?.edit).toBeUndefined();
    expect(miss?.command).toMatchObject({ command: "loadmark.showRatioMap", arguments: ["swing arm"] });
  });

  it("offer the allowance last, with its reason to be filled in", async () => {
    await start(robot(PAST_PEAK));
    await client.open("robot.ts");
    await client.waitForRules("robot.ts", ["past-peak"]);
    const offered = await actions("robot.ts", "swing =");
    expect(offered.at(-1)?.title).toMatch(/^Allow /);
    const action = offered.find(({ title }) => title.startsWith('Allow "past-peak"'));
    const line = client.at("robot.ts", "export const swing");
    expect(action?.edit?.documentChanges).toEqual([
      {
        textDocument: { uri: client.uri("robot.ts"), version: 1 },
        edits: [
          {
            range: { start: line, end: line },
            snippet: { kind: "snippet", value: `// loadmark-allow past-peak: \${1:reason}\n` },
          },
        ],
      },
    ]);
  });
});
