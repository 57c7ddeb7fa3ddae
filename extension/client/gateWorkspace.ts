/** The gate's questions, asked of VS Code; and when to ask them again. */
import * as vscode from "vscode";
import { isSource } from "./documents.js";
import type { GateWorkspace } from "./gate.js";
import { readText } from "./readText.js";

/** Typing is looked at when it pauses. */
const PAUSE_MS = 400;

export const gateWorkspace: GateWorkspace = {
  openSources: () =>
    vscode.workspace.textDocuments
      .filter(isSource)
      .map((document) => ({ uri: document.uri.toString(), text: () => document.getText() })),
  readNearestManifest: async (uri) => {
    for (const folder of foldersAbove(vscode.Uri.parse(uri))) {
      const text = await readText(vscode.Uri.joinPath(folder, "package.json"));
      if (text !== null) return text;
    }
    return undefined;
  },
  hasSettingsFile: async () => (await vscode.workspace.findFiles("**/loadmark.json", "**/node_modules/**", 1)).length > 0,
};

/** Calls back whenever the answers may have become others: a document was opened or edited, a settings file appeared. */
export function onGateMayOpen(ask: () => void): vscode.Disposable {
  let pause: ReturnType<typeof setTimeout> | undefined;
  const settingsFiles = vscode.workspace.createFileSystemWatcher("**/loadmark.json", false, true, true);
  return vscode.Disposable.from(
    settingsFiles,
    settingsFiles.onDidCreate(ask),
    vscode.workspace.onDidOpenTextDocument((document) => {
      if (isSource(document)) ask();
    }),
    vscode.workspace.onDidChangeTextDocument(({ document }) => {
      if (!isSource(document)) return;
      clearTimeout(pause);
      pause = setTimeout(ask, PAUSE_MS);
    }),
    { dispose: () => clearTimeout(pause) },
  );
}

function* foldersAbove(uri: vscode.Uri): Generator<vscode.Uri> {
  for (let folder = vscode.Uri.joinPath(uri, ".."); ; folder = vscode.Uri.joinPath(folder, "..")) {
    yield folder;
    if (folder.path === "/" || folder.path === "" || folder.path === ".") return;
  }
}
