/** `between`: findings take the worst corner, numbers the middle. */
import { describe, expect, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

describe("between", () => {
  it("finds the worse end, which is the high one for a load", () => {
    const { mechanisms } = checkFindings(`${PRELUDE}
export const hub = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: between("0.6 N*m", "1.2 N*m") }) });
//           ^^^ warning past-peak: 1.2 N·m, 60 % of the 2 N·m at which it stalls. A ratio of at least 1.2 instead of 1 takes it back below half. (With load.torque 1.2 N·m.)`);
    expect(mechanisms[0]?.numbers?.hardest.motorTorqueNm).toBeCloseTo(0.9, 12);
    expect(mechanisms[0]?.assumed.join()).toContain("worst of 2 combinations");
  });

  it("finds the low end of an efficiency and of a counterbalance, together", () => {
    // 10 kg on 20 mm: 1.961 N·m less the counterbalance's 20 N · 0.02 m; over an efficiency of 0.8, behind a ratio of 1.5.
    checkFindings(`${PRELUDE}
export const hub = mechanism("hub", {
//           ^^^ warning past-peak: 1.3 N·m
//           ^^^ information backdrives: at 33.4 mm/s
  motor: twelveVolt,
  stages: [reduction(1.5, { efficiency: between(0.8, 1) })],
  load: lift({ mass: "10 kg", drumRadius: "20 mm", travel: "1 m", counterbalance: between("20 N", "60 N") }),
});`);
  });

  it("reaches the battery of the robot", () => {
    checkFindings(`import { robot } from "loadmark";
${PRELUDE}
const tired = battery({ openCircuit: between("9 V", "12 V"), resistance: "0 ohm" });
export const hub = mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "0.9 N*m" }) });
//           ^^^ warning past-peak: 60 % of the 1.5 N·m
robot("one", { supply: tired, mechanisms: [hub] });`);
  });

  it("tries a fair part of the corners where there are too many", () => {
    const { mechanisms } = checkFindings(`${PRELUDE}
export const hub = mechanism("hub", {
//           ^^^ warning past-peak: 1.2 N·m
  motor: twelveVolt,
  stages: [reduction(between(1, 1), { efficiency: between(1, 1) }), reduction(between(1, 1), { efficiency: between(1, 1) })],
  drag: between("0 N*m", "0.2 N*m"),
  load: roller({ torque: between("0.5 N*m", "1 N*m") }),
});`);
    expect(mechanisms[0]?.assumed.join()).toContain("worst of 30 combinations");
  });
});
