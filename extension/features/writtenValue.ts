/** The value of a constant that is declared as a plain literal, read from its text. */
import type { Origin, Snapshot } from "../evaluator/value.js";
import { passedThrough } from "./feeds.js";

/** `undefined` where what it comes down to is an expression, or a text with escapes. */
export function writtenValue(snapshot: Snapshot, origin: Origin): string | number | undefined {
  const written = passedThrough(origin).at(-1);
  if (written?.kind !== "literal") return undefined;
  const text = snapshot.read(written.span.file)?.slice(written.span.start, written.span.end) ?? "";
  if (/^\d|^\.\d/.test(text)) {
    const number = Number(text.replaceAll("_", ""));
    return Number.isFinite(number) ? number : undefined;
  }
  return /^(["'`])([^\\$]*)\1$/.exec(text)?.[2];
}
