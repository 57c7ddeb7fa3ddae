/** The extension in a browser's worker, where there is no process: the server is a worker of its own. */
import type * as vscode from "vscode";
import { activateWith, type LoadmarkApi } from "./extension.js";
import { makeWorkerClient } from "./workerClient.js";

export function activate(context: vscode.ExtensionContext): LoadmarkApi {
  // A browser loads one file, so that nothing can be left for behind the gate.
  return activateWith(context, (parts) => makeWorkerClient(context.extensionUri, parts));
}
