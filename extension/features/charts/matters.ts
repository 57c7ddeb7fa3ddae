/**
 * Everything that the chart of what matters plots: by how much each declared number moves the results, and how far they spread over what is
 * declared as uncertain.
 *
 * Both take hundreds of solutions: they are prepared when a chart is asked for, and kept by what they rest on.
 */
import type { AnalysedMechanism, Analysis, Finding } from "../../analysis/analysis.js";
import { type Sensitivity, sensitivitiesOf } from "../../analysis/sensitivity.js";
import { drawSpread, type Spread } from "../../analysis/spread.js";
import { inputWords } from "../inputWords.js";
import { findingsAbout, type State, verdictOf } from "../verdict.js";
import type { ChartFeature } from "./feature.js";
import { mechanismSubjects, noMechanism, whyMechanismIsOld } from "./mechanismSubjects.js";
import { restsOn } from "./restsOn.js";

/** One declared number; null for a result that it does not move. */
export interface MattersInput {
  /** Such as "stage 1 driven". */
  readonly words: string;
  /** Per cent of the result for one per cent of it. */
  readonly current: number | null;
  readonly time: number | null;
  readonly share: number | null;
}

export interface MattersChart {
  readonly mechanism: string;
  readonly motorCount: number;
  readonly state: State;
  readonly verdict: string;
  readonly findings: readonly Pick<Finding, "rule" | "level" | "message">[];
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
  /** In the order of their greatest effect. */
  readonly inputs: readonly MattersInput[];
  /** Null where nothing is declared as uncertain. */
  readonly spread: Spread | null;
}

interface Prepared {
  readonly inputs: readonly MattersInput[];
  readonly spread: Spread | null;
}

const KEPT = 12;

export function createMattersFeature(): ChartFeature<MattersChart, unknown> {
  const known = new Map<string, Prepared>();
  return {
    subjects: mechanismSubjects,
    *prepare(analysis, name) {
      const mechanism = mechanismIn(analysis, name);
      const key = mechanism && keyOf(analysis, mechanism);
      if (mechanism === undefined || key === undefined || known.has(key)) return;
      yield;
      const inputs = inputsOf(sensitivitiesOf(analysis, mechanism));
      yield;
      const spread = yield* drawSpread(analysis, mechanism);
      const prepared = { inputs, spread: spread ?? null };
      const [oldest] = known.keys();
      if (known.size >= KEPT && oldest !== undefined) known.delete(oldest);
      known.set(key, prepared);
    },
    chartOf(analysis, name) {
      const mechanism = mechanismIn(analysis, name);
      const prepared = mechanism && known.get(keyOf(analysis, mechanism));
      return mechanism && prepared && chartFrom(analysis, mechanism, prepared);
    },
    whyOld: whyMechanismIsOld,
    nothing: noMechanism,
  };
}

function mechanismIn({ mechanisms }: Analysis, name: string): AnalysedMechanism | undefined {
  return mechanisms.find((one) => one.name === name && one.numbers !== undefined);
}

function keyOf(analysis: Analysis, mechanism: AnalysedMechanism): string {
  return JSON.stringify(restsOn(analysis, mechanism));
}

function inputsOf(sensitivities: readonly Sensitivity[]): MattersInput[] {
  const inputs = new Map<string, { words: string; current: number | null; time: number | null; share: number | null }>();
  for (const { input, output, perCentPerPerCent } of sensitivities) {
    const one = inputs.get(input) ?? { words: inputWords(input), current: null, time: null, share: null };
    one[output] = perCentPerPerCent;
    inputs.set(input, one);
  }
  return [...inputs.values()];
}

function chartFrom(analysis: Analysis, mechanism: AnalysedMechanism, { inputs, spread }: Prepared): MattersChart {
  const { state, words } = verdictOf(analysis, mechanism);
  return {
    mechanism: mechanism.name,
    motorCount: mechanism.drive?.motorCount ?? 1,
    state,
    verdict: words,
    findings: findingsAbout(analysis, mechanism).map(({ rule, level, message }) => ({ rule, level, message })),
    assumed: mechanism.assumed,
    notChecked: mechanism.notChecked,
    inputs,
    spread,
  };
}
