/**
 * The numbers of one mechanism as reports carry them: SI, per motor unless the name says source, null where it does not apply.
 *
 * Deliberately not here: how they come about.
 */
import type { FeedforwardNumbers } from "./feedforward.js";
import type { HotShare } from "./hotShare.js";
import type { LimitedBy } from "./operatingPoint.js";

export interface MechanismNumbers {
  /** Motor turns per turn of the output shaft. */
  readonly ratio: number;
  /** Of all stages together, motor driving; screw friction not included. */
  readonly stageEfficiency: number;
  readonly available: AvailableNumbers;
  readonly hardest: HardestNumbers & HotShare;
  /** null for a roller. */
  readonly travel: TravelNumbers | null;
  /** null for a flywheel. */
  readonly hold: HoldNumbers | null;
  readonly stall: StallNumbers;
  readonly feedforward: FeedforwardNumbers;
}

/** The available line at the motor's shaft. */
export interface AvailableNumbers {
  readonly noLoadSpeedRadPerS: number;
  readonly stallTorqueNm: number;
  readonly stallCurrentA: number;
}

/** Running steadily at the hardest position. */
export interface HardestNumbers {
  /** m for lift, wheels, screw; rad for arm and loadCurve; null for flywheel and roller. */
  readonly position: number | null;
  /** At one motor's terminals. */
  readonly terminalVoltageV: number;
  /** Required at one motor's shaft. */
  readonly motorTorqueNm: number;
  /** 0 where it stalls. */
  readonly motorSpeedRadPerS: number;
  readonly motorCurrentA: number;
  readonly sourceCurrentA: number;
  readonly shaftPowerW: number;
  /** One motor's share of what reaches the output shaft. */
  readonly loadPowerW: number;
  /** Into one motor's terminals. */
  readonly electricalPowerW: number;
  readonly motorEfficiency: number | null;
  /** Required over available stall torque; null where there is none. */
  readonly stallShare: number | null;
  readonly limitedBy: LimitedBy;
}

/** One travel from rest at full command, from cold. */
export interface TravelNumbers {
  /** null where it does not arrive. */
  readonly timeS: number | null;
  /** In the load's own coordinate per second: m/s, or rad/s for arm, loadCurve and flywheel. */
  readonly endSpeed: number;
  readonly peakMotorCurrentA: number;
  readonly rmsMotorCurrentA: number;
  /** From the supply's terminals; what is sent back is not credited. */
  readonly sourceEnergyJ: number;
  /** null without thermal data. */
  readonly windingPeakC: number | null;
  /** null: protection stays closed, or its time cannot be told. */
  readonly tripsAfterS: number | null;
}

/** Holding the load where it pulls hardest, from cold. */
export interface HoldNumbers {
  readonly motorCurrentA: number;
  readonly tripsAfterS: number | null;
  /** After `holdFor`, or for ever; null without thermal data or where the heat runs away. */
  readonly windingFinalC: number | null;
  /** Until the winding passes its limit; null: never, or no thermal data. */
  readonly limitAfterS: number | null;
}

/** Full command with the output shaft blocked, from cold. */
export interface StallNumbers {
  readonly motorCurrentA: number;
  readonly sourceCurrentA: number;
  readonly tripsAfterS: number | null;
  readonly windingLimitAfterS: number | null;
}
