// The harness: a VS Code server with the extension, run from the sources' build or installed from its package, and a
// Chromium page that shows it. Each opening takes a fresh copy of the workspace. Nothing here knows what is tested.

import { type BrowserContext, chromium, type Page } from "playwright-core";
import { CHROMIUM_FLAGS } from "./chromium.js";
import { Editor } from "./editor.js";
import { copyFolder } from "./folderCopy.js";
import { startServer, type WorkbenchServer } from "./server.js";
import { quietSettings } from "./settings.js";
import { stageExtension } from "./stageExtension.js";
import type { TemporaryFolder } from "./temporaryFolder.js";

export type ExtensionMode = "development" | "installed";

export interface WorkbenchOptions {
  readonly extensionMode: ExtensionMode;
  /** The browser's executable: see getChromium. */
  readonly browser: string;
  /** The folder that each opening copies. */
  readonly workspace: string;
  /** The packed extension, for the installed mode. */
  readonly vsix?: string | undefined;
  /** The extension's folder, for the development mode; else the repository's build. */
  readonly extension?: string | undefined;
  readonly settings?: Readonly<Record<string, unknown>> | undefined;
  readonly viewport?: { readonly width: number; readonly height: number } | undefined;
  /** Device pixels per CSS pixel. */
  readonly scale?: number | undefined;
}

export interface HostTestOptions {
  /** The folder that is copied; else that of the workbench. */
  readonly workspace?: string | undefined;
  /** Another folder of the extension than the workbench's. */
  readonly extension?: string | undefined;
  /** The module whose `run` the extension host calls. */
  readonly tests: string;
  /** What a development host needs beside the installed extension: any folder with a manifest. */
  readonly emptyExtension: string;
  readonly onLog: (text: string) => void;
  readonly timeoutMs: number;
}

export interface Workbench {
  readonly page: Page;
  readonly logFile: string;
  /** Opens a fresh copy of the workspace, or of another folder, replacing what was open. */
  open(openFile?: string, another?: string): Promise<Editor>;
  /** Runs tests in the extension host, in a fresh copy, and gives their exit code. */
  runHostTests(options: HostTestOptions): Promise<number>;
  /** Settings on top of the quiet ones, from the next opening on. */
  changeSettings(settings: Readonly<Record<string, unknown>>): void;
  stop(): Promise<void>;
}

/** A page that was left does not come back: its extension host need not wait for it. */
const RECONNECT_WITHIN_S = 30;

export async function startWorkbench(options: WorkbenchOptions): Promise<Workbench> {
  const { extensionMode, settings, browser: executablePath, viewport = { width: 1280, height: 800 } } = options;
  const vsix = extensionMode === "installed" ? options.vsix : undefined;
  if (extensionMode === "installed" && !vsix) throw new Error("An installed extension needs its package.");
  const endings: (() => Promise<void>)[] = [];
  const stop = async () => {
    for (let end = endings.pop(); end; end = endings.pop()) await end();
  };
  try {
    const extension = extensionMode === "development" ? (options.extension ?? (await stage(endings))) : undefined;
    const server = await startServer({
      name: extensionMode,
      settings: { ...quietSettings, ...settings },
      vsix,
      reconnectWithinS: RECONNECT_WITHIN_S,
    });
    endings.push(server.stop);
    const browser = await chromium.launch({ executablePath, args: CHROMIUM_FLAGS });
    endings.push(() => browser.close());
    const context = await browser.newContext({ viewport, deviceScaleFactor: options.scale ?? 1 });
    return { ...(await drive(options, server, context, extension, endings)), stop };
  } catch (error) {
    await stop();
    throw error;
  }
}

async function stage(endings: (() => Promise<void>)[]): Promise<string> {
  const staged = await stageExtension();
  endings.push(staged.remove);
  return staged.folder;
}

async function drive(
  { workspace, settings }: WorkbenchOptions,
  server: WorkbenchServer,
  context: BrowserContext,
  extension: string | undefined,
  endings: (() => Promise<void>)[],
): Promise<Omit<Workbench, "stop">> {
  const page = await context.newPage();
  page.on("dialog", (dialog) => void dialog.accept());
  let copy: TemporaryFolder | undefined;
  // Leaving the page first ends its extension host, which would otherwise go on watching the folder that is removed.
  const leave = async () => {
    await page.goto("about:blank");
    await copy?.remove();
    copy = undefined;
  };
  endings.push(leave);
  const takeCopy = async (another = workspace) => {
    await leave();
    copy = await copyFolder(another);
    return copy.folder;
  };
  return {
    page,
    logFile: server.logFile,
    changeSettings: (more) => server.writeSettings({ ...quietSettings, ...settings, ...more }),
    open: async (openFile, another) => {
      const folder = await takeCopy(another);
      await page.goto(server.address({ folder, extension }));
      const editor = new Editor(page, folder);
      await editor.waitUntilReady();
      if (openFile) await editor.openFile(openFile);
      return editor;
    },
    runHostTests: async ({ workspace: another, extension: other, tests, emptyExtension, onLog, timeoutMs }) => {
      const folder = await takeCopy(another);
      const address = server.address({ folder, extension: other ?? extension ?? emptyExtension, extensionTests: tests });
      const hostPage = await context.newPage();
      try {
        return await waitForExit(hostPage, address, onLog, timeoutMs);
      } finally {
        await hostPage.close();
      }
    },
  };
}

/** The workbench calls two functions of its page while it runs extension tests: one per log line, one at the end. */
async function waitForExit(page: Page, address: string, onLog: (text: string) => void, timeoutMs: number): Promise<number> {
  let timer: NodeJS.Timeout | undefined;
  const exited = new Promise<number>((resolve, reject) => {
    timer = setTimeout(
      () => reject(new Error(`The tests in the extension host did not end within ${timeoutMs / 1000} s.`)),
      timeoutMs,
    );
    void page.exposeFunction("codeAutomationExit", (code: number) => resolve(code));
  });
  try {
    await page.exposeFunction("codeAutomationLog", (_level: string, args: unknown[]) => onLog(args.map(String).join(" ")));
    await page.goto(address);
    return await exited;
  } finally {
    clearTimeout(timer);
  }
}
