/**
 * What the load does when power is lost and the driver shorts the motor: whether it drives the mechanism back, and how fast.
 *
 * Deliberately not here: coasting with open terminals, where only friction brakes.
 */
import type { Drive } from "./drive.js";
import { breakawayCurrent, lossCurrentSlope, torquePerAmpere } from "./motor.js";
import { type Direction, shaftLoadOf } from "./shaftLoad.js";
import { throughTrain, trainOf } from "./stages.js";

export interface Descent {
  /** In the load's own coordinate. */
  readonly position: number;
  /** Torque with which the load turns one motor, N·m. */
  readonly motorTorqueNm: number;
  readonly motorSpeedRadPerS: number;
  /** Of the load, in its own coordinate per second: m/s or rad/s. */
  readonly speed: number;
}

/**
 * Steady speed where the load drives hardest, terminals shorted; null where it does not drive the motor at all.
 *
 * The driven machine's balance K·(k_e·ω/R + I_loss(ω)) = T with K = max(k_t, k_e), no supply: the generator equation of the DC
 * machine (Fitzgerald, Kingsley, Umans, Electric Machinery, ch. 7). Winding resistance only.
 */
export function descentOf(drive: Drive): Descent | null {
  const load = shaftLoadOf(drive);
  if (load.endless || load.selfLocking) return null;
  const train = trainOf(drive.stages);
  const perMotor = train.ratio * drive.motorCount;
  let best = { position: 0, torque: 0 };
  for (const position of load.extremes()) {
    for (const direction of [1, -1] satisfies Direction[]) {
      const torque = -throughTrain(train, load.opposing(position, direction)) / perMotor;
      if (torque > best.torque) best = { position, torque };
    }
  }
  const { motor } = drive;
  const gain = torquePerAmpere(motor, true);
  const free = best.torque / gain - breakawayCurrent(motor);
  if (!(free > 0)) return null;
  const motorSpeedRadPerS = free / (motor.backEmfVPerRadPerS / motor.resistanceOhm + lossCurrentSlope(motor));
  return {
    position: best.position * load.ownPerRad,
    motorTorqueNm: best.torque,
    motorSpeedRadPerS,
    speed: (motorSpeedRadPerS / train.ratio) * Math.abs(load.ownPerRad),
  };
}
