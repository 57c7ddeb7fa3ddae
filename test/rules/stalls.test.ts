import { describe, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

describe("stalls", () => {
  // 10 kg on a drum of 50 mm: 10 · 9.80665 · 0.05 = 4.903 N·m; through a loss-free ratio of 2 that is 2.45 N·m against 2 N·m.
  it("speaks where the load needs more than the stall torque, and silences past-peak", () => {
    checkFindings(`${PRELUDE}
export const hoist = mechanism("hoist", {
//           ^^^^^ error stalls: each motor must give 2.45 N·m, but stalls at 2 N·m. A ratio of 4.91 instead of 2 would
//           ^^^^^ information backdrives: Runs back
  motor: twelveVolt,
  stages: [reduction(2, { efficiency: 1 })],
  load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "1 m" }),
});`);
  });

  it("speaks at exactly the stall torque", () => {
    checkFindings(`${PRELUDE}
export const hub = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "2 N*m" }) });
//           ^^^ error stalls: each motor must give 2 N·m, but stalls at 2 N·m`);
  });

  // k_t = 2 N·m / 4 A: a limit of 1 A gives no more than 0.5 N·m.
  it("speaks of the current limit where that comes first", () => {
    checkFindings(`${PRELUDE}
export const hub = mechanism("hub", { motor: twelveVolt, stages: [], motorCurrentLimit: "1 A", load: roller({ torque: "0.6 N*m" }) });
//           ^^^ error stalls: each motor must give 600 mN·m, more than its current limit of 1 A allows`);
  });

  // 10 kg on 45 degrees needs 69.3 N; a grip of 0.9 gives 62.4 N.
  it("speaks of the grip where wheels can't move the mass at all", () => {
    checkFindings(`${PRELUDE}
export const base = mechanism("base", {
//           ^^^^ error stalls: the wheels must push 69.3 N, but grip only 62.4 N
//           ^^^^ information backdrives: Runs back
  motor: twelveVolt,
  motorCount: 4,
  stages: [],
  load: wheels({ mass: "10 kg", radius: "50 mm", grip: 0.9, slope: "45 deg", distance: "2 m" }),
});`);
  });

  it("sits on the name argument where nothing holds the mechanism", () => {
    checkFindings(`${PRELUDE}
const list = [
  mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "3 N*m" }) }),
//          ^^^^^ error stalls: each motor must give 3 N·m
];`);
  });
});
