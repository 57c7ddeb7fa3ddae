/** Charts of what matters as the page gets them, from declarations in a string, through the whole way. */
import type { Analysis } from "../../extension/analysis/analysis.js";
import { createMattersFeature } from "../../extension/features/charts/matters.js";
import { chartAnswerSchema } from "../../extension/protocol/chartMessages.js";
import type { ShownChart } from "../../extension/protocol/charts/views.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { analyseFixture } from "./chartFixture.js";

type Feature = ReturnType<typeof createMattersFeature>;

/** Works to its end; how many steps that took. */
export function prepareMatters(feature: Feature, analysis: Analysis, mechanism: string): number {
  let steps = 0;
  for (const work = feature.prepare?.(analysis, mechanism, undefined); work?.next().done === false; ) steps += 1;
  return steps;
}

export function mattersShown(source: string, mechanism: string, saved?: string): ShownChart<"matters"> {
  const feature = createMattersFeature();
  const of = (text: string) => {
    const analysis = analyseFixture(text);
    prepareMatters(feature, analysis, mechanism);
    return feature.chartOf(analysis, mechanism, undefined) ?? null;
  };
  const parts = { chart: of(source), saved: saved === undefined ? null : of(saved), old: null };
  const answer = readMessage(chartAnswerSchema, JSON.parse(JSON.stringify({ kind: "chart", view: "matters", ...parts })));
  if (answer?.kind !== "chart" || answer.view !== "matters") throw new Error(`There is no such chart of ${mechanism}.`);
  return answer;
}
