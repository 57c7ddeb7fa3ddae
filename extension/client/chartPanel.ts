/**
 * The one chart panel: opened by a command, kept across reloads, and given a full answer whenever its page asks or something changed.
 *
 * Follows the caret until it is told a mechanism, and again as soon as the caret moves. Draws nothing and knows no number.
 */
import * as vscode from "vscode";
import {
  type ChartAnswer,
  type ChartQuestion,
  type HostMessage,
  type PageMessage,
  pageMessageSchema,
} from "../protocol/chartMessages.js";
import { chartViewSchema } from "../protocol/chartView.js";
import { SHOW_CHART } from "../protocol/commands.js";
import { readMessage } from "../protocol/readMessage.js";
import { chartHtml } from "./chartHtml.js";
import { isSource } from "./documents.js";
import { saveAs } from "./saveAs.js";
import type { Server } from "./server.js";

export const CHART_VIEW = "loadmark.chart";

export interface ChartParts {
  readonly extensionUri: vscode.Uri;
  readonly server: Server;
  readonly log: vscode.LogOutputChannel;
}

/** Registers the command, the panel's return after a reload, and what it follows. */
export function registerChart(parts: ChartParts): vscode.Disposable {
  const chart = new ChartPanel(parts);
  const { window, commands } = vscode;
  return vscode.Disposable.from(
    chart,
    commands.registerCommand(SHOW_CHART, (wanted: unknown) => chart.open(nameIn(wanted))),
    window.registerWebviewPanelSerializer(CHART_VIEW, {
      deserializeWebviewPanel: async (panel, state) => chart.adopt(panel, readMessage(chartViewSchema, state)?.mechanism ?? null),
    }),
    window.onDidChangeTextEditorSelection(({ textEditor }) => chart.follow(textEditor)),
    window.onDidChangeActiveTextEditor((editor) => chart.follow(editor)),
    parts.server.onChartMayDiffer(() => void chart.refresh()),
  );
}

class ChartPanel implements vscode.Disposable {
  readonly #parts: ChartParts;
  #panel: vscode.WebviewPanel | undefined;
  /** True from the page's first word until the editor throws it away. */
  #isReady = false;
  #mechanism: string | null = null;
  #caret: ChartQuestion["caret"] = null;
  #shown = "";
  #asking: { again: boolean } | undefined;

  constructor(parts: ChartParts) {
    this.#parts = parts;
  }

  /** Shows the chart of a mechanism, or of the one at the caret. The keyboard stays where it is. */
  open(mechanism: string | undefined): void {
    const editor = vscode.window.activeTextEditor;
    this.#caret = mechanism === undefined && editor && isSource(editor.document) ? caretOf(editor) : null;
    this.#mechanism = mechanism ?? this.#mechanism;
    if (this.#panel !== undefined) {
      this.#panel.reveal(undefined, true);
      void this.refresh();
      return;
    }
    const column = { viewColumn: vscode.ViewColumn.Beside, preserveFocus: true };
    this.adopt(vscode.window.createWebviewPanel(CHART_VIEW, vscode.l10n.t("Operating Point"), column), this.#mechanism);
  }

  /** Takes a panel that is new, or that the editor brings back. */
  adopt(panel: vscode.WebviewPanel, mechanism: string | null): void {
    const other = this.#panel;
    this.#panel = panel;
    this.#mechanism = mechanism;
    this.#leavePage();
    other?.dispose();
    panel.onDidDispose(() => {
      if (this.#panel === panel) this.#panel = undefined;
      this.#leavePage();
    });
    panel.onDidChangeViewState(() => {
      if (!panel.visible) this.#leavePage();
    });
    panel.webview.onDidReceiveMessage((message: unknown) => this.#receive(message));
    const { webview } = panel;
    const root = vscode.Uri.joinPath(this.#parts.extensionUri, "dist", "webview");
    const uriOf = (file: string) => webview.asWebviewUri(vscode.Uri.joinPath(root, file)).toString();
    webview.options = { enableScripts: true, localResourceRoots: [root] };
    webview.html = chartHtml({
      cspSource: webview.cspSource,
      nonce: makeNonce(),
      scriptUri: uriOf("main.js"),
      styleUri: uriOf("panel.css"),
    });
  }

  follow(editor: vscode.TextEditor | undefined): void {
    if (this.#panel === undefined || editor === undefined || editor !== vscode.window.activeTextEditor) return;
    if (!isSource(editor.document)) return;
    this.#caret = caretOf(editor);
    void this.refresh();
  }

  /** Asks anew, one question at a time: what comes meanwhile is asked once more at the end. */
  async refresh(): Promise<void> {
    if (!this.#isReady) return;
    if (this.#asking !== undefined) {
      this.#asking.again = true;
      return;
    }
    const asking = { again: true };
    this.#asking = asking;
    try {
      while (asking.again && this.#isReady) {
        asking.again = false;
        await this.#ask();
      }
    } catch (error) {
      this.#parts.log.error(error instanceof Error ? error : String(error));
    } finally {
      this.#asking = undefined;
    }
  }

  dispose(): void {
    this.#panel?.dispose();
  }

  async #ask(): Promise<void> {
    const { server } = this.#parts;
    const answer = await server.askForChart({ caret: this.#caret, mechanism: this.#mechanism });
    if (answer !== undefined) this.#show(answer);
    else if (!server.isWanted) this.#show({ kind: "nothing", reason: "nothing-declared" });
  }

  #show(answer: ChartAnswer): void {
    if (answer.kind === "chart") this.#mechanism = answer.chart.mechanism;
    const content = JSON.stringify(answer);
    if (!this.#isReady || content === this.#shown) return;
    this.#shown = content;
    void this.#panel?.webview.postMessage({ type: "show", answer } satisfies HostMessage);
  }

  #receive(message: unknown): void {
    const read = readMessage(pageMessageSchema, message);
    if (read === undefined) this.#parts.log.warn("The chart's page sent a message that is not known; it was ignored.");
    else this.#act(read);
  }

  #act(message: PageMessage): void {
    switch (message.type) {
      case "ready":
        this.#isReady = true;
        this.#shown = "";
        this.#mechanism ??= message.mechanism;
        void this.refresh();
        return;
      case "savePicture":
        void saveAs(
          message.fileName,
          Uint8Array.from(atob(message.base64), (byte) => byte.charCodeAt(0)),
        );
        return;
      case "saveTable":
        void saveAs(message.fileName, new TextEncoder().encode(message.csv));
        return;
      case "trouble":
        this.#parts.log.warn(message.what);
    }
  }

  #leavePage(): void {
    this.#isReady = false;
    this.#shown = "";
  }
}

/** Links and lenses give a name, the view its item. */
function nameIn(wanted: unknown): string | undefined {
  if (typeof wanted === "string") return wanted;
  const name = typeof wanted === "object" && wanted !== null && "name" in wanted ? wanted.name : undefined;
  return typeof name === "string" ? name : undefined;
}

function caretOf({ document, selection }: vscode.TextEditor): ChartQuestion["caret"] {
  const { line, character } = selection.active;
  return { uri: document.uri.toString(), line, character };
}

function makeNonce(): string {
  return btoa(String.fromCharCode(...crypto.getRandomValues(new Uint8Array(18))));
}
