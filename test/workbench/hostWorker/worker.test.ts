// The editor's features with the server in a browser's worker: the same findings, hovers, notes and cross-file edits as with a
// process, in files that only the editor can read.

import * as vscode from "vscode";
import { closeAll, rangeOf, retype, show, undoAll, uriOf, waitForFinding, waitForNoFinding } from "../host/demo.js";
import type { WorkerTests } from "./runWorkerTests.js";

const LIFT = "mechanisms/shelfLift.ts";
const HOIST = "mechanisms/trayHoist.ts";

export const tests: WorkerTests = {
  "findings come, in files that are not open too": async () => {
    await show(LIFT);
    await waitForFinding(LIFT, "past-peak");
    // Never opened: it was found and read through the editor.
    await waitForFinding("mechanisms/wateringArm.ts", "backdrives");
  },

  "an edit of a constant changes findings where it is used, and undoing takes them back": async () => {
    await show(HOIST);
    const editor = await show("gearing.ts");
    const saved = editor.document.getText();
    await retype(editor, "TRAY_DRIVEN = 54", "TRAY_DRIVEN = 40");
    await waitForFinding(HOIST, "past-peak");
    await undoAll(editor, saved);
    await waitForNoFinding(HOIST, "past-peak");
    await closeAll();
  },

  "a hover on a gear constant tells of every mechanism that it feeds": async () => {
    const { document } = await show("gearing.ts");
    const text = await hoverText(document, "PINION");
    // The comment above the constant, which TypeScript shows, names them too, but no torque.
    for (const name of ["tray hoist", "watering arm"]) {
      expectTrue(new RegExp(`${name}.*N·m`).test(text), `the torque of ${name} is not in: ${text}`);
    }
  },

  "lenses, notes and symbols are there": async () => {
    const { document } = await show(LIFT);
    await waitForFinding(LIFT, "past-peak");
    const all = new vscode.Range(0, 0, document.lineCount, 0);
    const hints: vscode.InlayHint[] = await vscode.commands.executeCommand("vscode.executeInlayHintProvider", document.uri, all);
    expectTrue(
      hints.some(({ label }) => String(label).includes("of stall")),
      `hints: ${JSON.stringify(hints)}`,
    );
    const lenses: vscode.CodeLens[] = await vscode.commands.executeCommand("vscode.executeCodeLensProvider", document.uri, 10);
    expectTrue(lenses.length > 0, "no lens");
    const symbols: vscode.SymbolInformation[] = await vscode.commands.executeCommand(
      "vscode.executeWorkspaceSymbolProvider",
      "shelf lift",
    );
    expectTrue(
      symbols.some(({ name }) => name === "shelf lift"),
      `symbols: ${JSON.stringify(symbols)}`,
    );
    await closeAll();
  },

  "a file that is written anew, moved and deleted takes its findings along": async () => {
    const [here, there] = ["mechanisms/spare.ts", "mechanisms/moved.ts"];
    const text = 'import { spur } from "loadmark";\nexport const pair = spur(0, 40);\n';
    await vscode.workspace.fs.writeFile(uriOf(here), new TextEncoder().encode(text));
    await waitForFinding(here, "bad-declaration");
    await vscode.workspace.fs.rename(uriOf(here), uriOf(there));
    await waitForFinding(there, "bad-declaration");
    await waitForNoFinding(here);
    await vscode.workspace.fs.delete(uriOf(there));
    await waitForNoFinding(there);
  },

  "the server is started anew on request": async () => {
    await vscode.commands.executeCommand("loadmark.restartServer");
    await show(LIFT);
    await waitForFinding(LIFT, "past-peak");
    await closeAll();
  },
};

async function hoverText(document: vscode.TextDocument, word: string): Promise<string> {
  const at = rangeOf(document, word).start;
  const hovers: vscode.Hover[] = await vscode.commands.executeCommand("vscode.executeHoverProvider", document.uri, at);
  return hovers.flatMap(({ contents }) => contents.map((one) => (typeof one === "string" ? one : one.value))).join("\n");
}

function expectTrue(isSo: boolean, otherwise: string): void {
  if (!isSo) throw new Error(otherwise);
}
