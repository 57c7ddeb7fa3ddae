// Findings follow what is typed: in the file that is edited, and in files that import from it, saved or not, open or not.

import assert from "node:assert/strict";
import * as vscode from "vscode";
import { closeAll, retype, show, undoAll, waitForFinding, waitForFindingOn, waitForNoFinding } from "./demo.js";
import { trayHoist } from "./handDemo.js";

/** Too few teeth: by hand the tray hoist needs more than half of its stall torque. */
const TOO_FEW = 40;

describe("findings while typing", () => {
  afterEach(closeAll);

  it("come with a worse ratio, and go when it is undone", async () => {
    const editor = await show("mechanisms/lidArm.ts");
    await waitForNoFinding("mechanisms/lidArm.ts", "past-peak");
    const saved = editor.document.getText();
    await retype(editor, "LID_RATIO, ", "2.4, ");
    const past = await waitForFinding("mechanisms/lidArm.ts", "past-peak");
    assert.equal(past.severity, vscode.DiagnosticSeverity.Warning);
    await waitForFindingOn("lidArm", editor.document, "past-peak");
    await undoAll(editor, saved);
    await waitForNoFinding("mechanisms/lidArm.ts", "past-peak");
  });

  it("come in a file that nobody opened, from the constant that it imports", async () => {
    assert.ok(trayHoist({ driven: TOO_FEW }).share > 0.5 && trayHoist().share < 0.5);
    const editor = await show("gearing.ts");
    const saved = editor.document.getText();
    await retype(editor, "54", String(TOO_FEW));
    await waitForFinding("mechanisms/trayHoist.ts", "past-peak");
    assert.ok(!vscode.workspace.textDocuments.some(({ uri }) => uri.path.endsWith("trayHoist.ts")));
    await undoAll(editor, saved);
    await waitForNoFinding("mechanisms/trayHoist.ts", "past-peak");
  });

  it("come in an open file as well, and go when the unsaved constant is dropped", async () => {
    const { document } = await show("mechanisms/trayHoist.ts");
    const editor = await show("gearing.ts");
    await retype(editor, "54", String(TOO_FEW));
    await waitForFindingOn("trayHoist", document, "past-peak");
    await vscode.commands.executeCommand("workbench.action.files.revert");
    await waitForNoFinding("mechanisms/trayHoist.ts", "past-peak");
  });

  it("stay on their words while lines are put in above, and on half-typed code", async () => {
    const editor = await show("mechanisms/shelfLift.ts");
    const saved = editor.document.getText();
    await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
    editor.selection = new vscode.Selection(0, 0, 0, 0);
    await vscode.commands.executeCommand("type", { text: "\n\n" });
    await waitForFindingOn("shelfLift", editor.document, "past-peak");
    await retype(editor, "drumRadius: ", "drumRad");
    await waitForFinding("mechanisms/shelfLift.ts", "bad-declaration");
    await undoAll(editor, saved);
    await waitForFindingOn("shelfLift", editor.document, "past-peak");
    await waitForNoFinding("mechanisms/shelfLift.ts", "bad-declaration");
  });
});
