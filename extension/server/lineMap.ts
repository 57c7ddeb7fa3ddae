/**
 * Offsets to positions and back, for one text.
 *
 * Lines and characters count from 0, characters in UTF-16 units, as the protocol does by default; a line ends at LF, CR LF or a lone CR.
 */
import type { Position, Range } from "vscode-languageserver";

export interface LineMap {
  readonly text: string;
  positionAt(offset: number): Position;
  rangeOf(span: { readonly start: number; readonly end: number }): Range;
  /** A position beyond a line's end means its end; one beyond the last line means the text's end. */
  offsetAt(position: Position): number;
}

export function createLineMap(text: string): LineMap {
  const starts = lineStartsOf(text);
  const positionAt = (offset: number): Position => {
    const inside = Math.max(0, Math.min(offset, text.length));
    const line = lastAtMost(starts, inside);
    return { line, character: inside - (starts[line] ?? 0) };
  };
  return {
    text,
    positionAt,
    rangeOf: ({ start, end }) => ({ start: positionAt(start), end: positionAt(end) }),
    offsetAt({ line, character }) {
      const start = starts[line];
      if (line < 0) return 0;
      if (start === undefined) return text.length;
      let end = starts[line + 1] ?? text.length;
      if (line + 1 < starts.length) while (end > start && isLineBreak(text.charCodeAt(end - 1))) end -= 1;
      return Math.max(start, Math.min(start + character, end));
    },
  };
}

function lineStartsOf(text: string): readonly number[] {
  const starts = [0];
  for (const { index, 0: lineBreak } of text.matchAll(/\r\n|\r|\n/g)) starts.push(index + lineBreak.length);
  return starts;
}

/** Index of the last entry that is not above the value; the first entry is 0. */
function lastAtMost(starts: readonly number[], value: number): number {
  let low = 0;
  let high = starts.length;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((starts[middle] ?? 0) <= value) low = middle;
    else high = middle;
  }
  return low;
}

function isLineBreak(code: number): boolean {
  return code === 10 || code === 13;
}
