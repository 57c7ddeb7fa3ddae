// The ratio map as a person uses it: opened by its command, a better ratio written by one press, and taken back by undoing.

import assert from "node:assert/strict";
import { waitUntil } from "../waitUntil.js";
import { workbench } from "./session.js";

const SHOW = "Loadmark: Show Ratio Map";
const CONTENT = "#view-ratio-map .content:not([hidden])";

describe("the ratio map", () => {
  it("writes the fastest ratio where the gears are declared, which mends the finding and can be undone", async () => {
    const editor = await workbench().open("mechanisms/shelfLift.ts");
    await editor.waitForLens();
    await editor.reveal("mechanisms/shelfLift.ts", "stages");
    await editor.runCommand(SHOW);
    const verdict = async () => {
      const frame = await editor.webview(CONTENT);
      return (await frame.locator(`${CONTENT} .verdict`).textContent()) ?? "";
    };
    const waitForVerdict = (words: string) =>
      waitUntil(
        `the verdict ${words}`,
        async () => ((await verdict()) === words ? true : undefined),
        20_000,
        () => "",
      );
    await waitForVerdict("Past its peak of power");
    // The gears are declared in another file: it is open, so that what is written can be seen and undone there.
    await editor.openFile("gearing.ts");
    const frame = await editor.webview(CONTENT);
    const button = frame.getByRole("button", { name: "Write the fastest" });
    const words = (await button.textContent()) ?? "";
    const [, driver, driven] = /stage 1 with (\d+) and (\d+) teeth/.exec(words) ?? [];
    await button.click();
    // Lines end where the panel begins: their text is read, wherever they are cut.
    const written = new RegExp(`driver:\\s${driver},\\sdriven:\\s${driven}`);
    await editor.page.locator(".view-line", { hasText: written }).waitFor();
    await waitForVerdict("Fine");
    assert.match((await (await editor.webview(CONTENT)).locator(`${CONTENT} .facts`).textContent()) ?? "", /was 1\.1: /);
    await editor.page.locator(".editor-group-container .tab", { hasText: "gearing.ts" }).first().click();
    await editor.undoUntil("driver: 20");
    await waitForVerdict("Past its peak of power");
  });
});
