/**
 * Everything that the chart of what matters plots: by how much each declared number moves the results, and how far they spread over what is
 * declared as uncertain.
 *
 * Both take hundreds of solutions: they are prepared when a chart is asked for, and kept by what they rest on.
 */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { type Sensitivity, sensitivitiesOf } from "../../analysis/sensitivity.js";
import { drawSpread, type Spread } from "../../analysis/spread.js";
import { inputWords } from "../inputWords.js";
import type { ChartFeature } from "./feature.js";
import { headOf, type MechanismHead } from "./mechanismHead.js";
import { mechanismSubjects, noMechanism, whyMechanismIsOld } from "./mechanismSubjects.js";
import { createPreparedCharts } from "./preparedCharts.js";
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

export interface MattersChart extends MechanismHead {
  /** In the order of their greatest effect. */
  readonly inputs: readonly MattersInput[];
  /** Null where nothing is declared as uncertain. */
  readonly spread: Spread | null;
}

interface Prepared {
  readonly inputs: readonly MattersInput[];
  readonly spread: Spread | null;
}

export function createMattersFeature(): ChartFeature<MattersChart, unknown> {
  return {
    subjects: mechanismSubjects,
    ...createPreparedCharts({ keyOf, prepare, chartFrom }),
    whyOld: whyMechanismIsOld,
    nothing: noMechanism,
  };
}

function* prepare(analysis: Analysis, mechanism: AnalysedMechanism): Generator<undefined, Prepared> {
  yield;
  const inputs = inputsOf(sensitivitiesOf(analysis, mechanism));
  yield;
  const spread = yield* drawSpread(analysis, mechanism);
  return { inputs, spread: spread ?? null };
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

function chartFrom(analysis: Analysis, mechanism: AnalysedMechanism, prepared: Prepared): MattersChart {
  return { ...headOf(analysis, mechanism), ...prepared };
}
