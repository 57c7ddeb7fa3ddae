import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { DiagnosticSeverity, FileChangeType } from "vscode-languageserver/node";
import { buildServer } from "../support/builtServer.js";
import { type ServerClient, startServerClient } from "../support/serverClient.js";
import { FINE, gears, PAST_PEAK, STALLS, SWING_ARM } from "../support/swingArm.js";

vi.setConfig({ testTimeout: 30_000 });

let server: string;
let client: ServerClient;

beforeAll(async () => {
  server = await buildServer("findings");
}, 60_000);
afterEach(async () => {
  expect(client.errors).toEqual([]);
  await client.stop();
});

async function start(files: Readonly<Record<string, string>>): Promise<ServerClient> {
  client = await startServerClient({ server, files });
  return client;
}

const robot = (driven: number) => ({ "robot.ts": SWING_ARM, "gears.ts": gears(driven) });

describe("findings of the built server", () => {
  it("appear for files of the workspace that nobody opened", async () => {
    await start(robot(STALLS));
    const [finding] = await client.waitForRules("robot.ts", ["stalls"]);
    expect(finding).toMatchObject({ source: "Loadmark", severity: DiagnosticSeverity.Error });
    expect(finding?.range.start).toEqual(client.at("robot.ts", "swing ="));
    expect(finding?.range.end).toEqual(client.at("robot.ts", " = mechanism"));
  });

  it("follow the constant that is being edited in another file, saved or not", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    await client.retype("gears.ts", `${FINE}`, `${PAST_PEAK}`);
    const [finding] = await client.waitForRules("robot.ts", ["past-peak"]);
    expect(finding?.severity).toBe(DiagnosticSeverity.Warning);
    await client.retype("gears.ts", `${PAST_PEAK}`, `${STALLS}`);
    await client.waitForRules("robot.ts", ["stalls"]);
    await client.retype("gears.ts", `${STALLS}`, `${FINE}`);
    await client.waitForRules("robot.ts", []);
  });

  it("go back to the disk's text when an edited document is closed unsaved", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    await client.retype("gears.ts", `${FINE}`, `${STALLS}`);
    await client.waitForRules("robot.ts", ["stalls"]);
    await client.close("gears.ts");
    await client.waitForRules("robot.ts", []);
  });

  it("stay for a closed document, and go with its file", async () => {
    await start(robot(STALLS));
    await client.open("robot.ts");
    await client.waitForRules("robot.ts", ["stalls"]);
    await client.close("robot.ts");
    await client.write("gears.ts", gears(PAST_PEAK));
    await client.waitForRules("robot.ts", ["past-peak"]);
    await client.remove("robot.ts");
    await client.waitForRules("robot.ts", []);
  });

  it("move with a renamed file", async () => {
    await start(robot(STALLS));
    await client.waitForRules("robot.ts", ["stalls"]);
    await client.write("renamed.ts", SWING_ARM);
    await client.remove("robot.ts");
    await client.waitForRules("renamed.ts", ["stalls"]);
    await client.waitForRules("robot.ts", []);
  });

  it("go when the folder that holds the files goes, although only the folder is told of", async () => {
    await start({ "src/robot.ts": SWING_ARM, "src/gears.ts": gears(STALLS) });
    await client.waitForRules("src/robot.ts", ["stalls"]);
    await client.remove("src");
    await client.waitForRules("src/robot.ts", []);
  });

  it("are true after another branch was checked out", async () => {
    await start({ ...robot(STALLS), "old.ts": SWING_ARM.replace("swing arm", "old arm") });
    await client.waitForRules("robot.ts", ["stalls"]);
    await client.waitForRules("old.ts", ["stalls"]);
    await Promise.all([
      client.write("gears.ts", gears(FINE)),
      client.write("robot.ts", SWING_ARM.replace("./gears.js", "./more/gears.js")),
      client.write("more/gears.ts", gears(PAST_PEAK)),
      client.remove("old.ts"),
    ]);
    await client.waitForRules("robot.ts", ["past-peak"]);
    await client.waitForRules("old.ts", []);
  });

  it("appear once a missing import comes into being", async () => {
    await start({ "robot.ts": SWING_ARM });
    await client.waitForRules("robot.ts", ["not-constant"]);
    await client.write("gears.ts", gears(STALLS));
    await client.waitForRules("robot.ts", ["stalls"]);
  });

  it("carry the version of the document that they are for, and never an older one after a newer", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    await client.open("robot.ts");
    for (let round = 0; round < 10; round += 1) {
      await client.retype("robot.ts", "swing arm", `swing arm${round}`);
      await client.retype("robot.ts", `swing arm${round}`, "swing arm");
      await client.retype(
        "gears.ts",
        client.text("gears.ts").includes(`${FINE}`) ? `${FINE}` : `${STALLS}`,
        round % 2 ? `${FINE}` : `${STALLS}`,
      );
      await new Promise((resolve) => setTimeout(resolve, round * 30));
    }
    await client.retype("gears.ts", `${FINE}`, `${PAST_PEAK}`);
    await client.waitForRules("robot.ts", ["past-peak"]);
    const versions = client.published.filter(({ uri }) => uri === client.uri("robot.ts")).map(({ version }) => version ?? 0);
    expect(versions).toEqual(versions.toSorted((a, b) => a - b));
    expect(versions.at(-1)).toBe(21);
  });

  it("do not flash while text is typed", async () => {
    await start(robot(STALLS));
    await client.open("gears.ts");
    await client.waitForRules("robot.ts", ["stalls"]);
    const before = client.published.length;
    for (const [text, replacement] of [
      ["16", "1"],
      ["= 1;", "= ;"],
      ["= ;", "= 2;"],
      ["= 2;", "= 24;"],
    ] as const) {
      await client.retype("gears.ts", text, replacement);
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
    await client.waitForRules("robot.ts", ["past-peak"]);
    expect(client.published.length - before).toBe(1);
  });

  it("stand in half-typed code, and the rest of the file is still checked", async () => {
    const second = SWING_ARM.slice(SWING_ARM.indexOf("export")).replace("swing =", "other =").replace("swing arm", "other arm");
    await start({ "robot.ts": SWING_ARM + second, "gears.ts": gears(STALLS) });
    await client.open("robot.ts");
    await client.waitForRules("robot.ts", ["stalls", "stalls"]);
    await client.retype("robot.ts", `mass: "1 kg"`, "mass: ");
    const findings = await client.waitForRules("robot.ts", ["bad-declaration", "stalls"]);
    expect(findings[1]?.range.start).toEqual(client.at("robot.ts", "other ="));
  });

  it("point from a use to the literal that it came from", async () => {
    await start({
      "robot.ts": SWING_ARM.replace("1 kg", "$" + "{MASS}")
        .replace('"$' + '{MASS}"', "MASS")
        .replace("{ DRIVEN }", "{ DRIVEN, MASS }"),
      "gears.ts": `${gears(FINE)}export const MASS = "1 kgg";\n`,
    });
    const [finding] = await client.waitForRules("robot.ts", ["bad-declaration"]);
    expect(finding?.relatedInformation?.[0]?.location).toMatchObject({
      uri: client.uri("gears.ts"),
      range: { start: client.at("gears.ts", '"1 kgg"') },
    });
  });

  it("respect folders that the settings leave out, and levels", async () => {
    await start({
      ...robot(STALLS),
      "old/robot.ts": SWING_ARM.replace("swing arm", "old arm"),
      "old/gears.ts": gears(STALLS),
      "loadmark.json": '{ "leaveOut": ["old"] }',
    });
    await client.waitForRules("robot.ts", ["stalls"]);
    expect(client.findings("old/robot.ts")).toEqual([]);
    await client.write("loadmark.json", '{ "levels": { "stalls": "off" } }');
    await client.waitForRules("robot.ts", []);
    await client.write("loadmark.json", "{ ");
    await client.waitForRules("loadmark.json", ["bad-declaration"]);
    await client.waitForRules("robot.ts", ["stalls"]);
    await client.waitForRules("old/robot.ts", ["stalls"]);
    await client.remove("loadmark.json");
    await client.waitForRules("loadmark.json", []);
  });

  it("come and go with workspace folders", async () => {
    await start({ "a/robot.ts": SWING_ARM, "a/gears.ts": gears(STALLS) });
    await client.waitForRules("a/robot.ts", ["stalls"]);
    const root = { uri: client.uri("").replace(/\/$/, ""), name: "robot" };
    await client.connection.sendNotification("workspace/didChangeWorkspaceFolders", { event: { added: [], removed: [root] } });
    await client.waitForRules("a/robot.ts", []);
    await client.connection.sendNotification("workspace/didChangeWorkspaceFolders", { event: { added: [root], removed: [] } });
    await client.waitForRules("a/robot.ts", ["stalls"]);
  });

  it("survive garbage of every kind", async () => {
    await start(robot(STALLS));
    await client.open("robot.ts");
    await client.open("gears.ts");
    await client.waitForRules("robot.ts", ["stalls"]);
    const { connection } = client;
    await connection.sendNotification("textDocument/didChange", {
      textDocument: { uri: "file:///nowhere.ts", version: 3 },
      contentChanges: [{ text: "x" }],
    });
    await connection.sendNotification("textDocument/didClose", { textDocument: { uri: "not an address" } });
    await connection.sendNotification("loadmark/unheardOf", { any: "thing" });
    await client.tell([{ file: "\u0000/%zz", type: FileChangeType.Created }]);
    const texts = [
      "\ud800\udfff\ud800",
      `${"(".repeat(20_000)}"loadmark"`,
      'import { mechanism } from "loadmark"; mechanism(',
      "`${".repeat(500),
      "\u202e\u0007\u0000loadmark",
    ];
    for (const text of texts) {
      await client.retype("robot.ts", client.text("robot.ts"), text);
      await new Promise((resolve) => setTimeout(resolve, 200));
    }
    await client.retype("robot.ts", client.text("robot.ts"), SWING_ARM);
    await client.waitForRules("robot.ts", ["stalls"]);
  });
});
