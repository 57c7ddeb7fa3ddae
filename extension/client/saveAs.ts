/** Writes a file where the person says. */
import * as vscode from "vscode";

/** `fileName` with its ending; offered in the first workspace folder. */
export async function saveAs(fileName: string, content: Uint8Array): Promise<void> {
  const ending = fileName.slice(fileName.lastIndexOf(".") + 1);
  const folder = vscode.workspace.workspaceFolders?.[0]?.uri ?? vscode.Uri.file("/");
  const target = await vscode.window.showSaveDialog({
    defaultUri: vscode.Uri.joinPath(folder, fileName),
    filters: { [ending.toUpperCase()]: [ending] },
  });
  if (target === undefined) return;
  try {
    await vscode.workspace.fs.writeFile(target, content);
  } catch (error) {
    const why = error instanceof Error ? error.message : String(error);
    void vscode.window.showErrorMessage(vscode.l10n.t("The file could not be written: {0}", why));
  }
}
