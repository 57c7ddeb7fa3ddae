// The server's life as the editor sees it: one process where declarations are used, whose end or restart loses no finding.

import assert from "node:assert/strict";
import * as vscode from "vscode";
import { closeAll, show, waitForFinding, waitForNoFinding } from "./demo.js";
import { serverProcesses, waitForServer } from "./serverProcesses.js";

const LIFT = "mechanisms/shelfLift.ts";

describe("the server", () => {
  beforeEach(async () => {
    await show(LIFT);
    await waitForFinding(LIFT, "past-peak");
  });
  afterEach(closeAll);

  it("runs once", async () => {
    assert.equal((await serverProcesses()).length, 1);
  });

  it("is started anew on request, and tells everything again", async () => {
    const [before] = await serverProcesses();
    await vscode.commands.executeCommand("loadmark.restartServer");
    const now = await waitForServer((pid) => pid !== before);
    assert.notEqual(now, before);
    await waitForFinding(LIFT, "past-peak");
  });

  it("is started anew when it dies, and tells everything again", async () => {
    const [before] = await serverProcesses();
    assert.ok(before);
    process.kill(before, "SIGKILL");
    await waitForServer((pid) => pid !== before);
    await waitForFinding(LIFT, "past-peak");
    // It answers edits too, so the findings are not just left over.
    await show("mechanisms/trayHoist.ts");
    const editor = await show("gearing.ts");
    await editor.edit((edit) => edit.replace(new vscode.Range(5, 0, 6, 0), "export const TRAY_DRIVEN = 40;\n"));
    await waitForFinding("mechanisms/trayHoist.ts", "past-peak");
    await vscode.commands.executeCommand("workbench.action.files.revert");
    await waitForNoFinding("mechanisms/trayHoist.ts", "past-peak");
  });
});
