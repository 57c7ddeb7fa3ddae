// Drives one open VS Code page as a person would, by keyboard and mouse, and reads what it shows. It waits for what it
// is asked about and for nothing else; what the texts mean is the tests' business.

import { readFile } from "node:fs/promises";
import { basename, join } from "node:path";
import type { Frame, Locator, Page } from "playwright-core";
import { type Box, findTextInView, readSquiggles, type Squiggle } from "./viewLines.js";
import { waitUntil } from "./waitUntil.js";

const OPEN_TIMEOUT_MS = 60_000;
const SETTLES_MS = 400;

export class Editor {
  constructor(
    readonly page: Page,
    /** The copy that is open, which a test may edit on disk too. */
    readonly folder: string,
  ) {}

  async waitUntilReady(): Promise<void> {
    await this.page.waitForSelector(".monaco-workbench .explorer-folders-view .monaco-list-row", { timeout: OPEN_TIMEOUT_MS });
  }

  /** Waits until a lens tells that the open file has been checked. */
  async waitForLens(): Promise<void> {
    await this.page.waitForSelector(".editor-group-container.active .codelens-decoration a");
  }

  /** Waits until the status bar no longer says that a language service is still working. */
  async waitUntilIdle(): Promise<void> {
    const busy = this.page.locator(".statusbar .codicon-modifier-spin, .statusbar .codicon-loading");
    await waitUntil("an idle status bar", async () => ((await busy.count()) === 0 ? true : undefined), 30_000);
  }

  /** Opens a file of the folder by its path through Quick Open. */
  async openFile(path: string): Promise<void> {
    await this.page.keyboard.press("Control+p");
    await this.fillQuickInput(path);
    await this.page.waitForSelector(`.quick-input-list .monaco-list-row.focused[aria-label^="${basename(path)}"]`);
    await this.page.keyboard.press("Enter");
    await this.page.waitForSelector(`.tab.active[data-resource-name="${basename(path)}"]`);
    await this.page.waitForSelector(".editor-group-container.active .monaco-editor.focused .view-line");
  }

  /** Runs a command by its title in the Command Palette. */
  async runCommand(title: string): Promise<void> {
    await this.page.keyboard.press("F1");
    await this.fillQuickInput(`>${title}`);
    await this.page.waitForSelector(`.quick-input-list .monaco-list-row.focused[aria-label^="${title}"]`);
    await this.page.keyboard.press("Enter");
  }

  /** Opens the Mechanisms view by the status item, in place of the files, and gives its rows. */
  async showMechanisms(): Promise<Locator> {
    await this.page.locator("#loadmark\\.loadmark\\.loadmark\\.status a").click();
    const rows = this.page.locator('.pane:has(> .pane-header[aria-label^="Mechanisms"]) .monaco-list-row');
    await rows.first().waitFor();
    // A list shows only the rows that it has room for.
    await this.page.locator(".pane-header:has(+ .pane-body .explorer-folders-view)").click();
    return rows;
  }

  /** Opens the next problem behind the caret in the text, below its line. */
  async showProblem(text: string): Promise<void> {
    await this.page.keyboard.press("F8");
    await this.page.locator(".marker-widget", { hasText: text }).waitFor();
  }

  /** Takes a view out of the side bar. */
  async hideView(title: string): Promise<void> {
    const header = this.page.locator(`.pane-header[aria-label^="${title}"]`);
    const entry = this.page.locator(".monaco-menu .action-label", { hasText: `Hide '${title}'` });
    await header.click({ button: "right" });
    // A menu takes no click right after it came up.
    const hide = async () => {
      if ((await entry.count()) > 0) await entry.click({ timeout: 1000 }).catch(() => undefined);
      return (await header.count()) === 0 ? true : undefined;
    };
    await waitUntil(`the view ${title} to be hidden`, hide);
  }

  /** Scrolls the line of the saved file that holds `text` into the middle and puts the caret there. */
  async reveal(file: string, text: string): Promise<void> {
    const lines = (await readFile(join(this.folder, file), "utf8")).split("\n");
    const line = lines.findIndex((content) => content.includes(text)) + 1;
    if (line === 0) throw new Error(`"${text}" is not in ${file}.`);
    await this.page.keyboard.press("Control+g");
    await this.fillQuickInput(`:${line}`);
    await this.page.keyboard.press("Enter");
    await waitUntil(`"${text}" in view`, () => findTextInView(this.page, text));
  }

  /** Selects `text` where the view first shows it, and types over it. */
  async retype(text: string, replacement: string): Promise<void> {
    const box = await this.findSettled(text);
    await this.page.mouse.click(box.x + 1, box.y + box.height / 2);
    for (let step = 0; step < text.length; step += 1) await this.page.keyboard.press("Shift+ArrowRight");
    await this.page.keyboard.type(replacement, { delay: 20 });
  }

  async undo(): Promise<void> {
    await this.page.keyboard.press("Control+z");
  }

  /** Undoes until the view shows a text again. */
  async undoUntil(text: string): Promise<void> {
    for (let step = 0; !(await this.shows(text)); step += 1) {
      if (step === 20) throw new Error(`Undoing did not bring back "${text}".`);
      await this.undo();
    }
  }

  async save(): Promise<void> {
    await this.page.keyboard.press("Control+s");
    await this.page.waitForSelector(".tab.active:not(.dirty)");
  }

  /** Whether a text is within a line in view. */
  async shows(text: string): Promise<boolean> {
    return (await findTextInView(this.page, text)) !== undefined;
  }

  /** The squiggles that the view shows, from top to bottom. */
  squiggles(): Promise<Squiggle[]> {
    return readSquiggles(this.page);
  }

  /** Waits until the shown squiggles satisfy the predicate, and gives them. */
  async waitForSquiggles(
    what: string,
    accept: (squiggles: readonly Squiggle[]) => boolean,
    timeoutMs = 45_000,
  ): Promise<Squiggle[]> {
    let last: Squiggle[] = [];
    const look = async () => {
      last = await this.squiggles();
      return accept(last) ? last : undefined;
    };
    return waitUntil(what, look, timeoutMs, () => `the view shows ${JSON.stringify(last)}`);
  }

  /** Hovers over the `text` in view with the mouse, and gives the hover's text once it holds what is expected. */
  async hover(text: string, expected: RegExp, timeoutMs = 45_000): Promise<string> {
    let last = "";
    const look = async () => {
      // Looked for each time, since lines move when lenses come.
      const box = await findTextInView(this.page, text);
      if (!box) return undefined;
      await this.page.mouse.move(box.x + box.width / 2 + Math.random(), box.y + box.height / 2);
      last = await this.hoverText();
      if (expected.test(last)) return last;
      // An open hover is not filled up by what comes later: it has to be asked for anew.
      if (last !== "") await this.leaveHover();
      return undefined;
    };
    return waitUntil(
      `a hover over "${text}" that holds ${expected}`,
      look,
      timeoutMs,
      () => `the hover says ${JSON.stringify(last)}`,
    );
  }

  private async hoverText(): Promise<string> {
    const contents = this.page.locator(".monaco-resizable-hover:visible .hover-contents, .monaco-hover:visible .hover-contents");
    const loading = this.page.locator(".monaco-hover:visible", { hasText: "Loading..." });
    // Its parts arrive one by one; what is there after a moment without "Loading..." is all of it.
    await this.page.waitForTimeout(SETTLES_MS);
    if ((await loading.count()) > 0) return "";
    return (await contents.allInnerTexts()).join("\n").replaceAll("\u00a0", " ").replaceAll("\u2002", "");
  }

  /** Takes the pointer and an open hover away. */
  async leaveHover(): Promise<void> {
    await this.page.mouse.move(2, 2);
    await this.page.keyboard.press("Escape");
    await this.page.waitForSelector(".monaco-hover:visible", { state: "hidden" });
  }

  /** The frame of a webview that holds what the selector asks for. */
  webview(selector: string, timeoutMs = 45_000): Promise<Frame> {
    const look = async () => {
      for (const frame of this.page.frames()) {
        if (frame !== this.page.mainFrame() && (await frame.$(selector).catch(() => null))) return frame;
      }
      return undefined;
    };
    return waitUntil(`a webview with ${selector}`, look, timeoutMs);
  }

  /** Where a text is once it stays there: lines move when lenses come. */
  private findSettled(text: string): Promise<Box> {
    let last: Box | undefined;
    return waitUntil(`"${text}" at rest in view`, async () => {
      const box = await findTextInView(this.page, text);
      const rests = box !== undefined && box.x === last?.x && box.y === last.y;
      last = box;
      if (!rests) await this.page.waitForTimeout(SETTLES_MS);
      return rests ? box : undefined;
    });
  }

  private async fillQuickInput(text: string): Promise<void> {
    const input = this.page.locator(".quick-input-widget:visible .quick-input-filter input");
    await input.waitFor();
    await input.fill(text);
  }
}
