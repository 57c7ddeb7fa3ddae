// Help while writing: units inside the strings of declarations, and quick fixes for findings.

import assert from "node:assert/strict";
import * as vscode from "vscode";
import { perCent } from "../../support/handNumbers.js";
import { mechanismIn, reportOn } from "../reportOn.js";
import { closeAll, folder, rangeOf, retype, show, undoAll, waitForFinding, waitForFindingOn, waitForNoFinding } from "./demo.js";

const LIFT = "mechanisms/shelfLift.ts";

describe("completions inside a unit string", () => {
  before(async () => {
    await show(LIFT);
    await waitForFinding(LIFT, "past-peak");
  });
  afterEach(closeAll);

  it("are the units of what the field holds, the usual ones first", async () => {
    const editor = await show(LIFT);
    const lengths = await unitsAfter(editor, "25 mm", "25 ");
    assert.ok(lengths.slice(0, 4).includes("mm") && lengths.includes("in"), `Lengths were ${lengths}.`);
    assert.ok(!lengths.includes("kg"));
    const masses = await unitsAfter(editor, "13 kg", "13 ");
    assert.ok(masses.includes("kg") && masses.includes("lb") && !masses.includes("mm"), `Masses were ${masses}.`);
  });

  it("are not offered elsewhere", async () => {
    const editor = await show(LIFT);
    assert.deepEqual(await unitsAfter(editor, "Raises the whole", "25 "), []);
  });
});

describe("quick fixes", () => {
  before(() => show(LIFT));
  afterEach(closeAll);

  it("allow a finding with a reason, above the mechanism", async () => {
    const { document } = await show(LIFT);
    const past = await waitForFinding(LIFT, "past-peak");
    const fixes = await fixesAt(document, past.range);
    const allow = fixes.find(({ title }) => /allow.*past-peak/i.test(title));
    assert.ok(allow?.edit, `None of ${JSON.stringify(fixes.map(({ title }) => title))} is it.`);
    assert.ok(!allow.isPreferred);
    await vscode.workspace.applyEdit(allow.edit);
    const line = document.lineAt(past.range.start.line).text;
    assert.match(line, /^\/\/ loadmark-allow past-peak: \S/);
    assert.ok(document.lineAt(past.range.start.line + 1).text.startsWith("export const shelfLift"));
    await waitForNoFinding(LIFT, "past-peak");
    await vscode.commands.executeCommand("workbench.action.files.revert");
    await waitForFinding(LIFT, "past-peak");
  });

  it("offer another gear in another file, whose predicted result comes true", async () => {
    const { document } = await show(LIFT);
    const past = await waitForFinding(LIFT, "past-peak");
    const { proposals } = await reportOn(folder().fsPath);
    const [proposal] = proposals.filter(({ mechanism, rule }) => mechanism === "shelf lift" && rule === "past-peak");
    assert.equal(proposal?.edits[0]?.file, "gearing.ts");
    assert.ok("stallShare" in proposal.predicted);
    const fixes = await fixesAt(document, past.range);
    const words = proposal.summary.split(":")[0] ?? "";
    const fix = fixes.find(({ title }) => title.startsWith(words));
    assert.ok(fix?.edit, `None of ${JSON.stringify(fixes.map(({ title }) => title))} begins with "${words}".`);
    assert.ok(fix.title.includes(`${perCent(proposal.predicted.stallShare ?? Number.NaN)} of stall`), fix.title);
    const gearing = await show("gearing.ts");
    const saved = gearing.document.getText();
    await vscode.workspace.applyEdit(fix.edit);
    await waitForNoFinding(LIFT, "past-peak");
    await gearing.document.save();
    const { hardest } = mechanismIn(await reportOn(folder().fsPath), "shelf lift");
    assert.equal(hardest.stallShare, proposal.predicted.stallShare);
    await undoAll(gearing, saved);
    await gearing.document.save();
    await waitForFinding(LIFT, "past-peak");
  });

  it("put right a field that is misspelt", async () => {
    const editor = await show(LIFT);
    const saved = editor.document.getText();
    await retype(editor, "drumRadius", "drumRadus");
    const bad = await waitForFinding(LIFT, "bad-declaration");
    await waitForFindingOn("drumRadus", editor.document, "bad-declaration");
    const fixes = await fixesAt(editor.document, bad.range);
    const mend = fixes.find(({ title }) => title === "Change to drumRadius");
    assert.ok(mend?.edit, `None of ${JSON.stringify(fixes.map(({ title }) => title))} is it.`);
    await vscode.workspace.applyEdit(mend.edit);
    assert.equal(editor.document.getText(), saved);
    await waitForNoFinding(LIFT, "bad-declaration");
  });
});

/** Types `start` over `text`, and gives the units offered behind it; then undoes that. */
async function unitsAfter(editor: vscode.TextEditor, text: string, start: string): Promise<string[]> {
  const saved = editor.document.getText();
  const { start: position } = rangeOf(editor.document, text);
  await retype(editor, text, start);
  const list = await vscode.commands.executeCommand<vscode.CompletionList>(
    "vscode.executeCompletionItemProvider",
    editor.document.uri,
    position.translate(0, start.length),
  );
  await undoAll(editor, saved);
  const units = list.items.filter(({ kind }) => kind === vscode.CompletionItemKind.Unit);
  return units
    .toSorted((one, other) => (one.sortText ?? "").localeCompare(other.sortText ?? ""))
    .map(({ label }) => (typeof label === "string" ? label : label.label));
}

/** In the order in which the editor lists them; TypeScript has some of its own. */
function fixesAt(document: vscode.TextDocument, range: vscode.Range): Thenable<vscode.CodeAction[]> {
  const kind = vscode.CodeActionKind.QuickFix.value;
  return vscode.commands.executeCommand("vscode.executeCodeActionProvider", document.uri, range, kind);
}
