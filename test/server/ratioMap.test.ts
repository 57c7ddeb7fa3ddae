/** The ratio map from the built server: worked out when asked for, stopped by an edit, and written into the code. */
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { CHART, CHART_EDITS, chartAnswerSchema, chartEditsSchema } from "../../extension/protocol/chartMessages.js";
import type { ShownChart } from "../../extension/protocol/charts/views.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { buildServer } from "../support/builtServer.js";
import { type ServerClient, startServerClient } from "../support/serverClient.js";
import { FINE, gears, PAST_PEAK, SWING_ARM } from "../support/swingArm.js";

vi.setConfig({ testTimeout: 30_000 });

let server: string;
let client: ServerClient;

beforeAll(async () => {
  server = await buildServer("ratioMap");
}, 60_000);
afterEach(async () => {
  expect(client.errors).toEqual([]);
  await client.stop();
});

const question = (write: { mechanism: string; ratio: number } | null = null) => ({
  caret: null,
  mechanism: "swing arm",
  robot: null,
  want: { view: "ratio-map", write },
});

/** `undefined` where the server stopped its work. */
async function ask(): Promise<ShownChart<"ratio-map"> | undefined> {
  const message = await client.connection.sendRequest(CHART, question());
  if (message === null) return undefined;
  const answer = readMessage(chartAnswerSchema, message);
  if (answer?.kind !== "chart" || answer.view !== "ratio-map") throw new Error(`There is no map: ${JSON.stringify(answer)}`);
  return answer;
}

describe("the server's ratio map", () => {
  it("is of the code as it stands, beside the saved one", async () => {
    client = await startServerClient({ server, files: { "robot.ts": SWING_ARM, "gears.ts": gears(FINE) } });
    await client.open("gears.ts");
    await client.waitForRules("robot.ts", []);
    expect(await ask()).toMatchObject({ chart: { now: { ratio: FINE / 16, breaks: [] } }, saved: null });
    await client.retype("gears.ts", `${FINE}`, `${PAST_PEAK}`);
    await client.waitForRules("robot.ts", ["past-peak"]);
    const edited = await ask();
    expect(edited?.chart.now).toMatchObject({ ratio: PAST_PEAK / 16, breaks: ["Past its peak of power"] });
    expect(edited?.saved?.now.ratio).toBe(FINE / 16);
  });

  it("takes an edit that is made meanwhile, and answers the next question about it", async () => {
    client = await startServerClient({ server, files: { "robot.ts": SWING_ARM, "gears.ts": gears(FINE) } });
    await client.open("gears.ts");
    await client.waitForRules("robot.ts", []);
    const first = ask();
    await client.retype("gears.ts", `${FINE}`, `${PAST_PEAK}`);
    await first;
    await client.waitForRules("robot.ts", ["past-peak"]);
    expect((await ask())?.chart.now.ratio).toBe(PAST_PEAK / 16);
  });

  it("writes a ratio where the gears are declared, and that mends the finding", async () => {
    client = await startServerClient({ server, files: { "robot.ts": SWING_ARM, "gears.ts": gears(PAST_PEAK) } });
    await client.open("gears.ts");
    await client.waitForRules("robot.ts", ["past-peak"]);
    const fastest = (await ask())?.chart.toWrite.fastest;
    if (fastest == null) throw new Error("nothing can be written");
    const message = await client.connection.sendRequest(CHART_EDITS, question({ mechanism: "swing arm", ratio: fastest.ratio }));
    const edits = readMessage(chartEditsSchema, message) ?? [];
    expect(new Set(edits.map(({ uri }) => uri))).toContain(client.uri("gears.ts"));
    for (const { uri, range, newText } of edits) {
      const file = uri === client.uri("gears.ts") ? "gears.ts" : "robot.ts";
      if (file === "robot.ts") await client.open("robot.ts");
      const line = client.text(file).split("\n")[range.start.line] ?? "";
      const changed = line.slice(0, range.start.character) + newText + line.slice(range.end.character);
      await client.retype(file, line, changed);
    }
    await client.waitForRules("robot.ts", []);
  });
});
