/** Quick fixes, each offered singly, in the order in which they were found: what mends first, what silences last. */

import type { Range } from "vscode-languageserver";
import {
  type CodeAction,
  CodeActionKind,
  type Diagnostic,
  type SnippetTextEdit,
  type TextDocumentEdit,
  type TextEdit,
} from "vscode-languageserver";
import type { Proposal } from "../../analysis/proposal.js";
import { type Edit, findingsTouching, type QuickFix, quickFixesAt } from "../../features/quickFixes.js";
import { SHOW_RATIO_MAP } from "../../protocol/commands.js";
import type { CurrentFile } from "../current.js";
import { inLines } from "../diagnostics.js";
import type { Proposer } from "../proposer.js";
import type { Result } from "../session.js";
import type { Texts } from "../texts.js";

export interface CodeActionParts {
  readonly texts: Texts;
  /** The client can let the user fill in a stretch of what was put in. */
  readonly canFillIn: boolean;
  readonly propose: Proposer;
  /** Commands that the client has. */
  readonly commands: readonly string[];
  /** What the client shows at the range. */
  readonly shown: readonly Diagnostic[];
}

/** Nothing while the text is newer than the result, or where it changes meanwhile: an edit must fit exactly. */
export async function answerCodeActions(
  { result, file, lines }: CurrentFile,
  range: Range,
  { texts, canFillIn, propose, commands, shown }: CodeActionParts,
): Promise<CodeAction[]> {
  if (lines.text !== result.snapshot.read(file)) return [];
  const [start, end] = [lines.offsetAt(range.start), lines.offsetAt(range.end)];
  const proposals: Proposal[] = [];
  for (const finding of findingsTouching(result.analysis, file, start, end)) {
    const found = await propose(result, finding);
    if (found === undefined) return [];
    proposals.push(...found);
  }
  return quickFixesAt(result.analysis, file, start, end, proposals)
    .filter(({ edits }) => [file, ...edits.map((edit) => edit.file)].every((one) => isUnchanged(texts, result, one)))
    .map((fix) => ({
      title: fix.title,
      kind: CodeActionKind.QuickFix,
      diagnostics: shown.filter(({ code, message }) => code === fix.finding.rule && message === inLines(fix.finding.message)),
      ...(fix.edits.length === 0
        ? opening(fix, commands)
        : { edit: { documentChanges: documentEditsOf(fix, result, texts, canFillIn) } }),
    }));
}

/** A nearest miss changes nothing: it leads to the map of all ratios. */
function opening({ title, finding }: QuickFix, commands: readonly string[]): Pick<CodeAction, "command"> {
  const leads = finding.mechanism !== null && commands.includes(SHOW_RATIO_MAP);
  return leads ? { command: { title, command: SHOW_RATIO_MAP, arguments: [finding.mechanism] } } : {};
}

function documentEditsOf(fix: QuickFix, result: Result, texts: Texts, canFillIn: boolean): TextDocumentEdit[] {
  const files = [...new Set(fix.edits.map(({ file }) => file))];
  return files.map((file) => ({
    textDocument: { uri: texts.uriOf(file), version: result.snapshot.versions.get(file) ?? null },
    edits: fix.edits.flatMap((edit) => {
      if (edit.file !== file) return [];
      const range = result.snapshot.lineMap(file).rangeOf(edit);
      const snippet = canFillIn && edit === fix.edits[0] ? snippetOf(edit, fix.placeholder) : undefined;
      return snippet === undefined ? ({ range, newText: edit.newText } satisfies TextEdit) : snippetEdit(range, snippet);
    }),
  }));
}

function snippetEdit(range: Range, value: string): SnippetTextEdit {
  return { range, snippet: { kind: "snippet", value } };
}

function snippetOf({ newText }: Edit, placeholder: QuickFix["placeholder"]): string | undefined {
  if (placeholder === undefined) return undefined;
  const { start, end } = placeholder;
  const parts = [newText.slice(0, start), newText.slice(start, end), newText.slice(end)].map(escapeSnippet);
  return `${parts[0]}\${1:${parts[1]}}${parts[2]}`;
}

function escapeSnippet(text: string): string {
  return text.replaceAll(/[\\$}]/g, "\\$&");
}

function isUnchanged(texts: Texts, result: Result, file: string): boolean {
  const open = texts.openText(file);
  return open === undefined || open.text === result.snapshot.read(file);
}
