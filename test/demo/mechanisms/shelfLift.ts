/** Raises the whole shelf carriage on two motors, one at each side. */
import { lift, mechanism, spur } from "loadmark";
import { SHELF } from "../gearing.js";
import { steadyMotor } from "../motors.js";
import { pack } from "../power.js";

export const shelfLift = mechanism("shelf lift", {
  motor: steadyMotor,
  motorCount: 2,
  stages: [spur(SHELF.driver, SHELF.driven)],
  load: lift({ mass: "13 kg", drumRadius: "25 mm", travel: "0.9 m", frictionForce: "6 N" }),
  within: "12 s",
  supply: pack,
});
