/** Which mechanism a chart is of: the one at the caret, else the one that is shown, else any, those of the same file first. */
import type { Analysis } from "../../analysis/analysis.js";
import type { NoChart, Wish } from "./feature.js";

/** Names, the most wanted first. */
export function mechanismSubjects(analysis: Analysis, { mechanisms, file, shownMechanism }: Wish): readonly string[] {
  const atCaret = mechanisms.map(({ name }) => name);
  const kept = shownMechanism === null ? [] : [shownMechanism];
  const others = analysis.mechanisms.toSorted((one, other) => Number(other.at.file === file) - Number(one.at.file === file));
  // Where a loop declares several at once, the one that is shown stays.
  const first = shownMechanism !== null && atCaret.includes(shownMechanism) ? [shownMechanism] : [];
  return [...new Set([...first, ...atCaret, ...kept, ...others.map(({ name }) => name)])];
}

export function whyMechanismIsOld(analysis: Analysis, name: string): string {
  const mechanism = analysis.mechanisms.find((one) => one.name === name);
  const why =
    mechanism === undefined
      ? "The code as it stands does not declare this mechanism."
      : (mechanism.notChecked[0] ?? "A value is missing.");
  return `${why} What is shown is its last result.`;
}

export function noMechanism(analysis: Analysis): NoChart {
  return { reason: analysis.mechanisms.length > 0 ? "nothing-computed" : "nothing-declared", says: [], example: null };
}
