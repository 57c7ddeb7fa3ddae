/** Opens a small robot to start from, as a new file, so that nothing of the workspace is touched. */
import * as vscode from "vscode";
import { EXAMPLE_ROBOT } from "./exampleRobot.js";

export async function openExample(): Promise<void> {
  const document = await vscode.workspace.openTextDocument({ language: "typescript", content: EXAMPLE_ROBOT });
  await vscode.window.showTextDocument(document);
}
