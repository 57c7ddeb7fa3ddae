/**
 * Everything that the chart of one mechanism over its ratio plots.
 *
 * The map takes many solutions: it is prepared step by step when a chart is asked for, and kept by what it rests on. SI throughout.
 */
import type { AnalysedMechanism, Analysis, Finding } from "../../analysis/analysis.js";
import { ratioEdits } from "../../analysis/ratioEdits.js";
import { mapRatio, type RatioMap } from "../../analysis/ratioMap.js";
import type { RatioPoint } from "../../analysis/ratioPoint.js";
import type { RatioSpan } from "../../analysis/ratioSpans.js";
import { findingsAbout, ruleWords, type State, verdictOf } from "../verdict.js";
import type { ChartFeature } from "./feature.js";
import { mechanismSubjects, noMechanism, whyMechanismIsOld } from "./mechanismSubjects.js";
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

export interface RatioMapChart {
  readonly mechanism: string;
  readonly motorCount: number;
  readonly state: State;
  readonly verdict: string;
  readonly findings: readonly Pick<Finding, "rule" | "level" | "message">[];
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
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

/** Maps that are kept: of what is shown, what is saved, and what was looked at before. */
const KEPT = 12;

export function createRatioMapFeature(): ChartFeature<RatioMapChart, RatioMapWant> {
  const maps = new Map<string, RatioMap>();
  return {
    subjects: mechanismSubjects,
    *prepare(analysis, name) {
      const mechanism = mechanismIn(analysis, name);
      const key = mechanism && keyOf(analysis, mechanism);
      if (mechanism === undefined || key === undefined || maps.has(key)) return;
      const map = yield* mapRatio(analysis, mechanism);
      if (map === undefined) return;
      const [oldest] = maps.keys();
      if (maps.size >= KEPT && oldest !== undefined) maps.delete(oldest);
      maps.set(key, map);
    },
    chartOf(analysis, name) {
      const mechanism = mechanismIn(analysis, name);
      const map = mechanism && maps.get(keyOf(analysis, mechanism));
      return mechanism && map && chartFrom(analysis, mechanism, map);
    },
    whyOld: whyMechanismIsOld,
    editsFor: (analysis, _name, { write }) =>
      write === null ? undefined : ratioEdits(analysis, write.mechanism, write.ratio)?.edits,
    nothing: noMechanism,
  };
}

function mechanismIn({ mechanisms }: Analysis, name: string): AnalysedMechanism | undefined {
  return mechanisms.find((one) => one.name === name && one.numbers !== undefined);
}

/** Beside the declaration: what the project's settings and the allowances above it say. */
function keyOf(analysis: Analysis, mechanism: AnalysedMechanism): string {
  const { levels, toothCounts } = analysis;
  const { at, call } = mechanism;
  const comments = call.leadingComments.map(({ text }) => text);
  return JSON.stringify([restsOn(analysis, mechanism), levels.get(at.file), toothCounts.get(at.file), comments]);
}

function chartFrom(analysis: Analysis, mechanism: AnalysedMechanism, map: RatioMap): RatioMapChart {
  const { state, words } = verdictOf(analysis, mechanism);
  const { drive } = mechanism;
  const { fastest, bestEfficiency, toWrite } = map;
  const writable = (one: (RatioPoint & { readonly words: string }) | null) => one && { ...pointFrom(one), words: one.words };
  return {
    mechanism: mechanism.name,
    motorCount: drive?.motorCount ?? 1,
    state,
    verdict: words,
    findings: findingsAbout(analysis, mechanism).map(({ rule, level, message }) => ({ rule, level, message })),
    assumed: [
      ...mechanism.assumed,
      "Losses and inertias of the stages stay as they are at every ratio.",
      ...(map.middleOnly ? ["Over the ratio, rules are judged for the middle of each range."] : []),
    ],
    notChecked: mechanism.notChecked,
    hasTravel: mechanism.numbers?.travel !== null,
    withinS: drive?.withinS ?? null,
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
