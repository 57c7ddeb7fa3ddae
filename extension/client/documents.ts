/** Which documents the server is told of: sources and the data that they import, where the editor itself works on them. */
import * as vscode from "vscode";

const SOURCE_LANGUAGES: readonly string[] = ["typescript", "typescriptreact", "javascript", "javascriptreact"];

const DATA_LANGUAGES: readonly string[] = ["json", "jsonc"];

/** Other schemes show copies, such as the old side of a comparison: declarations there would count twice. */
function workingSchemes(): Set<string> {
  const folders = vscode.workspace.workspaceFolders ?? [];
  return new Set(["file", "untitled", ...folders.map(({ uri }) => uri.scheme)]);
}

export function isSource({ languageId, uri }: vscode.TextDocument): boolean {
  return SOURCE_LANGUAGES.includes(languageId) && workingSchemes().has(uri.scheme);
}

export function documentSelector(): { readonly language: string; readonly scheme: string }[] {
  const languages = [...SOURCE_LANGUAGES, ...DATA_LANGUAGES];
  return [...workingSchemes()].flatMap((scheme) => languages.map((language) => ({ language, scheme })));
}
