/** The model's one entrance for a mechanism: plain SI data in, all its numbers out. Deliberately no judgement: that is the rules' work. */
import type { Drive } from "./drive.js";
import { feedforwardNumbers } from "./feedforward.js";
import { hardestPosition, slipPoint } from "./hardest.js";
import type { HeldRun } from "./heldRun.js";
import { availableLine } from "./line.js";
import type { HardestNumbers, HoldNumbers, MechanismNumbers, TravelNumbers } from "./numbers.js";
import { type OperatingPoint, operatingPointAt, pointAt } from "./operatingPoint.js";
import { solveHold, solveStall } from "./runs.js";
import { trainOf } from "./stages.js";
import { solveTravel } from "./travel.js";
import type { TravelResult } from "./travelResult.js";

/** The runs behind a mechanism's numbers, for rules and hovers that need more of them. */
export interface MechanismSolution {
  readonly numbers: MechanismNumbers;
  readonly travel: TravelResult | null;
  readonly hold: HeldRun | null;
  readonly stall: HeldRun;
}

/** Numbers of a mechanism. Legal input, however extreme, gives finite numbers or null; the function does not throw. */
export function solveMechanism(drive: Drive): MechanismNumbers {
  return solveMechanismRuns(drive).numbers;
}

/** The same, with the runs. */
export function solveMechanismRuns(drive: Drive): MechanismSolution {
  const train = trainOf(drive.stages);
  const line = availableLine(drive);
  const travel = solveTravel(drive);
  const hold = solveHold(drive);
  const stall = solveStall(drive);
  const numbers: MechanismNumbers = {
    ratio: train.ratio,
    stageEfficiency: train.efficiency,
    available: {
      noLoadSpeedRadPerS: line.noLoadSpeedRadPerS,
      stallTorqueNm: line.stallTorqueNm,
      stallCurrentA: line.stallCurrentA,
    },
    hardest: hardestNumbers(drive, train.efficiency, line.stallTorqueNm),
    travel: travel && travelNumbers(travel),
    hold: hold && holdNumbers(hold),
    stall: {
      motorCurrentA: stall.motorCurrentA,
      sourceCurrentA: stall.sourceCurrentA,
      tripsAfterS: stall.trip.opensAfterS,
      windingLimitAfterS: stall.limitAfterS,
    },
    feedforward: feedforwardNumbers(drive),
  };
  return { numbers, travel, hold, stall };
}

function travelNumbers(travel: TravelResult): TravelNumbers {
  const { timeS, endSpeed, peakMotorCurrentA, rmsMotorCurrentA, sourceEnergyJ, windingPeakC } = travel;
  return { timeS, endSpeed, peakMotorCurrentA, rmsMotorCurrentA, sourceEnergyJ, windingPeakC, tripsAfterS: travel.opensAfterS };
}

function holdNumbers(hold: HeldRun): HoldNumbers {
  const { motorCurrentA, windingFinalC, limitAfterS } = hold;
  return { motorCurrentA, tripsAfterS: hold.trip.opensAfterS, windingFinalC, limitAfterS };
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
