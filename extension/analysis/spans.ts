/** Places compared: the same, told once, in order. */
import type { Span } from "../evaluator/value.js";

export function spanKey({ file, start, end }: Span): string {
  return `${start} ${end} ${file}`;
}

export function sameSpan(a: Span, b: Span): boolean {
  return a.file === b.file && a.start === b.start && a.end === b.end;
}

/** Each place once, and none at `except`. */
export function distinctPlaces<Item extends { readonly at: Span }>(items: readonly Item[], except: Span): Item[] {
  const seen = new Set([spanKey(except)]);
  return items.filter(({ at }) => seen.size < seen.add(spanKey(at)).size);
}
