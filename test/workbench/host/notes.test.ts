// Inlay hints, code lenses and symbols in the editor say what the command's report says.

import assert from "node:assert/strict";
import * as vscode from "vscode";
import { perCent, three } from "../../support/handNumbers.js";
import { type ComputedMechanism, mechanismIn, outputRpm, outputTorque, reportOn } from "../reportOn.js";
import { closeAll, folder, rangeOf, retype, show, undoAll, waitForFinding } from "./demo.js";

/** Inlay hints are asked for again a moment after an edit, so these wait by asking. */
const PATIENCE_MS = 10_000;

const mechanisms = [
  { file: "mechanisms/shelfLift.ts", name: "shelf lift", motorCount: 2, stage: "spur(SHELF.driver, SHELF.driven)" },
  { file: "mechanisms/trayHoist.ts", name: "tray hoist", motorCount: 1, stage: "spur(PINION, TRAY_DRIVEN)" },
  { file: "mechanisms/lidArm.ts", name: "lid arm", motorCount: 1, stage: "reduction(LID_RATIO, { efficiency: 0.85 })" },
] as const;

describe("notes beside the code", () => {
  let reported: (name: string) => ComputedMechanism;
  before(async () => {
    await show("mechanisms/shelfLift.ts");
    await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
    const report = await reportOn(folder().fsPath);
    reported = (name) => mechanismIn(report, name);
  });
  afterEach(closeAll);

  for (const { file, name, motorCount, stage } of mechanisms) {
    it(`show the ${name}'s share of stall, and torque and speed behind its stage`, async () => {
      const { document } = await show(file);
      const mechanism = reported(name);
      const hints = await hintsOf(document);
      const torque = outputTorque(mechanism, motorCount);
      assert.deepEqual(hints, [
        { behind: `"${name}"`, label: `${perCent(mechanism.hardest.stallShare ?? Number.NaN)} of stall` },
        { behind: stage, label: shortLabel(torque, outputRpm(mechanism)) },
      ]);
    });

    it(`show one lens above the ${name}, with its numbers`, async () => {
      const { document } = await show(file);
      const { hardest } = reported(name);
      const lenses = await lensesOf(document);
      assert.equal(lenses.length, 1);
      const [lens] = lenses;
      assert.equal(lens?.range.start.line, rangeOf(document, "mechanism(").start.line);
      const title = lens?.command?.title ?? "";
      const numbers = `${perCent(hardest.stallShare ?? Number.NaN)} of stall, ${three(hardest.motorCurrentA)} A`;
      assert.ok(title.includes(numbers), `"${title}" has not "${numbers}".`);
    });
  }

  it("say that a mechanism stalls", async () => {
    const { document } = await show("mechanisms/wateringArm.ts");
    const labels = (await hintsOf(document)).map(({ label }) => label);
    assert.equal(labels[0], "stalls");
    assert.match(labels[1] ?? "", /stall/);
    const [lens] = await lensesOf(document);
    assert.match(lens?.command?.title ?? "", /^Stalls: 138 % of stall/);
  });

  it("follow what is typed", async () => {
    const editor = await show("mechanisms/lidArm.ts");
    const saved = editor.document.getText();
    await retype(editor, "LID_RATIO, ", "5, ");
    await waitForLabel(editor.document, "28 % of stall");
    await undoAll(editor, saved);
    await waitForLabel(editor.document, "35 % of stall");
  });
});

describe("search for names", () => {
  before(() => show("mechanisms/shelfLift.ts"));
  after(closeAll);

  it("finds mechanisms and motors where they are declared", async () => {
    await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
    assert.deepEqual(await foundAt("shelf lift", "mechanism"), ["mechanisms/shelfLift.ts"]);
    assert.deepEqual(await foundAt("steadyMotor", "motor"), ["motors.ts"]);
  });
});

/** The editor cuts long notes, so at most 16 characters: three digits where they fit, else two. */
function shortLabel(torqueNm: number, rpm: number): string {
  const labels = [3, 2].map((digits) => `${Number(torqueNm.toPrecision(digits))} N·m ${Number(rpm.toPrecision(digits))} rpm`);
  return labels.find(({ length }) => length <= 16) ?? "";
}

/** Files with symbols of a kind of the product's own; TypeScript finds some of its own too. */
async function foundAt(query: string, kind: string): Promise<string[]> {
  const command = "vscode.executeWorkspaceSymbolProvider";
  const symbols = await vscode.commands.executeCommand<vscode.SymbolInformation[]>(command, query);
  return symbols
    .filter(({ containerName }) => containerName === kind)
    .map(({ location }) => vscode.workspace.asRelativePath(location.uri));
}

interface ShownHint {
  /** The text that ends where the hint stands. */
  readonly behind: string;
  readonly label: string;
}

async function hintsOf(document: vscode.TextDocument): Promise<ShownHint[]> {
  const whole = new vscode.Range(0, 0, document.lineCount, 0);
  const hints = await vscode.commands.executeCommand<vscode.InlayHint[]>("vscode.executeInlayHintProvider", document.uri, whole);
  return hints.map(({ label, position }) => {
    const before = document.lineAt(position.line).text.slice(0, position.character);
    const behind = /("[^"]*"|\w+\([^()]*\))$/.exec(before)?.[0] ?? before;
    return { behind, label: typeof label === "string" ? label : label.map(({ value }) => value).join("") };
  });
}

async function waitForLabel(document: vscode.TextDocument, label: string): Promise<void> {
  const end = Date.now() + PATIENCE_MS;
  for (;;) {
    const labels = (await hintsOf(document)).map((hint) => hint.label);
    if (labels.includes(label)) return;
    if (Date.now() > end) assert.fail(`No hint "${label}" but ${JSON.stringify(labels)}.`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

/** Resolved, so with their titles; those of other extensions left out. */
async function lensesOf(document: vscode.TextDocument): Promise<vscode.CodeLens[]> {
  const lenses = await vscode.commands.executeCommand<vscode.CodeLens[]>("vscode.executeCodeLensProvider", document.uri, 20);
  return lenses.filter(({ command }) => command !== undefined && !/reference|implementation/.test(command.title));
}
