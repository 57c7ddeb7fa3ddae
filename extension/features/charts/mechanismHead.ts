/** What every chart of a mechanism says of it beside its own numbers. */
import type { AnalysedMechanism, Analysis, Finding } from "../../analysis/analysis.js";
import { findingsAbout, type State, verdictOf } from "../verdict.js";

export interface MechanismHead {
  readonly mechanism: string;
  readonly motorCount: number;
  readonly state: State;
  /** A few words, such as "Past its peak of power". */
  readonly verdict: string;
  readonly findings: readonly Pick<Finding, "rule" | "level" | "message">[];
  /** Plain sentences. */
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
}

export function headOf(analysis: Analysis, mechanism: AnalysedMechanism): MechanismHead {
  const { state, words } = verdictOf(analysis, mechanism);
  return {
    mechanism: mechanism.name,
    motorCount: mechanism.drive?.motorCount ?? 1,
    state,
    verdict: words,
    findings: findingsAbout(analysis, mechanism).map(({ rule, level, message }) => ({ rule, level, message })),
    assumed: mechanism.assumed,
    notChecked: mechanism.notChecked,
  };
}

/** The mechanism of a name, where it has numbers. */
export function mechanismIn({ mechanisms }: Analysis, name: string): AnalysedMechanism | undefined {
  return mechanisms.find((one) => one.name === name && one.numbers !== undefined);
}
