/** Moves the carrier along the rows of the greenhouse, over a small ramp at the door. */
import { mechanism, reduction, wheels } from "loadmark";
import { wheelMotor } from "../motors.js";
import { pack } from "../power.js";

const CARRIER_KG = 24;

export const driveBase = mechanism("drive base", {
  motor: wheelMotor,
  motorCount: 4,
  stages: [reduction(13.7, { efficiency: 0.85 })],
  load: wheels({ mass: `${CARRIER_KG} kg`, diameter: "120 mm", grip: 0.6, rolling: 0.02, slope: "5 deg", distance: "4 m" }),
  ramp: "0.4 s",
  within: "8 s",
  supply: pack,
});
