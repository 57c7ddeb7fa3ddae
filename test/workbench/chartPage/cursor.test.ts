// The read-out by mouse and by keyboard.

import assert from "node:assert/strict";
import type { ChartMemory } from "../../../extension/protocol/chartMemory.js";
import { waitUntil } from "../waitUntil.js";
import type { OpenedChart } from "./chartHost.js";
import { fine, NEEDED_NM, pastPeak } from "./charts.js";
import { chartHost } from "./session.js";

describe("the cursor of the chart's page", () => {
  let chart: OpenedChart;
  beforeEach(async () => {
    chart = await chartHost().open();
    await chart.show(fine());
  });
  afterEach(async () => {
    assert.deepEqual(chart.troubles, []);
    await chart.close();
  });

  const caption = async () => (await chart.page.locator(".readout caption").textContent()) ?? "";
  const picture = () =>
    chart.page
      .locator("canvas")
      .first()
      .evaluate((canvas) => (canvas as HTMLCanvasElement).toDataURL());
  const cursorNm = async () => ((await chart.state()) as ChartMemory | undefined)?.views["operating-point"].cursor;

  it("is reached and moved by keys alone", async () => {
    await chart.page.keyboard.press("Tab");
    assert.equal(await chart.page.evaluate(() => document.activeElement?.getAttribute("role")), "tab");
    await chart.page.keyboard.press("Tab");
    assert.equal(await chart.page.evaluate(() => document.activeElement?.tagName), "SELECT");
    await chart.page.keyboard.press("Tab");
    assert.equal(await chart.page.evaluate(() => (document.activeElement as HTMLInputElement).type), "range");
    await chart.page.keyboard.press("Tab");
    const plots = chart.page.getByRole("slider", { name: "Torque of the read-out" });
    assert.equal(await plots.evaluate((element) => element === document.activeElement), true);
    const before = await picture();
    await chart.page.keyboard.press("ArrowRight");
    assert.ok(Math.abs(((await cursorNm()) ?? Number.NaN) / NEEDED_NM - 1) < 1e-9);
    assert.match(await caption(), /: needed$/);
    assert.notEqual(await picture(), before);
    await chart.page.keyboard.press("ArrowRight");
    assert.ok(((await cursorNm()) ?? Number.NaN) > NEEDED_NM);
    await chart.page.keyboard.press("ArrowLeft");
    await chart.page.keyboard.press("ArrowLeft");
    assert.ok(((await cursorNm()) ?? Number.NaN) < NEEDED_NM);
    await chart.page.keyboard.press("Home");
    assert.equal(await cursorNm(), 0);
    assert.equal(await plots.getAttribute("aria-valuenow"), "0");
    await chart.page.keyboard.press("End");
    assert.equal(await plots.getAttribute("aria-valuenow"), await plots.getAttribute("aria-valuemax"));
    assert.match(await caption(), /100 % of stall: standstill$/);
    await chart.page.keyboard.press("Escape");
    assert.equal(await cursorNm(), null);
    assert.equal(await picture(), before);
  });

  it("reads off all values at one torque, in cells and in words", async () => {
    await chart.page.focus(".plots");
    await chart.page.keyboard.press("Home");
    const cells = await chart.page.locator(".readout tbody tr").last().locator("td").allInnerTexts();
    // The sheet at no load, as declared.
    assert.deepEqual(cells, ["310 rpm", "0.35 A", "0 W", "0 %"]);
    const spoken = chart.page.locator(".spoken");
    assert.match(
      (await spoken.textContent()) ?? "",
      /Sheet: speed 310 rpm, current 0\.35 A, output power 0 W, efficiency 0 %\.$/,
    );
    const slider = chart.page.locator(".plots");
    assert.equal(await slider.getAttribute("aria-valuetext"), "0 N·m, 0 % of stall");
  });

  it("follows the mouse, to the nearest computed point", async () => {
    const box = await chart.page.locator("canvas").first().boundingBox();
    if (box === null) throw new Error("The plot is not there.");
    await chart.page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    const middle = (await cursorNm()) ?? Number.NaN;
    await chart.page.mouse.move(box.x + box.width - 60, box.y + box.height / 2);
    const right = (await cursorNm()) ?? Number.NaN;
    await chart.page.mouse.move(box.x + 57, box.y + box.height / 2);
    assert.equal(await cursorNm(), 0);
    assert.ok(0 < middle && middle < right, `${middle}, ${right}`);
    // There is as much room left of the axis as right of it, for numbers as long; the axis ends at 1.06 of stall.
    const stallNm = (1.3 / 4.4) * (12.6 / (12 / 4.4 + 0.1));
    assert.ok(Math.abs(middle / stallNm - 0.53) < 0.02, String(middle / stallNm));
  });

  it("leaves keys with Ctrl, Alt or Meta, and others, to the editor", async () => {
    await chart.page.focus(".plots");
    for (const key of ["Control+ArrowRight", "Alt+Home", "a"]) await chart.page.keyboard.press(key);
    assert.equal((await cursorNm()) ?? null, null);
  });

  it("stays at its torque while the same mechanism changes, and goes with another", async () => {
    await chart.page.focus(".plots");
    await chart.page.keyboard.press("ArrowRight");
    await chart.show(pastPeak());
    assert.match(await caption(), /^At 0\.52/);
    assert.equal(await chart.page.locator(".plots").evaluate((element) => element === document.activeElement), true);
    const other = pastPeak();
    await chart.show({ ...other, chart: { ...other.chart, mechanism: "lid arm" } });
    await waitUntil("no cursor", async () => ((await cursorNm()) === null ? true : undefined));
  });
});
