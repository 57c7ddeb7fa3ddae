/** Numbers for people. Expectations are written by hand. */
import { describe, expect, it } from "vitest";
import { writeIn, writeNumber, writeOthers, writeQuantity, writeShare } from "../../extension/units/write.js";

describe("writeQuantity", () => {
  it.each([
    [2.345, "torque", "2.35 N·m"],
    [0.01234, "torque", "12.3 mN·m"],
    [0, "torque", "0 N·m"],
    [-3.2, "current", "−3.2 A"],
    [0.0456, "current", "45.6 mA"],
    [Math.PI, "speed", "30 rpm"],
    [1234.5, "power", "1.23 kW"],
    [0.9999, "voltage", "1 V"],
    [Math.PI / 4, "angle", "45°"],
    [298.15, "temperature", "25 °C"],
    [0.09, "resistance", "90 mΩ"],
    [1e-9, "torque", "1e-6 mN·m"],
    [1e12, "force", "1e+9 kN"],
  ] as const)("%d as %s is %s", (si, dimension, text) => {
    expect(writeQuantity(si, dimension)).toBe(text);
  });
});

describe("writeNumber, writeShare, writeIn, writeOthers", () => {
  it("keeps three significant digits", () => {
    expect([0.0001234, 123456, 1.005, 99.96].map(writeNumber)).toEqual(["0.000123", "123000", "1", "100"]);
  });
  it("writes shares without false digits", () => {
    expect([0.583, 0.0512, 1.2, 0].map(writeShare)).toEqual(["58 %", "5.1 %", "120 %", "0 %"]);
  });
  it("writes in the unit asked for", () => {
    expect(writeIn(Math.PI / 3, "deg/s")).toBe("60°/s");
  });
  it("lists the other units of a dimension once each", () => {
    expect(writeOthers(0.112984829, "torque", "lbf*in")).toContain("0.113 N·m");
    expect(writeOthers(0.112984829, "torque", "lbf*in").filter((text) => text.includes("lbf"))).toHaveLength(1);
  });
});
