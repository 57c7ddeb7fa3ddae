// The Mechanisms view and the status item: what the report says, and nothing at all where nothing is declared.

import assert from "node:assert/strict";
import { perCent } from "../../support/handNumbers.js";
import type { Editor } from "../editor.js";
import { newFolder, plainFolder } from "../paths.js";
import { mechanismIn, reportOn } from "../reportOn.js";
import { waitUntil } from "../waitUntil.js";
import { workbench } from "./session.js";

const STATUS = "#loadmark\\.loadmark\\.loadmark\\.status";

describe("the overview of the workspace", () => {
  it("lists the robot's mechanisms with their share of stall, as reported", async () => {
    const editor = await workbench().open("mechanisms/shelfLift.ts");
    const report = await reportOn(editor.folder);
    const rows = await editor.showMechanisms();
    const texts = await waitUntil("a row of each mechanism", async () => {
      const all = (await rows.allInnerTexts()).map((text) => text.replaceAll("\n", ""));
      return all.length > report.mechanisms.length ? all : undefined;
    });
    assert.ok(texts[0]?.startsWith("seedling carrier"));
    for (const { name } of report.mechanisms) {
      const share = perCent(mechanismIn(report, name).hardest.stallShare ?? Number.NaN);
      const isRow = (text: string) => text.startsWith(`${name}${share} of stall`);
      assert.ok(texts.some(isRow), `No row of ${JSON.stringify(texts)} has ${name} at ${share}.`);
    }
  });

  it("leads to a declaration by a click", async () => {
    const editor = await workbench().open("gearing.ts");
    const rows = await editor.showMechanisms();
    await rows.filter({ hasText: "watering arm" }).click();
    await editor.page.waitForSelector('.tab.active[data-resource-name="wateringArm.ts"]');
    await editor.waitForSquiggles("its error", (squiggles) => squiggles.some(({ level }) => level === "error"));
  });

  it("counts findings in one status item, and follows an edit", async () => {
    const editor = await workbench().open("mechanisms/wateringArm.ts");
    await editor.waitForLens();
    await waitForStatus(editor, "Loadmark: 1 error");
    assert.equal(await editor.page.locator(STATUS).count(), 1);
    // It no longer stalls, but is past its peak of power still.
    await editor.retype("spur(PINION, WATERING_DRIVEN)", "spur(10, 60)");
    await waitForStatus(editor, "warning");
    await editor.save();
    const { findings } = await reportOn(editor.folder);
    assert.ok(findings.some(({ rule, mechanism }) => rule === "past-peak" && mechanism === "watering arm"));
    await waitForStatus(editor, `${findings.filter(({ level }) => level === "warning").length} warnings`);
  });

  it("says what to do where nothing is declared yet, and opens an example", async () => {
    const editor = await workbench().open("plan.ts", newFolder);
    const { page } = editor;
    const header = page.locator('.pane-header[aria-label^="Mechanisms"]');
    await header.waitFor();
    const welcome = page.locator(".pane:has(> .pane-header[aria-label^='Mechanisms']) .welcome-view-content");
    const example = welcome.getByRole("button", { name: "Open an Example" });
    // A view that is closed has no words yet.
    await waitUntil("the welcome of the view", async () => {
      if ((await header.getAttribute("aria-expanded")) !== "true") await header.click();
      return (await example.count()) > 0 ? true : undefined;
    });
    assert.match((await welcome.textContent()) ?? "", /No mechanism is declared yet/);
    await example.click();
    await page.locator(".view-line", { hasText: "Invented" }).first().waitFor();
    const rows = page.locator('.pane:has(> .pane-header[aria-label^="Mechanisms"]) .monaco-list-row');
    await rows.filter({ hasText: "tray mover" }).waitFor();
    await rows.filter({ hasText: "flap" }).waitFor();
  });

  it("is absent where nothing is declared", async () => {
    const editor = await workbench().open("tally.ts", plainFolder);
    // TypeScript's own finding tells that the file has been looked at.
    await editor.waitForSquiggles("TypeScript's error", (squiggles) => squiggles.some(({ text }) => text === "trays"));
    assert.equal(await editor.page.locator(STATUS).count(), 0);
    assert.equal(await editor.page.locator('.pane-header[aria-label^="Mechanisms"]').count(), 0);
  });
});

async function waitForStatus(editor: Editor, part: string): Promise<void> {
  let last = "";
  const look = async () => {
    last = (await editor.page.locator(STATUS).allTextContents()).join();
    return last.includes(part) ? true : undefined;
  };
  await waitUntil(`"${part}" in the status`, look, 15_000, () => `it says "${last}"`);
}
