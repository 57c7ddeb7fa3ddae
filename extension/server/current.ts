/**
 * The last result, seen from the text as it is now: places of the one carried over the edits since, and back.
 *
 * Between an edit and the next result, what is shown moves along with the text instead of flickering.
 */
import { carryBack, carrySpan } from "./editTrail.js";
import { createLineMap, type LineMap } from "./lineMap.js";
import type { Result } from "./session.js";
import type { Texts } from "./texts.js";

export interface CurrentFile {
  readonly result: Result;
  readonly file: string;
  /** Lines of the text of now. */
  readonly lines: LineMap;
  /** A span of the analysed text, where it is now. */
  carry<T extends { readonly start: number; readonly end: number }>(span: T): T;
  /** An offset of the text of now in the analysed text; `undefined` in text that is newer. */
  carryBack(offset: number): number | undefined;
}

/** `undefined` for a file that the result knows nothing of, or whose text of now has nothing to do with that of the result. */
export function currentFile(texts: Texts, result: Result, file: string): CurrentFile | undefined {
  const version = result.snapshot.versions.get(file);
  const open = texts.openText(file);
  const analysed = result.snapshot.read(file);
  if (typeof analysed !== "string") return undefined;
  const edits = open === undefined || version === undefined ? [] : texts.editsSince(file, version);
  // Opened since then, or anew, with another text: nothing leads from one to the other.
  if (open !== undefined && edits.length === 0 && open.text !== analysed) return undefined;
  const isAnalysed = open === undefined || edits.length === 0;
  let lines: LineMap | undefined;
  return {
    result,
    file,
    get lines() {
      lines ??= isAnalysed ? result.snapshot.lineMap(file) : createLineMap(open.text);
      return lines;
    },
    carry: (span) => carrySpan(edits, span),
    carryBack: (offset) => carryBack(edits, offset),
  };
}
