// How the page looks and who can use it: four kinds of theme, narrow panels, sharp pixels, pictures, no motion, its policy.

import assert from "node:assert/strict";
import axe from "axe-core";
import type { OpenedChart } from "./chartHost.js";
import { crowded, fine, noRobot, nothingDeclared, pastPeak, power, remembered, travel } from "./charts.js";
import { chartHost } from "./session.js";
import { pageThemes, type ThemeName } from "./themes.js";

const themes = Object.keys(pageThemes) as ThemeName[];

describe("the looks of the chart's page", () => {
  let chart: OpenedChart;
  afterEach(async () => {
    assert.deepEqual(chart.troubles, []);
    await chart.close();
  });

  const picture = () =>
    chart.page
      .locator("canvas")
      .first()
      .evaluate((canvas) => (canvas as HTMLCanvasElement).toDataURL());

  for (const theme of themes) {
    it(`break no rule of accessibility in any view in ${theme}`, async () => {
      for (const answer of [travel(), power(), noRobot()]) {
        chart = await chartHost().open({ theme, state: { ...remembered({ tableOpen: true }), view: answer.view } });
        await chart.show(answer);
        assert.deepEqual(await violations(chart), [], answer.view);
        if (answer.kind !== "nothing") await chart.close();
      }
    });

    it(`break no rule of accessibility in ${theme}`, async () => {
      chart = await chartHost().open({ theme, state: remembered({ cursor: 0.3, tableOpen: true }) });
      for (const answer of [pastPeak(), crowded(), nothingDeclared()]) {
        await chart.show(answer);
        assert.deepEqual(await violations(chart), []);
      }
    });

    it(`show every curve in ${theme} with a contrast of at least 3 to its ground`, async () => {
      chart = await chartHost().open({ theme });
      await chart.show(fine());
      for (const [index, least] of [0, 1].map((at) => [at, 3] as const)) {
        const share = await shareWithContrast(chart, index, least);
        // Curves, axes and words together cover more than a hundredth of a plot.
        assert.ok(share > 0.01, `${share}`);
      }
    });
  }

  it("are drawn anew when the theme changes", async () => {
    chart = await chartHost().open({ theme: "dark" });
    await chart.show(fine());
    const dark = await picture();
    await chart.setTheme("light");
    await chart.page.waitForFunction((before) => document.querySelector("canvas")?.toDataURL() !== before, dark);
    const light = await picture();
    await chart.setTheme("dark");
    await chart.page.waitForFunction((before) => document.querySelector("canvas")?.toDataURL() !== before, light);
    assert.equal(await picture(), dark);
  });

  it("use no colour but the letters' for curves in high contrast", async () => {
    chart = await chartHost().open({ theme: "high contrast light" });
    await chart.show(fine());
    assert.equal(await colouredPixels(chart), 0);
    await chart.setTheme("light");
    await chart.page.waitForFunction(() => getComputedStyle(document.body).color === "rgb(59, 59, 59)");
    await chart.page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))));
    assert.ok((await colouredPixels(chart)) > 500);
  });

  for (const [name, answer] of [
    ["travel", travel],
    ["power", power],
  ] as const) {
    it(`fit a panel of 400 px in the view ${name}, and are drawn in every kind of theme`, async () => {
      for (const theme of themes) {
        chart = await chartHost().open({ theme, width: 400, state: { ...remembered({ tableOpen: true }), view: answer().view } });
        await chart.show(answer());
        assert.deepEqual(await overflowing(chart), [], theme);
        for (const index of [0, 1]) assert.ok((await shareWithContrast(chart, index, 3)) > 0.01, `${theme}, plot ${index}`);
        if (theme.startsWith("high contrast")) assert.equal(await colouredPixels(chart), 0);
        if (theme !== "high contrast light") await chart.close();
      }
    });
  }

  it("fit a panel of 400 px, and grow with a wider one", async () => {
    chart = await chartHost().open({ width: 400 });
    await chart.show(crowded());
    assert.deepEqual(await overflowing(chart), []);
    const narrow = await chart.page
      .locator("canvas")
      .first()
      .evaluate((canvas) => canvas.clientWidth);
    assert.ok(narrow <= 400 && narrow > 300, `${narrow}`);
    await chart.page.setViewportSize({ width: 900, height: 1000 });
    await chart.page.waitForFunction((before) => (document.querySelector("canvas")?.clientWidth ?? 0) > before + 300, narrow);
    await chart.page.setViewportSize({ width: 400, height: 1000 });
    await chart.page.waitForFunction((before) => document.querySelector("canvas")?.clientWidth === before, narrow);
  });

  it("are sharp on a fine screen", async () => {
    chart = await chartHost().open({ pixelRatio: 2 });
    await chart.show(fine());
    const [pixels, width] = await chart.page
      .locator("canvas")
      .first()
      .evaluate((canvas) => [(canvas as HTMLCanvasElement).width, canvas.clientWidth]);
    assert.equal(pixels, 2 * (width ?? 0));
  });

  it("do not move by themselves", async () => {
    chart = await chartHost().open();
    await chart.show(fine());
    const moving = await chart.page.evaluate(() => {
      const styles = [...document.querySelectorAll("*")].map((element) => getComputedStyle(element));
      const timed = styles.filter((one) => one.transitionDuration !== "0s" || one.animationName !== "none");
      return timed.length + document.getAnimations().length;
    });
    assert.equal(moving, 0);
    // Drawn whole at once: a later frame shows the same.
    const first = await picture();
    await chart.page.evaluate(() => new Promise((done) => setTimeout(done, 400)));
    assert.equal(await picture(), first);
  });

  it("come as an opaque picture at twice the pixels, on the theme's ground, whatever the panel's width", async () => {
    for (const [theme, ground, width] of [
      ["dark", [31, 31, 31, 255], 400],
      ["high contrast light", [255, 255, 255, 255], 900],
    ] as const) {
      chart = await chartHost().open({ theme, width });
      await chart.show(pastPeak());
      await chart.page.getByRole("button", { name: "Save picture (PNG)" }).click();
      const { fileName, base64 } = await chart.waitForSent("savePicture");
      assert.equal(fileName, "tray-hoist-operating-point.png");
      const bytes = Buffer.from(base64, "base64");
      assert.equal(bytes.subarray(1, 4).toString("latin1"), "PNG");
      assert.equal(bytes.readUInt32BE(16), 1800);
      const { corner, transparent } = await readPicture(chart, base64);
      assert.deepEqual(corner, ground);
      assert.equal(transparent, 0);
      if (theme === "dark") {
        assert.deepEqual(chart.troubles, []);
        await chart.close();
      }
    }
  });

  it("need no more than the policy lets in, and the policy is in force", async () => {
    chart = await chartHost().open();
    await chart.show(pastPeak());
    assert.deepEqual(chart.troubles, []);
    await chart.close();
    const guarded = await chartHost().open();
    const ran = await guarded.page.evaluate(() => {
      const script = document.createElement("script");
      script.textContent = "document.title = 'ran'";
      document.body.append(script);
      document.body.insertAdjacentHTML("beforeend", '<p id="styled" style="color: rgb(1, 2, 3)">x</p>');
      const styled = document.getElementById("styled");
      return [document.title === "ran", styled !== null && getComputedStyle(styled).color === "rgb(1, 2, 3)"];
    });
    assert.deepEqual(ran, [false, false]);
    await guarded.close();
    chart = await chartHost().open();
  });
});

async function violations({ page }: OpenedChart): Promise<string[]> {
  await page.evaluate(axe.source);
  return page.evaluate(async () => {
    const { axe: checker } = window as unknown as {
      axe: { run(): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }> };
    };
    const found = await checker.run();
    return found.violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 200)).join(" | ")}`);
  });
}

/** Share of a canvas's pixels that are drawn opaquely with at least a contrast to the page's ground. */
function shareWithContrast({ page }: OpenedChart, index: number, least: number): Promise<number> {
  return page
    .locator("canvas")
    .nth(index)
    .evaluate((element, wanted) => {
      const canvas = element as HTMLCanvasElement;
      const data = canvas.getContext("2d")?.getImageData(0, 0, canvas.width, canvas.height).data ?? new Uint8ClampedArray();
      const linear = (channel: number) => {
        const share = channel / 255;
        return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
      };
      const luminance = (r = 0, g = 0, b = 0) => 0.2126 * linear(r) + 0.7152 * linear(g) + 0.0722 * linear(b);
      const ground = luminance(...(getComputedStyle(document.body).backgroundColor.match(/\d+/g) ?? []).map(Number));
      let count = 0;
      for (let at = 0; at < data.length; at += 4) {
        if ((data[at + 3] ?? 0) < 255) continue;
        const own = luminance(data[at], data[at + 1], data[at + 2]);
        if ((Math.max(own, ground) + 0.05) / (Math.min(own, ground) + 0.05) >= wanted) count += 1;
      }
      return count / (canvas.width * canvas.height);
    }, least);
}

/** Opaque pixels of a canvas whose channels differ clearly. */
function colouredPixels({ page }: OpenedChart): Promise<number> {
  return page
    .locator("canvas")
    .first()
    .evaluate((element) => {
      const canvas = element as HTMLCanvasElement;
      const data = canvas.getContext("2d")?.getImageData(0, 0, canvas.width, canvas.height).data ?? new Uint8ClampedArray();
      let count = 0;
      for (let at = 0; at < data.length; at += 4) {
        const channels = [data[at] ?? 0, data[at + 1] ?? 0, data[at + 2] ?? 0];
        if ((data[at + 3] ?? 0) === 255 && Math.max(...channels) - Math.min(...channels) > 40) count += 1;
      }
      return count;
    });
}

/** Elements that reach beyond the window on its right. */
function overflowing({ page }: OpenedChart): Promise<string[]> {
  return page.evaluate(() => {
    const wide = [...document.querySelectorAll("#chart *:not(.table-box *):not(.spoken)")].filter(
      (element) => element.getBoundingClientRect().right > window.innerWidth + 0.5,
    );
    const names = wide.map((element) => `${element.tagName} ${element.className}`);
    return document.documentElement.scrollWidth > window.innerWidth ? [...names, "the page"] : names;
  });
}

async function readPicture({ page }: OpenedChart, base64: string): Promise<{ corner: number[]; transparent: number }> {
  return page.evaluate(async (content) => {
    const bytes = Uint8Array.from(atob(content), (character) => character.charCodeAt(0));
    const bitmap = await createImageBitmap(new Blob([bytes], { type: "image/png" }));
    const canvas = document.createElement("canvas");
    [canvas.width, canvas.height] = [bitmap.width, bitmap.height];
    const context = canvas.getContext("2d");
    context?.drawImage(bitmap, 0, 0);
    const data = context?.getImageData(0, 0, canvas.width, canvas.height).data ?? new Uint8ClampedArray();
    let transparent = 0;
    for (let at = 3; at < data.length; at += 4) if (data[at] !== 255) transparent += 1;
    return { corner: [...data.slice(0, 4)], transparent };
  }, base64);
}
