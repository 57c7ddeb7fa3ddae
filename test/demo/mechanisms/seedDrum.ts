/** Turns the drum that meters out seeds, all day long. */
import { belt, breaker, mechanism, roller } from "loadmark";
import { DRUM } from "../gearing.js";
import { quickMotor } from "../motors.js";
import { pack } from "../power.js";

export const seedDrum = mechanism("seed drum", {
  motor: quickMotor,
  stages: [belt(DRUM.driver, DRUM.driven)],
  load: roller({ torque: "0.35 N*m", speed: "150 rpm" }),
  protect: breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "5 s" } }),
  supply: pack,
});
