// What an edit changed since the last commit, through the editor's own Git in a repository of the test's own. The settings of the
// other tests keep Git off; here it is on, in an extension host of its own.

import assert from "node:assert/strict";
import { execFileSync } from "node:child_process";
import * as vscode from "vscode";
import { three } from "../../support/handNumbers.js";
import { closeAll, folder, rangeOf, retype, show, undoAll, waitForFinding, waitForNoFinding } from "../host/demo.js";
import { shelfLift } from "../host/handDemo.js";
import { waitUntil } from "../waitUntil.js";

const SINCE = "since the last commit";
const LIFT = "mechanisms/shelfLift.ts";

describe("since the last commit", () => {
  before(async () => {
    git("init", "--quiet");
    git("add", ".");
    git("commit", "--quiet", "--message", "as it is");
    const exported = await vscode.extensions.getExtension("vscode.git")?.activate();
    await waitUntil("the editor's Git is on", async () => exported.enabled || undefined);
    assert.ok(await exported.getAPI(1).openRepository(folder()), "The repository was not opened.");
    await show(LIFT);
    await waitForFinding(LIFT, "past-peak");
  });
  after(closeAll);

  it("hover and lens tell what an edit that is not saved changed, and nothing once it is undone", async () => {
    const { document } = await show(LIFT);
    assert.doesNotMatch(await hoverOn(document), /since the last commit/);
    const gearing = await show("gearing.ts");
    const saved = gearing.document.getText();
    await retype(gearing, "driven: 22", "driven: 40");
    await waitForNoFinding(LIFT, "past-peak");
    const [before, after] = [shelfLift(), shelfLift({ driven: 40 })].map(({ currentA }) => three(currentA));
    const change = `current ${before} → ${after} A`;
    await waitUntil("the hover tells the change", async () => (await hoverOn(document)).includes(`${change}, `) || undefined);
    await waitUntil("the lens tells the change", async () =>
      (await lensesOf(document)).find(({ command }) => command?.title.includes(`· ${change} since the last commit`)),
    );
    await show("gearing.ts");
    await undoAll(gearing, saved);
    await waitForFinding(LIFT, "past-peak");
    assert.doesNotMatch(await hoverOn(document), /since the last commit/);
  });

  it("a commit of the edit leaves nothing to tell", async () => {
    const gearing = await show("gearing.ts");
    const saved = gearing.document.getText();
    await retype(gearing, "driven: 22", "driven: 40");
    await gearing.document.save();
    await waitForNoFinding(LIFT, "past-peak");
    const { document } = await show(LIFT);
    await waitUntil("the hover tells the change", async () => (await hoverOn(document)).includes(SINCE) || undefined);
    git("commit", "--quiet", "--all", "--message", "another ratio");
    await waitUntil("nothing has changed", async () => !(await hoverOn(document)).includes(SINCE) || undefined);
    await show("gearing.ts");
    await undoAll(gearing, saved);
    await gearing.document.save();
    await waitForFinding(LIFT, "past-peak");
  });
});

function git(...args: string[]): void {
  const identity = ["-c", "user.name=test", "-c", "user.email=test@example.invalid", "-c", "commit.gpgsign=false"];
  execFileSync("git", [...identity, ...args], { cwd: folder().fsPath, stdio: "ignore" });
}

async function hoverOn(document: vscode.TextDocument): Promise<string> {
  const { start } = rangeOf(document, "shelfLift =");
  const hovers = await vscode.commands.executeCommand<vscode.Hover[]>("vscode.executeHoverProvider", document.uri, start);
  return hovers.flatMap(({ contents }) => contents.map((part) => (typeof part === "string" ? part : part.value))).join("\n");
}

function lensesOf(document: vscode.TextDocument): Thenable<vscode.CodeLens[]> {
  return vscode.commands.executeCommand<vscode.CodeLens[]>("vscode.executeCodeLensProvider", document.uri, 10);
}
