/** Writes to the code what a chart wants, as one edit of the workspace that can be undone. Nothing where a text has changed meanwhile. */
import * as vscode from "vscode";
import type { ChartQuestion } from "../protocol/chartMessages.js";
import type { ChartParts } from "./chartPanel.js";

export async function writeEdits({ server, log }: Pick<ChartParts, "server" | "log">, question: ChartQuestion): Promise<void> {
  try {
    const edits = (await server.askForChartEdits(question)) ?? [];
    const change = new vscode.WorkspaceEdit();
    for (const { uri, range, newText, version } of edits) {
      const { start, end } = range;
      const target = vscode.Uri.parse(uri);
      const open = vscode.workspace.textDocuments.find((document) => document.uri.toString() === target.toString());
      if (open !== undefined && version !== null && open.version !== version) return;
      change.replace(target, new vscode.Range(start.line, start.character, end.line, end.character), newText);
    }
    const isWritten = edits.length > 0 && (await vscode.workspace.applyEdit(change));
    if (!isWritten)
      void vscode.window.showErrorMessage(vscode.l10n.t("Nothing was written: the code has changed, or holds no number for it."));
  } catch (error) {
    log.error(error instanceof Error ? error : String(error));
  }
}
