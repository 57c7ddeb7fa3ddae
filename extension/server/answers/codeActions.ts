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
import type { Finding } from "../../analysis/analysis.js";
import type { Proposal } from "../../analysis/proposal.js";
import { proposalsFor } from "../../analysis/propose.js";
import { type Edit, type QuickFix, quickFixesAt } from "../../features/quickFixes.js";
import type { CurrentFile } from "../current.js";
import { inLines } from "../diagnostics.js";
import type { Result } from "../session.js";
import type { Texts } from "../texts.js";

export interface CodeActionParts {
  readonly texts: Texts;
  /** The client can let the user fill in a stretch of what was put in. */
  readonly canFillIn: boolean;
  /** The proposals for a finding of the result; kept, since the editor asks again with every move of the caret. */
  readonly propose: (result: Result, finding: Finding) => readonly Proposal[];
  /** What the client shows at the range. */
  readonly shown: readonly Diagnostic[];
}

/** Proposals are worked out once for a finding: findings live as long as their result. */
export function createProposer(): CodeActionParts["propose"] {
  const known = new WeakMap<Finding, readonly Proposal[]>();
  return (result, finding) => {
    const before = known.get(finding);
    if (before !== undefined) return before;
    const proposals = proposalsFor(result.analysis, finding, result.analyse);
    known.set(finding, proposals);
    return proposals;
  };
}

/** Nothing while the text is newer than the result: an edit must fit exactly. */
export function answerCodeActions(
  current: CurrentFile,
  range: Range,
  { texts, canFillIn, propose, shown }: CodeActionParts,
): CodeAction[] {
  const { result, file, lines } = current;
  if (lines.text !== result.snapshot.read(file)) return [];
  const fixes = quickFixesAt(result.analysis, file, lines.offsetAt(range.start), lines.offsetAt(range.end), (finding) =>
    propose(result, finding),
  );
  return fixes
    .filter(({ edits }) => edits.every((edit) => isUnchanged(texts, result, edit.file)))
    .map((fix) => ({
      title: fix.title,
      kind: CodeActionKind.QuickFix,
      diagnostics: shown.filter(({ code, message }) => code === fix.finding.rule && message === inLines(fix.finding.message)),
      edit: { documentChanges: documentEditsOf(fix, result, texts, canFillIn) },
    }));
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
