/** The extension on desktop and remote hosts: the server is a Node process of its own. */
import { join } from "node:path";
import type * as vscode from "vscode";
import { activateWith, type LoadmarkApi } from "./extension.js";

export function activate(context: vscode.ExtensionContext): LoadmarkApi {
  return activateWith(context, async (parts) => {
    // Loaded behind the gate: most workspaces never need it.
    const { makeNodeClient } = await import("./nodeClient.js");
    const compiledCode = join(context.globalStorageUri.fsPath, "compiled");
    const serverModule = context.asAbsolutePath("dist/server.cjs");
    return makeNodeClient({ serverModule, folder: context.extensionPath, compiledCode }, parts);
  });
}
