/** Sensitivities against the derivatives of the closed forms. */
import { describe, expect, it } from "vitest";
import { sensitivitiesOf } from "../../extension/analysis/sensitivity.js";
import { analyseFixture, PRELUDE } from "../support/checkFindings.js";

/** The named sensitivities of the fixture's only mechanism. */
function sensitivityIn(text: string): (input: string, output: string) => number | undefined {
  const analysis = analyseFixture(text);
  const [mechanism] = analysis.mechanisms;
  if (mechanism === undefined) throw new Error("no mechanism");
  const all = sensitivitiesOf(analysis, mechanism);
  return (input, output) => all.find((one) => one.input === input && one.output === output)?.perCentPerPerCent;
}

describe("sensitivities", () => {
  const hoist = `${PRELUDE}
const pack = battery({ openCircuit: "12 V", resistance: "1 ohm" });
export const hoist = mechanism("hoist", {
  motor: twelveVolt,
  stages: [spur(20, 40, { efficiency: 0.9 })],
  load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "1 m" }),
  supply: pack,
});`;

  // T = m·g·r/(N·η), T_stall = k_t·V/(R + R_b), R = V_s/I_s: the share is a product of powers.
  it("are the exponents where the result is a product of powers", () => {
    const of = sensitivityIn(hoist);
    expect(of("load.mass", "share")).toBeCloseTo(1, 5);
    expect(of("load.drumRadius", "share")).toBeCloseTo(1, 5);
    expect(of("stages[0].efficiency", "share")).toBeCloseTo(-1, 5);
    expect(of("supply.openCircuit", "share")).toBeCloseTo(-1, 5);
    // −d ln T_stall/d ln R_b = R_b/(R + R_b) = 1/4.
    expect(of("supply.resistance", "share")).toBeCloseTo(0.25, 5);
    expect(of("motor.stall.torque", "share")).toBeCloseTo(-1, 5);
  });

  it("take teeth by one up and down", () => {
    const of = sensitivityIn(hoist);
    expect(of("stages[0].driven", "share")).toBeCloseTo(-1, 9);
    expect(of("stages[0].driver", "share")).toBeCloseTo(1, 9);
  });

  it("leave out what has no effect and put the strongest first", () => {
    const analysis = analyseFixture(hoist);
    const [mechanism] = analysis.mechanisms;
    const all = mechanism === undefined ? [] : sensitivitiesOf(analysis, mechanism);
    expect(all.some(({ input, output }) => input === "load.travel" && output === "share")).toBe(false);
    const sizes = all.map(({ perCentPerPerCent }) => Math.round(Math.abs(perCentPerPerCent) * 1e4));
    expect(sizes).toEqual([...sizes].sort((a, b) => b - a));
    expect(all.some(({ output }) => output === "time")).toBe(true);
  });

  it("reach the supply of the robot", () => {
    const of = sensitivityIn(`${hoist.replace("  supply: pack,\n", "").replace("battery,", "battery, robot,")}
robot("one", { supply: pack, mechanisms: [hoist] });`);
    expect(of("supply.openCircuit", "share")).toBeCloseTo(-1, 5);
  });

  /** Every number of this text is written once. */
  const heatedArm = `${PRELUDE}
const warm = motor({
  voltage: "12.1 V",
  noLoad: { speed: "137 rpm", current: "0.31 A" },
  stall: { torque: "2.9 N*m", current: "4.7 A" },
  thermal: { windingToHousing: "3.3 K/W", housingToAmbient: "9.1 K/W", windingTime: "4.4 s", housingTime: "310 s", limit: "131 degC" },
});
export const reach = mechanism("reach", {
  motor: warm,
  stages: [spur(20, 80, { efficiency: 0.93, inertia: "15 kg*cm^2" })],
  load: arm({ mass: "2.2 kg", centreOfMass: "0.27 m", from: "-40 deg", to: "55 deg" }),
  within: "7 s",
  motorCurrentLimit: "4.5 A",
  ramp: "0.21 s",
  protect: breaker({ holdCurrent: "2.6 A", trips: { at: "5.2 A", after: "6.6 s" } }),
  supply: battery({ openCircuit: "12.7 V", resistance: "92 mohm", mustStayAbove: "9.6 V" }),
});`;

  it.each([
    ["motor.voltage", "12.1 V"],
    ["motor.noLoad.speed", "137 rpm"],
    ["motor.noLoad.current", "0.31 A"],
    ["motor.stall.torque", "2.9 N*m"],
    ["motor.stall.current", "4.7 A"],
    ["motor.thermal.windingToHousing", "3.3 K/W"],
    ["motor.thermal.windingTime", "4.4 s"],
    ["motor.thermal.limit", "131 degC"],
    ["stages[0].inertia", "15 kg*cm^2"],
    ["load.mass", "2.2 kg"],
    ["load.centreOfMass", "0.27 m"],
    ["load.from", "-40 deg"],
    ["load.to", "55 deg"],
    ["within", "7 s"],
    ["motorCurrentLimit", "4.5 A"],
    ["ramp", "0.21 s"],
    ["protect.holdCurrent", "2.6 A"],
    ["protect.trips.after", "6.6 s"],
    ["supply.openCircuit", "12.7 V"],
    ["supply.resistance", "92 mohm"],
    ["supply.mustStayAbove", "9.6 V"],
  ])("of %s are what writing another number gives", (input, written) => {
    const [digits = "", unit = ""] = written.split(" ");
    const numbersWith = (factor: number) => {
      const text = heatedArm.replace(`"${written}"`, `"${Number(digits) * factor} ${unit}"`);
      const numbers = analyseFixture(text).mechanisms[0]?.numbers;
      if (numbers === undefined) throw new Error(`no numbers with ${input} times ${factor}`);
      return { current: numbers.hardest.motorCurrentA, share: numbers.hardest.stallShare ?? 0, time: numbers.travel?.timeS ?? 0 };
    };
    const of = sensitivityIn(heatedArm);
    const [low, high] = [numbersWith(0.995), numbersWith(1.005)];
    for (const output of ["current", "share", "time"] as const) {
      const expected = Math.log(high[output] / low[output]) / Math.log(1.005 / 0.995);
      expect(of(input, output) ?? 0, output).toBeCloseTo(Math.abs(expected) < 1e-4 ? 0 : expected, 3);
    }
  });
});
