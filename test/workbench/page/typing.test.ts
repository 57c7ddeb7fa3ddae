// What a person sees while typing: the squiggle of an overloaded motor comes with a worse ratio, and goes with undo.

import assert from "node:assert/strict";
import type { Squiggle } from "../viewLines.js";
import { workbench } from "./session.js";

describe("the squiggle of an overloaded motor", () => {
  it("comes while a worse ratio is typed, and goes when that is undone", async () => {
    const editor = await workbench().open("mechanisms/lidArm.ts");
    await editor.waitForLens();
    assert.deepEqual((await editor.squiggles()).filter(isWarning), []);
    await editor.retype("LID_RATIO,", "2.4,");
    await editor.waitForSquiggles("a warning under the mechanism", isUnder("lidArm"));
    await editor.undoUntil("LID_RATIO, {");
    await editor.waitForSquiggles("no warning", (squiggles) => !squiggles.some(isWarning));
  });

  it("comes in another file from the unsaved constant that it imports, and goes with it", async () => {
    const editor = await workbench().open("mechanisms/trayHoist.ts");
    await editor.waitForLens();
    await editor.openFile("gearing.ts");
    await editor.retype("54;", "40;");
    await editor.openFile("mechanisms/trayHoist.ts");
    await editor.waitForSquiggles("a warning under the mechanism", isUnder("trayHoist"));
    await editor.openFile("gearing.ts");
    await editor.undoUntil("TRAY_DRIVEN = 54;");
    await editor.openFile("mechanisms/trayHoist.ts");
    await editor.waitForSquiggles("no warning", (squiggles) => !squiggles.some(isWarning));
  });

  it("says in its hover why, and what would help", async () => {
    const editor = await workbench().open("mechanisms/shelfLift.ts");
    await editor.waitForSquiggles("a warning under the mechanism", isUnder("shelfLift"));
    const text = await editor.hover("shelfLift =", /past-peak[\s\S]*ratio 1\.1/);
    assert.match(text, /66 % of the 2\.34 N·m at which it stalls/);
    assert.match(text, /A ratio of at least 1\.46/);
  });
});

function isWarning({ level }: Squiggle): boolean {
  return level === "warning" || level === "error";
}

function isUnder(name: string): (squiggles: readonly Squiggle[]) => boolean {
  return (squiggles) => squiggles.some(({ text, level }) => text === name && level === "warning");
}
