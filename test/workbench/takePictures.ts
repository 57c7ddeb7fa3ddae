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

const VIEWPORT = { width: 1100, height: 640 };
const DEVICE_PIXELS = 2;
const PICTURE_SETTINGS = {
  "editor.fontSize": 14,
  "outline.collapseItems": "alwaysCollapse",
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
    for (const { name, theme, file, steps } of list) {
      workbench.changeSettings({ ...PICTURE_SETTINGS, "workbench.colorTheme": theme });
      const editor = await workbench.open(file);
      // Else TypeScript's own part of a hover says that it is loading.
      await editor.waitUntilIdle();
      for (const step of steps) await takeStep(editor, step);
      const path = join(into, `${name}.png`);
      await editor.page.screenshot({ path, animations: "disabled" });
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
    case "hover":
      await editor.hover(step.over, step.holds);
      return;
    case "runCommand":
      return editor.runCommand(step.title);
    case "expectWebview":
      await editor.webview(step.selector);
      return;
  }
}
