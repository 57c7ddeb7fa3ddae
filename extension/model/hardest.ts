/**
 * What the load asks of one motor, position by position, and the hardest position of the travel.
 *
 * Static: no acceleration. Deliberately not here: what the motor can give (operatingPoint.ts).
 */
import type { Drive } from "./drive.js";
import { breakawayCurrent } from "./motor.js";
import { type Direction, type ShaftLoad, shaftLoadOf } from "./shaftLoad.js";
import { throughTrain, trainOf } from "./stages.js";

export interface HardestPosition {
  /** In the load's own coordinate: m, or rad for arm and loadCurve; null for flywheel and roller. */
  readonly position: number | null;
  readonly direction: Direction;
  /** Required torque at the output shaft, friction included, N·m. */
  readonly outputTorqueNm: number;
  /** Required torque at one motor's shaft, N·m. */
  readonly motorTorqueNm: number;
}

/** Torques closer than this share are a tie: the smaller position is named. */
const TIE = 1e-12;

/** The greatest driving motor torque over the travel, both ways, since what goes there must come back. */
export function hardestPosition(drive: Drive): HardestPosition {
  const load = shaftLoadOf(drive);
  const train = trainOf(drive.stages);
  const extremes = load.extremes();
  let best = { position: extremes[0] ?? 0, direction: 1 as Direction, torque: 0 };
  for (const position of extremes) {
    for (const direction of [1, -1] as const) {
      const torque = load.opposing(position, direction);
      if (torque > best.torque * (1 + TIE)) best = { position, direction, torque };
    }
  }
  return {
    position: load.endless ? null : best.position * load.ownPerRad,
    direction: best.direction,
    outputTorqueNm: best.torque,
    motorTorqueNm: best.torque / (train.ratio * train.efficiency * drive.motorCount),
  };
}

/**
 * Static torque at one motor's shaft to move at a position (own coordinate) in a direction, N·m; below 0 the load drives the
 * motor. Driving: T/(N·η·count); driven: η_b·T/(N·count), above 0 where the train does not run back.
 */
export function requiredMotorTorque(drive: Drive, position: number, direction: Direction): number {
  const load = shaftLoadOf(drive);
  const train = trainOf(drive.stages);
  return throughTrain(train, load.opposing(position / load.ownPerRad, direction)) / (train.ratio * drive.motorCount);
}

/** Where wheels let go of the ground. */
export interface SlipPoint {
  /** Torque at one motor's shaft when the wheels slip, N·m. */
  readonly motorTorqueNm: number;
  /** One motor's current then, from standstill, A. */
  readonly motorCurrentA: number;
  /** False where the grip is not enough to move at all. */
  readonly canMove: boolean;
}

/** The traction limit as seen by one motor at standstill; null for anything but wheels. */
export function slipPoint(drive: Drive): SlipPoint | null {
  const load = shaftLoadOf(drive);
  if (!load.traction) return null;
  const train = trainOf(drive.stages);
  const { limitNm, besideGroundNm } = load.traction;
  const motorTorqueNm = throughTrain(train, limitNm + besideGroundNm) / (train.ratio * drive.motorCount);
  return {
    motorTorqueNm,
    motorCurrentA: motorTorqueNm / drive.motor.torqueConstantNmPerA + breakawayCurrent(drive.motor),
    canMove: greatestGroundTorque(load) < limitNm,
  };
}

function greatestGroundTorque(load: ShaftLoad): number {
  const beside = load.traction?.besideGroundNm ?? 0;
  return Math.max(load.opposing(0, 1), load.opposing(0, -1)) - beside;
}
