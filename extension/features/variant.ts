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
 * `fed` with the text that gives `origin` its value written anew, in the same order. `undefined` where no place is found to write it such
 * that all of them can still be computed: the new value is refused, or the value is not worked out from text that can be replaced.
 */
export function variantOf(
  analysis: Analysis,
  origin: Origin,
  rewrite: (text: string) => string,
  fed: readonly AnalysedMechanism[],
  analyse: Analyse,
): readonly AnalysedMechanism[] | undefined {
  const roots = rootsOf(analysis, fed);
  for (const place of placesToWrite(origin)) {
    const changed = analyse(roots, withText(analysis.snapshot, place, rewrite), true);
    const found = fed.flatMap((mechanism) => counterpart(mechanism, analysis, changed) ?? []);
    if (found.length === fed.length && found.every((one, index) => isChanged(fed[index], one))) return found;
  }
  return undefined;
}

/** Only what is asked about is analysed: its files, and those of the robots that may supply it. */
function rootsOf({ robots }: Analysis, fed: readonly AnalysedMechanism[]): string[] {
  const listing = robots.filter(({ declared }) => fed.some((one) => one.declared && declared?.mechanisms.includes(one.declared)));
  return [...new Set([...fed, ...listing].map(({ call }) => call.span.file))];
}

/** The same mechanism in another analysis: its file and name, and its turn among those that share both. */
function counterpart(mechanism: AnalysedMechanism, before: Analysis, after: Analysis): AnalysedMechanism | undefined {
  const isLike = ({ name, call }: AnalysedMechanism): boolean =>
    name === mechanism.name && call.span.file === mechanism.call.span.file;
  return after.mechanisms.filter(isLike)[before.mechanisms.filter(isLike).indexOf(mechanism)];
}

/** The snapshot with one stretch of one file rewritten. */
export function withText(snapshot: Snapshot, { file, start, end }: Span, rewrite: (text: string) => string): Snapshot {
  const before = snapshot.read(file);
  if (typeof before !== "string") return snapshot;
  const changed = before.slice(0, start) + rewrite(before.slice(start, end)) + before.slice(end);
  return { ...snapshot, read: (asked) => (asked === file ? changed : snapshot.read(asked)) };
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
