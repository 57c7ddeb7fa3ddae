/** `overloads`: ratings of motors and stages. k_t of the prelude's kind of motor is 0.5 N·m/A. */
import { describe, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

const RATED = `${PRELUDE}
const rated = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" }, rated: { torque: "0.4 N*m" } });`;

describe("overloads", () => {
  it("speaks above the motor's rated torque", () => {
    checkFindings(`${RATED}
export const light = mechanism("light", { motor: rated, stages: [], load: roller({ torque: "0.4 N*m" }) });
export const heavy = mechanism("heavy", { motor: rated, stages: [], load: roller({ torque: "0.5 N*m" }) });
//           ^^^^^ warning overloads: 500 mN·m needed, 400 mN·m rated. A ratio of at least 1.25 instead of 1`);
  });

  it("speaks where a stage bears less than the travel asks", () => {
    checkFindings(`${PRELUDE}
export const hub = mechanism("hub", { motor: twelveVolt, stages: [reduction(4, { efficiency: 1, maxTorque: "2 N*m" })], load: roller({ torque: "3 N*m" }) });
//           ^^^ warning overloads: Overloads stage 1 (reduction): 3 N·m in the travel, but it bears 2 N·m`);
  });

  it("speaks where a stage bears the travel but not the stalled motor, with the current limit that would do", () => {
    checkFindings(`${PRELUDE}
export const hub = mechanism("hub", { motor: twelveVolt, stages: [reduction(4, { efficiency: 1, maxTorque: "6 N*m" })], load: roller({ torque: "3 N*m" }) });
//           ^^^ warning overloads: 8 N·m when blocked, but it bears 6 N·m. A motor current limit of 3 A`);
    checkFindings(`${PRELUDE}
export const hub = mechanism("hub", { motor: twelveVolt, motorCurrentLimit: "3 A", stages: [reduction(4, { efficiency: 1, maxTorque: "6 N*m" })], load: roller({ torque: "3 N*m" }) });`);
  });
});
