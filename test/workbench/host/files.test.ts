// Findings go with their file: deleted, renamed or written by the editor or behind its back.

import { rename, rm, writeFile } from "node:fs/promises";
import * as vscode from "vscode";
import { closeAll, show, textOf, uriOf, waitForFinding, waitForNoFinding } from "./demo.js";

const EXTRA = "mechanisms/spareLift.ts";
const RENAMED = "mechanisms/spareHoist.ts";

describe("findings of files that come and go", () => {
  before(() => show("mechanisms/shelfLift.ts"));
  afterEach(async () => {
    await closeAll();
    for (const path of [EXTRA, RENAMED]) await rm(uriOf(path).fsPath, { force: true });
    for (const path of [EXTRA, RENAMED]) await waitForNoFinding(path);
  });

  it("come with a new file and go when it is deleted, in the editor", async () => {
    const made = new vscode.WorkspaceEdit();
    made.createFile(uriOf(EXTRA), { contents: new TextEncoder().encode(await spareLift()) });
    await vscode.workspace.applyEdit(made);
    await waitForFinding(EXTRA, "past-peak");
    await vscode.workspace.fs.delete(uriOf(EXTRA));
    await waitForNoFinding(EXTRA);
  });

  it("move along when a file that is open is renamed", async () => {
    await writeFile(uriOf(EXTRA).fsPath, await spareLift());
    await show(EXTRA);
    await waitForFinding(EXTRA, "past-peak");
    const renamed = new vscode.WorkspaceEdit();
    renamed.renameFile(uriOf(EXTRA), uriOf(RENAMED));
    await vscode.workspace.applyEdit(renamed);
    await waitForFinding(RENAMED, "past-peak");
    await waitForNoFinding(EXTRA);
  });

  it("follow what other programs do to files", async () => {
    await writeFile(uriOf(EXTRA).fsPath, await spareLift());
    await waitForFinding(EXTRA, "past-peak");
    await rename(uriOf(EXTRA).fsPath, uriOf(RENAMED).fsPath);
    await waitForFinding(RENAMED, "past-peak");
    await waitForNoFinding(EXTRA);
    await rm(uriOf(RENAMED).fsPath);
    await waitForNoFinding(RENAMED);
  });
});

/** The shelf lift under another name: the same load, so also past its peak. */
async function spareLift(): Promise<string> {
  const text = await textOf("mechanisms/shelfLift.ts");
  return text.replace('"shelf lift"', '"spare lift"').replace("shelfLift", "spareLift");
}
