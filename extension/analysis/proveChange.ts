/**
 * Whether edits of the texts clear a finding: the texts are analysed again with them, and nothing may newly come at its level.
 *
 * Mechanisms alone first, since a robot's load cycle takes longer.
 */
import { allowedRules } from "./allowanceComments.js";
import type { Analyser } from "./analyser.js";
import type { AnalysedMechanism, Analysis, Finding } from "./analysis.js";
import { type Difference, differencesOf, predict } from "./predict.js";
import type { Touched } from "./proposal.js";
import { rankOf } from "./rank.js";
import type { RobotCheck } from "./robotsStayGood.js";
import { type Edit, withEdits } from "./writeChange.js";

export interface Proof {
  /** As for proposals. */
  readonly analyse: Analyser["analyse"];
  readonly robotCheck: RobotCheck;
}

/** The changed texts analysed; `undefined` where the edits do not help. Robots are not run for a mechanism's finding. */
export function provenBy(
  analysis: Analysis,
  finding: Finding,
  edits: readonly Edit[],
  { analyse, robotCheck }: Proof,
): Analysis | undefined {
  const roots = [...analysis.files.keys()];
  const texts = withEdits(analysis.snapshot, edits);
  const alone = analyse(roots, texts, true);
  // Without the robots' findings their allowances would count as unused.
  const hasAllowances = analysis.robots.some(({ call }) => allowedRules(call).size > 0);
  const judged = hasAllowances ? alone.findings.filter(({ rule }) => rule !== "bad-declaration") : alone.findings;
  if (isWorse(analysis.findings, judged, finding)) return undefined;
  if (finding.robot === undefined && !hasAllowances) return robotCheck(analysis, alone, finding.level) ? alone : undefined;
  const after = analyse(roots, texts);
  return isWorse(analysis.findings, after.findings, finding) ? undefined : after;
}

/** The finding is still there, or another one newly at its level or above. */
function isWorse(before: readonly Finding[], after: readonly Finding[], finding: Finding): boolean {
  const ranks = new Map<string, number>();
  for (const one of before) ranks.set(keyOf(one), Math.max(ranks.get(keyOf(one)) ?? 0, rankOf(one.level)));
  const cleared = keyOf(finding);
  return after.some((one) => {
    const rank = rankOf(one.level);
    return rank >= rankOf(finding.level) && (keyOf(one) === cleared || (ranks.get(keyOf(one)) ?? -1) < rank);
  });
}

/** Places move with edits: a finding is the same where its rule and what it is about are. */
function keyOf({ rule, mechanism, robot, at }: Finding): string {
  return JSON.stringify([rule, mechanism ?? [at.file, robot]]);
}

/** A mechanism whose numbers an edit changed. */
export interface Changed extends Touched {
  /** Its name, with how its numbers change. */
  readonly told: string;
  /** Its name, with the new number that tells most. */
  readonly brief: string;
}

/** Every mechanism whose numbers the edits for a finding changed, but the one that it is about. */
export function changedBy(before: Analysis, after: Analysis, { rule, mechanism: except }: Finding): Changed[] {
  return after.mechanisms.flatMap((one): Changed[] => {
    const was = before.mechanisms.find(({ name }) => name === one.name);
    if (one.name === except || !hasNumbers(one) || was === undefined || !hasNumbers(was)) return [];
    if (JSON.stringify(one.numbers) === JSON.stringify(was.numbers)) return [];
    const predicted = predict(one.numbers, one.drive);
    const differences = differencesOf(predict(was.numbers, was.drive), predicted, rule);
    const numbers = differences.map(({ now, before: old }) => (old === undefined ? now : `${now} instead of ${old}`));
    return [
      {
        mechanism: one.name,
        predicted,
        told: numbers.length === 0 ? one.name : `${one.name} (${numbers.slice(0, MOST_TOLD).join(", ")})`,
        brief: briefly(one.name, differences),
      },
    ];
  });
}

/** The share of stall, where it changes: it says at once how the mechanism copes. */
function briefly(name: string, differences: readonly Difference[]): string {
  const most = differences.find(({ now }) => now.endsWith("of stall")) ?? differences[0];
  return most === undefined ? name : `${name} (${most.now})`;
}

/** Numbers told of each mechanism that is touched beside; the report holds all. */
const MOST_TOLD = 2;

export function hasNumbers(
  one: AnalysedMechanism,
): one is AnalysedMechanism & Required<Pick<AnalysedMechanism, "numbers" | "drive">> {
  return one.numbers !== undefined && one.drive !== undefined;
}
