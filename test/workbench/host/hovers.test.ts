// Hovers in the editor on constants: what each mechanism that they feed makes of them, whichever file that is in.

import assert from "node:assert/strict";
import * as vscode from "vscode";
import { perCent, three } from "../../support/handNumbers.js";
import { mechanismIn, outputRpm, outputTorque, reportOn } from "../reportOn.js";
import { closeAll, folder, rangeOf, show, waitForFinding } from "./demo.js";
import { type HandPoint, trayHoist, wateringArm } from "./handDemo.js";

describe("hover on a gear constant", () => {
  before(async () => {
    await show("mechanisms/shelfLift.ts");
    await waitForFinding("mechanisms/shelfLift.ts", "past-peak");
  });
  afterEach(closeAll);

  it("shows the resulting torque in every mechanism that it feeds", async () => {
    const rows = await rowsAt("gearing.ts", "PINION");
    checkRow(rows, "tray hoist", trayHoist());
    checkRow(rows, "watering arm", wateringArm());
    assert.ok(!rows.some(([label]) => label === "shelf lift" || label === "lid arm"));
  });

  it("shows what one tooth more or fewer would do", async () => {
    const rows = await rowsAt("gearing.ts", "TRAY_DRIVEN");
    const more = rows.find(([label]) => label?.includes("55"));
    const fewer = rows.find(([label]) => label?.includes("53"));
    assert.deepEqual(more?.slice(1, 5), cellsOf(trayHoist({ driven: 55 })));
    assert.deepEqual(fewer?.slice(1, 5), cellsOf(trayHoist({ driven: 53 })));
  });

  it("shows the report's numbers, at a property and at a ratio too", async () => {
    const report = await reportOn(folder().fsPath);
    const places = [
      { text: "driver: 20", name: "shelf lift", motorCount: 2 },
      { text: "LID_RATIO", name: "lid arm", motorCount: 1 },
    ];
    for (const { text, name, motorCount } of places) {
      const mechanism = mechanismIn(report, name);
      const row = (await rowsAt("gearing.ts", text)).find(([label]) => label === name);
      const torque = `${three(outputTorque(mechanism, motorCount))} N·m of `;
      assert.ok(row?.[1]?.startsWith(torque), `"${row?.[1]}" does not begin with "${torque}".`);
      assert.equal(row?.[2], `${three(outputRpm(mechanism))} rpm`);
      assert.equal(row?.[3], `${three(mechanism.hardest.motorCurrentA)} A`);
      assert.equal(row?.[4], perCent(mechanism.hardest.stallShare ?? Number.NaN));
    }
  });

  it("says the same where the constant is used in another file", async () => {
    assert.deepEqual(await rowsAt("mechanisms/trayHoist.ts", "PINION, TRAY_DRIVEN)"), await rowsAt("gearing.ts", "PINION"));
  });
});

function checkRow(rows: readonly string[][], name: string, hand: HandPoint): void {
  assert.deepEqual(rows.find(([label]) => label === name)?.slice(1, 5), cellsOf(hand));
}

function cellsOf({ motorNm, stallNm, share, currentA, outputNm, outputRpm: rpm }: HandPoint): string[] {
  const stall = three((outputNm / motorNm) * stallNm);
  return [
    `${three(outputNm)} N·m of ${stall} N·m`,
    rpm === 0 ? "stalled" : `${three(rpm)} rpm`,
    `${three(currentA)} A`,
    perCent(share),
  ];
}

/** The table rows of the hover on a text, head excluded. */
async function rowsAt(path: string, text: string): Promise<string[][]> {
  const { document } = await show(path);
  const position = rangeOf(document, text).start;
  const hovers = await vscode.commands.executeCommand<vscode.Hover[]>("vscode.executeHoverProvider", document.uri, position);
  const markdown = hovers.flatMap(({ contents }) => contents.map((part) => (typeof part === "string" ? part : part.value)));
  const lines = markdown
    .join("\n")
    .split("\n")
    .filter((line) => line.startsWith("|"));
  assert.ok(lines.length > 2, `No table in the hover on "${text}": ${markdown.join("\n")}`);
  return lines.slice(2).map((line) =>
    line
      .split("|")
      .slice(1, -1)
      .map((cell) => cell.trim().replace(/^&ensp;/, "")),
  );
}
