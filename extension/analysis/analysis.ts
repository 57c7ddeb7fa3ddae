/**
 * What one analysis of a snapshot of texts gives: mechanisms with their numbers, and one list of findings.
 *
 * Plain data. Places are spans of UTF-16 offsets; the server and the report turn them into lines and columns.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Motor } from "../declarations/motor.js";
import type { Robot } from "../declarations/robot.js";
import type { DefinitionCall, FileEvaluation, Snapshot, Span } from "../evaluator/value.js";
import type { Drive } from "../model/drive.js";
import type { MechanismNumbers } from "../model/numbers.js";
import type { RobotDrive } from "../model/robotDrive.js";
import type { RobotNumbers, RobotSolution } from "../model/robotSolution.js";
import type { Level, RuleId } from "../rules/rule.js";

export interface Finding {
  readonly rule: RuleId;
  readonly level: Level;
  /** Name of the mechanism that it is about, or `null`. */
  readonly mechanism: string | null;
  /** Of a finding about a robot: which one, and what of it, as its rule tells them apart. */
  readonly robot?: { readonly name: string; readonly subject: string };
  readonly message: string;
  readonly at: Span;
  readonly related: readonly { readonly at: Span; readonly message: string }[];
}

export interface AnalysedMechanism {
  readonly name: string;
  /** The variable that holds it, else its name argument. */
  readonly at: Span;
  readonly call: DefinitionCall;
  /** Absent where a value is unknown or refused. */
  readonly declared?: Mechanism;
  /** What the model was told: the declaration with the supply that it runs on; present with `numbers`. */
  readonly drive?: Drive;
  /** Absent where the physics could not be run; `notChecked` then says why. */
  readonly numbers?: MechanismNumbers;
  /** Plain sentences. */
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
}

export interface AnalysedMotor {
  readonly at: Span;
  readonly call: DefinitionCall;
  readonly declared: Motor;
}

export interface AnalysedRobot {
  readonly name: string;
  readonly at: Span;
  readonly call: DefinitionCall;
  /** Absent where a value is unknown or refused. */
  readonly declared?: Robot;
  /** What the model was told of its load cycle; present with `numbers`. */
  readonly drive?: RobotDrive;
  /** Absent without a load cycle, or where its physics could not be run; `notChecked` then says why. */
  readonly numbers?: RobotNumbers;
  /** The run behind the numbers. */
  readonly solution?: RobotSolution;
  /** Plain sentences. */
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
}

export type Levels = Readonly<Partial<Record<RuleId, Level | "off">>>;

/** What one file declares: the same object as in the analysis before as long as nothing of it changed. */
export interface FileAnalysis {
  readonly evaluation: FileEvaluation;
  readonly mechanisms: readonly AnalysedMechanism[];
  readonly motors: readonly AnalysedMotor[];
  readonly robots: readonly AnalysedRobot[];
  /** Findings about these, in order of place; one may sit in another file, as where a caller gives a helper the name. */
  readonly findings: readonly Finding[];
}

export interface Analysis {
  /** In order of file, then position; so are findings. */
  readonly mechanisms: readonly AnalysedMechanism[];
  readonly motors: readonly AnalysedMotor[];
  readonly robots: readonly AnalysedRobot[];
  readonly findings: readonly Finding[];
  /** Findings by the file that they sit in; the same list as in the analysis before as long as nothing changed. Files without are absent. */
  readonly findingsIn: ReadonlyMap<string, readonly Finding[]>;
  /** By file, all that were evaluated. A mechanism is under the file of its call, which may be another than that of its place. */
  readonly inFile: ReadonlyMap<string, FileAnalysis>;
  /** Every file that was evaluated, with what it says. */
  readonly files: ReadonlyMap<string, FileEvaluation>;
  /** Files to load before the result is whole; the host loads them and runs again. */
  readonly wanted: readonly string[];
  readonly snapshot: Snapshot;
  /** Levels of rules by file, where the project's settings name them. */
  readonly levels: ReadonlyMap<string, Levels>;
  /** Tooth counts in stock by file, where the project's settings name them. */
  readonly toothCounts: ReadonlyMap<string, readonly number[]>;
}
