// Where nothing is declared there is no server; it starts as soon as something is.

import assert from "node:assert/strict";
import { rm, writeFile } from "node:fs/promises";
import * as vscode from "vscode";
import { closeAll, retype, show, uriOf, waitFor, waitForFinding } from "../host/demo.js";
import { serverProcesses, waitForServer } from "../host/serverProcesses.js";

/** Longer than the pause after typing for which the extension waits before it looks again. */
const AFTER_A_PAUSE_MS = 1500;

describe("a project without declarations", () => {
  after(async () => {
    await closeAll();
    await rm(uriOf("hoist.ts").fsPath, { force: true });
  });

  it("has no server, whatever is opened and typed", async () => {
    const editor = await show("tally.ts");
    await extension().activate();
    // By then TypeScript, whose server does start here, has looked at it.
    await waitForTypeScript("tally.ts");
    await retype(editor, "counts", "trayCounts");
    await new Promise((resolve) => setTimeout(resolve, AFTER_A_PAUSE_MS));
    assert.equal(extension().exports.isServerWanted(), false);
    assert.deepEqual(await serverProcesses(), []);
    assert.deepEqual(
      vscode.languages.getDiagnostics().filter(([, all]) => all.some(({ source }) => source === "Loadmark")),
      [],
    );
  });

  it("gets one with its first declaration", async () => {
    assert.deepEqual(await serverProcesses(), []);
    await writeFile(uriOf("hoist.ts").fsPath, 'import { spur } from "loadmark";\nexport const pair = spur(0, 40);\n');
    await show("hoist.ts");
    await waitForServer(() => true);
    await waitForFinding("hoist.ts", "bad-declaration");
    assert.equal(extension().exports.isServerWanted(), true);
  });
});

function extension(): vscode.Extension<{ isServerWanted(): boolean }> {
  const found = vscode.extensions.getExtension("loadmark.loadmark");
  assert.ok(found, "The extension is not there.");
  return found;
}

async function waitForTypeScript(path: string): Promise<void> {
  const look = () => vscode.languages.getDiagnostics(uriOf(path)).find(({ source }) => source === "ts");
  await waitFor(`TypeScript's error in ${path}`, look, vscode.languages.onDidChangeDiagnostics, () => "it has none");
}
