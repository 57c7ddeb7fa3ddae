/** Units inside the strings of declarations; everything else is completed by TypeScript. */
import { type CompletionItem, CompletionItemKind, type Position } from "vscode-languageserver";
import { completionsAt } from "../../features/completions.js";
import type { CurrentFile } from "../current.js";
import type { LineMap } from "../lineMap.js";

/**
 * True where a number and a space stand before the caret, inside a string: a look at the line alone. The editor shows all suggestions
 * together, so that those of others must not wait for an analysis where there will be none.
 */
export function mayHoldUnit({ text, offsetAt }: LineMap, { line, character }: Position): boolean {
  const before = text.slice(offsetAt({ line, character: 0 }), offsetAt({ line, character }));
  return /(?:["'`][+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?|\}) [^\s"'`{}]*$/.test(before);
}

export function answerCompletions(current: CurrentFile, position: Position): CompletionItem[] {
  const { result, file, lines } = current;
  const offset = current.carryBack(lines.offsetAt(position));
  if (offset === undefined || lines.text !== result.snapshot.read(file)) return [];
  return completionsAt(result.analysis, file, offset).map(({ label, detail, newText, replaces }, index) => ({
    label,
    detail,
    kind: CompletionItemKind.Unit,
    // The most usual first, not the alphabet.
    sortText: String(index).padStart(3, "0"),
    filterText: newText,
    textEdit: { range: lines.rangeOf(replaces), newText },
  }));
}
