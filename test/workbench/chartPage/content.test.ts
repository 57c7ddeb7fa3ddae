// What the page shows and hands out: numbers in facts, read-out, table and files, and the states without a chart.

import assert from "node:assert/strict";
import { NO_MEMORY } from "../../../extension/protocol/chartMemory.js";
import { shownChart } from "../../support/chartFixture.js";
import type { OpenedChart } from "./chartHost.js";
import { crowded, fine, hoistChart, NEEDED_NM, nothingDeclared, pastPeak, remembered } from "./charts.js";
import { chartHost } from "./session.js";

const WANT = { view: "operating-point", probe: null };

describe("the chart's page", () => {
  let chart: OpenedChart;
  afterEach(async () => {
    assert.deepEqual(chart.troubles, []);
    await chart.close();
  });

  // biome-ignore lint/performance/useDomNodeTextContent: what is hidden must not count
  const text = (selector: string) => chart.page.innerText(selector);

  it("asks first, and says what it showed before", async () => {
    chart = await chartHost().open();
    assert.deepEqual(await chart.waitForSent("ready"), { type: "ready", mechanism: null, robot: null, want: WANT });
    await chart.close();
    chart = await chartHost().open({ state: { ...NO_MEMORY, mechanism: "lid arm" } });
    assert.deepEqual(await chart.waitForSent("ready"), { type: "ready", mechanism: "lid arm", robot: null, want: WANT });
  });

  it("starts anew from a memory that it cannot read", async () => {
    chart = await chartHost().open({ state: { mechanism: 7 } });
    assert.deepEqual(await chart.waitForSent("ready"), { type: "ready", mechanism: null, robot: null, want: WANT });
  });

  it("shows nothing until it is answered", async () => {
    chart = await chartHost().open();
    await chart.waitForSent("ready");
    assert.equal((await text("[role=tabpanel]")).trim(), "");
  });

  it("shows the verdict and what is needed", async () => {
    chart = await chartHost().open();
    await chart.show(fine());
    assert.equal(await text(".content h1"), "tray hoist");
    assert.equal(await text(".verdict"), "Fine");
    const facts = await text(".facts");
    assert.ok(facts.includes(`${NEEDED_NM.toPrecision(3)} N·m`), facts);
    assert.ok(!facts.includes("was"), facts);
    assert.equal(await chart.page.locator(".old").isVisible(), false);
  });

  it("shows findings, and what was before where that is saved", async () => {
    chart = await chartHost().open();
    await chart.show(pastPeak());
    assert.match(await text(".findings"), /^Warning: /);
    const needed = (await chart.page.locator(".fact", { hasText: "Torque needed" }).textContent()) ?? "";
    assert.ok(needed.includes(`${((NEEDED_NM * 54) / 40).toPrecision(3)} N·m`), needed);
    assert.ok(needed.includes(`was ${NEEDED_NM.toPrecision(3)} N·m`), needed);
  });

  it("says that a result is old, and why", async () => {
    chart = await chartHost().open();
    await chart.show(crowded());
    assert.equal(await text(".old"), "A value is missing. What is shown is its last result.");
    await chart.show(fine());
    assert.equal(await chart.page.locator(".old").isVisible(), false);
  });

  it("says what to do where there is no chart, and shows one when it comes", async () => {
    chart = await chartHost().open();
    await chart.show(nothingDeclared());
    assert.match(await text("body"), /Declare one/);
    assert.equal(await chart.page.locator("canvas").first().isVisible(), false);
    await chart.show(fine());
    assert.equal(await chart.page.locator(".empty").isVisible(), false);
    assert.equal(await chart.page.locator("canvas").first().isVisible(), true);
  });

  it("always shows the cautions", async () => {
    chart = await chartHost().open();
    await chart.show(fine());
    assert.match(await text("footer"), /^Estimates, not a safety assessment\./);
  });

  it("has a table of the same numbers behind the plots", async () => {
    chart = await chartHost().open();
    await chart.show(fine());
    const table = chart.page.getByRole("region", { name: "Table" });
    const button = chart.page.getByRole("button", { name: "Show table" });
    assert.equal(await table.isVisible(), false);
    assert.equal(await button.getAttribute("aria-expanded"), "false");
    await button.click();
    assert.equal(await table.isVisible(), true);
    const row = table.locator("tbody tr", { hasText: "needed" });
    const cells = await row.locator("th, td").allInnerTexts();
    const { hardest } = hoistChart();
    const rpm = (hardest.speedRadPerS * 60) / (2 * Math.PI);
    const expected = [NEEDED_NM, (hardest.stallShare ?? 0) * 100, rpm, hardest.currentA, hardest.shaftPowerW];
    assert.deepEqual(
      cells.slice(0, 5).map(Number),
      expected.map((value) => Number(value.toPrecision(3))),
    );
    const head = await table.locator("thead th").allTextContents();
    assert.deepEqual(head.slice(0, 3), ["Torque (N·m)", "Share of stall (%)", "Speed (rpm)"]);
    assert.deepEqual(await chart.state(), { ...NO_MEMORY, mechanism: "tray hoist", tableOpen: true });
    await chart.page.getByRole("button", { name: "Hide table" }).click();
    assert.equal(await table.isVisible(), false);
  });

  it("has the table first and open with a reader of the screen", async () => {
    chart = await chartHost().open({ withReader: true });
    await chart.show(fine());
    assert.equal(await chart.page.getByRole("region", { name: "Table" }).isVisible(), true);
    const isFirst = await chart.page.evaluate(() => {
      const [table, plots] = [document.querySelector(".table-box"), document.querySelector(".plots")];
      return table && plots ? (table.compareDocumentPosition(plots) & Node.DOCUMENT_POSITION_FOLLOWING) !== 0 : false;
    });
    assert.equal(isFirst, true);
  });

  it("comes back as it was left", async () => {
    chart = await chartHost().open({ state: remembered({ mechanism: "tray hoist", cursor: 0, tableOpen: true }) });
    await chart.show(fine());
    assert.equal(await chart.page.getByRole("region", { name: "Table" }).isVisible(), true);
    assert.match(await text(".readout caption"), /^At 0 N·m, 0 % of stall/);
  });

  it("hands out all numbers as CSV", async () => {
    chart = await chartHost().open();
    await chart.show(fine());
    await chart.page.getByRole("button", { name: "Save numbers (CSV)" }).click();
    const { fileName, csv } = await chart.waitForSent("saveTable");
    assert.equal(fileName, "tray-hoist-operating-point.csv");
    const rows = csv.trimEnd().split("\r\n").slice(1);
    const { samples } = hoistChart();
    // The point of peak power is found beside the one at half of stall, and takes its place.
    assert.ok(rows.length >= samples.length - 3 && rows.length <= samples.length, `${rows.length} of ${samples.length}`);
    const needed =
      rows
        .find((row) => row.endsWith(",needed"))
        ?.split(",")
        .map(Number) ?? [];
    assert.ok(Math.abs((needed[0] ?? Number.NaN) / NEEDED_NM - 1) < 1e-9, String(needed[0]));
  });

  it("shows names as text, whatever is in them", async () => {
    const name = '<img src=x onerror="document.title=1"><b>bold</b> &amp; \u202egnp.';
    const hostile = { ...hoistChart(), mechanism: name, verdict: name, assumed: [name], notChecked: [name] };
    const findings = [{ rule: "stalls", level: "error" as const, message: name }];
    chart = await chartHost().open();
    await chart.show(shownChart({ ...hostile, findings }, { old: name }));
    assert.equal(await chart.page.locator(".content h1").textContent(), name);
    assert.equal(await chart.page.locator("#chart img, #chart b").count(), 0);
    assert.equal(await chart.page.title(), "Loadmark chart");
  });

  it("shows absurd values without a number that is none", async () => {
    chart = await chartHost().open({ width: 400, state: remembered({ tableOpen: true }) });
    for (const mass of ["0.000000001 kg", "1000000000 kg"]) {
      for (const stallTorque of ["0.000000001 N*m", "1000000000 N*m"]) {
        for (const openCircuit of ["0.000000001 V", "1000000000 V"]) {
          await chart.show(shownChart(hoistChart({ mass, stallTorque, openCircuit }), { saved: hoistChart() }));
          const shown = await text("body");
          assert.doesNotMatch(shown, /NaN|Infinity|undefined|null|object/);
          const labels = await chart.page
            .locator("canvas")
            .evaluateAll((all) => all.map((one) => one.getAttribute("aria-label")));
          assert.doesNotMatch(labels.join(" "), /NaN|Infinity|undefined|null|object/);
        }
      }
    }
  });

  it("ignores what it does not know, and says so to the log", async () => {
    chart = await chartHost().open();
    await chart.show(fine());
    for (const message of ["hello", { type: "run" }, { type: "show", answer: { kind: "chart", chart: {} } }])
      await chart.post(message);
    assert.match((await chart.waitForSent("trouble")).what, /ignored/);
    assert.equal(await text(".content h1"), "tray hoist");
  });
});
