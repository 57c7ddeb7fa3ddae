/** The commands of the palette, and those that links in hovers and lenses lead to. */
import * as vscode from "vscode";
import { REVEAL, SHOW_CHART, SHOW_RATIO_MAP } from "../protocol/commands.js";
import { spanSchema } from "../protocol/place.js";
import { readMessage } from "../protocol/readMessage.js";
import { openExample } from "./example.js";
import type { Server } from "./server.js";

/** Commands that texts of the server may lead to; no other is trusted in them. */
export const LINKED_COMMANDS: readonly string[] = [SHOW_CHART, SHOW_RATIO_MAP, REVEAL];

export function registerCommands(server: Server, log: vscode.LogOutputChannel): vscode.Disposable {
  const { registerCommand } = vscode.commands;
  return vscode.Disposable.from(
    registerCommand("loadmark.restartServer", () => server.restart()),
    registerCommand("loadmark.showLog", () => log.show()),
    registerCommand("loadmark.openExample", openExample),
    registerCommand(REVEAL, (argument: unknown) => reveal(server, argument)),
  );
}

async function reveal(server: Server, argument: unknown): Promise<void> {
  const query = readMessage(spanSchema, argument);
  const place = query && (await server.findPlace(query));
  if (place === undefined) return;
  const { start, end } = place.range;
  const selection = new vscode.Range(start.line, start.character, end.line, end.character);
  await vscode.window.showTextDocument(vscode.Uri.parse(place.uri), { selection });
}
