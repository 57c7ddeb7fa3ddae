// The open copy of the demo as the tests of the extension host use it: its documents, the findings shown for them, typing
// into them. It waits for what the editor tells, never for a time.

import * as vscode from "vscode";

const PATIENCE_MS = 15_000;

export function folder(): vscode.Uri {
  const [first] = vscode.workspace.workspaceFolders ?? [];
  if (!first) throw new Error("No folder is open.");
  return first.uri;
}

export function uriOf(path: string): vscode.Uri {
  return vscode.Uri.joinPath(folder(), path);
}

export async function show(path: string): Promise<vscode.TextEditor> {
  return vscode.window.showTextDocument(await vscode.workspace.openTextDocument(uriOf(path)));
}

export async function textOf(path: string): Promise<string> {
  return (await vscode.workspace.openTextDocument(uriOf(path))).getText();
}

/** Where a text first stands in a document. */
export function rangeOf(document: vscode.TextDocument, text: string): vscode.Range {
  const start = document.getText().indexOf(text);
  if (start < 0) throw new Error(`"${text}" is not in ${document.uri.path}.`);
  return new vscode.Range(document.positionAt(start), document.positionAt(start + text.length));
}

export function findingsIn(path: string): vscode.Diagnostic[] {
  return vscode.languages.getDiagnostics(uriOf(path)).filter(({ source }) => source === "Loadmark");
}

/** Findings of the whole workspace, by path inside it. */
export function allFindings(): [path: string, finding: vscode.Diagnostic][] {
  const root = `${folder().path}/`;
  return vscode.languages
    .getDiagnostics()
    .flatMap(([{ path }, diagnostics]) =>
      diagnostics
        .filter(({ source }) => source === "Loadmark")
        .map((finding): [string, vscode.Diagnostic] => [path.replace(root, ""), finding]),
    );
}

/** Waits until a file has a finding of the rule, and gives it. */
export function waitForFinding(path: string, rule: string): Promise<vscode.Diagnostic> {
  return waitForFindings(path, `${path} to have ${rule}`, (findings) => findings.find(({ code }) => code === rule));
}

/** Waits until a document's finding of the rule lies on these words: those of an older text may lie elsewhere. */
export async function waitForFindingOn(words: string, document: vscode.TextDocument, rule: string): Promise<void> {
  const isThere = ({ code, range }: vscode.Diagnostic) => code === rule && document.getText(range) === words;
  const path = vscode.workspace.asRelativePath(document.uri);
  await waitForFindings(path, `${rule} on ${words} in ${path}`, (findings) => (findings.some(isThere) ? true : undefined));
}

/** Waits until a file has no finding of the rule, or none at all. */
export async function waitForNoFinding(path: string, rule?: string): Promise<void> {
  const isGone = (findings: vscode.Diagnostic[]) =>
    findings.some(({ code }) => rule === undefined || code === rule) ? undefined : true;
  await waitForFindings(path, `${path} to have no ${rule ?? "finding"}`, isGone);
}

function waitForFindings<T>(path: string, what: string, choose: (findings: vscode.Diagnostic[]) => T | undefined): Promise<T> {
  const last = () => `it has ${JSON.stringify(findingsIn(path).map(({ code }) => code))}`;
  return waitFor(what, () => choose(findingsIn(path)), vscode.languages.onDidChangeDiagnostics, last);
}

/** Selects a text and types over it, as a person would: an editor may close a bracket by itself, so no open one goes in. */
export async function retype(editor: vscode.TextEditor, text: string, replacement: string): Promise<void> {
  const { start, end } = rangeOf(editor.document, text);
  editor.selection = new vscode.Selection(start, end);
  await vscode.commands.executeCommand("type", { text: replacement });
}

/** Undoes until the document is as it was saved. */
export async function undoAll(editor: vscode.TextEditor, saved: string): Promise<void> {
  for (let step = 0; editor.document.getText() !== saved; step += 1) {
    if (step === 20) throw new Error(`Undoing did not bring back the text: ${editor.document.getText()}`);
    await vscode.commands.executeCommand("undo");
  }
}

/** Drops what is not saved, and closes everything. */
export async function closeAll(): Promise<void> {
  for (const document of vscode.workspace.textDocuments.filter(({ isDirty }) => isDirty)) {
    await vscode.window.showTextDocument(document);
    await vscode.commands.executeCommand("workbench.action.files.revert");
  }
  await vscode.commands.executeCommand("workbench.action.closeAllEditors");
}

/** Looks now and at each event until there is something. */
export function waitFor<T>(
  what: string,
  look: () => T | undefined,
  event: vscode.Event<unknown>,
  describeLast: () => string,
): Promise<T> {
  return new Promise((resolve, reject) => {
    const found = look();
    if (found !== undefined) {
      resolve(found);
      return;
    }
    const end = () => {
      clearTimeout(timer);
      listener.dispose();
    };
    const timer = setTimeout(() => {
      end();
      reject(new Error(`Waited ${PATIENCE_MS / 1000} s for ${what}; ${describeLast()}.`));
    }, PATIENCE_MS);
    const listener = event(() => {
      const now = look();
      if (now === undefined) return;
      end();
      resolve(now);
    });
  });
}
