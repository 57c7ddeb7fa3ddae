/**
 * What changed of a mechanism since the last commit: its numbers that read differently, old and new.
 *
 * Judges nothing: whether that is better or worse, the verdict beside it says.
 */
import type { AnalysedMechanism } from "../analysis/analysis.js";
import type { MechanismNumbers } from "../model/numbers.js";
import { writeNumber, writeQuantity, writeShare } from "../units/write.js";

/** The mechanism as the last commit has it: `null` where it is not in it, `undefined` where that is not known, or not yet. */
export type Committed = (mechanism: AnalysedMechanism) => AnalysedMechanism | null | undefined;

/** Nothing to compare with. */
export const NO_COMMIT: Committed = () => undefined;

/** "current 1.9 → 2.7 A": the numbers that moved, the most telling first; none where both read the same or one is unknown. */
export function movedSince(committed: Committed, mechanism: AnalysedMechanism): string[] {
  const before = committed(mechanism)?.numbers;
  const { numbers } = mechanism;
  if (before === undefined || numbers === undefined) return [];
  return COMPARED.flatMap(({ label, write }) => {
    const [old, now] = [write(before), write(numbers)];
    return old === now ? [] : [`${label} ${withoutUnitOf(old, now)} → ${now}`];
  });
}

/** One line for a hover; `undefined` where nothing moved. */
export function sinceCommitLine(committed: Committed, mechanism: AnalysedMechanism): string | undefined {
  if (committed(mechanism) === null) return "New since the last commit.";
  const moved = movedSince(committed, mechanism);
  return moved.length === 0 ? undefined : `${moved.join(", ")} since the last commit`;
}

const COMPARED: readonly { readonly label: string; write(numbers: MechanismNumbers): string }[] = [
  { label: "current", write: ({ hardest }) => writeQuantity(hardest.motorCurrentA, "current") },
  { label: "share of stall", write: ({ hardest }) => (hardest.stallShare === null ? "none" : writeShare(hardest.stallShare)) },
  { label: "travel", write: ({ travel }) => (travel === null ? "none" : arrival(travel.timeS)) },
  { label: "ratio", write: ({ ratio }) => writeNumber(ratio) },
];

function arrival(timeS: number | null): string {
  return timeS === null ? "never arrives" : writeQuantity(timeS, "time");
}

/** "1.9 A" before "2.7 A" is "1.9": a unit that both have stands once. */
function withoutUnitOf(old: string, now: string): string {
  const unit = / [^ \d]+$/.exec(now)?.[0];
  return unit !== undefined && old.endsWith(unit) && /\d/.test(old) ? old.slice(0, -unit.length) : old;
}
