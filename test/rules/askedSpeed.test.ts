/** `beyond-speed` and `no-headroom`: the line of the prelude's motor is straight, 100 rpm at 0 and 0 at 2 N·m. */
import { describe, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

describe("beyond-speed", () => {
  it("speaks where a roller is asked for more than the line gives under its torque", () => {
    // At 0.5 N·m the line is at 75 rpm.
    checkFindings(`${PRELUDE}
export const fine = mechanism("fine", { motor: twelveVolt, stages: [], load: roller({ torque: "0.5 N*m", speed: "60 rpm" }) });
export const fast = mechanism("fast", { motor: twelveVolt, stages: [], load: roller({ torque: "0.5 N*m", speed: "80 rpm" }) });
//           ^^^^ error beyond-speed: 80 rpm is asked of the output, but the motor turns it at no more than 75 rpm`);
  });

  it("judges the output shaft behind the stages", () => {
    // 0.25 N·m at a motor behind a loss-free 1:2 up-gearing of 0.125 N·m: 87.5 rpm at the motor, 175 rpm at the output.
    checkFindings(`${PRELUDE}
export const wheel = mechanism("wheel", { motor: twelveVolt, stages: [reduction(0.5, { efficiency: 1 })],
//           ^^^^^ error beyond-speed: 180 rpm is asked of the output, but the motor turns it at no more than 175 rpm
  load: flywheel({ inertia: "0.01 kg*m^2", speed: "180 rpm", drag: "0.125 N*m" }) });`);
  });

  it("is silent under a stall, which says it already", () => {
    checkFindings(`${PRELUDE}
export const stuck = mechanism("stuck", { motor: twelveVolt, stages: [], load: roller({ torque: "3 N*m", speed: "80 rpm" }) });
//           ^^^^^ error stalls: 3 N·m`);
  });
});

describe("no-headroom", () => {
  it("speaks above nine tenths of what is reached", () => {
    checkFindings(`${PRELUDE}
export const tight = mechanism("tight", { motor: twelveVolt, stages: [], load: roller({ torque: "0.5 N*m", speed: "70 rpm" }) });
//           ^^^^^ information no-headroom: 70 rpm is 93 % of the 75 rpm`);
  });
});
