/**
 * What a rule over a whole robot is: a judgement over its load cycle on one supply.
 *
 * Its names are those of the mechanisms' rules, and so are its levels and settings. Never looks at source text.
 */
import type { RobotDrive } from "../model/robotDrive.js";
import type { RobotSolution } from "../model/robotSolution.js";
import type { Level, RuleId } from "./rule.js";

export interface RobotFacts {
  readonly drive: RobotDrive;
  readonly solution: RobotSolution;
  /** By index in `drive.mechanisms`. */
  readonly names: readonly string[];
  /** True where a rule has already spoken about a mechanism alone. */
  readonly isTold: (mechanism: number, rule: RuleId) => boolean;
}

/** The two numbers that it compares, with units, and one way out. */
export interface RobotVerdict {
  readonly message: string;
  /** What of the robot it judges: tells it from other verdicts of the same rule over the same robot. */
  readonly subject: string;
  /** Mechanisms that it is about, each with what it has to do with it. */
  readonly about: readonly { readonly mechanism: number; readonly says: string }[];
  /** Fields of the robot's declaration that the message speaks of. */
  readonly blames: readonly (readonly (string | number)[])[];
  /** A level other than the rule's own. */
  readonly level?: Level;
}

export interface RobotRule {
  readonly id: RuleId;
  readonly level: Level;
  judge(facts: RobotFacts): readonly RobotVerdict[];
}
