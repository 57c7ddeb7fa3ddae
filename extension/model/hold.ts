/**
 * Holding the load still: torque, current and voltage of one motor, all friction left out.
 *
 * Deliberately not here: how long it can be held (holdRun.ts).
 */
import type { ControlledSupply } from "./bus.js";
import type { Drive } from "./drive.js";
import { controlled } from "./operatingPoint.js";
import { type ShaftLoad, shaftLoadOf } from "./shaftLoad.js";
import { trainOf } from "./stages.js";

export interface HoldPoint {
  /** Where the load pulls hardest, own coordinate; null for a roller. */
  readonly position: number | null;
  /** At one motor's shaft, N·m; 0 where stages or screw lock themselves. */
  readonly motorTorqueNm: number;
  readonly motorCurrentA: number;
  /** At one motor's terminals, V. */
  readonly motorVoltageV: number;
  /** What the controller does for it; null: the supply collapses. */
  readonly supply: ControlledSupply | null;
  /** True where the controller's greatest duty is enough. */
  readonly withinLine: boolean;
}

/**
 * T = |T_load|/(N·count) at the greatest |T_load|, I = T/k_t without loss current, V = I·R; null for a flywheel, which has
 * nothing to hold. Give the drive hot motors (`driveAt`) for the hot hold.
 */
export function holdPoint(drive: Drive): HoldPoint | null {
  const load = shaftLoadOf(drive);
  if (load.kind === "flywheel") return null;
  const train = trainOf(drive.stages);
  const at = hardestToHold(load);
  const locked = train.selfLocking || load.selfLocking;
  const motorTorqueNm = locked ? 0 : at.torque / (train.ratio * drive.motorCount);
  const motorCurrentA = motorTorqueNm / drive.motor.torqueConstantNmPerA;
  const supply = controlled(drive, motorCurrentA, 0);
  const limit = drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY;
  return {
    position: load.endless ? null : at.position * load.ownPerRad,
    motorTorqueNm,
    motorCurrentA,
    motorVoltageV: motorCurrentA * drive.motor.resistanceOhm,
    supply,
    withinLine: supply !== null && supply.duty <= drive.pwmDuty && motorCurrentA <= limit,
  };
}

/** Position (rad at the output shaft) and size of the greatest torque that the load exerts at rest. */
export function hardestToHold(load: ShaftLoad): { readonly position: number; readonly torque: number } {
  const extremes = load.extremes();
  let best = { position: extremes[0] ?? 0, torque: 0 };
  for (const position of extremes) {
    const torque = Math.abs(load.restTorque(position));
    if (torque > best.torque * (1 + 1e-12)) best = { position, torque };
  }
  return best;
}
