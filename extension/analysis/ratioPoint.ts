/** What a mechanism does at another ratio, and which rules it breaks there, as the project's settings and allowances count them. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Drive } from "../model/drive.js";
import { lazySolution } from "../model/lazySolution.js";
import { withRatioTimes } from "../model/ratioSearch.js";
import { isLate } from "../rules/late.js";
import type { MechanismFacts, RuleId } from "../rules/rule.js";
import { MECHANISM_RULES } from "../rules/table.js";
import { allowedRules } from "./allowanceComments.js";
import type { AnalysedMechanism, Analysis } from "./analysis.js";
import { type Corner, cornersOf } from "./corners.js";
import { robotOf, supplyCallOf } from "./lentSupply.js";
import { rankOf } from "./rank.js";

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

export type PointReader = (ratio: number) => RatioPoint;

export interface RatioReader {
  readonly pointAt: PointReader;
  /** True where rules are judged with the middle of ranges alone: there are too many of them for every combination. */
  readonly middleOnly: boolean;
}

/** Combinations of ranges' ends up to this many are all judged at every ratio. */
const MOST_CORNERS = 8;

export function createRatioReader(
  analysis: Analysis,
  mechanism: AnalysedMechanism,
  declared: Mechanism,
  drive: Drive,
): RatioReader {
  const isBroken = createJudge(analysis, mechanism);
  const corners = cornersIn(analysis, mechanism, declared);
  const middleOnly = corners.length > MOST_CORNERS;
  const nominal = createFacts(declared, drive);
  const judged = corners.length === 0 || middleOnly ? [] : corners.map((one) => createFacts(one.mechanism, driveAt(one, drive)));
  return {
    middleOnly,
    pointAt(ratio) {
      const facts = nominal(ratio / declared.ratio);
      const { hardest } = facts.numbers;
      const own = isBroken(facts);
      const breaks = judged.length === 0 ? own : union(judged.map((factsAt) => isBroken(factsAt(ratio / declared.ratio))));
      return {
        ratio,
        stallShare: hardest.stallShare,
        motorCurrentA: hardest.motorCurrentA,
        // What stalls does not arrive; following it is slow.
        timeS: own.includes("stalls") ? null : (facts.travel?.timeS ?? null),
        outputRadPerS: hardest.motorSpeedRadPerS / ratio,
        motorEfficiency: hardest.motorEfficiency,
        breaks,
      };
    },
  };
}

/** Each rule speaks for its own worst corner. */
function union(lists: readonly (readonly RuleId[])[]): RuleId[] {
  const found = new Set(lists.flat());
  return MECHANISM_RULES.map(({ id }) => id).filter((id) => found.has(id));
}

function cornersIn({ robots }: Analysis, { call }: AnalysedMechanism, declared: Mechanism): readonly Corner[] {
  const robot = declared.si.supply === undefined ? robotOf(declared, robots) : undefined;
  return cornersOf(call, robot && supplyCallOf(robot));
}

function driveAt({ mechanism, supply }: Corner, nominal: Drive): Drive {
  const lent = mechanism.si.supply === undefined ? (supply ?? nominal.supply) : undefined;
  return lent === undefined ? mechanism.si : { ...mechanism.si, supply: lent };
}

/** What a declaration comes to with its whole ratio times a factor; each result is worked out when a rule first asks for it. */
function createFacts(declared: Mechanism, drive: Drive): (factor: number) => MechanismFacts {
  // A blocked shaft knows no ratio.
  const { stall } = lazySolution(drive);
  return (factor) => {
    const changed = withRatioTimes(drive, factor);
    const solution = lazySolution(changed);
    return {
      mechanism: { ...declared, ratio: declared.ratio * factor },
      drive: changed,
      numbers: solution.numbers,
      get travel() {
        return solution.travel;
      },
      get hold() {
        return solution.hold;
      },
      stall,
      get turning() {
        return solution.turning;
      },
      get repeats() {
        return solution.repeats;
      },
    };
  };
}

/** The rules of level warning or error that facts break. */
function createJudge(analysis: Analysis, { at, call }: AnalysedMechanism): (facts: MechanismFacts) => RuleId[] {
  const allowed = allowedRules(call);
  const levels = analysis.levels.get(at.file) ?? {};
  return (facts) => {
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
}
