/**
 * How far a mechanism's motors reach, and where along the way they give the most power and waste the least.
 *
 * Efficiency here is that of reports: from the motor's terminals, so that supply and wiring do not count. Found by narrowing, since a
 * current limit bends the line and the terminals' voltage changes along it.
 */
import type { Drive } from "./drive.js";
import { availableLine } from "./line.js";
import { breakawayCurrent } from "./motor.js";
import { type OperatingPoint, operatingPointAt } from "./operatingPoint.js";

/** Torque at which one motor stands still, N·m: the available line's, or less under a current limit. */
export function greatestTorque(drive: Drive): number {
  const { motor, motorCurrentLimitA } = drive;
  const { stallTorqueNm } = availableLine(drive);
  if (motorCurrentLimitA === undefined) return stallTorqueNm;
  return Math.max(Math.min(stallTorqueNm, motor.torqueConstantNmPerA * (motorCurrentLimitA - breakawayCurrent(motor))), 0);
}

/** `undefined` for a motor that gives nothing. */
export function bestEfficiencyPoint(drive: Drive): OperatingPoint | undefined {
  return bestPoint(drive, ({ efficiency }) => efficiency ?? 0);
}

/** `undefined` for a motor that gives nothing. */
export function greatestPowerPoint(drive: Drive): OperatingPoint | undefined {
  return bestPoint(drive, ({ shaftPowerW }) => shaftPowerW);
}

const STEPS = 64;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** Both measures are 0 at no load and at stall with one maximum between: a coarse scan brackets it, a golden section narrows it. */
function bestPoint(drive: Drive, measure: (point: OperatingPoint) => number): OperatingPoint | undefined {
  const greatest = greatestTorque(drive);
  if (!(greatest > 0)) return undefined;
  const valueAt = (torqueNm: number): number => measure(operatingPointAt(drive, torqueNm));
  let best = 0;
  for (let step = 1; step < STEPS; step++) {
    if (valueAt((step / STEPS) * greatest) > valueAt((best / STEPS) * greatest)) best = step;
  }
  let low = (Math.max(best - 1, 0) / STEPS) * greatest;
  let high = ((best + 1) / STEPS) * greatest;
  for (let round = 0; round < 60; round++) {
    const left = high - (high - low) * GOLDEN;
    const right = low + (high - low) * GOLDEN;
    if (valueAt(left) < valueAt(right)) low = left;
    else high = right;
  }
  return operatingPointAt(drive, (low + high) / 2);
}
