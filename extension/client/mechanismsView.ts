/** The Mechanisms view: robots, their mechanisms, and how each stands. A click shows where it is declared. */
import * as vscode from "vscode";
import type { Place } from "../protocol/place.js";
import type { MechanismState, RobotState, Standing, State } from "../protocol/state.js";
import type { Server } from "./server.js";

export const VIEW = "loadmark.mechanisms";

export type MechanismItem = RobotState | MechanismState;

export function createMechanismsView(server: Server): vscode.Disposable {
  const changed = new vscode.EventEmitter<void>();
  const provider: vscode.TreeDataProvider<MechanismItem> = {
    onDidChangeTreeData: changed.event,
    getChildren: (item) => childrenOf(server.state, item),
    getTreeItem: (item) => ("mechanisms" in item ? robotItem(item) : mechanismItem(item)),
  };
  return vscode.Disposable.from(
    changed,
    server.onDidChangeState(() => changed.fire()),
    vscode.window.createTreeView(VIEW, { treeDataProvider: provider }),
  );
}

function childrenOf({ robots, apart }: State, item: MechanismItem | undefined): MechanismItem[] {
  if (item === undefined) return [...robots, ...apart];
  return "mechanisms" in item ? [...item.mechanisms] : [];
}

function robotItem({ label, description, tooltip, standing, place, mechanisms }: RobotState): vscode.TreeItem {
  const state = mechanisms.length > 0 ? vscode.TreeItemCollapsibleState.Expanded : vscode.TreeItemCollapsibleState.None;
  const item = new vscode.TreeItem(label, state);
  item.description = description;
  item.tooltip = tooltip;
  item.iconPath = iconOf(standing);
  item.contextValue = "robot";
  item.command = showPlace(place);
  item.accessibilityInformation = { label: tooltip === "" ? label : `${label}: ${tooltip}` };
  return item;
}

function mechanismItem({ label, description, tooltip, standing, place }: MechanismState): vscode.TreeItem {
  const item = new vscode.TreeItem(label);
  item.description = description;
  item.tooltip = tooltip;
  item.iconPath = iconOf(standing);
  item.contextValue = "mechanism";
  item.command = showPlace(place);
  item.accessibilityInformation = { label: `${label}: ${tooltip}` };
  return item;
}

function showPlace({ uri, range: { start, end } }: Place): vscode.Command {
  const selection = new vscode.Range(start.line, start.character, end.line, end.character);
  const options: vscode.TextDocumentShowOptions = { selection, preserveFocus: true };
  return { title: vscode.l10n.t("Show Declaration"), command: "vscode.open", arguments: [vscode.Uri.parse(uri), options] };
}

/** Shape and colour both tell the standing. */
function iconOf(standing: Standing): vscode.ThemeIcon {
  switch (standing) {
    case "error":
      return new vscode.ThemeIcon("error", new vscode.ThemeColor("problemsErrorIcon.foreground"));
    case "warning":
      return new vscode.ThemeIcon("warning", new vscode.ThemeColor("problemsWarningIcon.foreground"));
    case "fine":
      return new vscode.ThemeIcon("pass", new vscode.ThemeColor("testing.iconPassed"));
    case "unknown":
      return new vscode.ThemeIcon("question");
  }
}
