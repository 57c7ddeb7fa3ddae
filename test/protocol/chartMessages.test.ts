import { describe, expect, it } from "vitest";
import type { OperatingPointChart as ComputedChart } from "../../extension/features/charts/operatingPoint.js";
import { chartMemorySchema, NO_MEMORY } from "../../extension/protocol/chartMemory.js";
import {
  chartAnswerSchema,
  chartQuestionSchema,
  hostMessageSchema,
  pageMessageSchema,
} from "../../extension/protocol/chartMessages.js";
import type { OperatingPointChart } from "../../extension/protocol/charts/operatingPoint.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { chartIn, hoistSource, shownChart } from "../support/chartFixture.js";
import { cartSource, powerShown, travelShown } from "../support/viewFixture.js";

const WANT = { view: "operating-point", probe: null };
const chart = chartIn(hoistSource(), "tray hoist");

/** Fails to compile where a computed chart is not what travels. */
const travels: (computed: ComputedChart) => OperatingPointChart = (computed) => computed;

describe("a chart on its way", () => {
  it("arrives as it was computed", () => {
    const message = { type: "show", answer: shownChart(chart, { saved: travels(chart as ComputedChart), old: "A reason." }) };
    expect(readMessage(hostMessageSchema, JSON.parse(JSON.stringify(message)))).toEqual(message);
  });

  it.each([
    ["NaN", Number.NaN],
    ["Infinity", Number.POSITIVE_INFINITY],
    ["a text", "1"],
    ["nothing", undefined],
  ])("is refused with %s among its numbers", (_what, value) => {
    const samples = chart.samples.map((sample, index) => (index === 3 ? { ...sample, torqueNm: value } : sample));
    expect(readMessage(chartAnswerSchema, shownChart({ ...chart, samples } as never))).toBeUndefined();
  });

  it("is refused with a level or a limit that there isn't", () => {
    const findings = [{ rule: "stalls", level: "fatal", message: "" }];
    expect(readMessage(chartAnswerSchema, shownChart({ ...chart, findings } as never))).toBeUndefined();
    const hardest = { ...chart.hardest, limitedBy: "magic" };
    expect(readMessage(chartAnswerSchema, shownChart({ ...chart, hardest } as never))).toBeUndefined();
  });
});

describe("a chart of another view on its way", () => {
  it("arrives as it was computed, and is refused with a series that is too short or no number", () => {
    const power = powerShown(cartSource(), "cart");
    expect(readMessage(chartAnswerSchema, JSON.parse(JSON.stringify(power)))).toEqual(power);
    const travel = travelShown(cartSource(), "tray hoist");
    expect(readMessage(chartAnswerSchema, JSON.parse(JSON.stringify(travel)))).toEqual(travel);
    const { chart } = travel;
    for (const currentA of [chart.currentA.slice(1), chart.currentA.map(() => Number.NaN), chart.currentA.map(String), null]) {
      expect(readMessage(chartAnswerSchema, { ...travel, chart: { ...chart, currentA } })).toBeUndefined();
      expect(readMessage(chartAnswerSchema, { ...power, chart: { ...power.chart, currentA } })).toBeUndefined();
    }
  });
});

describe("messages that are not known", () => {
  it.each([
    undefined,
    null,
    7,
    "show",
    [],
    {},
    { type: "hide" },
    { type: "show" },
    { type: "show", answer: { kind: "chart" } },
    { type: "show", answer: { kind: "nothing", view: "operating-point", reason: "<b>no</b>", says: [], example: null } },
    { type: "open", view: "elsewhere" },
  ])("are dropped by the page: %j", (message) => {
    expect(readMessage(hostMessageSchema, message)).toBeUndefined();
  });

  it.each([
    undefined,
    { type: "run", command: "workbench.action.quit" },
    { type: "ready" },
    { type: "ready", mechanism: 7, robot: null, want: WANT },
    { type: "ready", mechanism: null, robot: null, want: { view: "elsewhere" } },
    { type: "ask" },
    { type: "savePicture", fileName: "a.png", base64: "not base64!" },
    { type: "savePicture", fileName: "a.png", base64: "abc" },
    { type: "savePicture", fileName: "../a.png", base64: "" },
    { type: "saveTable", fileName: "/etc/passwd", csv: "" },
    { type: "savePage", fileName: "../a.html", html: "" },
    { type: "savePage", fileName: "a.exe", html: "" },
    { type: "chooseUnits", units: "furlongs" },
    { type: "writeToCode" },
    { type: "writeToCode", want: { view: "operating-point", probe: { torqueNm: Number.NaN } } },
    { type: "ask", want: { view: "power", span: { fromS: 0 }, cycle: "first" } },
    { type: "saveTable", fileName: "a.sh", csv: "" },
    { type: "saveTable", fileName: "a\\b.csv", csv: "" },
    { type: "trouble", what: "x".repeat(2001) },
  ])("are dropped by the host: %j", (message) => {
    expect(readMessage(pageMessageSchema, message)).toBeUndefined();
  });

  it("are dropped by the server", () => {
    for (const message of [
      undefined,
      {},
      { caret: null },
      { caret: { uri: "file:///a", line: -1, character: 0 }, mechanism: null, robot: null, want: WANT },
      { caret: null, mechanism: null, robot: null, want: { view: "elsewhere" } },
    ]) {
      expect(readMessage(chartQuestionSchema, message)).toBeUndefined();
    }
  });
});

describe("a picture of several megabytes", () => {
  it("passes the check without running out of stack", () => {
    const message = { type: "savePicture", fileName: "a.png", base64: "AbC/".repeat(4_000_000) };
    expect(readMessage(pageMessageSchema, message)).toBeDefined();
  });
});

describe("what the page remembers", () => {
  it("is read as it was kept, and nothing where it is not that", () => {
    expect(readMessage(chartMemorySchema, NO_MEMORY)).toEqual(NO_MEMORY);
    const memory = { ...NO_MEMORY, mechanism: "hoist", tableOpen: true };
    expect(readMessage(chartMemorySchema, memory)).toEqual(memory);
    const views = { ...NO_MEMORY.views, "operating-point": { cursor: "far" } };
    for (const state of [undefined, {}, { ...memory, view: "elsewhere" }, { ...memory, views }])
      expect(readMessage(chartMemorySchema, state)).toBeUndefined();
  });
});
