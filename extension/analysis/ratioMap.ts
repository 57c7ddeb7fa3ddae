/**
 * A mechanism over its ratio: which ratios keep every rule, what they lead to, and the best among them.
 *
 * The whole ratio is varied by the first stage's; losses and inertias stay. Numbers are for the middle of ranges,
 * rules for their worst corner, as in the analysis. Computed when asked for, a
 * ratio at a time, so that a host can stop it.
 */
import { bestEfficiencyPoint } from "../model/bestPoints.js";
import type { Drive } from "../model/drive.js";
import { hardestPosition } from "../model/hardest.js";
import { availableLine } from "../model/line.js";
import { quickestRatio } from "../model/ratioSearch.js";
import { COMMON_TOOTH_COUNTS } from "../proposals/stock.js";
import { plainRatios, stockRatios } from "../proposals/stockRatios.js";
import type { RuleId } from "../rules/rule.js";
import { MECHANISM_RULES } from "../rules/table.js";
import type { AnalysedMechanism, Analysis } from "./analysis.js";
import { bestWritable, fastestIn, interpolated, timeCost, type WritableRatio } from "./ratioBest.js";
import { createRatioReader, type RatioPoint } from "./ratioPoint.js";
import { keptSpans, type RatioSpan, spansBetween } from "./ratioSpans.js";

export interface RatioMap {
  /** Rising ratio; the marked ones are among them. */
  readonly samples: readonly RatioPoint[];
  /** Where every rule is kept that any ratio keeps. */
  readonly kept: readonly RatioSpan[];
  /** By rule that some ratio keeps and some breaks: where it is broken. */
  readonly broken: readonly { readonly rule: RuleId; readonly spans: readonly RatioSpan[] }[];
  /** Rules that no ratio keeps; they do not count against any, unless without them the mechanism does not do its work. */
  readonly neverKept: readonly RuleId[];
  readonly now: RatioPoint;
  /** Shortest travel, or for a load without one the fastest output, among those that keep every rule; null where none does. */
  readonly fastest: RatioPoint | null;
  /** Where the motor wastes least at the hardest position; null where that lies outside, or without a load to stand against. */
  readonly bestEfficiency: RatioPoint | null;
  /** The best of each that can be written into the code and keeps every rule; null where there is none, or the ratio that is does no worse. */
  readonly toWrite: { readonly fastest: WritableRatio | null; readonly bestEfficiency: WritableRatio | null };
  readonly stock: readonly { readonly ratio: number; readonly words: string; readonly gears: 1 | 2; readonly keeps: boolean }[];
  /** True where rules are judged with the middle of ranges alone. */
  readonly middleOnly: boolean;
  /** True where any ratio can be had: a plain reduction. */
  readonly anyRatio: boolean;
}

/** Without these kept the mechanism does not do what is asked of it. */
const ESSENTIAL: ReadonlySet<RuleId> = new Set(["stalls", "cannot-hold", "beyond-speed", "late"]);

const SAMPLES = 64;
/** What is better by less than this share is not worth a change. */
const SAME = 1e-6;

/** `undefined` where the mechanism has no numbers. Yields after each ratio. */
export function* mapRatio(analysis: Analysis, mechanism: AnalysedMechanism): Generator<undefined, RatioMap | undefined> {
  const { declared, drive } = mechanism;
  if (declared === undefined || drive === undefined || mechanism.numbers === undefined) return undefined;
  const { pointAt, middleOnly } = createRatioReader(analysis, mechanism, declared, drive);
  const { from, to } = rangeOf(drive, declared.ratio);
  const points: RatioPoint[] = [];
  const add = (ratio: number): RatioPoint => {
    const point = pointAt(ratio);
    points.push(point);
    return point;
  };
  for (let step = 0; step <= SAMPLES; step++) {
    yield;
    add(from * (to / from) ** (step / SAMPLES));
  }
  const now = add(declared.ratio);
  const efficientAt = mostEfficientRatio(drive, declared.ratio);
  const bestEfficiency = efficientAt === null || efficientAt < from || efficientAt > to ? null : add(efficientAt);
  const neverKept = rulesIn(points).filter((rule) => points.every((point) => isBrokenOrSilent(rule, point)));
  const excused = new Set(neverKept.filter((rule) => !ESSENTIAL.has(rule)));
  const counted = ({ breaks }: RatioPoint): readonly RuleId[] => breaks.filter((rule) => !excused.has(rule));
  const keeps = (point: RatioPoint): boolean => counted(point).length === 0;
  const sorted = () => points.toSorted((one, other) => one.ratio - other.ratio);
  const kept = yield* keptSpans(sorted(), keeps, { pointAt, onPoint: (point) => points.push(point) });
  const broken = rulesIn(points)
    .filter((rule) => !neverKept.includes(rule))
    .map((rule) => ({ rule, spans: spansBetween(sorted(), ({ breaks }) => breaks.includes(rule)) }));
  const search = { keeps, pointAt, cost: timeCost(points) };
  const fastest = yield* fastestIn(kept, points, search);
  if (fastest !== null) points.push(fastest);
  const isKept = (ratio: number): boolean => kept.some((span) => span.from <= ratio && ratio <= span.to);
  const toothCounts = analysis.toothCounts.get(mechanism.at.file) ?? COMMON_TOOTH_COUNTS;
  const stock = stockRatios({ mechanism: declared, toothCounts }, from, to);
  const aims = [fastest, bestEfficiency].flatMap((point) => (point === null ? [] : [point.ratio]));
  const choices = [...stock, ...aims.flatMap((ratio) => plainRatios(declared, ratio))].filter(({ ratio }) => isKept(ratio));
  const toEfficient = (ratio: number): number =>
    bestEfficiency === null ? Number.POSITIVE_INFINITY : Math.abs(Math.log(ratio / bestEfficiency.ratio));
  const quickest = yield* bestWritable(choices, interpolated(sorted(), search.cost), search);
  const byEfficiency = { ...search, cost: ({ ratio }: RatioPoint) => toEfficient(ratio) };
  const efficient = yield* bestWritable(choices, toEfficient, byEfficiency);
  const better = (found: WritableRatio | null, { cost }: typeof search): WritableRatio | null =>
    found === null || (keeps(now) && cost(now) <= cost(found) + SAME * Math.abs(cost(found))) ? null : found;
  return {
    samples: distinct(sorted()),
    kept,
    broken,
    neverKept,
    now,
    fastest,
    bestEfficiency,
    toWrite: { fastest: better(quickest, search), bestEfficiency: better(efficient, byEfficiency) },
    stock: stock.map(({ ratio, change, gears }) => ({ ratio, words: change.words, gears, keeps: isKept(ratio) })),
    middleOnly,
    anyRatio: declared.stages.some(({ kind }) => kind === "reduction"),
  };
}

/** From where it stalls to well beyond the quickest ratio, the one that is well inside. */
function rangeOf(drive: Drive, ratio: number): RatioSpan {
  const share = hardestPosition(drive).motorTorqueNm / availableLine(drive).stallTorqueNm;
  const stallsAt = Number.isFinite(share) && share > 0 ? ratio * share : ratio / 4;
  const quickest = quickestRatio(drive)?.ratio ?? stallsAt * 3;
  const from = Math.min(stallsAt * 0.8, ratio / 2, quickest / 2);
  const to = Math.max(stallsAt * 8, ratio * 2, quickest * 3);
  // A ratio that is absurd takes the rest of the axis with it.
  return { from: Math.max(from, to / 1000), to };
}

/** The torque at one motor's shaft goes with one over the ratio. */
function mostEfficientRatio(drive: Drive, ratio: number): number | null {
  const { motorTorqueNm } = hardestPosition(drive);
  const best = bestEfficiencyPoint(drive);
  return motorTorqueNm > 0 && best !== undefined && best.torqueNm > 0 ? (ratio * motorTorqueNm) / best.torqueNm : null;
}

/** What another rule silences is not kept: nothing is known of it. */
function isBrokenOrSilent(rule: RuleId, { breaks }: RatioPoint): boolean {
  return breaks.some((one) => one === rule || MECHANISM_RULES.some(({ id, silences }) => id === one && silences.includes(rule)));
}

function rulesIn(points: readonly RatioPoint[]): RuleId[] {
  const found = new Set(points.flatMap(({ breaks }) => breaks));
  return MECHANISM_RULES.map(({ id }) => id).filter((id) => found.has(id));
}

function distinct(points: readonly RatioPoint[]): RatioPoint[] {
  return points.filter(({ ratio }, index) => ratio !== points[index - 1]?.ratio);
}
