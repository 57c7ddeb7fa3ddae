// Reads the text view of a VS Code page from its DOM: where a text is on the screen, and which text a squiggle lies
// under. It sees only the lines that are scrolled into view.

import type { Page } from "playwright-core";

export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

export interface Squiggle {
  readonly level: "error" | "warning" | "info" | "hint";
  /** The characters above the squiggle. */
  readonly text: string;
  /** The whole line that it is on. */
  readonly line: string;
}

const ACTIVE_EDITOR = ".editor-group-container.active .monaco-editor";

/** The box of the first occurrence of a text within one line. */
export async function findTextInView(page: Page, text: string): Promise<Box | undefined> {
  const boxes = await page.evaluate(readCharacters, ACTIVE_EDITOR);
  for (const line of boxes) {
    const start = line
      .map(({ character }) => character)
      .join("")
      .indexOf(text);
    const first = line[start];
    const last = line[start + text.length - 1];
    if (start >= 0 && first && last)
      return { x: first.x, y: first.y, width: last.x + last.width - first.x, height: first.height };
  }
  return undefined;
}

export async function readSquiggles(page: Page): Promise<Squiggle[]> {
  const [lines, marks] = await Promise.all([
    page.evaluate(readCharacters, ACTIVE_EDITOR),
    page.evaluate(readMarks, ACTIVE_EDITOR),
  ]);
  return marks.flatMap(({ level, box }) => {
    const line = lines.find(
      ([first]) => first && box.y + box.height / 2 >= first.y && box.y + box.height / 2 <= first.y + first.height,
    );
    if (!line) return [];
    const under = line.filter(({ x, width }) => x + width / 2 > box.x && x + width / 2 < box.x + box.width);
    return [{ level, text: join(under), line: join(line) }];
  });
}

interface Character extends Box {
  readonly character: string;
}

function join(characters: readonly Character[]): string {
  return characters.map(({ character }) => character).join("");
}

/** Runs in the page: every character of every view line, from top to bottom. */
function readCharacters(editor: string): Character[][] {
  const lines = [...document.querySelectorAll(`${editor} .view-lines .view-line`)].map((line) => {
    const characters: Character[] = [];
    const walker = document.createTreeWalker(line, NodeFilter.SHOW_TEXT);
    for (let node = walker.nextNode(); node; node = walker.nextNode()) {
      // Inlay hints are drawn into the line, but are not its text.
      if (node.parentElement?.closest("[class*='dyn-rule']")) continue;
      const text = node.textContent ?? "";
      for (let at = 0; at < text.length; at += 1) {
        const range = document.createRange();
        range.setStart(node, at);
        range.setEnd(node, at + 1);
        const { x, y, width, height } = range.getBoundingClientRect();
        characters.push({ character: (text[at] ?? "").replace("\u00a0", " "), x, y, width, height });
      }
    }
    return characters;
  });
  return lines.sort(([a], [b]) => (a?.y ?? 0) - (b?.y ?? 0));
}

/** Runs in the page: the boxes of the squiggles, from top to bottom. */
function readMarks(editor: string): { level: Squiggle["level"]; box: Box }[] {
  const levels = ["error", "warning", "info", "hint"] as const;
  const marks = levels.flatMap((level) =>
    [...document.querySelectorAll(`${editor} .view-overlays .squiggly-${level}`)].map((mark) => {
      const { x, y, width, height } = mark.getBoundingClientRect();
      return { level, box: { x, y, width, height } };
    }),
  );
  return marks.sort((a, b) => a.box.y - b.box.y || a.box.x - b.box.x);
}
