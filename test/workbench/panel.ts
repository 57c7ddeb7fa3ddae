// What the page tests of the chart panel share: opening it, its tab, its page, and the files that it saves.

import { readFile } from "node:fs/promises";
import { join } from "node:path";
import type { Editor } from "./editor.js";
import { workbench } from "./page/session.js";
import { waitUntil } from "./waitUntil.js";

export const CONTENT = "#chart .content:not([hidden])";

export async function openAtCaret(file: string, text: string): Promise<Editor> {
  const editor = await workbench().open(file);
  await editor.waitForLens();
  await editor.reveal(file, text);
  return editor;
}

/** Clicks until the panel is there: lenses, hovers and rows are drawn anew while results come, and a click in between is lost. */
export async function openPanelBy(editor: Editor, tab: string, click: () => Promise<void>): Promise<void> {
  await waitUntil("the chart panel", async () => {
    await click().catch(() => undefined);
    return editor.page
      .locator(tab)
      .waitFor({ timeout: 3000 })
      .then(
        () => true,
        () => undefined,
      );
  });
}

/** Opens a file beside the panel, not over it: whoever pressed something in the panel is in its group. `code`: the name of what is open beside it. */
export async function openBesidePanel(editor: Editor, code: string, file: string): Promise<void> {
  await editor.page.locator(`.tab[data-resource-name="${code}"]`).click();
  await editor.openFile(file);
}

/** Presses a button of the page, and takes the place that the dialog then offers; gives what was saved. */
export async function saveBy(editor: Editor, button: string, name: string): Promise<Buffer> {
  const frame = await editor.webview(CONTENT);
  await frame.getByRole("button", { name: button }).click();
  const input = editor.page.locator(".quick-input-widget:visible .quick-input-filter input");
  await waitUntil(`a dialog that offers ${name}`, async () =>
    (await input.inputValue().catch(() => "")).endsWith(name) ? true : undefined,
  );
  await editor.page.keyboard.press("Enter");
  return waitUntil(`the file ${name}`, () => readFile(join(editor.folder, name)).catch(() => undefined));
}
