/** The one item in the status bar: how the workspace's mechanisms stand. Absent where nothing is declared. */
import * as vscode from "vscode";
import { VIEW } from "./mechanismsView.js";
import type { Server } from "./server.js";

export function createStatusItem(server: Server): vscode.Disposable {
  const item = vscode.window.createStatusBarItem("loadmark.status", vscode.StatusBarAlignment.Right, 100);
  item.name = "Loadmark";
  item.command = `${VIEW}.focus`;
  const follow = server.onDidChangeState(({ status }) => {
    if (status === null) {
      item.hide();
      return;
    }
    // With its name: other counts of errors stand in the same bar.
    item.text = `$(pulse) Loadmark: ${status.text}`;
    item.tooltip = `Loadmark: ${status.tooltip}`;
    item.accessibilityInformation = { label: `Loadmark: ${status.tooltip}` };
    item.show();
  });
  return vscode.Disposable.from(item, follow);
}
