// What matters on the page: ranked bars by choice and by keyboard, the spread in words, and how it looks in every theme and width.

import assert from "node:assert/strict";
import axe from "axe-core";
import { NO_MEMORY } from "../../../extension/protocol/chartMemory.js";
import type { ShownChart } from "../../../extension/protocol/charts/views.js";
import { hoistSource } from "../../support/chartFixture.js";
import { mattersShown } from "../../support/mattersFixture.js";
import type { ChartPageOptions, OpenedChart } from "./chartHost.js";
import { chartHost } from "./session.js";
import { pageThemes, type ThemeName } from "./themes.js";

const VIEW = "#view-matters";

describe("what matters on the page", () => {
  let chart: OpenedChart;
  let answer: ShownChart<"matters">;
  before(() => {
    const source = (tolerance: number) =>
      hoistSource({ more: ' protect: breaker({ holdCurrent: "1.6 A", trips: { at: "3 A", after: "4 s" } }),' }).replace(
        'current: "4.4 A" },',
        `current: "4.4 A" }, tolerance: ${tolerance},`,
      );
    answer = mattersShown(source(0.2), "tray hoist", source(0.1));
  });
  afterEach(async () => {
    assert.deepEqual(chart.troubles, []);
    await chart.close();
  });

  const open = async (options: ChartPageOptions = {}): Promise<void> => {
    chart = await chartHost().open({ state: { ...NO_MEMORY, view: "matters" }, ...options });
    await chart.show(answer);
  };
  // biome-ignore lint/performance/useDomNodeTextContent: what is hidden must not count
  const text = async (selector: string) => (await chart.page.locator(`${VIEW} ${selector}`).innerText()).trim();
  const bars = () => chart.page.locator(`${VIEW} canvas`).first().getAttribute("aria-label");

  it("tells the spread with seed and count, beside the saved one", async () => {
    await open();
    const facts = await text(".facts");
    assert.match(facts, /Drawn\s+200 times over ±20 % of the motor, seed 1\s+was 200 times over ±10 %/);
    assert.match(facts, /Protection opens\s+in [\d.]+ % of the draws/);
    assert.equal(await chart.page.locator(`${VIEW} canvas`).count(), 2);
  });

  it("ranks by the result that is chosen, and remembers the choice", async () => {
    await open();
    assert.match((await bars()) ?? "", /^Per cent of current /);
    await chart.page.getByRole("radio", { name: "Travel time" }).check();
    assert.match((await bars()) ?? "", /^Per cent of travel time /);
    const kept = (await chart.state()) as typeof NO_MEMORY;
    assert.equal(kept.views.matters.output, "time");
  });

  it("goes from bar to bar with the keys, and reads each off", async () => {
    await open();
    await chart.page.locator(`${VIEW} .plots`).focus();
    await chart.page.keyboard.press("Home");
    const first = await text(".readout caption");
    assert.match(first, /^At rank 1: \w/);
    await chart.page.keyboard.press("ArrowDown");
    assert.match(await text(".readout caption"), /^At rank 2: \w/);
  });

  for (const theme of Object.keys(pageThemes) as ThemeName[]) {
    it(`breaks no rule of accessibility in ${theme}`, async () => {
      await open({ theme });
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
    await open({ width: 400 });
    assert.ok((await chart.page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)) <= 0);
  });
});
