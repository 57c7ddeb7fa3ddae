/** What the page hands out to be saved. */
import { describe, expect, it } from "vitest";
import { pageMessageSchema } from "../../extension/protocol/chartMessages.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { fileNameOf } from "../../webview/fileName.js";
import { csvOf } from "../../webview/frame/csv.js";
import { fileOf } from "../../webview/views/operatingPoint/csv.js";
import { stopsOf } from "../../webview/views/operatingPoint/stops.js";
import { chartIn, hoistSource } from "../support/chartFixture.js";

describe("the numbers as CSV", () => {
  const chart = chartIn(hoistSource(), "tray hoist");
  const lines = csvOf(fileOf(stopsOf(chart), "metric")).split("\r\n");
  const [header = "", ...rows] = lines.slice(0, -1);

  it("name each column with its unit", () => {
    expect(header).toBe(
      "Torque (N*m),Share of stall torque (%),Speed (rpm),Current (A),Output power (W),Efficiency (%)," +
        "Speed by the sheet (rpm),Current by the sheet (A),Output power by the sheet (W),Efficiency by the sheet (%),Point",
    );
  });

  it("have a row for every point, each with as many cells, and end with a line break", () => {
    expect(rows).toHaveLength(stopsOf(chart).length);
    for (const row of rows) expect(row.split(",")).toHaveLength(11);
    expect(lines.at(-1)).toBe("");
  });

  it("hold the numbers to ten digits", () => {
    const needed =
      rows
        .find((row) => row.endsWith(",needed"))
        ?.split(",")
        .map(Number) ?? [];
    const { torqueNm, speedRadPerS, currentA, shaftPowerW, efficiency } = chart.hardest;
    const rpm = (speedRadPerS * 60) / (2 * Math.PI);
    const expected = [torqueNm, (chart.hardest.stallShare ?? 0) * 100, rpm, currentA, shaftPowerW, (efficiency ?? 0) * 100];
    for (const [index, value] of expected.entries()) expect((needed[index] ?? Number.NaN) / value).toBeCloseTo(1, 9);
  });

  it("leave empty what a line does not reach", () => {
    expect(rows.at(-1)).toMatch(/,,,,,standstill$/);
  });
});

describe("the name of a file", () => {
  it.each([
    ["tray hoist", "tray-hoist-operating-point.png"],
    ["../../etc/passwd", "etc-passwd-operating-point.png"],
    ["C:\\aux<>|?*", "C-aux-operating-point.png"],
    ["", "unnamed-operating-point.png"],
    ["\u202e\u0000", "unnamed-operating-point.png"],
    ["Förderband 2", "Förderband-2-operating-point.png"],
    ["רובוט", "רובוט-operating-point.png"],
  ])("of %j is %s", (mechanism, name) => {
    expect(fileNameOf(mechanism, "operating-point", "png")).toBe(name);
  });

  it("is taken by the host, however long or odd the mechanism's", () => {
    for (const mechanism of ["x".repeat(9999), "𝔘".repeat(300), "a/b", ".", "..", "e\u0301".repeat(99), "🤖"]) {
      const message = { type: "saveTable", fileName: fileNameOf(mechanism, "operating-point", "csv"), csv: "" };
      expect(readMessage(pageMessageSchema, message), mechanism.slice(0, 9)).toEqual(message);
    }
  });
});
