/**
 * Makes text that comes from someone's source harmless: names may hold markup, line breaks or characters that turn a line around.
 *
 * The only place that escapes. Does not decide what is shown.
 */

/** Characters (code points) of a name that are shown before it is cut. */
const LONGEST_NAME = 60;

/** One line of plain text for labels: no control or direction characters, cut to `longest` code points. */
export function plainText(text: string, longest = LONGEST_NAME): string {
  // A first cut keeps the cost bounded: whatever is shown, its source needs no more than a few units per character.
  const line = text
    .slice(0, longest * 8)
    .replaceAll(/[\p{White_Space}\p{Cc}]+/gu, " ")
    .replaceAll(/\p{Cf}/gu, "")
    .replaceAll(/[\p{Cs}\p{Co}]/gu, "\uFFFD")
    .trim();
  const characters = [...line];
  const cut = characters.length > longest || text.length > longest * 8;
  return isolate(cut ? `${characters.slice(0, longest - 1).join("")}…` : line);
}

/** The same for Markdown: every character that could start markup, a link, an icon or HTML stands for itself. */
export function inertMarkdown(text: string, longest = LONGEST_NAME): string {
  return plainText(text, longest)
    .replaceAll(/[\\`*_[\]{}|~#]/g, "\\$&")
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll("://", "\\://")
    .replaceAll("@", "\\@")
    .replaceAll(/www\./gi, (start) => `${start.slice(0, -1)}\\.`)
    .replaceAll("$(", "$ (")
    .replace(/^([-+=])/, "\\$1")
    .replace(/^(\d+)([.)])(?=\s|$)/, "$1\\$2");
}

/** Right-to-left letters would carry the numbers next to them along; an isolate keeps them to themselves. */
function isolate(text: string): string {
  return RIGHT_TO_LEFT.test(text) ? `\u2068${text}\u2069` : text;
}

// The blocks that Unicode reserves for right-to-left scripts (UAX #9, table of default bidirectional classes).
const RIGHT_TO_LEFT = /[\u0590-\u08FF\uFB1D-\uFDFF\uFE70-\uFEFF\u{10800}-\u{10FFF}\u{1E800}-\u{1EFFF}]/u;
