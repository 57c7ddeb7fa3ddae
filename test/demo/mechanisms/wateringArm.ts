/** Swings the watering head over the trays: heavy when the hose is full. */
import { arm, mechanism, spur } from "loadmark";
import { PINION, WATERING_DRIVEN } from "../gearing.js";
import { steadyMotor } from "../motors.js";
import { pack } from "../power.js";

const HEAD_KG = 1.5;
const FULL_HOSE_KG = 0.9;

export const wateringArm = mechanism("watering arm", {
  motor: steadyMotor,
  stages: [spur(PINION, WATERING_DRIVEN)],
  load: arm({ mass: `${HEAD_KG + FULL_HOSE_KG} kg`, centreOfMass: "0.42 m", from: "-20 deg", to: "75 deg" }),
  supply: pack,
});
