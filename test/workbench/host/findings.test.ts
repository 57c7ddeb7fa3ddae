// The demo's findings in the editor: exactly those of the report, and what a person reads of them.

import assert from "node:assert/strict";
import * as vscode from "vscode";
import { perCent, three } from "../../support/handNumbers.js";
import { reportOn } from "../reportOn.js";
import { allFindings, closeAll, folder, show, waitForFinding } from "./demo.js";
import { shelfLift } from "./handDemo.js";

const SEVERITIES: Readonly<Record<string, vscode.DiagnosticSeverity>> = {
  error: vscode.DiagnosticSeverity.Error,
  warning: vscode.DiagnosticSeverity.Warning,
  information: vscode.DiagnosticSeverity.Information,
};

describe("findings in the editor", () => {
  afterEach(closeAll);

  it("appear once a file of a project that uses the declarations is open, for every file", async () => {
    // This one imports mechanisms, not the declarations.
    await show("carrier.ts");
    const past = await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
    const stalls = await waitForFinding("mechanisms/wateringArm.ts", "stalls");
    assert.equal(past.severity, vscode.DiagnosticSeverity.Warning);
    assert.equal(stalls.severity, vscode.DiagnosticSeverity.Error);
    const { document } = await show("mechanisms/shelfLift.ts");
    assert.equal(document.getText(past.range), "shelfLift");
  });

  it("say the numbers that they compare", async () => {
    await show("mechanisms/shelfLift.ts");
    const past = await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
    const { motorNm, stallNm, share, ratioAtPeak } = shelfLift();
    const numbers = `${three(motorNm)} N·m, ${perCent(share)} of the ${three(stallNm)} N·m`;
    assert.ok(past.message.includes(numbers), `"${past.message}" has not "${numbers}".`);
    // Rounded up, since anything below would still be too little.
    const ratio = Number(/ratio of at least ([\d.]+)/.exec(past.message)?.[1]);
    assert.ok(ratio >= ratioAtPeak && ratio < 1.01 * ratioAtPeak, `The message proposes ${ratio}, by hand it is ${ratioAtPeak}.`);
  });

  it("are those of the command's report, in the same places", async () => {
    await show("mechanisms/shelfLift.ts");
    await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
    const { findings } = await reportOn(folder().fsPath);
    const reported = findings.map(({ rule, level, message, file, line, column, endLine, endColumn, related }) => ({
      file,
      rule,
      message,
      severity: SEVERITIES[level],
      range: [line - 1, column - 1, endLine - 1, endColumn - 1],
      related: related.map((one) => [one.message, one.file, one.line - 1, one.column - 1]),
    }));
    const shown = allFindings().map(([file, { code, message, severity, range, relatedInformation }]) => ({
      file,
      rule: code,
      // The editor has a line for each sentence.
      message: message.replaceAll("\n", " "),
      severity,
      range: [range.start.line, range.start.character, range.end.line, range.end.character],
      related: (relatedInformation ?? []).map((one) => [
        one.message,
        vscode.workspace.asRelativePath(one.location.uri),
        one.location.range.start.line,
        one.location.range.start.character,
      ]),
    }));
    assert.deepEqual(byPlace(shown), byPlace(reported));
    assert.ok(shown.length > 0);
  });

  it("lead to the constants and the motor that they come from, in other files", async () => {
    await show("mechanisms/shelfLift.ts");
    const past = await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
    const places = (past.relatedInformation ?? []).map(async ({ location: { uri, range } }) => {
      const document = await vscode.workspace.openTextDocument(uri);
      return `${vscode.workspace.asRelativePath(uri)}: ${document.getText(range)}`;
    });
    assert.deepEqual(await Promise.all(places), ["gearing.ts: 20", "gearing.ts: 22", "motors.ts: steadyMotor"]);
  });
});

function byPlace<Shown extends { file: string; range: readonly number[] }>(findings: readonly Shown[]): Shown[] {
  return findings.toSorted((one, other) => {
    return one.file.localeCompare(other.file) || (one.range[0] ?? 0) - (other.range[0] ?? 0);
  });
}
