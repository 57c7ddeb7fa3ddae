/** What a terminal is told of feedforward voltages and of the hot winding. */
import { describe, expect, it } from "vitest";
import { tellFeedforward } from "../../extension/report/feedforwardWords.js";
import { writeText } from "../../extension/report/text.js";
import { analyseFixture, PRELUDE } from "../support/checkFindings.js";

describe("feedforward voltages in words", () => {
  const all = { holdLoadV: 2.4, holdLoadSupplyShare: 0.21, voltsPerRadPerS: 0.35, voltsPerRadPerS2: 0.012, frictionV: 0.6 };

  it("name what each is for, with its unit", () => {
    expect(tellFeedforward(all)).toBe(
      "at the output shaft: 2.4 V (21 % of the supply) holds the load, 600 mV against friction, 0.35 V per rad/s, 0.012 V per rad/s²",
    );
  });

  it("leave out what is nothing, and a share that no command gives", () => {
    expect(tellFeedforward({ ...all, holdLoadV: null, holdLoadSupplyShare: null, frictionV: 0 })).toBe(
      "at the output shaft: 0.35 V per rad/s, 0.012 V per rad/s²",
    );
    expect(tellFeedforward({ ...all, holdLoadSupplyShare: null })).toContain("2.4 V holds the load");
  });
});

describe("a mechanism in the terminal", () => {
  const hoist = (thermal: string) => `${PRELUDE}
const warm = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" }, ${thermal} });
export const hoist = mechanism("hoist", {
  motor: warm, stages: [reduction(1)], holdFor: "100 h",
  load: lift({ mass: "2 kg", drumRadius: "25 mm", travel: "10 mm" }),
});`;
  const told = (text: string): string => writeText(analyseFixture(text), (file) => file);

  it("is told hot and cold where its motor has thermal data", () => {
    const heat =
      'thermal: { windingToHousing: "4 K/W", housingToAmbient: "8 K/W", windingTime: "20 s", housingTime: "300 s", limit: "130 degC" }';
    // Held for ever: I = T/k_t, T = 25 + 12·I²·3·(1 + α·(T − 25)); stall torque falls as copper's resistance grows.
    const needed = 2 * 9.80665 * 0.025;
    const [amperes, growth] = [needed / (2 / 4), 0.00393 / (1 + 0.00393 * 5)];
    const cold = 12 * amperes ** 2 * 3;
    const riseK = cold / (1 - cold * growth);
    // The customary efficiency of a reduction is 0.95.
    const share = (needed / 0.95 / 2) * (1 + growth * riseK);
    expect(told(hoist(heat))).toContain(
      `\n  hot          ${Math.round(share * 100)} % of what is then left at stall, winding ${Number((25 + riseK).toPrecision(3))} °C\n`,
    );
    expect(told(hoist('rotorInertia: "1 g*m^2"'))).not.toContain("\n  hot ");
  });

  it("is told its feedforward voltages", () => {
    // Held: T·R/k_t = 0.4903·3/0.5; k_e + R·I_0/ω_0 is V/ω_0 where the loss grows with speed: 12 V at 100 rpm.
    const volts = (2 * 9.80665 * 0.025 * 3) / 0.5;
    const perSpeed = 12 / ((100 * Math.PI) / 30);
    expect(told(hoist(""))).toContain(
      `\n  feedforward  at the output shaft: ${volts.toPrecision(3)} V (${Math.round((volts / 12) * 100)} % of the supply) holds the load, ${perSpeed.toPrecision(3)} V per rad/s`,
    );
  });
});
