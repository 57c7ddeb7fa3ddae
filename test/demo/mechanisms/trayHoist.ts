/** Lifts a tray of seedlings from the bench to the height of the shelves. */
import { breaker, lift, mechanism, spur } from "loadmark";
import { PINION, TRAY_DRIVEN } from "../gearing.js";
import { quickMotor } from "../motors.js";
import { pack } from "../power.js";

const TRAY_KG = 4.5;
const WET_SOIL_KG = 1.4;
const DRUM_RADIUS_MM = 30;

export const trayHoist = mechanism("tray hoist", {
  motor: quickMotor,
  stages: [spur(PINION, TRAY_DRIVEN)],
  load: lift({ mass: `${TRAY_KG + WET_SOIL_KG} kg`, drumRadius: `${DRUM_RADIUS_MM} mm`, travel: "0.7 m" }),
  within: "5 s",
  holdFor: "30 s",
  protect: breaker({ holdCurrent: "3 A", trips: { at: "6 A", after: "4 s" } }),
  supply: pack,
});

/** Turns of the motor that raise the tray by `metres`. */
export function turnsFor(metres: number): number {
  return (metres * 1000 * trayHoist.ratio) / (2 * Math.PI * DRUM_RADIUS_MM);
}
