/** Ratio maps as the page gets them, from declarations in a string, through the whole way. */
import type { Analysis } from "../../extension/analysis/analysis.js";
import { createRatioMapFeature } from "../../extension/features/charts/ratioMap.js";
import { chartAnswerSchema } from "../../extension/protocol/chartMessages.js";
import type { ShownChart } from "../../extension/protocol/charts/views.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { analyseFixture } from "./chartFixture.js";

type Feature = ReturnType<typeof createRatioMapFeature>;

/** Prepares a map to its end. */
export function prepare(feature: Feature, analysis: Analysis, mechanism: string): number {
  let steps = 0;
  for (const work = feature.prepare?.(analysis, mechanism, { write: null }); work?.next().done === false; ) steps += 1;
  return steps;
}

export function ratioMapShown(source: string, mechanism: string, saved?: string): ShownChart<"ratio-map"> {
  const feature = createRatioMapFeature();
  const of = (text: string) => {
    const analysis = analyseFixture(text);
    prepare(feature, analysis, mechanism);
    return feature.chartOf(analysis, mechanism, { write: null }) ?? null;
  };
  const parts = { chart: of(source), saved: saved === undefined ? null : of(saved), old: null };
  const answer = readMessage(chartAnswerSchema, JSON.parse(JSON.stringify({ kind: "chart", view: "ratio-map", ...parts })));
  if (answer?.kind !== "chart" || answer.view !== "ratio-map") throw new Error(`There is no ratio map of ${mechanism}.`);
  return answer;
}
