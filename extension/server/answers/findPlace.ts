/** Where a span that a link carries is now. */
import type { Place, PlaceQuery } from "../../protocol/place.js";
import { currentFile } from "../current.js";
import type { Result } from "../session.js";
import type { Texts } from "../texts.js";

export function answerFindPlace(texts: Texts, result: Result, { file, ...span }: PlaceQuery): Place | null {
  const current = currentFile(texts, result, file);
  return current === undefined ? null : { uri: texts.uriOf(file), range: current.lines.rangeOf(current.carry(span)) };
}
