/**
 * Which declarations a name in an import or export list stands for.
 *
 * Origins lead from uses to declarations and pass over the lists in between, so that the list is read here, as text. A name that could
 * stand for several declarations stands for none.
 */
import type { Analysis } from "../analysis/analysis.js";
import { sameSpan } from "../analysis/spans.js";
import type { Span } from "../evaluator/value.js";
import { leavesOf, originsOf } from "./feeds.js";

export interface ImportedWord {
  readonly span: Span;
  /** Where the name is declared. */
  readonly keys: readonly Span[];
}

const LIST = /\b(?:import|export)\s+(?:type\s+)?(?:[\w$]+\s*,\s*)?(?:\{[^{}]*\}|[\w$]+)\s*from\s*["'][^"'\n]*["']/g;
const WORD = /[\p{ID_Start}$_][\p{ID_Continue}$\u200C\u200D]*/gu;

export function importedAt(analysis: Analysis, file: string, offset: number): ImportedWord | undefined {
  const text = analysis.snapshot.read(file);
  if (typeof text !== "string") return undefined;
  const list = rangeAround(text, LIST, offset);
  const word = list && rangeAround(text, WORD, offset);
  if (list === undefined || word === undefined) return undefined;
  const used = usedAs(analysis, file, word.text);
  if (used.length === 1) return { span: { file, start: word.start, end: word.end }, keys: used };
  const name = originalName(text.slice(list.start, list.end), word.text);
  const near = declarationsCalled(analysis, name, analysis.files.get(file)?.dependencies);
  // A file that only passes names on reads nothing itself: nothing then narrows the search.
  const keys = near.length > 0 ? near : declarationsCalled(analysis, name);
  return keys.length === 1 ? { span: { file, start: word.start, end: word.end }, keys } : undefined;
}

/** `CHAIN as TEETH`: either word means what is called CHAIN where it is declared. */
function originalName(list: string, word: string): string {
  const renamed = new RegExp(`([\\w$]+)\\s+as\\s+${word.replaceAll("$", "\\$")}(?![\\w$])`).exec(list);
  return renamed?.[1] ?? word;
}

/** What the name stands for where this file uses it, whatever it is called where it is declared. */
function usedAs(analysis: Analysis, file: string, word: string): Span[] {
  const text = analysis.snapshot.read(file) ?? "";
  const leaves = [...analysis.files.values()].flatMap(({ calls }) => calls).flatMap(leavesOf);
  const uses = leaves
    .flatMap(({ value }) => [...originsOf(value)])
    .filter(({ kind, span }) => kind === "name" && span.file === file && text.slice(span.start, span.end) === word);
  return distinct(uses.flatMap(({ declaredAt }) => declaredAt ?? []));
}

function declarationsCalled(analysis: Analysis, name: string, files?: readonly string[]): Span[] {
  const calls = [...analysis.files.values()].flatMap((evaluation) => evaluation.calls);
  const origins = calls.flatMap(leavesOf).flatMap(({ value }) => [...originsOf(value)]);
  const declared = [...origins.map(({ declaredAt }) => declaredAt), ...calls.map(({ binding }) => binding?.span)];
  return distinct(
    declared.flatMap((at) => {
      if (at === undefined || files?.includes(at.file) === false) return [];
      return analysis.snapshot.read(at.file)?.slice(at.start, at.end) === name ? [at] : [];
    }),
  );
}

function distinct(spans: readonly Span[]): Span[] {
  return spans.filter((span, index) => spans.findIndex((other) => sameSpan(other, span)) === index);
}

function rangeAround(text: string, pattern: RegExp, offset: number): { start: number; end: number; text: string } | undefined {
  for (const match of text.matchAll(pattern)) {
    if (match.index > offset) return undefined;
    const end = match.index + match[0].length;
    if (offset <= end) return { start: match.index, end, text: match[0] };
  }
  return undefined;
}
