/**
 * One line above each mechanism: its verdict and the numbers that decide it.
 *
 * Every declared mechanism has one, computed or not, so that the code below does not jump while it is being edited.
 */
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";
import type { Span } from "../evaluator/value.js";
import { writeQuantity } from "../units/write.js";
import { plainText } from "./inertText.js";
import { outputShaftOf } from "./shaft.js";
import { type Committed, movedSince, NO_COMMIT } from "./sinceCommit.js";
import { verdictOf } from "./verdict.js";

export interface CodeLens {
  readonly span: Span;
  /** Plain text. */
  readonly title: string;
  /** Name of the mechanism whose chart it opens. */
  readonly mechanism: string;
}

/**
 * `committed`: what the last commit has; its changes stand at the end of a title. `mechanisms`: all that may have their place in the file,
 * in the analysis's order.
 */
export function codeLensesOf(
  analysis: Analysis,
  file: string,
  committed: Committed = NO_COMMIT,
  mechanisms: readonly AnalysedMechanism[] = analysis.mechanisms,
): CodeLens[] {
  const here = mechanisms.filter(({ at }) => at.file === file);
  const counts = new Map<number, number>();
  for (const { at } of here) counts.set(at.start, (counts.get(at.start) ?? 0) + 1);
  return here.map((mechanism) => {
    const isAlone = counts.get(mechanism.at.start) === 1;
    const [moved] = movedSince(committed, mechanism);
    const own = titleOf(analysis, mechanism);
    const title = moved === undefined ? own : `${own} · ${moved} since the last commit`;
    return { span: mechanism.at, title: isAlone ? title : `${plainText(mechanism.name)}: ${title}`, mechanism: mechanism.name };
  });
}

function titleOf(analysis: Analysis, mechanism: AnalysedMechanism): string {
  const { words, share } = verdictOf(analysis, mechanism);
  const hardest = mechanism.numbers?.hardest;
  const shaft = outputShaftOf(mechanism);
  if (hardest === undefined || shaft === undefined) return words;
  const speed = shaft.speedRadPerS === 0 ? [] : [writeQuantity(shaft.speedRadPerS, "speed")];
  const parts = [...(share === undefined ? [] : [share]), writeQuantity(hardest.motorCurrentA, "current"), ...speed];
  return `${words}: ${parts.join(", ")}`;
}
