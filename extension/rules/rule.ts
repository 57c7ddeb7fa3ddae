/**
 * What a rule is: a name, a level, and a judgement over facts that the model computed.
 *
 * A rule sees one mechanism or one motor. It never looks at source text; where a finding sits is decided by the analysis.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Motor } from "../declarations/motor.js";
import type { Drive } from "../model/drive.js";
import type { MechanismSolution } from "../model/solve.js";

export type Level = "error" | "warning" | "information";

export type RuleId =
  | "stalls"
  | "cannot-hold"
  | "beyond-speed"
  | "past-peak"
  | "trips"
  | "unprotected"
  | "overheats"
  | "overloads"
  | "sags"
  | "late"
  | "slips"
  | "backdrives"
  | "no-headroom"
  | "sheet-contradicts"
  | "not-constant"
  | "bad-declaration";

/** Numbers, and the runs behind them. */
export interface MechanismFacts extends MechanismSolution {
  readonly mechanism: Mechanism;
  /** What the model was told: the declaration with the supply that it runs on. */
  readonly drive: Drive;
}

/** What a rule has to say: the two numbers that it compares, with units, and one way out. */
export interface Verdict {
  readonly message: string;
  /** How bad it is, to find the worst corner of ranges: what is compared over its limit; only compared within one rule. */
  readonly excess: number;
  /** Fields of the declaration that the message speaks of, from the argument object inwards: `["within"]`. */
  readonly blames?: readonly (readonly (string | number)[])[];
  /** A level other than the rule's own. */
  readonly level?: Level;
}

export interface MechanismRule {
  readonly id: RuleId;
  readonly level: Level;
  /** Rules that have nothing to add where this one speaks. */
  readonly silences: readonly RuleId[];
  judge(facts: MechanismFacts): Verdict | undefined;
}

export interface MotorRule {
  readonly id: RuleId;
  readonly level: Level;
  judge(motor: Motor): Verdict | undefined;
}
