/** A change of declared numbers that might clear a finding. Says what to set; where that is written, and whether it helps, is found elsewhere. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Drive } from "../model/drive.js";
import type { MechanismSolution } from "../model/solve.js";

export interface Change {
  readonly sets: readonly Setting[];
  /** What is done, such as "stage 1 with 16 and 48 teeth". */
  readonly words: string;
}

export type Setting =
  /** A field of the mechanism; added where it is not written yet. */
  | { readonly field: "motorCount" | "within" | "pwmDuty" | "motorCurrentLimit"; readonly value: number | string }
  /** An argument of a stage: a tooth count or a plain ratio. */
  | { readonly stage: number; readonly argument: number; readonly value: number }
  /** One more spur stage behind the others. */
  | { readonly addSpur: readonly [driver: number, driven: number] };

export interface Situation extends MechanismSolution {
  readonly mechanism: Mechanism;
  readonly drive: Drive;
  /** How far the finding is beyond its limit, as the rule counts it. */
  readonly excess: number;
  /** Tooth counts in stock, rising. */
  readonly toothCounts: readonly number[];
}
