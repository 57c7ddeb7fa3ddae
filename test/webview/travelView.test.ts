/** The view of a travel as data and words: over time, over position, and where nothing moves. */
import { describe, expect, it } from "vitest";
import { drawTravel, wholeSpan } from "../../webview/views/travel/drawings.js";
import { momentsOf, positionAt } from "../../webview/views/travel/moments.js";
import { travelView } from "../../webview/views/travel/view.js";
import { cartSource, travelShown } from "../support/viewFixture.js";

const shown = travelShown(cartSource(), "tray hoist");
const { chart } = shown;
const boom = travelShown(cartSource(), "boom");
const memory = { over: "time", cursor: null, span: null } as const;
const sheet = travelView.sheet(shown, memory, "metric");

const stuck = travelShown(cartSource().replace('mass: "5.9 kg"', 'mass: "59 kg"'), "tray hoist");

describe("the sheet of a travel", () => {
  it("has the reported time, and what was allowed", () => {
    const fact = (name: string) => sheet.facts.find((one) => one.name === name)?.now;
    expect(fact("Travel time")).toBe(`${Number((chart.numbers.timeS ?? 0).toPrecision(3))} s`);
    expect(fact("Within")).toBe("5 s");
    expect(fact("Hold")).toMatch(/^1\.74 A for 10 s, winding at its limit after 9\.28 s$/);
  });

  it("marks the arrival and the time allowed, and draws the hold after it", () => {
    const { torque, current } = drawTravel(chart, null, { over: "time", ...wholeSpan(chart, "time") }, "metric");
    expect(current.uprights.map(({ words, kind }) => [words, kind])).toEqual([
      ["arrives, 4.18 s", "event"],
      ["within 5 s", "due"],
    ]);
    const hold = torque.lines.find(({ name }) => name === "holds");
    expect(hold?.xs[0]).toBeCloseTo(chart.timesS.at(-1) ?? Number.NaN, 9);
    expect(hold?.ys[0]).toBeCloseTo((5.9 * 9.80665 * 0.03) / (54 / 16), 9);
    expect(torque.levels[0]?.y).toBeCloseTo(chart.stallTorqueNm, 9);
  });

  it("goes over position from end to end, rising, also on the way back", () => {
    const { stops, across } = travelView.sheet(boom, { ...memory, over: "position" }, "metric");
    expect(across).toBe("Position");
    expect(stops).toEqual([...stops].sort((one, other) => one - other));
    expect(stops[0]).toBeCloseTo((-40 * Math.PI) / 180, 3);
    expect(stops.at(-1)).toBeCloseTo((80 * Math.PI) / 180, 9);
    expect(wholeSpan(boom.chart, "position").from).toBeCloseTo((-40 * Math.PI) / 180, 9);
  });

  it("reads off all values, in the units chosen", () => {
    const last = sheet.stops.length - 1;
    expect(sheet.readAt(last)).toMatchObject({
      at: "4.18 s, 700 mm",
      names: "arrives, 4.18 s",
      head: ["Needed", "Given", "Current", "Speed", "Supply", "Winding"],
    });
    const inch = travelView.sheet(shown, memory, "inch");
    expect(inch.readAt(last).at).toBe("4.18 s, 2.3 ft");
    expect(inch.readAt(last).rows[0]?.cells[0]).toMatch(/lbf·in$/);
    const si = travelView.sheet(boom, memory, "si");
    expect(si.readAt(0).at).toMatch(/^0 s, 1\.4 rad$/);
  });

  it("writes every moment to a file, with names, units and events", () => {
    const { head, rows } = sheet.file();
    expect(head).toEqual([
      "Time (s)",
      "Position (m)",
      "Torque needed (N*m)",
      "Torque given (N*m)",
      "Current (A)",
      "Speed of the load (m/s)",
      "Supply current (A)",
      "Supply voltage (V)",
      "Winding (degC)",
      "Event",
    ]);
    expect(rows.at(-1)?.at(-1)).toContain("arrives");
    expect(Number(rows.at(-1)?.[1])).toBeCloseTo(0.7, 6);
  });

  it("keeps what is needed where a stalled motor never gets, over position alone", () => {
    const { plots, across, choices, stops, readAt } = travelView.sheet(stuck, memory, "metric");
    expect([plots.length, across, choices]).toEqual([1, "Position", []]);
    expect(stops.length).toBeGreaterThan(10);
    expect(readAt(3)).toMatchObject({ at: expect.stringContaining("never there") });
    expect(readAt(3).rows[0]?.cells.slice(1, 4)).toEqual(["–", "–", "–"]);
  });

  it("forgets cursor and zoom where what lies across changes", () => {
    expect(travelView.chosen?.("over", "position")).toEqual({ over: "position", cursor: null, span: null });
    expect(momentsOf(chart, "time").every(({ timeS }) => timeS !== null)).toBe(true);
  });

  it("finds the place of a moment between two that were computed", () => {
    const made = { ...chart, timesS: [0, 2], positions: [1, 5] };
    expect([-1, 0, 0.5, 2, 3].map((timeS) => positionAt(made, timeS))).toEqual([1, 1, 2, 5, 5]);
  });
});
