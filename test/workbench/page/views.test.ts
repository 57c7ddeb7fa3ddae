// The chart panel's views in the editor: each opens by its command, shows the report's numbers, follows an edit, comes back after a
// reload; and a probe that is dragged writes the gear that it names, which can be undone.

import assert from "node:assert/strict";
import type { Frame } from "playwright-core";
import type { Editor } from "../editor.js";
import { CONTENT, openAtCaret, openBesidePanel, openPanelBy, saveBy } from "../panel.js";
import { mechanismIn, reportOn } from "../reportOn.js";
import { waitUntil } from "../waitUntil.js";

const tabOf = (title: string) => `.tab[aria-label^="${title}"]`;
const SOON = { timeout: 3000 };

describe("the views of the chart panel", () => {
  it("opens the travel of the mechanism at the caret, with the report's numbers", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand("Loadmark: Show Travel");
    await editor.page.waitForSelector(tabOf("Travel"));
    const { travel } = mechanismIn(await reportOn(editor.folder), "tray hoist");
    const seconds = travel?.timeS ?? Number.NaN;
    await waitForFact(editor, "travel", "Travel time", `${Number(seconds.toPrecision(3))} s`);
    const csv = (await saveBy(editor, "Save numbers (CSV)", "tray-hoist-travel.csv")).toString("utf8");
    const last = csv.trimEnd().split("\r\n").at(-1)?.split(",").map(Number) ?? [];
    assert.ok(Math.abs((last[0] ?? Number.NaN) / seconds - 1) < 1e-5, `${last[0]} is not the reported ${seconds} s.`);
    assert.ok(Math.abs((last[1] ?? Number.NaN) / 0.7 - 1) < 1e-6, `${last[1]} is not the declared 0.7 m.`);
    await openBesidePanel(editor, "trayHoist.ts", "gearing.ts");
    await editor.retype("54;", "40;");
    const frame = await editor.webview("#view-travel .content:not([hidden])");
    await frame.locator(".fact", { hasText: `was ${Number(seconds.toPrecision(3))} s` }).waitFor();
  });

  it("opens the robot's load cycle, with the report's numbers, and keeps view and zoom through a reload", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand("Loadmark: Show Power by Mechanism");
    await editor.page.waitForSelector(tabOf("Power by Mechanism"));
    const [robot] = (await reportOn(editor.folder)).robots;
    const lowest = robot?.lowestVoltageV ?? Number.NaN;
    await waitForFact(editor, "power", "Lowest voltage", `${Number(lowest.toPrecision(3))} V`);
    const csv = (await saveBy(editor, "Save numbers (CSV)", "seedling-carrier-power.csv")).toString("utf8");
    const rows = csv.trimEnd().split("\r\n").slice(1);
    const volts = rows.map((row) => Number(row.split(",")[1]));
    assert.ok(Math.abs(Math.min(...volts) / lowest - 1) < 1e-8, `${Math.min(...volts)} is not the reported ${lowest} V.`);
    const amperes = rows.map((row) => Number(row.split(",")[2]));
    const peak = robot?.peakCurrentA ?? Number.NaN;
    assert.ok(Math.abs(Math.max(...amperes) / peak - 1) < 1e-8, `${Math.max(...amperes)} is not the reported ${peak} A.`);
    const frame = await editor.webview("#view-power .plots");
    await frame.locator(".plots").focus();
    await editor.page.keyboard.press("+");
    const zoomed = (await frame.locator(".span").textContent()) ?? "";
    assert.match(zoomed, /^[\d.]+ s to [\d.]+ s$/);
    // A file in the panel's own group covers it, and the page is gone; a click brings it back.
    await editor.page.locator(tabOf("Power by Mechanism")).click();
    await editor.openFile("motors.ts");
    await waitUntil("a hidden page that is gone", async () => (frame.isDetached() ? true : undefined));
    await expectAsLeft(editor, zoomed);
    await editor.page.reload();
    await editor.waitUntilReady();
    await expectAsLeft(editor, zoomed);
  });

  it("opens from the robot in the Mechanisms view", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    const rows = await editor.showMechanisms();
    const row = rows.filter({ hasText: "seedling carrier" });
    await openPanelBy(editor, tabOf("Power by Mechanism"), async () => {
      await row.hover(SOON);
      await row.getByRole("button", { name: "Show Power by Mechanism" }).click(SOON);
    });
    await waitForFact(editor, "power", "Cycles done", "30 of 30");
  });

  it("writes the gear that a dragged probe names, only when asked, and so that it can be undone", async () => {
    const editor = await openAtCaret("mechanisms/trayHoist.ts", "stages");
    await editor.runCommand("Loadmark: Show Operating Point");
    const frame = await editor.webview(CONTENT);
    const teeth = await dragTo(editor, frame, 0.8);
    assert.ok(teeth > 54, `${teeth}`);
    assert.equal(await editor.page.locator(".tab.dirty").count(), 0);
    await frame.getByRole("button", { name: "Write to code" }).click();
    await openBesidePanel(editor, "trayHoist.ts", "gearing.ts");
    await waitUntil(`${teeth} teeth in the code`, async () =>
      (await editor.shows(`TRAY_DRIVEN = ${teeth};`)) ? true : undefined,
    );
    await frame.locator(".fact", { hasText: "was 0.525 N·m" }).waitFor();
    await editor.undoUntil("TRAY_DRIVEN = 54;");
    await frame.locator(".fact", { hasText: "was 0.525 N·m" }).waitFor({ state: "detached" });
  });
});

/** Drags the line of the needed torque to a share of where it is, and gives the driven teeth that the model then names. */
async function dragTo(editor: Editor, frame: Frame, share: number): Promise<number> {
  const says = frame.locator(".says");
  return waitUntil("an answer of the model to the probe", async () => {
    const box = await frame.locator("canvas").first().boundingBox();
    if (box === null) return undefined;
    // The torque axis begins as far from the left as the numbers of the left axis need; the needed torque is 40 % of stall.
    const [left, right] = [box.x + 57, box.x + box.width - 57];
    const needed = left + (0.4 / 1.06) * (right - left);
    const { mouse } = editor.page;
    await mouse.move(needed, box.y + 90);
    await mouse.down();
    await mouse.move(needed - (needed - left) * (1 - share), box.y + 90, { steps: 6 });
    await mouse.up();
    const text = await says.textContent({ timeout: 5000 }).catch(() => null);
    await editor.page.waitForTimeout(500);
    const settled = (await says.textContent({ timeout: 5000 }).catch(() => null)) ?? "";
    const [, teeth] = /with 16 and (\d+) teeth/.exec(settled) ?? [];
    const enabled = await frame.getByRole("button", { name: "Write to code" }).isEnabled();
    return text === settled && enabled && teeth !== undefined ? Number(teeth) : undefined;
  });
}

async function expectAsLeft(editor: Editor, zoomed: string): Promise<void> {
  await editor.page.locator(tabOf("Power by Mechanism")).click();
  const frame = await editor.webview("#view-power .content:not([hidden])", 30_000);
  assert.equal(await frame.locator(".span").textContent(), zoomed);
  assert.equal(await frame.locator(".content h1").textContent(), "seedling carrier");
}

async function waitForFact(editor: Editor, view: string, name: string, expected: string): Promise<void> {
  let last = "";
  const look = async () => {
    const frame = await editor.webview(`#view-${view} .content:not([hidden])`);
    last = (await frame.locator(".fact", { hasText: name }).locator(".now").textContent()) ?? "";
    return last === expected ? true : undefined;
  };
  await waitUntil(`${name} of "${expected}"`, look, 20_000, () => `it is "${last}"`);
}
