import { describe, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

describe("past-peak", () => {
  it("speaks above half of the available stall torque, and not at half", () => {
    checkFindings(`${PRELUDE}
export const half = mechanism("half", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }) });
export const more = mechanism("more", { motor: twelveVolt, stages: [], load: roller({ torque: "1.2 N*m" }) });
//           ^^^^ warning past-peak: each motor gives 1.2 N·m, 60 % of the 2 N·m at which it stalls. A ratio of at least 1.2 instead of 1`);
  });

  // 90 mohm beside the motor's 3 ohm: 12/3.09 = 3.883 A, so 1.942 N·m at stall; 1/1.942 = 0.515.
  it("counts the supply's resistance", () => {
    checkFindings(`${PRELUDE}
const weak = battery({ openCircuit: "12 V", resistance: "90 mohm" });
export const hub = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }), supply: weak });
//           ^^^ warning past-peak: each motor gives 1 N·m, 52 % of the 1.94 N·m`);
  });

  it("follows a constant into every mechanism that uses it", () => {
    checkFindings(`${PRELUDE}
//- gears.ts
export const TEETH = { driver: 20, driven: 22 } as const;
//- one.ts
${PRELUDE}import { TEETH } from "./gears.js";
export const one = mechanism("one", { motor: twelveVolt, stages: [spur(TEETH.driver, TEETH.driven)], load: roller({ torque: "1.2 N*m" }) });
//           ^^^ warning past-peak: 1.11 N·m
//- two.ts
${PRELUDE}import * as gears from "./gears";
export const two = mechanism("two", { motor: twelveVolt, stages: [spur(gears.TEETH.driver, gears.TEETH.driven)], load: roller({ torque: "1.2 N*m" }) });
//           ^^^ warning past-peak: 1.11 N·m`);
  });
});
