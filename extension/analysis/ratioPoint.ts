/** What a mechanism does at another ratio, and which rules it breaks there, as the project's settings and allowances count them. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Drive } from "../model/drive.js";
import { lazySolution } from "../model/lazySolution.js";
import { withRatioTimes } from "../model/ratioSearch.js";
import { isLate } from "../rules/late.js";
import type { MechanismFacts, RuleId } from "../rules/rule.js";
import { MECHANISM_RULES } from "../rules/table.js";
import { allowedRules } from "./allowances.js";
import type { AnalysedMechanism, Analysis } from "./analysis.js";
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

export function createPointReader(
  analysis: Analysis,
  { at, call }: AnalysedMechanism,
  declared: Mechanism,
  drive: Drive,
): PointReader {
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
      get turning() {
        return solution.turning;
      },
      get repeats() {
        return solution.repeats;
      },
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
