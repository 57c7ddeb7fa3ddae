// Stands in for the editor around the chart's page: serves the built page under its real policy, gives it the editor's
// three functions and a theme, and keeps what it says.

import { readFile } from "node:fs/promises";
import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { join } from "node:path";
import type { Browser, BrowserContext, Page } from "playwright-core";
import { chartHtml, chartPolicy } from "../../../extension/client/chartHtml.js";
import type { ChartAnswer, PageMessage } from "../../../extension/protocol/chartMessages.js";
import { repositoryRoot } from "../paths.js";
import { waitUntil } from "../waitUntil.js";
import { type PageTheme, pageThemes, type ThemeName } from "./themes.js";

export interface ChartPageOptions {
  readonly theme?: ThemeName;
  readonly width?: number;
  readonly height?: number;
  readonly pixelRatio?: number;
  /** What the page remembers from before. */
  readonly state?: unknown;
  readonly withReader?: boolean;
}

export interface OpenedChart {
  readonly page: Page;
  /** What the page has sent, in order. */
  readonly sent: readonly PageMessage[];
  /** Errors of the page, what its policy refused among them. */
  readonly troubles: readonly string[];
  show(answer: ChartAnswer): Promise<void>;
  post(message: unknown): Promise<void>;
  waitForSent<T extends PageMessage["type"]>(type: T): Promise<Extract<PageMessage, { type: T }>>;
  state(): Promise<unknown>;
  setTheme(theme: ThemeName): Promise<void>;
  close(): Promise<void>;
}

export interface ChartHost {
  open(options?: ChartPageOptions): Promise<OpenedChart>;
  stop(): Promise<void>;
}

const NONCE = "dGhpcyBpcyBhIHRlc3Q";

export async function startChartHost(browser: Browser): Promise<ChartHost> {
  const server = createServer((request, response) => {
    const address = new URL(request.url ?? "/", origin(server));
    void answer(server, address).then(
      ({ type, body }) => {
        response.setHeader("Content-Security-Policy", chartPolicy(origin(server), NONCE));
        response.setHeader("Content-Type", type);
        response.end(body);
      },
      () => response.writeHead(404).end(),
    );
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  return {
    open: (options = {}) => openChart(browser, origin(server), options),
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

async function openChart(browser: Browser, address: string, options: ChartPageOptions): Promise<OpenedChart> {
  const { theme = "dark", width = 900, height = 1300, pixelRatio = 1, state, withReader = false } = options;
  const context: BrowserContext = await browser.newContext({ viewport: { width, height }, deviceScaleFactor: pixelRatio });
  const page = await context.newPage();
  const sent: PageMessage[] = [];
  const troubles: string[] = [];
  page.on("pageerror", (error) => troubles.push(error.message));
  page.on("console", (message) => {
    if (message.type() === "error") troubles.push(message.text());
  });
  await page.exposeFunction("keepSent", (message: PageMessage) => void sent.push(message));
  await page.addInitScript(putEditorFunctions, state);
  await page.goto(`${address}/?${new URLSearchParams({ theme, class: bodyClass(pageThemes[theme], withReader) })}`);
  const post = (message: unknown): Promise<void> => page.evaluate((given) => window.postMessage(given, "*"), message);
  return {
    page,
    sent,
    troubles,
    post,
    async show(answer) {
      await post({ type: "show", answer });
      const selector = `#view-${answer.view} ${answer.kind === "chart" ? ".content" : ".empty"}:not([hidden])`;
      await page.waitForSelector(selector);
      // Two frames: the plots follow the size of their boxes after these are laid out.
      await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))));
    },
    waitForSent: (type) =>
      waitUntil(`a ${type} message of the page`, async () => sent.find((message) => message.type === type) as never),
    state: () => page.evaluate(() => (window as unknown as { keptState: unknown }).keptState),
    setTheme: (name) => page.evaluate(changeTheme, { ...pageThemes[name], bodyClass: bodyClass(pageThemes[name], withReader) }),
    close: () => context.close(),
  };
}

function bodyClass(theme: PageTheme, withReader: boolean): string {
  return [theme.bodyClass, "vscode-reduce-motion", ...(withReader ? ["vscode-using-screen-reader"] : [])].join(" ");
}

/** Runs in the page, before its own script. */
function putEditorFunctions(state: unknown): void {
  const holder = window as unknown as { keptState: unknown; keepSent: (message: unknown) => void; acquireVsCodeApi: unknown };
  holder.keptState = state;
  holder.acquireVsCodeApi = () => ({
    postMessage: (message: unknown) => holder.keepSent(message),
    getState: () => holder.keptState,
    setState: (next: unknown) => {
      holder.keptState = next;
    },
  });
}

/** Runs in the page: what the editor does when its theme changes. */
function changeTheme({ bodyClass: classes, variables }: PageTheme): void {
  for (const [name, value] of Object.entries(variables)) document.documentElement.style.setProperty(name, value);
  document.body.className = classes;
}

async function answer(server: Server, { pathname, searchParams }: URL): Promise<{ type: string; body: string }> {
  if (pathname === "/") {
    const base = origin(server);
    const html = chartHtml({
      cspSource: base,
      nonce: NONCE,
      scriptUri: `${base}/main.js`,
      styleUri: `${base}/panel.css`,
      units: "",
    });
    const themed = `<link rel="stylesheet" href="${base}/theme.css?${searchParams}">\n<title>`;
    const body = `<body class="${searchParams.get("class") ?? ""}">`;
    return { type: "text/html", body: html.replace("<title>", themed).replace('<body data-units="">', body) };
  }
  if (pathname === "/theme.css") {
    const { variables } = pageThemes[(searchParams.get("theme") ?? "dark") as ThemeName];
    const lines = Object.entries(variables).map(([name, value]) => `${name}: ${value};`);
    return { type: "text/css", body: `html { ${lines.join(" ")} }` };
  }
  const types: Readonly<Record<string, string>> = { "/main.js": "text/javascript", "/panel.css": "text/css" };
  const type = types[pathname];
  if (type === undefined) throw new Error(`${pathname} is not part of the page.`);
  return { type, body: await readFile(join(repositoryRoot, "dist/webview", pathname), "utf8") };
}

function origin(server: Server): string {
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
}
