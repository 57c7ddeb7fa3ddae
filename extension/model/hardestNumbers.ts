/** Running steadily at the hardest position, as reports carry it. Deliberately not here: where that is (hardest.ts). */
import type { Drive } from "./drive.js";
import { hardestPosition, slipPoint } from "./hardest.js";
import { availableLine } from "./line.js";
import type { HardestNumbers } from "./numbers.js";
import { type OperatingPoint, operatingPointAt, pointAt } from "./operatingPoint.js";
import { trainOf } from "./stages.js";

export function hardestNumbers(drive: Drive): HardestNumbers {
  const { stallTorqueNm } = availableLine(drive);
  const hardest = hardestPosition(drive);
  const point = hardestPoint(drive, hardest.motorTorqueNm);
  return {
    position: hardest.position,
    terminalVoltageV: point.terminalVoltageV,
    motorTorqueNm: hardest.motorTorqueNm,
    motorSpeedRadPerS: point.speedRadPerS,
    motorCurrentA: point.currentA,
    sourceCurrentA: point.sourceCurrentA,
    shaftPowerW: point.shaftPowerW,
    loadPowerW: point.shaftPowerW * trainOf(drive.stages).efficiency,
    electricalPowerW: point.electricalPowerW,
    motorEfficiency: point.efficiency,
    stallShare: stallTorqueNm > 0 ? hardest.motorTorqueNm / stallTorqueNm : null,
    limitedBy: point.limitedBy,
  };
}

/** Wheels that cannot grip do not move: the motor then brings no more torque than the ground takes. */
function hardestPoint(drive: Drive, torqueNm: number): OperatingPoint {
  const point = operatingPointAt(drive, torqueNm);
  const slip = slipPoint(drive);
  if (!slip || slip.canMove || slip.motorCurrentA >= point.currentA) return point;
  return pointAt(drive, torqueNm, 0, slip.motorCurrentA, "grip", true);
}
