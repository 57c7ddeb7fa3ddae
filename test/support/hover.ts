/** The hover at a fixture's cursor. */
import { hoverAt } from "../../extension/features/hover.js";
import { type Analysed, analyseWithCursor } from "./cursorFixture.js";

export interface HoverShown extends Analysed {
  /** The text that the hover is about. */
  readonly about: string;
  readonly markdown: string;
  /** Cells of the table, row by row, without its head. */
  readonly rows: readonly (readonly string[])[];
}

/** `undefined` where nothing is shown. */
export function hoverIn(source: string): HoverShown | undefined {
  const analysed = analyseWithCursor(source);
  const { file, offset } = analysed.cursor;
  const hover = hoverAt(analysed.analysis, file, offset, analysed.analyse);
  if (hover === undefined) return undefined;
  const { start, end } = hover.span;
  const about = analysed.files.get(hover.span.file)?.slice(start, end) ?? "";
  return { ...analysed, about, markdown: hover.markdown, rows: tableRows(hover.markdown) };
}

/** The hover, which must be there. */
export function checkHover(source: string, about: string): HoverShown {
  const hover = hoverIn(source);
  if (hover === undefined) throw new Error("There is no hover here.");
  if (hover.about !== about) throw new Error(`The hover is about ${JSON.stringify(hover.about)}, not ${JSON.stringify(about)}.`);
  return hover;
}

function tableRows(markdown: string): string[][] {
  const lines = markdown.split("\n").filter((line) => line.startsWith("|"));
  return lines.slice(2).map((line) =>
    line
      .slice(2, -2)
      .split(" | ")
      .map((cell) => cell.replace(/^&ensp;/, "").trim()),
  );
}
