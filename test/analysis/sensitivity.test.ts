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
    const sizes = all.map(({ perCentPerPerCent }) => Math.abs(perCentPerPerCent));
    expect(sizes).toEqual([...sizes].sort((a, b) => b - a));
    expect(all.some(({ output }) => output === "time")).toBe(true);
  });

  it("reach the supply of the robot", () => {
    const of = sensitivityIn(`${hoist.replace("  supply: pack,\n", "").replace("battery,", "battery, robot,")}
robot("one", { supply: pack, mechanisms: [hoist] });`);
    expect(of("supply.openCircuit", "share")).toBeCloseTo(-1, 5);
  });
});
