/** Charts from the built server: which mechanism, how it follows edits, and what stands beside it. */
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import type { Position } from "vscode-languageserver/node";
import { CHART, CHART_MAY_DIFFER, type ChartAnswer, chartAnswerSchema } from "../../extension/protocol/chartMessages.js";
import type { ShownChart } from "../../extension/protocol/charts/views.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { buildServer } from "../support/builtServer.js";
import { type ServerClient, startServerClient } from "../support/serverClient.js";
import { FINE, gears, PAST_PEAK, STALLS, SWING_ARM } from "../support/swingArm.js";

vi.setConfig({ testTimeout: 30_000 });

let server: string;
let client: ServerClient;

beforeAll(async () => {
  server = await buildServer("chart");
}, 60_000);
afterEach(async () => {
  expect(client.errors).toEqual([]);
  await client.stop();
});

/** 1 kg · 9.80665 m/s² · 0.3 m through `driven` : 16 teeth and the customary 0.98 of a spur stage. */
const neededNm = (driven: number, massKg = 1) => (massKg * 9.80665 * 0.3) / ((driven / 16) * 0.98);

const LIGHT_ARM = SWING_ARM.replace('"swing arm"', '"light arm"')
  .replace("export const swing", "export const light")
  .replace('mass: "1 kg"', 'mass: "0.2 kg"');

async function start(files: Readonly<Record<string, string>>): Promise<void> {
  client = await startServerClient({ server, files });
}

async function ask(caret: { file: string; at: Position } | null, mechanism: string | null = null): Promise<ChartAnswer> {
  const question = {
    caret: caret && { uri: client.uri(caret.file), ...caret.at },
    mechanism,
    robot: null,
    want: { view: "operating-point", probe: null },
  };
  const answer = readMessage(chartAnswerSchema, await client.connection.sendRequest(CHART, question));
  if (answer === undefined) throw new Error("The answer cannot be read.");
  return answer;
}

async function chartAt(file: string, text: string, mechanism: string | null = null): Promise<ShownChart<"operating-point">> {
  return shown(await ask({ file, at: client.at(file, text, 1) }, mechanism));
}

function shown(answer: ChartAnswer): ShownChart<"operating-point"> {
  if (answer.kind === "nothing") throw new Error(`There is no chart: ${answer.reason}.`);
  if (answer.view !== "operating-point") throw new Error(`It is another view: ${answer.view}.`);
  return answer;
}

const robot = (driven: number) => ({ "robot.ts": SWING_ARM, "light.ts": LIGHT_ARM, "gears.ts": gears(driven) });

describe("a chart", () => {
  it("is of the mechanism at the caret, else of the one that is shown, else of one in the file", async () => {
    await start(robot(FINE));
    await client.open("light.ts");
    await client.open("robot.ts");
    expect((await chartAt("robot.ts", "stages")).chart.mechanism).toBe("swing arm");
    expect((await chartAt("light.ts", "stages", "swing arm")).chart.mechanism).toBe("light arm");
    expect((await chartAt("light.ts", "import", "swing arm")).chart.mechanism).toBe("swing arm");
    expect((await chartAt("robot.ts", "import")).chart.mechanism).toBe("swing arm");
    expect((await chartAt("light.ts", "import")).chart.mechanism).toBe("light arm");
    expect(shown(await ask(null, "light arm")).chart.mechanism).toBe("light arm");
  });

  it("has what the load needs, and the finding", async () => {
    await start(robot(PAST_PEAK));
    const { chart, old, saved } = shown(await ask(null, "swing arm"));
    expect(chart.hardest.torqueNm).toBeCloseTo(neededNm(PAST_PEAK), 9);
    expect(chart.findings.map(({ rule, level }) => [rule, level])).toContainEqual(["past-peak", "warning"]);
    expect([old, saved]).toEqual([null, null]);
  });

  it("follows an edit in another file, with the saved one beside it until that is saved too", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    expect((await chartAt("gears.ts", "export", "swing arm")).saved).toBeNull();
    await client.retype("gears.ts", `${FINE}`, `${PAST_PEAK}`);
    const edited = await chartAt("gears.ts", "export", "swing arm");
    expect(edited.chart.hardest.torqueNm).toBeCloseTo(neededNm(PAST_PEAK), 9);
    expect(edited.saved?.hardest.torqueNm).toBeCloseTo(neededNm(FINE), 9);
    await client.save("gears.ts");
    await expect.poll(async () => (await chartAt("gears.ts", "export", "swing arm")).saved).toBeNull();
    await client.retype("gears.ts", `${PAST_PEAK}`, `${STALLS}`);
    const again = await chartAt("gears.ts", "export", "swing arm");
    expect(again.saved?.hardest.torqueNm).toBeCloseTo(neededNm(PAST_PEAK), 9);
    expect(again.chart.hardest).toMatchObject({ stalls: true, speedRadPerS: 0 });
  });

  it("has no saved one beside it where the unsaved text comes to the same", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    await client.retype("gears.ts", `${FINE}`, `${FINE / 2} * 2`);
    const { saved, chart } = await chartAt("gears.ts", "export", "swing arm");
    expect(saved).toBeNull();
    expect(chart.hardest.torqueNm).toBeCloseTo(neededNm(FINE), 9);
  });

  it("stays while a value is missing, and says why it is old", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    await chartAt("gears.ts", "export", "swing arm");
    await client.retype("gears.ts", `= ${FINE}`, "= ");
    const broken = await chartAt("gears.ts", "export", "swing arm");
    expect(broken.chart.hardest.torqueNm).toBeCloseTo(neededNm(FINE), 9);
    expect(broken.old).toMatch(/What is shown is its last result\.$/);
    await client.retype("gears.ts", "= ", `= ${PAST_PEAK}`);
    const mended = await chartAt("gears.ts", "export", "swing arm");
    expect(mended.old).toBeNull();
    expect(mended.chart.hardest.torqueNm).toBeCloseTo(neededNm(PAST_PEAK), 9);
  });

  it("stays while the code does not declare the mechanism, even if it was not asked for before", async () => {
    await start(robot(FINE));
    await client.open("robot.ts");
    await client.waitForRules("robot.ts", []);
    await client.retype("robot.ts", "mechanism(", "mechanis(");
    const gone = await chartAt("robot.ts", "import", "swing arm");
    expect(gone.chart.mechanism).toBe("swing arm");
    expect(gone.old).toContain("does not declare this mechanism");
  });

  it("is absent, with what to do, where nothing is declared or nothing can be computed", async () => {
    await start({ "robot.ts": 'import { motor } from "loadmark";\n' });
    expect(await ask(null)).toMatchObject({ kind: "nothing", reason: "nothing-declared" });
    await client.write("gears.ts", "export const DRIVEN = ;\n");
    await client.write("robot.ts", SWING_ARM);
    await expect.poll(() => ask(null)).toMatchObject({ kind: "nothing", reason: "nothing-computed" });
  });

  it("may differ after each result, which the client is told", async () => {
    await start(robot(FINE));
    await client.open("gears.ts");
    await client.waitForRules("gears.ts", []);
    await ask(null, "swing arm");
    const told = () => client.said.filter(({ method }) => method === CHART_MAY_DIFFER).length;
    const before = told();
    await client.retype("gears.ts", `${FINE}`, `${FINE + 1}`);
    await expect.poll(told).toBeGreaterThan(before);
  });

  it("is refused to a question that cannot be read", async () => {
    await start(robot(FINE));
    expect(await client.connection.sendRequest(CHART, { caret: "here" })).toBeNull();
  });
});
