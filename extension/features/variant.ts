/**
 * What would become of the mechanisms if one written value were another: the text is changed in a copy and analysed again.
 *
 * So every number shown is computed the way all others are, through whatever expressions the robot's code holds. Changes nothing.
 */
import type { Analyser } from "../analysis/analyser.js";
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";
import type { Origin, Snapshot, Span } from "../evaluator/value.js";
import { passedThrough } from "./feeds.js";

export type Analyse = Analyser["analyse"];

/**
 * The mechanisms, in their order, with the text that gives `origin` its value written anew. `undefined` where no place is found to write
 * it such that all of `fed` (positions in the list) can still be computed: the new value is refused, or the value is not worked out from
 * text that can be replaced.
 */
export function variantOf(
  analysis: Analysis,
  origin: Origin,
  rewrite: (text: string) => string,
  fed: readonly number[],
  analyse: Analyse,
): readonly AnalysedMechanism[] | undefined {
  const roots = [...analysis.files.keys()];
  for (const place of placesToWrite(origin)) {
    const { mechanisms } = analyse(roots, withText(analysis.snapshot, place, rewrite));
    const comparable = mechanisms.length === analysis.mechanisms.length;
    if (comparable && fed.every((index) => isChanged(analysis.mechanisms[index], mechanisms[index]))) return mechanisms;
  }
  return undefined;
}

/** The snapshot with one stretch of one file rewritten. */
export function withText(snapshot: Snapshot, { file, start, end }: Span, rewrite: (text: string) => string): Snapshot {
  const before = snapshot.read(file);
  if (typeof before !== "string") return snapshot;
  const changed = before.slice(0, start) + rewrite(before.slice(start, end)) + before.slice(end);
  return { read: (asked) => (asked === file ? changed : snapshot.read(asked)) };
}

/** The initialiser comes first, so that only this constant changes; then what it was made of, down to the literal. */
function placesToWrite(origin: Origin): Span[] {
  const [own, ...below] = passedThrough(origin);
  if (own === undefined) return [];
  const places = below.length === 0 ? [own] : below;
  return places.map(({ span }) => span);
}

function isChanged(before: AnalysedMechanism | undefined, after: AnalysedMechanism | undefined): boolean {
  if (before?.declared === undefined || after?.declared === undefined || after.numbers === undefined) return false;
  return JSON.stringify([before.declared.si, before.numbers]) !== JSON.stringify([after.declared.si, after.numbers]);
}
