/** Opens the lid of the seed drawer. */
import { arm, mechanism, reduction } from "loadmark";
import { LID_RATIO } from "../gearing.js";
import { quickMotor } from "../motors.js";
import { pack } from "../power.js";

export const lidArm = mechanism("lid arm", {
  motor: quickMotor,
  stages: [reduction(LID_RATIO, { efficiency: 0.85 })],
  load: arm({ mass: "0.8 kg", centreOfMass: "20 cm", from: "0 deg", to: "110 deg" }),
  supply: pack,
});
