/**
 * Brings the parts of the client to life: the gate, the server behind it, the view, the status item and the commands.
 *
 * The same on every host; the entry of each says how its language client is made.
 */
import * as vscode from "vscode";
import type { BaseLanguageClient } from "vscode-languageclient";
import { registerChart } from "./chartPanel.js";
import type { ClientParts } from "./clientOptions.js";
import { LINKED_COMMANDS, registerCommands } from "./commands.js";
import { usesDeclarations } from "./gate.js";
import { gateWorkspace, onGateMayOpen } from "./gateWorkspace.js";
import { shareCommits } from "./gitCommits.js";
import { createMechanismsView } from "./mechanismsView.js";
import { Server } from "./server.js";
import { createStatusItem } from "./statusItem.js";

export type MakeHostClient = (parts: ClientParts) => Promise<BaseLanguageClient>;

/** What other code in the same host can ask, such as tests. */
export interface LoadmarkApi {
  /** False where nothing in the workspace uses the declarations. */
  isServerWanted(): boolean;
}

export function activateWith(context: vscode.ExtensionContext, makeHostClient: MakeHostClient): LoadmarkApi {
  const log = vscode.window.createOutputChannel("Loadmark", { log: true });
  const server = new Server((onGivenUp) => makeHostClient({ log, commands: LINKED_COMMANDS, onGivenUp }), log);
  context.subscriptions.push(
    log,
    server,
    registerCommands(server, log),
    shareCommits(server, log),
    registerChart({ extensionUri: context.extensionUri, server, log, memory: context.globalState }),
    createMechanismsView(server),
    createStatusItem(server),
    server.onDidChangeState(({ status }) => {
      void setContext("loadmark.hasMechanisms", status !== null);
    }),
    // After the first result it is known whether anything is declared.
    server.onChartMayDiffer(() => void setContext("loadmark.isRead", true)),
  );
  openGate(context, server, log);
  return { isServerWanted: () => server.isWanted };
}

function setContext(name: string, value: boolean): Thenable<unknown> {
  return vscode.commands.executeCommand("setContext", name, value);
}

/** Asks until the answer is yes; the server then stays. */
function openGate(context: vscode.ExtensionContext, server: Server, log: vscode.LogOutputChannel): void {
  const ask = async () => {
    if (server.isWanted) return;
    try {
      if (!(await usesDeclarations(gateWorkspace)) || server.isWanted) return;
      later.dispose();
      log.info("The workspace uses the declarations: the server is started.");
      void setContext("loadmark.isUsed", true);
      await server.start();
    } catch (error) {
      log.error(error instanceof Error ? error : String(error));
    }
  };
  const later = onGateMayOpen(() => void ask());
  context.subscriptions.push(later);
  void ask();
}
