/** Mechanisms, motors and robots in the editor's search for names. */
import { SymbolKind, type WorkspaceSymbol } from "vscode-languageserver";
import { type DeclaredSymbol, workspaceSymbolsOf } from "../../features/symbols.js";
import type { Result } from "../session.js";

const KINDS: Readonly<Record<DeclaredSymbol["kind"], SymbolKind>> = {
  mechanism: SymbolKind.Object,
  motor: SymbolKind.Constant,
  robot: SymbolKind.Module,
};

export function answerWorkspaceSymbols(
  { analysis, snapshot }: Result,
  query: string,
  uriOf: (file: string) => string,
): WorkspaceSymbol[] {
  return workspaceSymbolsOf(analysis, query).map(({ name, kind, selection }) => ({
    name,
    kind: KINDS[kind],
    containerName: kind,
    location: { uri: uriOf(selection.file), range: snapshot.lineMap(selection.file).rangeOf(selection) },
  }));
}
