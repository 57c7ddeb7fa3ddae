// The chart panel as a person uses it: opened from everywhere, following caret and edits, saved to files, and still there after
// it was hidden and after a reload. Its numbers are the command's, and those of a calculation by hand.

import assert from "node:assert/strict";
import type { Frame } from "playwright-core";
import { three } from "../../support/handNumbers.js";
import type { Editor } from "../editor.js";
import { type HandPoint, trayHoist } from "../host/handDemo.js";
import { CONTENT, openAtCaret, openPanelBy, saveBy } from "../panel.js";
import { plainFolder } from "../paths.js";
import { mechanismIn, reportOn } from "../reportOn.js";
import { waitUntil } from "../waitUntil.js";
import { workbench } from "./session.js";

const SHOW = "Loadmark: Show Operating Point";
const SOON = { timeout: 3000 };
const PANEL_TAB = '.tab[aria-label^="Operating Point"]';

describe("the chart panel", () => {
  it("shows the command's numbers for the mechanism at the caret, and saves them", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand(SHOW);
    await waitForNeeded(editor, "tray hoist", trayHoist());
    const csv = await saveBy(editor, "Save numbers (CSV)", "tray-hoist-operating-point.csv");
    const needed = csv
      .toString("utf8")
      .split("\r\n")
      .find((row) => row.endsWith(",needed"));
    const cells = needed?.split(",").map(Number) ?? [];
    const { hardest } = mechanismIn(await reportOn(editor.folder), "tray hoist");
    const reported = [
      hardest.motorTorqueNm,
      (hardest.stallShare ?? Number.NaN) * 100,
      (hardest.motorSpeedRadPerS * 60) / (2 * Math.PI),
      hardest.motorCurrentA,
      hardest.shaftPowerW,
      (hardest.motorEfficiency ?? Number.NaN) * 100,
    ];
    for (const [index, value] of reported.entries()) {
      assert.ok(Math.abs((cells[index] ?? Number.NaN) / value - 1) < 1e-8, `${cells[index]} is not the reported ${value}.`);
    }
  });

  it("saves a picture", async () => {
    const editor = await openAtCaret("mechanisms/lidArm.ts", "stages");
    await editor.runCommand(SHOW);
    const picture = await saveBy(editor, "Save picture (PNG)", "lid-arm-operating-point.png");
    assert.equal(picture.subarray(1, 4).toString("latin1"), "PNG");
  });

  it("follows the caret to another mechanism, and keeps it where there is none", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand(SHOW);
    await waitForTitle(editor, "tray hoist");
    await editor.openFile("mechanisms/shelfLift.ts");
    await editor.reveal("mechanisms/shelfLift.ts", "stages");
    await waitForTitle(editor, "shelf lift");
    await editor.openFile("gearing.ts");
    await editor.reveal("gearing.ts", "LID_RATIO");
    assert.equal(await title(editor), "shelf lift");
    assert.equal(await editor.page.locator(PANEL_TAB).count(), 1);
  });

  it("follows an edit in another file, says what was saved, and forgets that when it is undone", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand(SHOW);
    await waitForNeeded(editor, "tray hoist", trayHoist());
    await editor.openFile("gearing.ts");
    await editor.retype("54;", "40;");
    await waitForNeeded(editor, "tray hoist", trayHoist({ driven: 40 }), trayHoist());
    await editor.undoUntil("TRAY_DRIVEN = 54;");
    await waitForNeeded(editor, "tray hoist", trayHoist());
  });

  it("keeps its last result while a value is missing, and says that it is old", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand(SHOW);
    await waitForNeeded(editor, "tray hoist", trayHoist());
    await editor.openFile("gearing.ts");
    await editor.retype("54;", ";");
    const frame = await editor.webview(CONTENT);
    const old = frame.locator(".old");
    await old.waitFor({ state: "visible" });
    assert.match((await old.textContent()) ?? "", /last result/);
    await waitForNeeded(editor, "tray hoist", trayHoist());
    await editor.undoUntil("TRAY_DRIVEN = 54;");
    await old.waitFor({ state: "hidden" });
  });

  it("opens from a lens, a hover's link and the view, each for its own mechanism", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await openPanelBy(editor, PANEL_TAB, () => editor.page.locator(".codelens-decoration a").first().click(SOON));
    await waitForTitle(editor, "tray hoist");
    await editor.openFile("mechanisms/lidArm.ts");
    await closePanel(editor);
    await openPanelBy(editor, PANEL_TAB, async () => {
      await editor.hover("lidArm =", /Chart/);
      await editor.page.locator(".monaco-hover:visible a", { hasText: "Chart" }).first().click(SOON);
    });
    await waitForTitle(editor, "lid arm");
    await closePanel(editor);
    await editor.page.locator('.pane-header[aria-label^="Mechanisms"]').click();
    const row = editor.page.locator(".pane .monaco-list-row", { hasText: "watering arm" });
    await openPanelBy(editor, PANEL_TAB, async () => {
      await row.hover(SOON);
      await row.getByRole("button", { name: "Show Operating Point" }).click(SOON);
    });
    await waitForTitle(editor, "watering arm");
  });

  it("is as it was after it was hidden, and after a reload of the window", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand(SHOW);
    const frame = await editor.webview(CONTENT);
    await frame.getByRole("button", { name: "Show table" }).click();
    await frame.locator(".plots").focus();
    await editor.page.keyboard.press("Home");
    await frame.locator(".readout caption", { hasText: "At 0 N·m" }).waitFor();
    // A file in the panel's own group covers it; a click makes that group the one that files open in.
    await editor.page.locator(PANEL_TAB).click();
    await editor.openFile("motors.ts");
    await editor.page.waitForSelector(`${PANEL_TAB}:not(.active)`);
    await waitUntil("a hidden page that is gone", async () => (frame.isDetached() ? true : undefined));
    await editor.page.locator(PANEL_TAB).click();
    await expectAsLeft(editor);
    await editor.page.reload();
    await editor.waitUntilReady();
    // Which tab was in front the editor keeps a little later than what is in them.
    await editor.page.locator(PANEL_TAB).click();
    await expectAsLeft(editor);
  });

  it("says what to do where nothing is declared", async () => {
    const editor = await workbench().open("tally.ts", plainFolder);
    await editor.runCommand(SHOW);
    const frame = await editor.webview("#chart .empty:not([hidden])");
    assert.match((await frame.locator(".empty").textContent()) ?? "", /No mechanism is declared/);
  });
});

async function title(editor: Editor): Promise<string> {
  return (await (await editor.webview(CONTENT)).locator(".content h1").textContent()) ?? "";
}

async function waitForTitle(editor: Editor, name: string): Promise<void> {
  let last = "";
  const look = async () => {
    last = await title(editor);
    return last === name ? true : undefined;
  };
  await waitUntil(`a chart of ${name}`, look, 15_000, () => `it is of "${last}"`);
}

/** Waits until the chart shows what is needed by hand, beside the saved result or alone. */
async function waitForNeeded(editor: Editor, name: string, now: HandPoint, was?: HandPoint): Promise<void> {
  const expected = `${three(now.motorNm)} N·m${was ? `was ${three(was.motorNm)} N·m` : ""}`;
  let last = "";
  const look = async () => {
    const frame = await editor.webview(CONTENT);
    last = (await frame.locator(".fact", { hasText: "Torque needed" }).locator("dd").textContent()) ?? "";
    return last === expected ? frame : undefined;
  };
  await waitUntil(`a needed torque of "${expected}"`, look, 15_000, () => `it is "${last}"`);
  await waitForTitle(editor, name);
}

async function expectAsLeft(editor: Editor): Promise<void> {
  const frame: Frame = await editor.webview(CONTENT, 30_000);
  assert.equal(await frame.locator(".content h1").textContent(), "tray hoist");
  assert.match((await frame.locator(".readout caption").textContent()) ?? "", /^At 0 N·m/);
  assert.equal(await frame.locator(".table-box").isVisible(), true);
}

async function closePanel(editor: Editor): Promise<void> {
  await editor.page.locator(PANEL_TAB).click({ button: "middle" });
  await editor.page.waitForSelector(PANEL_TAB, { state: "detached" });
}
