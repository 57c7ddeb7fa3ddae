/** A few sentences on one line under a heading, as many as stay short; the rest is counted. */
import { inertMarkdown } from "../inertText.js";

/** Characters on the line. */
const LONGEST = 160;

export function sentences(heading: string, all: readonly string[]): string[] {
  const [first, ...others] = all;
  if (first === undefined) return [];
  const shown = [first];
  for (const other of others) {
    if ([...shown, other].join(" ").length > LONGEST) break;
    shown.push(other);
  }
  const more = all.length - shown.length;
  const text = shown.map((sentence) => inertMarkdown(sentence, LONGEST)).join(" ");
  return [`${heading}: ${text}${more === 0 ? "" : ` And ${more} more.`}`];
}
