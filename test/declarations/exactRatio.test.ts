/** Exact ratios against worked gear trains. */
import { describe, expect, it } from "vitest";
import { exactRatio } from "../../extension/declarations/exactRatio.js";
import { lift, mechanism, motor, planetary, reduction, spur, worm } from "../../extension/declarations/index.js";

describe("exact ratios", () => {
  it("are fractions in lowest terms", () => {
    expect(exactRatio([spur(16, 40)])).toEqual({ numerator: 5, denominator: 2 });
    // 975 rpm through 20/50, 25/75 and 26/65 is 52 rpm (R. S. Khurmi, Theory of Machines, ex. 13.1): 75/4.
    expect(exactRatio([spur(20, 50), spur(25, 75), spur(26, 65)])).toEqual({ numerator: 75, denominator: 4 });
    // Sun 20, ring 80 fixed: 1 + 80/20 (Shigley, ex. 13-6).
    expect(exactRatio([planetary(20, 80)])).toEqual({ numerator: 5, denominator: 1 });
    expect(exactRatio([worm(3, 52, { leadAngle: "10 deg" })])).toEqual({ numerator: 52, denominator: 3 });
    expect(exactRatio([])).toEqual({ numerator: 1, denominator: 1 });
  });

  it("are unknown behind a plain ratio, and where whole numbers end", () => {
    expect(exactRatio([spur(16, 40), reduction(2.5)])).toBeUndefined();
    expect(exactRatio(Array.from({ length: 12 }, () => spur(9973, 99_991)))).toBeUndefined();
  });

  it("give a mechanism's ratio without the rounding of each stage", () => {
    const stages = [spur(10, 49), spur(49, 30)];
    const train = mechanism("train", {
      motor: motor({
        voltage: "12 V",
        noLoad: { speed: "100 rpm", current: "0.2 A" },
        stall: { torque: "2 N*m", current: "4 A" },
      }),
      stages,
      load: lift({ mass: "1 kg", drumRadius: "10 mm", travel: "1 m" }),
    });
    expect((49 / 10) * (30 / 49)).not.toBe(3);
    expect(train.ratio).toBe(3);
  });
});
