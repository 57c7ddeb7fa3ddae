import { describe, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

describe("slips", () => {
  // One motor, 4 kg, grip 0.5, wheel radius 40 mm: 0.5 · 4 · 9.80665 · 0.04 = 0.785 N·m; at 0.5 N·m/A that is 1.57 A.
  it("tells the current at which the wheels let go, where the motor could give more", () => {
    checkFindings(`${PRELUDE}
export const base = mechanism("base", { motor: twelveVolt, stages: [], load: wheels({ mass: "4 kg", radius: "40 mm", grip: 0.5, distance: "2 m" }) });
//           ^^^^ information slips: The wheels slip at 1.57 A per motor, before the motors stall at 4 A`);
  });

  it("is silent where the motors stall first", () => {
    checkFindings(`${PRELUDE}
export const base = mechanism("base", { motor: twelveVolt, stages: [], load: wheels({ mass: "20 kg", radius: "40 mm", grip: 0.5, distance: "2 m" }) });`);
  });
});
