// The views of the chart's page as a person goes through them: tabs, units, zoom, choices, the probe, and what is handed out.

import assert from "node:assert/strict";
import type { ChartMemory } from "../../../extension/protocol/chartMemory.js";
import { waitUntil } from "../waitUntil.js";
import type { OpenedChart } from "./chartHost.js";
import { fine, hoistChart, noRobot, power, probed, remembered, travel } from "./charts.js";
import { chartHost } from "./session.js";

describe("the views of the chart's page", () => {
  let chart: OpenedChart;
  afterEach(async () => {
    assert.deepEqual(chart.troubles, []);
    await chart.close();
  });

  // biome-ignore lint/performance/useDomNodeTextContent: what is hidden must not count
  const text = (selector: string) => chart.page.innerText(selector);
  const tab = (name: string) => chart.page.getByRole("tab", { name });
  const memory = async () => (await chart.state()) as ChartMemory;
  const open = async (view: ChartMemory["view"]) => {
    chart = await chartHost().open({ state: { ...remembered({}), view } });
  };
  const asked = () => chart.sent.flatMap((message) => (message.type === "ask" ? [message.want] : []));
  const caption = async () => (await chart.page.locator(".readout caption").textContent()) ?? "";
  const picture = () =>
    chart.page
      .locator("canvas")
      .first()
      .evaluate((canvas) => (canvas as HTMLCanvasElement).toDataURL());

  it("are switched by mouse and by arrow keys, asked for, and remembered", async () => {
    await open("operating-point");
    await chart.show(fine());
    assert.equal(await tab("Operating point").getAttribute("aria-selected"), "true");
    await tab("Travel").click();
    await chart.show(travel());
    assert.deepEqual(asked(), [{ view: "travel" }]);
    assert.equal(await chart.page.locator(".content h1").textContent(), "tray hoist");
    assert.equal((await memory()).view, "travel");
    await chart.page.keyboard.press("ArrowLeft");
    assert.equal((await memory()).view, "operating-point");
    // What was shown there is still there, until the host answers anew.
    assert.match(await caption(), /of stall/);
    await chart.page.keyboard.press("End");
    assert.equal(await tab("Power by mechanism").evaluate((element) => element === document.activeElement), true);
    assert.equal((await memory()).view, "power");
    const selected = await chart.page.locator('[role=tab][aria-selected="true"]').allTextContents();
    assert.deepEqual(selected, ["Power by mechanism"]);
    assert.equal(await chart.page.getByRole("tabpanel").getAttribute("aria-labelledby"), "tab-power");
  });

  it("are opened by the host", async () => {
    await open("operating-point");
    await chart.post({ type: "open", view: "power" });
    await waitUntil("the view of power", async () => ((await memory()).view === "power" ? true : undefined));
    assert.deepEqual(asked(), [{ view: "power", span: null, cycle: "first" }]);
  });

  it("come back after a reload, each as it was left", async () => {
    const views = { ...remembered({}).views, travel: { over: "position" as const, cursor: null, span: { from: 0.1, to: 0.3 } } };
    chart = await chartHost().open({ state: { ...remembered({ mechanism: "tray hoist" }), view: "travel", views } });
    assert.deepEqual((await chart.waitForSent("ready")).want, { view: "travel" });
    await chart.show(travel());
    assert.equal(await chart.page.getByRole("radio", { name: "Position" }).isChecked(), true);
    assert.equal(await chart.page.locator(".span").textContent(), "100 mm to 300 mm");
  });

  it("read in the units that are chosen, in every view, and keep them", async () => {
    await open("travel");
    await chart.show(travel());
    assert.match(await text(".facts"), /525 mN·m/);
    await chart.page.getByLabel("Units").selectOption("inch");
    assert.match(await text(".facts"), /4\.64 lbf·in/);
    assert.equal((await memory()).units, "inch");
    assert.deepEqual(await chart.waitForSent("chooseUnits"), { type: "chooseUnits", units: "inch" });
    await tab("Operating point").click();
    await chart.show(fine());
    assert.match(await text(".facts"), /4\.64 lbf·in/);
    await chart.page.getByRole("button", { name: "Save numbers (CSV)" }).click();
    const { csv } = await chart.waitForSent("saveTable");
    assert.match(csv, /^Torque \(lbf\*ft\),Share of stall torque \(%\),Speed \(rpm\)/);
    await chart.page.getByLabel("Units").selectOption("si");
    assert.match(await text(".facts"), /rad\/s/);
  });

  it("read off a travel by mouse and by keys", async () => {
    await open("travel");
    await chart.show(travel());
    await chart.page.focus(".plots");
    await chart.page.keyboard.press("End");
    assert.equal(await caption(), "At 4.18 s, 700 mm: arrives, 4.18 s");
    const spoken = (await chart.page.locator(".spoken").textContent()) ?? "";
    assert.match(spoken, /^4\.18 s\. Needed 525 mN·m, Given/);
    const box = await chart.page.locator("canvas").first().boundingBox();
    if (box === null) throw new Error("The plot is not there.");
    await chart.page.mouse.move(box.x + box.width / 2, box.y + 40);
    assert.match(await caption(), /^At 2\.\d+ s, \d+ mm$/);
    await chart.page.getByText("Position", { exact: true }).click();
    assert.deepEqual((await memory()).views.travel, { over: "position", cursor: null, span: null });
    assert.equal(await chart.page.locator(".plots").getAttribute("aria-label"), "Position of the read-out");
  });

  it("zoom to a span by dragging, by keys and by buttons, and back", async () => {
    await open("power");
    await chart.show(power());
    const whole = await picture();
    const box = await chart.page.locator("canvas").first().boundingBox();
    if (box === null) throw new Error("The plot is not there.");
    await chart.page.mouse.move(box.x + box.width * 0.4, box.y + 60);
    await chart.page.mouse.down();
    await chart.page.mouse.move(box.x + box.width * 0.6, box.y + 60, { steps: 4 });
    assert.equal(await chart.page.locator(".selection").isVisible(), true);
    await chart.page.mouse.up();
    assert.equal(await chart.page.locator(".selection").isVisible(), false);
    const { span } = (await memory()).views.power;
    assert.ok(span !== null && span.fromS > 1.5 && span.fromS < 3 && span.toS > 3.5 && span.toS < 5, JSON.stringify(span));
    assert.deepEqual(asked().at(-1), { view: "power", span, cycle: "first" });
    assert.notEqual(await picture(), whole);
    await chart.page.focus(".plots");
    await chart.page.keyboard.press("0");
    assert.equal((await memory()).views.power.span, null);
    await chart.page.keyboard.press("+");
    const closer = (await memory()).views.power.span;
    assert.ok(closer !== null && Math.abs(closer.toS - closer.fromS - 3.5) < 1e-6, JSON.stringify(closer));
    await chart.page.getByRole("button", { name: "Zoom out" }).click();
    assert.equal((await memory()).views.power.span, null);
    assert.equal(await chart.page.getByRole("button", { name: "Zoom out" }).isDisabled(), true);
    await chart.page.getByText("Last (12)").click();
    assert.deepEqual(asked().at(-1), { view: "power", span: null, cycle: "last" });
  });

  it("say in words what protection and windings do, and who takes how much", async () => {
    await open("power");
    await chart.show(power());
    const labels = await chart.page
      .locator(".plots canvas")
      .evaluateAll((all) => all.map((one) => one.getAttribute("aria-label") ?? ""));
    assert.equal(labels.length, 3);
    assert.match(labels[0] ?? "", /0 s to 4 s: step 1, tray hoist moves\./);
    assert.match(labels[0] ?? "", /boom at most .* sends back up to/);
    assert.match(labels[2] ?? "", /breaker of tray hoist \(holds 1\.8 A\): stays closed\./);
    assert.deepEqual(await chart.page.locator(".readout tbody th").allTextContents(), ["boom", "tray hoist"]);
    assert.equal(await chart.page.locator(".readout .swatch").count(), 2);
  });

  it("say what to write where there is no robot", async () => {
    await open("power");
    await chart.show(noRobot());
    assert.match(await text(".empty"), /No robot is declared yet[\s\S]*export default robot/);
  });

  it("try another torque by dragging: each place is asked for, and the code is left alone until that is wanted", async () => {
    chart = await chartHost().open({ state: remembered({ mechanism: "tray hoist" }) });
    await chart.show(fine());
    const write = chart.page.getByRole("button", { name: "Write to code" });
    assert.equal(await write.isDisabled(), true);
    const canvas = chart.page.locator("canvas").first();
    const box = await canvas.boundingBox();
    if (box === null) throw new Error("The plot is not there.");
    // As in the cursor's test: numbers take as much room at both sides, and the axis ends at 1.06 of stall.
    const { hardest, available } = hoistChart();
    const room = 57;
    const pxOf = (torqueNm: number) => box.x + room + (torqueNm / (available.stallTorqueNm * 1.06)) * (box.width - 2 * room);
    await chart.page.mouse.move(pxOf(hardest.torqueNm), box.y + 100);
    const grip = await chart.page.locator(".plots").evaluate((element) => getComputedStyle(element).cursor);
    assert.equal(grip, "ew-resize");
    await chart.page.mouse.down();
    await chart.page.mouse.move(pxOf(0.45), box.y + 100, { steps: 5 });
    await chart.page.mouse.up();
    const wants = asked();
    assert.ok(wants.length >= 4, `${wants.length} questions`);
    const last = wants.at(-1);
    assert.ok(
      last?.view === "operating-point" && last.probe !== null && Math.abs(last.probe.torqueNm - 0.45) < 0.02,
      JSON.stringify(last),
    );
    assert.equal(
      chart.sent.some(({ type }) => type === "writeToCode"),
      false,
    );
    await chart.show(probed(last.probe.torqueNm));
    const says = await text(".says");
    assert.match(says, /Stage 1 with 16 and \d+ teeth, ratio 3\.\d+: needs 0\.4\d+ N·m, 3\d % of stall/);
    assert.equal(await write.isEnabled(), true);
    await write.click();
    assert.deepEqual((await chart.waitForSent("writeToCode")).want, last);
    assert.equal((await memory()).views["operating-point"].probe, null);
  });

  it("try another torque by keys alone", async () => {
    chart = await chartHost().open({ state: remembered({ mechanism: "tray hoist" }) });
    await chart.show(fine());
    const slider = chart.page.getByRole("slider", { name: "Try a torque" });
    await slider.focus();
    const before = Number(await slider.inputValue());
    await chart.page.keyboard.press("ArrowLeft");
    assert.equal(Number(await slider.inputValue()), before - 1);
    const probe = (await memory()).views["operating-point"].probe;
    assert.ok(probe !== null && probe.torqueNm < hoistChart().hardest.torqueNm, JSON.stringify(probe));
    assert.match((await slider.getAttribute("aria-valuetext")) ?? "", /N·m$/);
    await chart.page.getByRole("button", { name: "Clear" }).click();
    assert.equal((await memory()).views["operating-point"].probe, null);
  });

  it("hand out a page to print: everything on white, without a script, names as text", async () => {
    await open("power");
    const answer = power();
    const name = '<img src=x onerror="document.title=1">';
    await chart.show({ ...answer, chart: { ...answer.chart, robot: name } });
    await chart.page.getByRole("button", { name: "Save page to print (HTML)" }).click();
    const { fileName, html } = await chart.waitForSent("savePage");
    assert.equal(fileName, "img-src-x-onerror-document-title-1-power.html");
    const page = await chart.page.context().newPage();
    await page.setContent(html);
    assert.equal(await page.locator("h1").textContent(), name);
    assert.equal(await page.locator("script").count(), 0);
    assert.deepEqual(
      (await page.locator(".keys li").allTextContents()).map((one) => one.trim()),
      ["tray hoist", "boom"],
    );
    const pictures = await page
      .locator("body > img")
      .evaluateAll((all) => all.map((one) => (one as HTMLImageElement).naturalWidth));
    assert.deepEqual(pictures, [1360, 1360, 1360]);
    assert.match(
      (await page.locator("body").textContent()) ?? "",
      /Lowest voltage[\s\S]*Findings[\s\S]*Estimates, not a safety assessment/,
    );
    assert.ok((await page.locator("tbody tr").count()) > 10);
    await page.close();
  });

  it("save a picture of a load cycle with all its rows, and what each fill stands for", async () => {
    await open("power");
    const answer = power();
    const [protector] = answer.chart.protectors;
    const protectors = Array.from({ length: 20 }, (_, index) => ({
      ...protector,
      feeds: [`part ${index}`],
    })) as typeof answer.chart.protectors;
    await chart.show({ ...answer, chart: { ...answer.chart, protectors } });
    await chart.page.getByRole("button", { name: "Save picture (PNG)" }).click();
    const { base64 } = await chart.waitForSent("savePicture");
    const size = await chart.page.evaluate(async (content) => {
      const bytes = Uint8Array.from(atob(content), (character) => character.charCodeAt(0));
      const { width, height } = await createImageBitmap(new Blob([bytes], { type: "image/png" }));
      return [width, height];
    }, base64);
    // Head, a line of keys, two plots of 300 px, 22 rows of 24 px with their axis, and a foot; at twice the pixels.
    assert.deepEqual(size, [1800, 2 * (84 + 20 + 600 + (8 + 22 * 24 + 38) + 26)]);
  });

  it("save pictures and numbers under the view's own name", async () => {
    await open("travel");
    await chart.show(travel());
    await chart.page.getByRole("button", { name: "Save picture (PNG)" }).click();
    assert.equal((await chart.waitForSent("savePicture")).fileName, "tray-hoist-travel.png");
    await chart.page.getByRole("button", { name: "Save numbers (CSV)" }).click();
    const { fileName, csv } = await chart.waitForSent("saveTable");
    assert.equal(fileName, "tray-hoist-travel.csv");
    assert.match(csv, /^Time \(s\),Position \(m\),Torque needed \(N\*m\)/);
  });
});
