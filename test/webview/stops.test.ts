import { describe, expect, it } from "vitest";
import { nearestStop } from "../../webview/frame/cursorKeys.js";
import { stopsOf, thinned } from "../../webview/views/operatingPoint/stops.js";
import { chartIn, hoistSource } from "../support/chartFixture.js";

const chart = chartIn(hoistSource(), "tray hoist");
const stops = stopsOf(chart);

describe("stops", () => {
  it("rise, and hold every point that has a name", () => {
    for (const [index, { torqueNm }] of stops.entries()) {
      if (index > 0) expect(torqueNm).toBeGreaterThan(stops[index - 1]?.torqueNm ?? Number.NaN);
    }
    expect(stops.flatMap(({ names }) => names)).toEqual(["best efficiency", "needed", "peak output power", "standstill"]);
  });

  it("know both lines where these reach", () => {
    const needed = stops.find(({ names }) => names.includes("needed"));
    expect(needed?.available?.speedRadPerS).toBeCloseTo(chart.hardest.speedRadPerS, 9);
    expect(needed?.shareOfStall).toBeCloseTo(chart.hardest.stallShare ?? Number.NaN, 12);
    // The battery is stronger than the sheet's supply: the available line is the longer one.
    expect(stops.at(-1)?.sheet).toBeNull();
    expect(stops.at(-1)?.available).not.toBeNull();
  });

  it("reach as far as the load asks, with nothing known there", () => {
    const beyond = stopsOf(chartIn(hoistSource({ mass: "400 kg" }), "tray hoist")).at(-1);
    expect(beyond).toMatchObject({ available: null, sheet: null, names: ["needed"] });
    expect(beyond?.torqueNm).toBeCloseTo((400 * 9.80665 * 0.03) / ((54 / 16) * 0.98), 6);
  });

  it("are found by torque", () => {
    const torques = stops.map(({ torqueNm }) => torqueNm);
    expect(nearestStop(torques, -1)).toBe(0);
    expect(nearestStop(torques, 99)).toBe(stops.length - 1);
    expect(stops[nearestStop(torques, chart.hardest.torqueNm * 1.0001)]?.names).toEqual(["needed"]);
    expect(nearestStop([], 1)).toBe(-1);
  });
});

describe("a thinned table", () => {
  const rows = thinned(stops, 20);

  it("has about as many rows as asked for, in order", () => {
    expect(rows.length).toBeGreaterThanOrEqual(18);
    expect(rows.length).toBeLessThanOrEqual(28);
    expect(rows).toEqual([...rows].sort((one, other) => one.torqueNm - other.torqueNm));
  });

  it("begins at no load and drops no named point", () => {
    expect(rows[0]?.torqueNm).toBe(0);
    expect(rows.flatMap(({ names }) => names)).toEqual(stops.flatMap(({ names }) => names));
  });
});
