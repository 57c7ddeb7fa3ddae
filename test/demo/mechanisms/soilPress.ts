/** Presses soil into the trays with a screw that holds itself. */
import { breaker, mechanism, reduction, screw, spur } from "loadmark";
import { PINION } from "../gearing.js";
import { wheelMotor } from "../motors.js";
import { pack } from "../power.js";

export const soilPress = mechanism("soil press", {
  motor: wheelMotor,
  stages: [reduction(9), spur(PINION, 40)],
  load: screw({ force: "420 N", lead: "3 mm", meanDiameter: "10.5 mm", friction: 0.15, travel: "90 mm", threadAngle: "15 deg" }),
  within: "10 s",
  holdFor: "20 s",
  protect: breaker({ holdCurrent: "1.6 A", trips: { at: "3.2 A", after: "2 s" } }),
  supply: pack,
});
