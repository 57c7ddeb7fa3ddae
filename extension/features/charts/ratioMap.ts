/**
 * Everything that the chart of one mechanism over its ratio plots.
 *
 * The map takes many solutions: it is prepared step by step when a chart is asked for, and kept by what it rests on. SI throughout.
 */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { ratioEdits } from "../../analysis/ratioEdits.js";
import { mapRatio, type RatioMap } from "../../analysis/ratioMap.js";
import type { RatioPoint } from "../../analysis/ratioPoint.js";
import type { RatioSpan } from "../../analysis/ratioSpans.js";
import { ruleWords } from "../verdict.js";
import type { ChartFeature } from "./feature.js";
import { headOf, type MechanismHead } from "./mechanismHead.js";
import { mechanismSubjects, noMechanism, whyMechanismIsOld } from "./mechanismSubjects.js";
import { createPreparedCharts } from "./preparedCharts.js";
import { restsOn } from "./restsOn.js";

export interface RatioMapPoint {
  readonly ratio: number;
  readonly timeS: number | null;
  readonly outputRadPerS: number;
  readonly currentA: number;
  readonly stallShare: number | null;
  readonly efficiency: number | null;
  /** In words. */
  readonly breaks: readonly string[];
}

export interface RatioMapChart extends MechanismHead {
  readonly hasTravel: boolean;
  readonly withinS: number | null;
  readonly samples: readonly RatioMapPoint[];
  readonly kept: readonly RatioSpan[];
  readonly broken: readonly { readonly words: string; readonly spans: readonly RatioSpan[] }[];
  readonly neverKept: readonly string[];
  readonly now: RatioMapPoint;
  readonly fastest: RatioMapPoint | null;
  readonly bestEfficiency: RatioMapPoint | null;
  readonly toWrite: { readonly fastest: WritablePoint | null; readonly bestEfficiency: WritablePoint | null };
  readonly stock: RatioMap["stock"];
  readonly anyRatio: boolean;
}

type WritablePoint = RatioMapPoint & { readonly words: string };

export interface RatioMapWant {
  readonly write: { readonly mechanism: string; readonly ratio: number } | null;
}

export function createRatioMapFeature(): ChartFeature<RatioMapChart, RatioMapWant> {
  return {
    subjects: mechanismSubjects,
    ...createPreparedCharts({ keyOf, prepare: mapRatio, chartFrom }),
    whyOld: whyMechanismIsOld,
    editsFor: (analysis, _name, { write }) =>
      write === null ? undefined : ratioEdits(analysis, write.mechanism, write.ratio)?.edits,
    nothing: noMechanism,
  };
}

/** Beside the declaration: what the project's settings and the allowances above it say. */
function keyOf(analysis: Analysis, mechanism: AnalysedMechanism): string {
  const { levels, toothCounts } = analysis;
  const { at, call } = mechanism;
  const comments = call.leadingComments.map(({ text }) => text);
  return JSON.stringify([restsOn(analysis, mechanism), levels.get(at.file), toothCounts.get(at.file), comments]);
}

function chartFrom(analysis: Analysis, mechanism: AnalysedMechanism, map: RatioMap): RatioMapChart {
  const head = headOf(analysis, mechanism);
  const { fastest, bestEfficiency, toWrite } = map;
  const writable = (one: (RatioPoint & { readonly words: string }) | null) => one && { ...pointFrom(one), words: one.words };
  return {
    ...head,
    assumed: [
      ...head.assumed,
      "Losses and inertias of the stages stay as they are at every ratio.",
      ...(map.middleOnly ? ["Over the ratio, rules are judged for the middle of each range."] : []),
    ],
    hasTravel: mechanism.numbers?.travel !== null,
    withinS: mechanism.drive?.withinS ?? null,
    samples: map.samples.map(pointFrom),
    kept: map.kept,
    broken: map.broken.map(({ rule, spans }) => ({ words: ruleWords(rule), spans })),
    neverKept: map.neverKept.map(ruleWords),
    now: pointFrom(map.now),
    fastest: fastest && pointFrom(fastest),
    bestEfficiency: bestEfficiency && pointFrom(bestEfficiency),
    toWrite: { fastest: writable(toWrite.fastest), bestEfficiency: writable(toWrite.bestEfficiency) },
    stock: map.stock,
    anyRatio: map.anyRatio,
  };
}

function pointFrom({
  ratio,
  timeS,
  outputRadPerS,
  motorCurrentA,
  stallShare,
  motorEfficiency,
  breaks,
}: RatioPoint): RatioMapPoint {
  return {
    ratio,
    timeS,
    outputRadPerS,
    currentA: motorCurrentA,
    stallShare,
    efficiency: motorEfficiency,
    breaks: breaks.map(ruleWords),
  };
}
