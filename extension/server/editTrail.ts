/**
 * Carries places over edits, so that what was worked out for an older text still stands at the right characters of a newer one.
 *
 * Holds no text; an edit is where it starts, how much it took away and how much it put there.
 */

export interface Edit {
  readonly start: number;
  readonly removed: number;
  readonly inserted: number;
}

/** Where an offset of the old text is after the edits; text put in right at the offset comes before it. */
export function carryForward(edits: readonly Edit[], offset: number): number {
  return edits.reduce((at, { start, removed, inserted }) => {
    if (at < start) return at;
    return at >= start + removed ? at + inserted - removed : Math.min(at, start + inserted);
  }, offset);
}

/** Where an offset of the new text was before the edits; `undefined` inside text that was put in. */
export function carryBack(edits: readonly Edit[], offset: number): number | undefined {
  let at = offset;
  for (const { start, removed, inserted } of edits.toReversed()) {
    if (at < start || (at === start && inserted > 0)) continue;
    if (at < start + inserted) return undefined;
    at += removed - inserted;
  }
  return at;
}

/** A span of the old text after the edits: text put in at its ends stays outside. */
export function carrySpan<T extends { readonly start: number; readonly end: number }>(edits: readonly Edit[], span: T): T {
  if (edits.length === 0) return span;
  let { start, end } = span;
  for (const edit of edits) {
    const before = end;
    start = carryForward([edit], start);
    // Text put in at the end's own offset comes after it.
    end = edit.removed === 0 && edit.start === before ? before : carryForward([edit], end);
  }
  return { ...span, start, end: Math.max(start, end) };
}
