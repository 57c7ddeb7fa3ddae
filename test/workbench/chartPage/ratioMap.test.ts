// The ratio map on the page: its marks in words, its buttons by mouse and keyboard, and how it looks in every theme and width.

import assert from "node:assert/strict";
import axe from "axe-core";
import { NO_MEMORY } from "../../../extension/protocol/chartMemory.js";
import type { ShownChart } from "../../../extension/protocol/charts/views.js";
import { hoistSource } from "../../support/chartFixture.js";
import { ratioMapShown } from "../../support/ratioFixture.js";
import type { ChartPageOptions, OpenedChart } from "./chartHost.js";
import { chartHost } from "./session.js";
import { pageThemes, type ThemeName } from "./themes.js";

const VIEW = "#view-ratio-map";

describe("the ratio map on the page", () => {
  let chart: OpenedChart;
  let answer: ShownChart<"ratio-map">;
  before(() => {
    const source = (driven: number) => hoistSource({ driven, more: ' within: "9 s",' });
    answer = ratioMapShown(source(30), "tray hoist", source(54));
  });
  afterEach(async () => {
    assert.deepEqual(chart.troubles, []);
    await chart.close();
  });

  const open = async (options: ChartPageOptions = {}, cursor: number | null = null): Promise<void> => {
    const views = { ...NO_MEMORY.views, "ratio-map": { cursor } };
    chart = await chartHost().open({ state: { ...NO_MEMORY, view: "ratio-map", views }, ...options });
    await chart.show(answer);
  };
  // biome-ignore lint/performance/useDomNodeTextContent: what is hidden must not count
  const text = async (selector: string) => (await chart.page.locator(`${VIEW} ${selector}`).innerText()).trim();

  it("asks for its view, and tells the marks beside what is saved", async () => {
    await open();
    const { want } = await chart.waitForSent("ready");
    assert.deepEqual(want, { view: "ratio-map", write: null });
    const facts = await text(".facts");
    assert.match(facts, /Now\s+1\.88: [\d.]+ s, \d+ % of stall\s+was 3\.38/);
    assert.match(facts, /Keeps every rule\s+[\d.]+ to [\d.]+/);
    assert.match(await text(".verdict"), /Past its peak of power/);
    const labels = await chart.page
      .locator(`${VIEW} canvas`)
      .evaluateAll((canvases) => canvases.map((one) => one.getAttribute("aria-label") ?? ""));
    assert.match(labels[0] ?? "", /^Every rule is kept at ratios from [\d.]+ to [\d.]+\..*Past its peak of power: from /);
    assert.match(labels[1] ?? "", /^Travel time over the ratio\. Now: 1\.88/);
  });

  it("writes by a click, and by the keyboard", async () => {
    await open();
    const { mechanism, toWrite } = answer.chart;
    const button = chart.page.getByRole("button", { name: "Write the fastest" });
    await button.click();
    const wanted = { view: "ratio-map", write: { mechanism, ratio: toWrite.fastest?.ratio } };
    assert.deepEqual((await chart.waitForSent("writeToCode")).want, wanted);
    await button.focus();
    await chart.page.keyboard.press("Enter");
    await chart.page.waitForTimeout(100);
    assert.equal(chart.sent.filter(({ type }) => type === "writeToCode").length, 2);
  });

  it("offers what is nearest to the cursor, and reads it off", async () => {
    await open();
    await chart.page.locator(`${VIEW} .plots`).focus();
    await chart.page.keyboard.press("Home");
    assert.match(await text(".writes"), /Write what is nearest to the cursor: .*\(breaks a rule\)/);
    assert.match(await text(".readout caption"), /^At ratio [\d.]+: breaks: Stalls/);
    await chart.page.keyboard.press("Escape");
    assert.doesNotMatch(await text(".writes"), /nearest to the cursor/);
  });

  for (const theme of Object.keys(pageThemes) as ThemeName[]) {
    it(`breaks no rule of accessibility in ${theme}`, async () => {
      await open({ theme }, 2);
      await chart.page.getByRole("button", { name: "Show table" }).click();
      await chart.page.evaluate(axe.source);
      const found = await chart.page.evaluate(async () => {
        const { axe: checker } = window as unknown as { axe: { run(): Promise<{ violations: { id: string }[] }> } };
        return (await checker.run()).violations.map(({ id }) => id);
      });
      assert.deepEqual(found, []);
    });
  }

  it("fits a panel of 400 px", async () => {
    await open({ width: 400 }, 2);
    const wide = await chart.page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    assert.ok(wide <= 0, `${wide} px too wide`);
    const right = await chart.page
      .locator(`${VIEW} .writes button`)
      .evaluateAll((buttons) => Math.max(...buttons.map((one) => one.getBoundingClientRect().right)));
    assert.ok(right <= 400, `a button ends at ${right} px`);
  });
});
