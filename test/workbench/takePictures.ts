// Makes each picture of a list in a real VS Code with the extension run from the build. Every step waits for what it is
// meant to show, so a picture that would show something else fails instead.

import { join } from "node:path";
import { getChromium } from "./chromium.js";
import type { Editor } from "./editor.js";
import { demoFolder, workbenchFolder } from "./paths.js";
import { type Shot, type Step, shots } from "./shots.js";
import { startWorkbench, type WorkbenchOptions } from "./workbench.js";

export interface PictureOptions {
  readonly list?: readonly Shot[];
  readonly into?: string;
  readonly workspace?: string;
  readonly extension?: string;
}

/** Tall, since an editor lets a hover take a quarter of its height; only a part of it is kept. */
const VIEWPORT = { width: 1200, height: 1600 };
const DEVICE_PIXELS = 1.4;
/** Without what is not about the project. */
const PICTURE_SETTINGS = {
  "editor.fontSize": 14,
  "editor.lightbulb.enabled": "off",
  "editor.renderLineHighlight": "none",
  "editor.scrollbar.horizontal": "hidden",
  "editor.scrollbar.vertical": "hidden",
  "editor.overviewRulerBorder": false,
  "editor.hideCursorInOverviewRuler": true,
  "workbench.activityBar.location": "hidden",
  "workbench.editor.editorActionsLocation": "hidden",
};

export async function takePictures({
  list = shots,
  into = join(workbenchFolder, "pictures"),
  workspace = demoFolder,
  extension,
}: PictureOptions = {}) {
  if (list.length === 0) throw new Error("The list of pictures is empty.");
  const found = await getChromium();
  if ("missing" in found) throw new Error(found.missing);
  const options: WorkbenchOptions = {
    extensionMode: "development",
    browser: found.path,
    workspace,
    extension,
    viewport: VIEWPORT,
    scale: DEVICE_PIXELS,
  };
  const workbench = await startWorkbench(options);
  try {
    for (const { name, theme, file, size, steps } of list) {
      workbench.changeSettings({ ...PICTURE_SETTINGS, "workbench.colorTheme": theme });
      const editor = await workbench.open(file);
      // Else TypeScript's own part of a hover says that it is loading.
      await editor.waitUntilIdle();
      for (const step of steps) await takeStep(editor, step);
      const path = join(into, `${name}.png`);
      await editor.page.screenshot({ path, animations: "disabled", clip: { x: 0, y: 0, ...size } });
      console.log(`  ${path}`);
    }
  } finally {
    await workbench.stop();
  }
}

async function takeStep(editor: Editor, step: Step): Promise<void> {
  switch (step.do) {
    case "reveal":
      return editor.reveal(step.file, step.text);
    case "retype":
      return editor.retype(step.text, step.by);
    case "expectSquiggle":
      await editor.waitForSquiggles(`a squiggle under "${step.under}"`, (squiggles) =>
        squiggles.some(({ text }) => text.includes(step.under)),
      );
      return;
    case "expectLens":
      return editor.waitForLens();
    case "hover":
      await editor.hover(step.over, step.holds);
      return;
    case "runCommand":
      return editor.runCommand(step.title);
    case "showProblem":
      return editor.showProblem(step.holds);
    case "hideView":
      return editor.hideView(step.title);
    case "showMechanisms":
      await editor.showMechanisms();
      return;
    case "expectWebview":
      await editor.webview(step.selector);
      return;
    case "pressInWebview":
      return pressInWebview(editor, step);
  }
}

async function pressInWebview(editor: Editor, step: Extract<Step, { do: "pressInWebview" }>): Promise<void> {
  const frame = await editor.webview(step.selector);
  await frame.locator(step.selector).focus();
  for (let time = 0; time < step.times; time += 1) await editor.page.keyboard.press(step.key);
  await frame.getByText(step.holds).first().waitFor();
  // The answer to the last key, and without the ring of the focus.
  await editor.page.waitForTimeout(1000);
  await frame.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
}
