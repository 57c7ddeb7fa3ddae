/**
 * Voltages that a robot's own code can send ahead of its feedback, at one motor's terminals, per motion of the output shaft.
 *
 * V = holdLoad + sign(ω)·friction + perRadPerS·ω + perRadPerS2·α. Deliberately not here: supply, wiring, limits.
 */
import type { Drive } from "./drive.js";
import { hardestToHold, holdPoint } from "./hold.js";
import { breakawayCurrent, lossCurrentSlope } from "./motor.js";
import { type ShaftLoad, shaftLoadOf, travelDirection } from "./shaftLoad.js";
import { trainOf } from "./stages.js";

export interface FeedforwardNumbers {
  /** Holds the load where it pulls hardest, V; null where there is nothing to hold. */
  readonly holdLoadV: number | null;
  /** The same as a share of the supply's voltage as it sags under the hold: the command that the controller sends; null also where no command would do. */
  readonly holdLoadSupplyShare: number | null;
  /** Per rad/s of the output shaft, V·s/rad. */
  readonly voltsPerRadPerS: number;
  /** Per rad/s² of the output shaft, with the greatest inertia of the travel, V·s²/rad. */
  readonly voltsPerRadPerS2: number;
  /** Against friction that does not depend on speed, V. */
  readonly frictionV: number;
}

/** From V = (R/k_t)·T + R·I_loss + k_e·ω_motor, the steady equation of the DC machine, sorted by ω and α of the output shaft. */
export function feedforwardNumbers(drive: Drive): FeedforwardNumbers {
  const { motor } = drive;
  const load = shaftLoadOf(drive);
  const train = trainOf(drive.stages);
  const voltsPerTorque = motor.resistanceOhm / motor.torqueConstantNmPerA;
  const share = train.ratio * train.efficiency * drive.motorCount;
  const at = hardestToHold(load).position;
  const direction = travelDirection(load);
  const friction = load.opposing(at, direction) - direction * load.restTorque(at);
  const inertia = greatestInertia(load) + train.inertiaKgM2;
  const hold = holdPoint(drive);
  return {
    holdLoadV: hold?.motorVoltageV ?? null,
    holdLoadSupplyShare: hold?.supply && hold.supply.duty <= drive.pwmDuty ? hold.supply.duty : null,
    voltsPerRadPerS: train.ratio * (motor.backEmfVPerRadPerS + motor.resistanceOhm * lossCurrentSlope(motor)),
    voltsPerRadPerS2: voltsPerTorque * (motor.rotorInertiaKgM2 * train.ratio + inertia / share),
    frictionV: (voltsPerTorque * friction) / share + motor.resistanceOhm * breakawayCurrent(motor),
  };
}

function greatestInertia(load: ShaftLoad): number {
  return Math.max(...[load.startRad, ...load.corners, load.endRad].map(load.inertia));
}
