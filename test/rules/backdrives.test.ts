/** `backdrives`: the prelude's motor has R = 3 ohm, k_t = 0.5 N·m/A, k_e = (12 − 3·0.2)/10.472 = 1.0886 V·s/rad. */
import { describe, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

const WORM = PRELUDE.replace("wheels }", "wheels, worm }");

describe("backdrives", () => {
  // 5 kg on 20 mm: 0.98067 N·m. Braking torque per rad/s: k_e·(k_e/3 + 0.2/10.472) = 1.0886·0.38197 = 0.41582; so 2.3584 rad/s, 47.2 mm/s.
  it("tells the descent of a lift at shorted terminals", () => {
    checkFindings(`${PRELUDE}
export const hoist = mechanism("hoist", { motor: twelveVolt, stages: [], load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "1 m" }) });
//           ^^^^^ information backdrives: the load turns each motor with 981 mN·m, at 47.2 mm/s if the driver shorts the motor`);
  });

  it("is silent where the stages lock, and where nothing pulls", () => {
    checkFindings(`${WORM}
export const hoist = mechanism("hoist", { motor: twelveVolt, stages: [worm(1, 30, { leadAngle: "2 deg", friction: 0.1 })],
  load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "1 m" }) });
export const table = mechanism("table", { motor: twelveVolt, stages: [], load: arm({ mass: "1 kg", centreOfMass: "0.2 m", from: "0 deg", to: "90 deg", slope: "0 deg" }) });`);
  });

  // The angle of friction is atan(0.05/cos 20°) = 3.046°; 2.9° is within 20 % of it.
  it("never claims self-locking within 20 % of the angle of friction", () => {
    checkFindings(`${WORM}
export const hoist = mechanism("hoist", { motor: twelveVolt, stages: [worm(1, 30, { leadAngle: "2.9 deg", friction: 0.05 })],
//           ^^^^^ information backdrives: May run back when the power is off
  load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "1 m" }) });`);
  });
});
