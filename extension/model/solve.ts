/** The model's one entrance for a mechanism: plain SI data in, all its numbers out. Deliberately no judgement: that is the rules' work. */
import type { Drive } from "./drive.js";
import { feedforwardNumbers } from "./feedforward.js";
import { hardestNumbers } from "./hardestNumbers.js";
import type { HeldRun } from "./heldRun.js";
import { hotShare } from "./hotShare.js";
import { availableLine } from "./line.js";
import type { HoldNumbers, MechanismNumbers, StallNumbers, TravelNumbers } from "./numbers.js";
import { type RepeatedRun, solveRepeats } from "./repeats.js";
import { solveHold, solveStall, solveTurning } from "./runs.js";
import { trainOf } from "./stages.js";
import { solveTravel } from "./travel.js";
import type { TravelResult } from "./travelResult.js";

/** The runs behind a mechanism's numbers, for rules and hovers that need more of them. */
export interface MechanismSolution {
  readonly numbers: MechanismNumbers;
  readonly travel: TravelResult | null;
  readonly hold: HeldRun | null;
  readonly stall: HeldRun;
  /** A flywheel or roller kept turning; null for others, and where nothing tells of heat or protection. */
  readonly turning: HeldRun | null;
  /** Repeated every so often; null where it is not, and where nothing tells of heat or protection. */
  readonly repeats: RepeatedRun | null;
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
  const turning = turningOf(drive);
  const repeats = repeatsOf(drive);
  const numbers: MechanismNumbers = {
    ratio: train.ratio,
    stageEfficiency: train.efficiency,
    available: {
      noLoadSpeedRadPerS: line.noLoadSpeedRadPerS,
      stallTorqueNm: line.stallTorqueNm,
      stallCurrentA: line.stallCurrentA,
    },
    hardest: { ...hardestNumbers(drive), ...hotShare(drive, { travel, hold, turning, repeats }) },
    travel: travel && travelNumbers(travel),
    hold: hold && holdNumbers(hold),
    stall: stallNumbers(stall),
    feedforward: feedforwardNumbers(drive),
  };
  return { numbers, travel, hold, stall, turning, repeats };
}

export function turningOf(drive: Drive): HeldRun | null {
  return isWatched(drive) ? solveTurning(drive) : null;
}

export function repeatsOf(drive: Drive): RepeatedRun | null {
  return isWatched(drive) ? solveRepeats(drive) : null;
}

function isWatched({ protection, motor }: Drive): boolean {
  return protection !== undefined || motor.thermal !== undefined;
}

export function travelNumbers(travel: TravelResult): TravelNumbers {
  const { timeS, endSpeed, peakMotorCurrentA, rmsMotorCurrentA, sourceEnergyJ, windingPeakC } = travel;
  return { timeS, endSpeed, peakMotorCurrentA, rmsMotorCurrentA, sourceEnergyJ, windingPeakC, tripsAfterS: travel.opensAfterS };
}

export function holdNumbers(hold: HeldRun): HoldNumbers {
  const { motorCurrentA, windingFinalC, limitAfterS } = hold;
  return { motorCurrentA, tripsAfterS: hold.trip.opensAfterS, windingFinalC, limitAfterS };
}

export function stallNumbers({ motorCurrentA, sourceCurrentA, trip, limitAfterS }: HeldRun): StallNumbers {
  return { motorCurrentA, sourceCurrentA, tripsAfterS: trip.opensAfterS, windingLimitAfterS: limitAfterS };
}
