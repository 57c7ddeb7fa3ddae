/**
 * What a robot's run comes to. Times count from the start of the run, s.
 *
 * Deliberately no equations, and no judgement.
 */

/** As the report carries them. */
export interface RobotNumbers {
  /** At the supply's terminals. */
  readonly lowestVoltageV: number;
  readonly lowestVoltageAtS: number;
  readonly peakCurrentA: number;
  /** From the supply's terminals over all cycles done; what is sent back is not credited. */
  readonly sourceEnergyJ: number;
  /** ∫I dt over all cycles done; what is sent back is not credited. */
  readonly chargeUsedAh: number;
  /** Whole cycles. */
  readonly cyclesDone: number;
}

/** `done`: all cycles; `empty`: the battery's charge ended it; `unresolved`: too many steps or events to follow. */
export type RobotOutcome = "done" | "empty" | "unresolved";

export interface RobotSolution {
  readonly numbers: RobotNumbers;
  readonly outcome: RobotOutcome;
  /** Time that the numbers cover. */
  readonly coveredS: number;
  /** Cycles that were followed one by one; the others repeat them. */
  readonly cyclesFollowed: number;
  /** The last of them, from 0. */
  readonly lastFollowed: number;
  /** True where the state repeats from cycle to cycle before the last one. */
  readonly periodic: boolean;
  /** Charge taken from the rated one, with Peukert's loss, A·h. */
  readonly depletedAh: number;
  readonly emptyAtS: number | null;
  /** First moment at which a hold gets less than it needs, or the supply's voltage breaks down; null: never. */
  readonly collapsesAtS: number | null;
  /** Times below the voltage that the supply must stay above. */
  readonly sags: SagHistory;
  readonly mechanisms: readonly MechanismHistory[];
  /** Own protectors in the order of their mechanisms, then shared ones in theirs. */
  readonly protectors: readonly ProtectorHistory[];
  readonly samples: readonly RobotSample[];
  /** True where there were too many to keep, and lines between those that are left pass the others. */
  readonly thinned: boolean;
}

export interface SagHistory {
  readonly count: number;
  /** The first ones. */
  readonly stretches: readonly SagStretch[];
  /** The longest; null without any. */
  readonly longest: SagStretch | null;
}

export interface SagStretch {
  readonly startS: number;
  readonly lastsS: number;
  readonly lowestV: number;
  readonly lowestAtS: number;
  /** Mechanisms that moved, or tried to, in this time; rising. */
  readonly moved: readonly number[];
  /** What each mechanism took from the supply at the lowest voltage, A. */
  readonly supplyA: readonly number[];
}

export interface MechanismHistory {
  /** One for each step that moves it, in the order of steps. */
  readonly travels: readonly StepTravel[];
  /** From the supply's terminals over all cycles done, what is sent back not credited, J. */
  readonly sourceEnergyJ: number;
  /** °C; null without thermal data. */
  readonly windingPeakC: number | null;
  readonly windingPeakAtS: number | null;
  readonly windingLimitAtS: number | null;
  /** At the end of the run, °C; null without thermal data. */
  readonly windingEndC: number | null;
  readonly housingEndC: number | null;
  /** First moment at which it stood still at full command; null: never. */
  readonly stallsAtS: number | null;
}

/** One step's travel over the cycles followed; a flywheel or roller arrives at its speed. */
export interface StepTravel {
  readonly step: number;
  /** Cycles in which it arrived within the step. */
  readonly arrivals: number;
  /** Cycles in which it did not. */
  readonly misses: number;
  /** From the start of the step; null where it never arrived. */
  readonly firstS: number | null;
  readonly slowestS: number | null;
  /** Last seen on arrival, in the load's own coordinate per second. */
  readonly endSpeed: number | null;
}

export interface ProtectorHistory {
  /** Mechanism that it belongs to; null where it is shared. */
  readonly mechanism: number | null;
  /** Index of the shared protector; null where it is a mechanism's own. */
  readonly shared: number | null;
  readonly openings: readonly Opening[];
  readonly count: number;
  /** The most that it has borne, as a share of what opens it; seen at the ends of the solver's steps. A fuse's slow gate. */
  readonly peakShare: number;
  /** A fuse's fast gate: it may open from here on; null: never. */
  readonly mayOpenAtS: number | null;
  /** A fuse's current then, A. */
  readonly mayOpenA: number | null;
}

export interface Opening {
  readonly atS: number;
  /** null: it stays open. */
  readonly closesAtS: number | null;
  readonly cycle: number;
  readonly step: number;
  /** Current that it carried, A. */
  readonly currentA: number;
  /** True where that is within 5 % of what it holds for ever: the time means nothing. */
  readonly borderline: boolean;
}

/** A moment, for charts. Lists go by mechanism, `open` by protector. */
export interface RobotSample {
  readonly timeS: number;
  readonly supplyVoltageV: number;
  readonly supplyCurrentA: number;
  /** At the supply's terminals, W; below 0 where it is sent back. */
  readonly powerW: readonly number[];
  readonly windingC: readonly (number | null)[];
  readonly open: readonly boolean[];
}

export interface RobotOptions {
  /** Span of time to sample, s; absent: no samples. */
  readonly sampled?: { readonly fromS: number; readonly toS: number };
}
