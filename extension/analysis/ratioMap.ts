/**
 * A mechanism over its ratio: which ratios keep every rule, what they lead to, and the best among them.
 *
 * The whole ratio is varied by the first stage's; losses and inertias stay. Judged with the middle of ranges. Computed when asked for, a
 * ratio at a time, so that a host can stop it.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import { bestEfficiencyPoint } from "../model/bestPoints.js";
import type { Drive } from "../model/drive.js";
import { hardestPosition } from "../model/hardest.js";
import { lazySolution } from "../model/lazySolution.js";
import { availableLine } from "../model/line.js";
import { quickestRatio, withRatioTimes } from "../model/ratioSearch.js";
import { COMMON_TOOTH_COUNTS } from "../proposals/stock.js";
import { stockRatios } from "../proposals/stockRatios.js";
import { isLate } from "../rules/late.js";
import type { MechanismFacts, RuleId } from "../rules/rule.js";
import { MECHANISM_RULES } from "../rules/table.js";
import { allowedRules } from "./allowances.js";
import type { AnalysedMechanism, Analysis } from "./analysis.js";
import { goldenLeast } from "./goldenLeast.js";
import { rankOf } from "./proveChange.js";

export interface RatioPoint {
  readonly ratio: number;
  readonly stallShare: number | null;
  /** At the hardest position, one motor. */
  readonly motorCurrentA: number;
  /** Of the travel; null for a load without one, or where it does not arrive. */
  readonly timeS: number | null;
  /** Of the output shaft at the hardest position. */
  readonly outputRadPerS: number;
  readonly motorEfficiency: number | null;
  /** Rules of level warning or error that it breaks. */
  readonly breaks: readonly RuleId[];
}

export interface RatioSpan {
  readonly from: number;
  readonly to: number;
}

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
  readonly stock: readonly { readonly ratio: number; readonly words: string; readonly gears: 1 | 2; readonly keeps: boolean }[];
  /** True where any ratio can be had: a plain reduction. */
  readonly anyRatio: boolean;
}

/** Without these kept the mechanism does not do what is asked of it. */
const ESSENTIAL: ReadonlySet<RuleId> = new Set(["stalls", "cannot-hold", "beyond-speed", "late"]);

const SAMPLES = 64;
/** Halvings of the span between a ratio that keeps a rule and its neighbour that does not: to a ten-thousandth of it. */
const HALVINGS = 13;

/** `undefined` where the mechanism has no numbers. Yields after each ratio. */
export function* mapRatio(analysis: Analysis, mechanism: AnalysedMechanism): Generator<undefined, RatioMap | undefined> {
  const { declared, drive } = mechanism;
  if (declared === undefined || drive === undefined || mechanism.numbers === undefined) return undefined;
  const pointAt = createPointReader(analysis, mechanism, declared, drive);
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
  const fastest = yield* fastestIn(kept, points, { keeps, pointAt });
  if (fastest !== null) points.push(fastest);
  const toothCounts = analysis.toothCounts.get(mechanism.at.file) ?? COMMON_TOOTH_COUNTS;
  const isKept = (ratio: number): boolean => kept.some((span) => span.from <= ratio && ratio <= span.to);
  return {
    samples: distinct(sorted()),
    kept,
    broken,
    neverKept,
    now,
    fastest,
    bestEfficiency,
    stock: stockRatios({ mechanism: declared, toothCounts }, from, to).map(({ ratio, change, gears }) => ({
      ratio,
      words: change.words,
      gears,
      keeps: isKept(ratio),
    })),
    anyRatio: declared.stages.some(({ kind }) => kind === "reduction"),
  };
}

type PointReader = (ratio: number) => RatioPoint;

function createPointReader(analysis: Analysis, { at, call }: AnalysedMechanism, declared: Mechanism, drive: Drive): PointReader {
  const allowed = allowedRules(call);
  const levels = analysis.levels.get(at.file) ?? {};
  // A blocked shaft knows no ratio.
  const { stall } = lazySolution(drive);
  const breaks = (facts: MechanismFacts): RuleId[] => {
    const silenced = new Set<RuleId>();
    return MECHANISM_RULES.flatMap(({ id, level, silences, judge }) => {
      if (silenced.has(id)) return [];
      // Its way out is dear, and not told here.
      const verdict = id === "late" ? undefined : judge(facts);
      if (id === "late" ? !isLate(facts) : verdict === undefined) return [];
      for (const other of silences) silenced.add(other);
      const told = levels[id] ?? verdict?.level ?? level;
      return told === "off" || allowed.has(id) || rankOf(told) < rankOf("warning") ? [] : [id];
    });
  };
  return (ratio) => {
    const changed = withRatioTimes(drive, ratio / declared.ratio);
    const solution = lazySolution(changed);
    const facts: MechanismFacts = {
      mechanism: { ...declared, ratio },
      drive: changed,
      numbers: solution.numbers,
      get travel() {
        return solution.travel;
      },
      get hold() {
        return solution.hold;
      },
      stall,
    };
    const { hardest } = solution.numbers;
    const broken = breaks(facts);
    return {
      ratio,
      stallShare: hardest.stallShare,
      motorCurrentA: hardest.motorCurrentA,
      // What stalls does not arrive; following it is slow.
      timeS: broken.includes("stalls") ? null : (solution.travel?.timeS ?? null),
      outputRadPerS: hardest.motorSpeedRadPerS / ratio,
      motorEfficiency: hardest.motorEfficiency,
      breaks: broken,
    };
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

interface Edges {
  readonly pointAt: PointReader;
  readonly onPoint: (point: RatioPoint) => void;
}

/** Spans of neighbours that keep the rules, their ends found by halving; each end lies where they are kept. */
function* keptSpans(
  points: readonly RatioPoint[],
  keeps: (point: RatioPoint) => boolean,
  { pointAt, onPoint }: Edges,
): Generator<undefined, RatioSpan[]> {
  const edge = function* (inside: RatioPoint, outside: RatioPoint): Generator<undefined, number> {
    let [low, high] = [inside, outside];
    for (let round = 0; round < HALVINGS; round++) {
      yield;
      const middle = pointAt(Math.sqrt(low.ratio * high.ratio));
      if (keeps(middle)) low = middle;
      else high = middle;
    }
    onPoint(low);
    onPoint(high);
    return low.ratio;
  };
  const spans: RatioSpan[] = [];
  let from: number | undefined;
  for (const [index, point] of points.entries()) {
    const before = points[index - 1];
    const passes = keeps(point);
    if (passes && from === undefined) from = before === undefined ? point.ratio : yield* edge(point, before);
    if (passes || from === undefined || before === undefined) continue;
    spans.push({ from, to: yield* edge(before, point) });
    from = undefined;
  }
  const last = points.at(-1);
  if (from !== undefined && last !== undefined) spans.push({ from, to: last.ratio });
  return spans;
}

/** Spans of neighbours that pass a test, ending midway to those that do not: exact where the ends of what is kept are among them. */
function spansBetween(points: readonly RatioPoint[], test: (point: RatioPoint) => boolean): RatioSpan[] {
  const spans: RatioSpan[] = [];
  let from: number | undefined;
  for (const [index, point] of points.entries()) {
    const before = points[index - 1]?.ratio ?? point.ratio;
    const passes = test(point);
    if (passes && from === undefined) from = Math.sqrt(before * point.ratio);
    if (passes || from === undefined) continue;
    spans.push({ from, to: Math.sqrt(before * point.ratio) });
    from = undefined;
  }
  const last = points.at(-1);
  if (from !== undefined && last !== undefined) spans.push({ from, to: last.ratio });
  return spans;
}

interface Search {
  readonly keeps: (point: RatioPoint) => boolean;
  readonly pointAt: PointReader;
}

/** In each span by golden section around its best sample; the time has one minimum over the ratio. */
function* fastestIn(
  spans: readonly RatioSpan[],
  points: readonly RatioPoint[],
  { keeps, pointAt }: Search,
): Generator<undefined, RatioPoint | null> {
  const hasTravel = points.some(({ timeS }) => timeS !== null);
  const costOf = ({ timeS, outputRadPerS }: RatioPoint): number =>
    hasTravel ? (timeS ?? Number.POSITIVE_INFINITY) : -outputRadPerS;
  let best: RatioPoint | null = null;
  const consider = (point: RatioPoint): void => {
    if (keeps(point) && Number.isFinite(costOf(point)) && (best === null || costOf(point) < costOf(best))) best = point;
  };
  for (const { from, to } of spans) {
    const inside = points.filter(({ ratio }) => from <= ratio && ratio <= to).sort((one, other) => one.ratio - other.ratio);
    const least = inside.reduce((found, point, index) => (costOf(point) < costOf(inside[found] ?? point) ? index : found), 0);
    const [left, right] = [inside[least - 1]?.ratio ?? from, inside[least + 1]?.ratio ?? to];
    for (const point of inside) consider(point);
    yield* goldenLeast(Math.log(left), Math.log(right), (log) => {
      const point = pointAt(Math.exp(log));
      consider(point);
      return costOf(point);
    });
  }
  return best;
}

function distinct(points: readonly RatioPoint[]): RatioPoint[] {
  return points.filter(({ ratio }, index) => ratio !== points[index - 1]?.ratio);
}
