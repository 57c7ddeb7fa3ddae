/** The chart panel's other views from the built server: whose they are, how they follow edits, and what a probe writes. */
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import {
  CHART,
  CHART_EDITS,
  type ChartAnswer,
  type ChartEdits,
  type ChartQuestion,
  chartAnswerSchema,
  chartEditsSchema,
} from "../../extension/protocol/chartMessages.js";
import type { ShownChart, ViewName } from "../../extension/protocol/charts/views.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { buildServer } from "../support/builtServer.js";
import { type ServerClient, startServerClient } from "../support/serverClient.js";
import { FINE, gears, SWING_ARM } from "../support/swingArm.js";
import { cartSource } from "../support/viewFixture.js";

vi.setConfig({ testTimeout: 30_000 });

let server: string;
let client: ServerClient;

beforeAll(async () => {
  server = await buildServer("chartViews");
}, 60_000);
afterEach(async () => {
  expect(client.errors).toEqual([]);
  await client.stop();
});

async function start(files: Readonly<Record<string, string>>): Promise<void> {
  client = await startServerClient({ server, files });
}

function questionOf({
  caret,
  ...rest
}: Partial<Omit<ChartQuestion, "caret">> & { caret?: [file: string, text: string] }): ChartQuestion {
  const at = caret === undefined ? null : { uri: client.uri(caret[0]), ...client.at(caret[0], caret[1], 1) };
  return { mechanism: null, robot: null, want: { view: "travel" }, ...rest, caret: at };
}

async function ask(question: Parameters<typeof questionOf>[0]): Promise<ChartAnswer> {
  const answer = readMessage(chartAnswerSchema, await client.connection.sendRequest(CHART, questionOf(question)));
  if (answer === undefined) throw new Error("The answer cannot be read.");
  return answer;
}

async function shown<V extends ViewName>(view: V, question: Parameters<typeof questionOf>[0]): Promise<ShownChart<V>> {
  const answer = await ask(question);
  if (answer.kind === "nothing" || answer.view !== view) throw new Error(`There is no chart of the view ${view}.`);
  return answer as ShownChart<V>;
}

const POWER = { view: "power", span: null, cycle: "first" } as const;
const probeAt = (torqueNm: number) => ({ view: "operating-point", probe: { torqueNm } }) as const;

describe("a travel", () => {
  it("is of the mechanism at the caret, and follows an edit beside the saved one", async () => {
    await start({ "robot.ts": SWING_ARM, "gears.ts": gears(FINE) });
    await client.open("gears.ts");
    await client.open("robot.ts");
    const before = await shown("travel", { caret: ["robot.ts", "stages"] });
    expect(before.chart.mechanism).toBe("swing arm");
    await client.retype("gears.ts", `${FINE}`, `${2 * FINE}`);
    const { chart, saved } = await shown("travel", { mechanism: "swing arm" });
    expect(chart.needed[0]?.torqueNm).toBeCloseTo((before.chart.needed[0]?.torqueNm ?? Number.NaN) / 2, 9);
    expect(saved?.needed).toEqual(before.chart.needed);
  });
});

describe("a load cycle", () => {
  it("is of the robot that lists the mechanism at the caret, and follows an edit", async () => {
    await start({ "robot.ts": cartSource() });
    await client.open("robot.ts");
    const { chart, saved } = await shown("power", { caret: ["robot.ts", "quick,"], want: POWER });
    expect([chart.robot, chart.cycleS, saved]).toEqual(["cart", 7, null]);
    await client.retype("robot.ts", 'lasts: "4 s"', 'lasts: "6 s"');
    const edited = await shown("power", { robot: "cart", want: POWER });
    expect([edited.chart.cycleS, edited.saved?.cycleS]).toEqual([9, 7]);
    const part = await shown("power", { robot: "cart", want: { ...POWER, span: { fromS: 1, toS: 2 } } });
    expect(part.chart.span).toEqual({ fromS: 1, toS: 2 });
  });

  it("stays as it was while the robot cannot be computed, and says so", async () => {
    await start({ "robot.ts": cartSource() });
    await client.open("robot.ts");
    await shown("power", { want: POWER });
    await client.retype("robot.ts", 'lasts: "4 s"', "lasts: ");
    const { chart, old } = await shown("power", { robot: "cart", want: POWER });
    expect(chart.cycleS).toBe(7);
    expect(old).toMatch(/What is shown is its last result\.$/);
  });

  it("says what to write where there is no robot", async () => {
    await start({ "robot.ts": SWING_ARM, "gears.ts": gears(FINE) });
    const answer = await ask({ want: POWER });
    expect(answer).toMatchObject({ kind: "nothing", view: "power", reason: "does-not-apply" });
    expect(answer.kind === "nothing" && answer.example).toContain("mechanisms: [swing]");
  });
});

describe("a probe", () => {
  const edits = async (question: Parameters<typeof questionOf>[0]): Promise<ChartEdits | undefined> =>
    readMessage(chartEditsSchema, await client.connection.sendRequest(CHART_EDITS, questionOf(question)));

  it("is answered from the model, and written where the number stands", async () => {
    await start({ "robot.ts": SWING_ARM, "gears.ts": gears(FINE) });
    await client.open("gears.ts");
    // 1 kg · 9.80665 m/s² · 0.3 m through i and 0.98 is 0.75 N·m: i = 4, with 16 teeth driving 64.
    const torqueNm = (9.80665 * 0.3) / (0.98 * 4);
    const { probe } = await shown("operating-point", { mechanism: "swing arm", want: probeAt(torqueNm) });
    expect(probe?.change).toMatchObject({ words: "stage 1 with 16 and 64 teeth", ratio: 4 });
    expect(probe?.change?.needed.torqueNm).toBeCloseTo(torqueNm, 9);
    const found = await edits({ mechanism: "swing arm", want: probeAt(torqueNm) });
    const start2 = gears(FINE).indexOf(String(FINE));
    expect(found).toEqual([
      {
        uri: client.uri("gears.ts"),
        newText: "64",
        version: expect.any(Number),
        range: { start: { line: 0, character: start2 }, end: { line: 0, character: start2 + 2 } },
      },
    ]);
  });

  it("writes nothing where nothing is tried, or nothing carries it", async () => {
    await start({ "robot.ts": SWING_ARM, "gears.ts": gears(FINE) });
    expect(await edits({ mechanism: "swing arm", want: { view: "operating-point", probe: null } })).toBeNull();
    expect(await edits({ mechanism: "swing arm" })).toBeNull();
    expect(await edits({ mechanism: "swing arm", want: probeAt(0) })).toBeNull();
  });
});
