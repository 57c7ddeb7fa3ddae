/**
 * The one chart panel: opened by a command, kept across reloads, and given a full answer whenever its page asks or something changed.
 *
 * Follows the caret until it is told a mechanism, and again as soon as the caret moves. Draws nothing and knows no number.
 */
import * as vscode from "vscode";
import { chartMemorySchema } from "../protocol/chartMemory.js";
import {
  type ChartAnswer,
  type ChartQuestion,
  type HostMessage,
  type PageMessage,
  pageMessageSchema,
} from "../protocol/chartMessages.js";
import { VIEW_NAMES, type ViewName, type Want } from "../protocol/charts/views.js";
import { SHOW_CHART, SHOW_MATTERS, SHOW_POWER, SHOW_RATIO_MAP, SHOW_TRAVEL } from "../protocol/commands.js";
import { readMessage } from "../protocol/readMessage.js";
import { chartHtml } from "./chartHtml.js";
import { isSource } from "./documents.js";
import { saveAs } from "./saveAs.js";
import type { Server } from "./server.js";
import { writeEdits } from "./writeEdits.js";

export const CHART_VIEW = "loadmark.chart";

/** The command that opens each view. */
const COMMANDS: Readonly<Record<ViewName, string>> = {
  "operating-point": SHOW_CHART,
  travel: SHOW_TRAVEL,
  "ratio-map": SHOW_RATIO_MAP,
  matters: SHOW_MATTERS,
  power: SHOW_POWER,
};

/** On the panel's own tab. */
const titleOf: Readonly<Record<ViewName, () => string>> = {
  "operating-point": () => vscode.l10n.t("Operating Point"),
  travel: () => vscode.l10n.t("Travel"),
  "ratio-map": () => vscode.l10n.t("Ratio Map"),
  matters: () => vscode.l10n.t("What Matters"),
  power: () => vscode.l10n.t("Power by Mechanism"),
};

interface Subject {
  readonly mechanism: string | null;
  readonly robot: string | null;
}

export interface ChartParts {
  readonly extensionUri: vscode.Uri;
  readonly server: Server;
  readonly log: vscode.LogOutputChannel;
  /** Kept from one window to the next. */
  readonly memory: vscode.Memento;
}

const UNITS_KEY = "loadmark.chartUnits";

/** Registers the command, the panel's return after a reload, and what it follows. */
export function registerChart(parts: ChartParts): vscode.Disposable {
  const chart = new ChartPanel(parts);
  const { window, commands } = vscode;
  return vscode.Disposable.from(
    chart,
    ...VIEW_NAMES.map((view) => commands.registerCommand(COMMANDS[view], (wanted: unknown) => chart.open(view, nameIn(wanted)))),
    window.registerWebviewPanelSerializer(CHART_VIEW, {
      deserializeWebviewPanel: async (panel, state) => {
        const memory = readMessage(chartMemorySchema, state);
        chart.adopt(panel, { mechanism: memory?.mechanism ?? null, robot: memory?.robot ?? null });
      },
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
  #subject: Subject = { mechanism: null, robot: null };
  /** What the page asked for last; the view that someone asked the editor for, until the page asks for it too. */
  #want: Want = { view: "operating-point", probe: null };
  #opening: ViewName | undefined;
  #caret: ChartQuestion["caret"] = null;
  #shown = "";
  #asking: { again: boolean } | undefined;

  constructor(parts: ChartParts) {
    this.#parts = parts;
  }

  /** Shows a view of a mechanism or a robot, or of what is at the caret. The keyboard stays where it is. */
  open(view: ViewName, wanted: string | undefined): void {
    const editor = vscode.window.activeTextEditor;
    this.#caret = wanted === undefined && editor && isSource(editor.document) ? caretOf(editor) : null;
    const named = view === "power" ? { robot: wanted ?? null } : { mechanism: wanted ?? null };
    const subject = wanted === undefined ? this.#subject : { ...this.#subject, ...named };
    this.#opening = view;
    if (this.#panel !== undefined) {
      this.#subject = subject;
      this.#panel.reveal(undefined, true);
      this.#openView();
      void this.refresh();
      return;
    }
    const column = { viewColumn: vscode.ViewColumn.Beside, preserveFocus: true };
    this.adopt(vscode.window.createWebviewPanel(CHART_VIEW, titleOf[view](), column), subject);
  }

  /** Takes a panel that is new, or that the editor brings back. */
  adopt(panel: vscode.WebviewPanel, subject: Subject): void {
    const other = this.#panel;
    this.#panel = panel;
    this.#subject = subject;
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
      units: this.#parts.memory.get<string>(UNITS_KEY) ?? "",
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
    const answer = await server.askForChart({ caret: this.#caret, ...this.#subject, want: this.#want });
    if (answer !== undefined) this.#show(answer);
    else if (!server.isWanted) this.#show(nothingDeclared(this.#want.view));
  }

  #show(answer: ChartAnswer): void {
    if (answer.kind === "chart") this.#subject = { ...this.#subject, ...subjectOf(answer) };
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
        this.#subject = {
          mechanism: this.#subject.mechanism ?? message.mechanism,
          robot: this.#subject.robot ?? message.robot,
        };
        this.#turnTo(message.want);
        this.#openView();
        void this.refresh();
        return;
      case "ask":
        this.#turnTo(message.want);
        void this.refresh();
        return;
      case "writeToCode":
        void writeEdits(this.#parts, { caret: null, ...this.#subject, want: message.want });
        return;
      case "chooseUnits":
        void this.#parts.memory.update(UNITS_KEY, message.units);
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
      case "savePage":
        void saveAs(message.fileName, new TextEncoder().encode(message.html));
        return;
      case "trouble":
        this.#parts.log.warn(message.what);
    }
  }

  #turnTo(want: Want): void {
    this.#want = want;
    if (this.#opening === want.view) this.#opening = undefined;
    const title = titleOf[want.view]();
    if (this.#panel !== undefined && this.#panel.title !== title) this.#panel.title = title;
  }

  /** The page keeps the views, so it is told which one is wanted, and asks for it by itself. */
  #openView(): void {
    if (!this.#isReady || this.#opening === undefined) return;
    void this.#panel?.webview.postMessage({ type: "open", view: this.#opening } satisfies HostMessage);
    this.#opening = undefined;
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

function subjectOf({ chart }: Extract<ChartAnswer, { kind: "chart" }>): Partial<Subject> {
  return "robot" in chart ? { robot: chart.robot } : { mechanism: chart.mechanism };
}

function nothingDeclared(view: ViewName): ChartAnswer {
  return { kind: "nothing", view, reason: "nothing-declared", says: [], example: null };
}

function caretOf({ document, selection }: vscode.TextEditor): ChartQuestion["caret"] {
  const { line, character } = selection.active;
  return { uri: document.uri.toString(), line, character };
}

function makeNonce(): string {
  return btoa(String.fromCharCode(...crypto.getRandomValues(new Uint8Array(18))));
}
