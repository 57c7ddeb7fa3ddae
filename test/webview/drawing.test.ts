/** The drawing against numbers worked out by hand from the declaration. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Drawing, drawChart } from "../../webview/views/operatingPoint/drawing.js";
import { chartIn, type HoistNumbers, hoistSource } from "../support/chartFixture.js";

const RPM = (2 * Math.PI) / 60;
/** 5.9 kg · 9.80665 m/s² · 30 mm at the drum, through 54 : 16 and the customary 0.98 of a spur stage. */
const NEEDED_NM = (5.9 * 9.80665 * 0.03) / ((54 / 16) * 0.98);
/** 12 V / 4.4 A in the motor and 0.1 ohm in the battery, at 12.6 V; all of the stall current gives torque. */
const STALL_A = 12.6 / (12 / 4.4 + 0.1);
const STALL_NM = (1.3 / 4.4) * STALL_A;

function draw(numbers: HoistNumbers = {}, savedNumbers?: HoistNumbers): Drawing {
  const chart = chartIn(hoistSource(numbers), "tray hoist");
  return drawChart({ chart, saved: savedNumbers ? chartIn(hoistSource(savedNumbers), "tray hoist") : null });
}

function curve({ motion, power }: Drawing, name: string, line = "available") {
  const found = [...motion.curves, ...power.curves].find((one) => one.quantity.name === name && one.line === line);
  if (found === undefined) throw new Error(`There is no curve of ${name}, ${line}.`);
  return found.points;
}

describe("the drawing", () => {
  it("spans the torque axis in N·m, with shares of stall at the same places", () => {
    const { torque, share } = draw();
    expect(torque.title).toBe("Torque at one motor's shaft (N·m)");
    expect(torque.ticks).toEqual([0, 0.25, 0.5, 0.75, 1, 1.25]);
    expect(torque.max).toBeGreaterThan(STALL_NM);
    expect(share?.ticks).toEqual([0, 25, 50, 75, 100]);
    expect((share?.max ?? Number.NaN) / 100).toBeCloseTo(torque.max / STALL_NM, 9);
  });

  it("draws the available line from no load to stall, in the units of its axes", () => {
    const drawing = draw();
    const speed = curve(drawing, "speed");
    const current = curve(drawing, "current");
    expect(drawing.motion.left.title).toBe("Speed (rpm)");
    expect(drawing.motion.right.title).toBe("Current (A)");
    expect(speed.at(-1)?.x).toBeCloseTo(STALL_NM, 9);
    expect(speed.at(-1)?.y).toBeCloseTo(0, 9);
    expect(current.at(-1)?.y).toBeCloseTo(STALL_A, 9);
    // At no load the motor asks for V = I·R + k_e·ω with I = I_0·ω/ω_0.
    const backEmf = (12 - (12 / 4.4) * 0.35) / (310 * RPM);
    const noLoad = 12.6 / (backEmf + (12 / 4.4 + 0.1) * (0.35 / (310 * RPM)));
    expect(speed[0]?.y).toBeCloseTo(noLoad / RPM, 6);
  });

  it("draws the sheet's line as the sheet says", () => {
    const drawing = draw();
    const speed = curve(drawing, "speed", "sheet");
    expect([speed[0]?.x, speed[0]?.y]).toEqual([0, expect.closeTo(310, 9)]);
    expect([speed.at(-1)?.x, speed.at(-1)?.y]).toEqual([expect.closeTo(1.3, 9), expect.closeTo(0, 9)]);
    const current = curve(drawing, "current", "sheet");
    expect([current[0]?.y, current.at(-1)?.y]).toEqual([expect.closeTo(0.35, 9), expect.closeTo(4.4, 9)]);
  });

  it("peaks in power at half of stall, and marks it", () => {
    const drawing = draw();
    const peak = drawing.power.marks.find(({ kind, quantity }) => kind === "best" && quantity.name === "power");
    expect(peak?.x).toBeCloseTo(STALL_NM / 2, 4);
    const highest = curve(drawing, "power").reduce((best, point) => (point.y > best.y ? point : best));
    expect(peak?.y).toBeGreaterThanOrEqual(highest.y * (1 - 1e-12));
  });

  it("marks what is needed on all four curves, where the curves are", () => {
    const drawing = draw();
    expect(drawing.needed).toEqual({ x: expect.closeTo(NEEDED_NM, 9), words: "needed 0.525 N·m", outside: false });
    const marks = [...drawing.motion.marks, ...drawing.power.marks].filter(({ kind }) => kind === "needed");
    expect(marks.map(({ quantity }) => quantity.name)).toEqual(["speed", "current", "power", "efficiency"]);
    for (const { quantity, x, y } of marks) {
      expect(curve(drawing, quantity.name)).toContainEqual({ x, y: expect.closeTo(y, 9) });
    }
  });

  it("hatches what lies past the peak, and beyond stall", () => {
    const { zones } = draw();
    expect(zones.map(({ kind, words }) => [kind, words])).toEqual([
      ["past-peak", "past the peak of power"],
      ["no-go", "beyond stall"],
    ]);
    expect(zones[0]?.from).toBeCloseTo(STALL_NM / 2, 9);
    expect(zones[1]?.from).toBeCloseTo(STALL_NM, 9);
  });

  it("ends at the current limit, and says so", () => {
    const { zones } = draw({ more: ' motorCurrentLimit: "3 A",' });
    expect(zones.map(({ words }) => words)).toEqual(["past the peak of power", "current limit 3 A", "beyond the current limit"]);
    // At standstill nothing of the limit goes into turning.
    expect(zones[2]?.from).toBeCloseTo((1.3 / 4.4) * 3, 9);
  });

  it("has a boundary where the protection opens in time", () => {
    const { boundaries } = draw({ more: ' protect: breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "6 s" } }),' });
    expect(boundaries.map(({ words }) => words)).toEqual(["protection may open: 2 A"]);
  });

  it("stretches the axis to a torque that stalls, but not without end", () => {
    const near = draw({ mass: "22 kg" });
    expect(near.needed.words).toMatch(/^needed 1\.96 N·m: stalls$/);
    expect(near.needed.outside).toBe(false);
    const far = draw({ mass: "400 kg" });
    expect(far.needed).toMatchObject({ words: "needed 35.6 N·m: stalls", outside: true });
    expect(far.torque.max).toBeLessThan(2 * STALL_NM);
    expect(far.motion.marks.filter(({ kind }) => kind === "needed")).toEqual([]);
  });

  it("keeps the saved result beside the new one", () => {
    const other = draw({ driven: 40 }, {});
    expect(other.wasNeeded).toEqual({ x: expect.closeTo(NEEDED_NM, 9), words: "saved: needed 0.525 N·m", outside: false });
    // Another ratio asks for another torque of the same line.
    expect(other.motion.curves.filter(({ line }) => line === "saved")).toEqual([]);
    const weaker = draw({ stallTorque: "1 N*m" }, {});
    expect(curve(weaker, "speed", "saved")).toEqual(curve(draw(), "speed"));
    expect(draw({}, {}).wasNeeded).toBeNull();
  });

  it("gives finite numbers and rising ticks for absurd declarations", () => {
    const sizes = ["0.000000001", "1", "1000000000"];
    fc.assert(
      fc.property(fc.constantFrom(...sizes), fc.constantFrom(...sizes), fc.constantFrom(...sizes), (mass, torque, volts) => {
        const drawing = draw({ mass: `${mass} kg`, stallTorque: `${torque} N*m`, openCircuit: `${volts} V` });
        checkFinite(drawing);
        for (const { ticks, max } of [drawing.torque, drawing.motion.left, drawing.motion.right, drawing.power.left]) {
          expect(max).toBeGreaterThan(0);
          expect(ticks.length).toBeGreaterThan(1);
          expect(ticks.length).toBeLessThan(12);
        }
      }),
    );
  });
});

function checkFinite(value: unknown): void {
  if (typeof value === "number") expect(Number.isFinite(value)).toBe(true);
  else if (typeof value === "object" && value !== null) for (const inner of Object.values(value)) checkFinite(inner);
}
