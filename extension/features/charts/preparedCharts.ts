/** Charts that take long: what each rests on is prepared when it is asked for, and kept by all that it depends on. */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import type { ChartFeature } from "./feature.js";
import { mechanismIn } from "./mechanismHead.js";

/** Of what is shown, what is saved, and what was looked at before. */
const KEPT = 12;

interface Preparation<Prepared, Chart> {
  readonly keyOf: (analysis: Analysis, mechanism: AnalysedMechanism) => string;
  /** Step by step; `undefined` where there is nothing to prepare. */
  readonly prepare: (analysis: Analysis, mechanism: AnalysedMechanism) => Generator<undefined, Prepared | undefined>;
  readonly chartFrom: (analysis: Analysis, mechanism: AnalysedMechanism, prepared: Prepared) => Chart;
}

export function createPreparedCharts<Prepared extends object, Chart>({
  keyOf,
  prepare,
  chartFrom,
}: Preparation<Prepared, Chart>): Required<Pick<ChartFeature<Chart, unknown>, "prepare" | "chartOf">> {
  const known = new Map<string, Prepared>();
  return {
    *prepare(analysis, name) {
      const mechanism = mechanismIn(analysis, name);
      const key = mechanism && keyOf(analysis, mechanism);
      if (mechanism === undefined || key === undefined || known.has(key)) return;
      const prepared = yield* prepare(analysis, mechanism);
      if (prepared === undefined) return;
      const [oldest] = known.keys();
      if (known.size >= KEPT && oldest !== undefined) known.delete(oldest);
      known.set(key, prepared);
    },
    chartOf(analysis, name) {
      const mechanism = mechanismIn(analysis, name);
      const prepared = mechanism && known.get(keyOf(analysis, mechanism));
      return mechanism && prepared && chartFrom(analysis, mechanism, prepared);
    },
  };
}
