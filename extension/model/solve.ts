/** The model's one entrance for a mechanism: plain SI data in, all its numbers out. Deliberately no judgement: that is the rules' work. */
import type { Drive } from "./drive.js";
import { feedforwardNumbers } from "./feedforward.js";
import { hardestPosition, slipPoint } from "./hardest.js";
import { holdPoint } from "./hold.js";
import { availableLine } from "./line.js";
import type { HardestNumbers, MechanismNumbers } from "./numbers.js";
import { type OperatingPoint, operatingPointAt, pointAt, stalledPoint } from "./operatingPoint.js";
import { trainOf } from "./stages.js";

/** Numbers of a mechanism. Legal input, however extreme, gives finite numbers or null; the function does not throw. */
export function solveMechanism(drive: Drive): MechanismNumbers {
  const train = trainOf(drive.stages);
  const line = availableLine(drive);
  const hold = holdPoint(drive);
  const stall = stalledPoint(drive, line.stallTorqueNm);
  return {
    ratio: train.ratio,
    stageEfficiency: train.efficiency,
    available: {
      noLoadSpeedRadPerS: line.noLoadSpeedRadPerS,
      stallTorqueNm: line.stallTorqueNm,
      stallCurrentA: line.stallCurrentA,
    },
    hardest: hardestNumbers(drive, train.efficiency, line.stallTorqueNm),
    hold: hold && { motorCurrentA: hold.motorCurrentA },
    stall: { motorCurrentA: stall.currentA, sourceCurrentA: stall.sourceCurrentA },
    feedforward: feedforwardNumbers(drive),
  };
}

function hardestNumbers(drive: Drive, stageEfficiency: number, stallTorqueNm: number): HardestNumbers {
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
    loadPowerW: point.shaftPowerW * stageEfficiency,
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
