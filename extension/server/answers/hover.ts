/** Hovers: Markdown whose links are the product's own commands. */
import { type Hover, MarkupKind, type Position } from "vscode-languageserver";
import { hoverAt } from "../../features/hover.js";
import type { CurrentFile } from "../current.js";

export function answerHover(current: CurrentFile, position: Position): Hover | null {
  const { result, file, lines } = current;
  const offset = current.carryBack(lines.offsetAt(position));
  const hover = offset === undefined ? undefined : hoverAt(result.analysis, file, offset, result.analyse);
  if (hover === undefined) return null;
  const contents = { kind: MarkupKind.Markdown, value: hover.markdown };
  return hover.span.file === file ? { contents, range: lines.rangeOf(current.carry(hover.span)) } : { contents };
}
