// The product's own server as a process, spoken to as an editor does, with what it says about findings. It counts no time.

import { type ChildProcess, spawn } from "node:child_process";
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import {
  createProtocolConnection,
  type Diagnostic,
  type ProtocolConnection,
  type PublishDiagnosticsParams,
  StreamMessageReader,
  StreamMessageWriter,
} from "vscode-languageserver/node";
import { ENGINE_OPTIONS, serverArguments } from "../../extension/client/serverProcess.js";
import { CHART_MAY_DIFFER } from "../../extension/protocol/chartMessages.js";
import { cacheFolder, repositoryRoot } from "../workbench/paths.js";
import type { EditedFile } from "./workspace.js";

export class LanguageServer {
  readonly process: ChildProcess;
  readonly findings = new Map<string, readonly Diagnostic[]>();
  readonly #connection: ProtocolConnection;
  readonly #versions = new Map<string, number>();
  readonly #texts = new Map<string, string>();
  #heard: (published: PublishDiagnosticsParams) => void = () => {};
  /** Whether nothing comes any more of the last findings. */
  #isQuiet = true;
  readonly #waiting: (() => void)[] = [];

  constructor() {
    const server = join(repositoryRoot, "dist/server.cjs");
    const args = [...ENGINE_OPTIONS, server, "--stdio", ...serverArguments(join(cacheFolder, "../bench/compiled"))];
    this.process = spawn(process.execPath, args, { stdio: ["pipe", "pipe", "inherit"] });
    const { stdin, stdout } = this.process;
    if (stdin === null || stdout === null) throw new Error("The server has no streams.");
    this.#connection = createProtocolConnection(new StreamMessageReader(stdout), new StreamMessageWriter(stdin));
    this.#connection.onNotification("textDocument/publishDiagnostics", (published: PublishDiagnosticsParams) => {
      this.#isQuiet = false;
      this.findings.set(published.uri, published.diagnostics);
      this.#heard(published);
    });
    this.#connection.onNotification(CHART_MAY_DIFFER, () => {
      this.#isQuiet = true;
      for (const resolve of this.#waiting.splice(0)) resolve();
    });
    this.#connection.onRequest("client/registerCapability", () => null);
    this.#connection.onRequest("workspace/configuration", ({ items }: { items: unknown[] }) => items.map(() => ({})));
    for (const refresh of ["workspace/inlayHint/refresh", "workspace/codeLens/refresh"]) {
      this.#connection.onRequest(refresh, () => null);
    }
    this.#connection.onNotification("window/logMessage", ({ type, message }: { type: number; message: string }) => {
      if (type === 1) console.error(`The server says: ${message}`);
    });
    this.#connection.listen();
  }

  async start(folder: string): Promise<void> {
    await this.#connection.sendRequest("initialize", {
      processId: process.pid,
      rootUri: null,
      workspaceFolders: [{ uri: pathToFileURL(folder).href, name: "bench" }],
      capabilities: {
        workspace: {
          configuration: true,
          workspaceFolders: true,
          didChangeWatchedFiles: { dynamicRegistration: true },
          inlayHint: { refreshSupport: true },
          codeLens: { refreshSupport: true },
        },
      },
    });
    await this.#connection.sendNotification("initialized", {});
  }

  async open(path: string): Promise<void> {
    const uri = pathToFileURL(path).href;
    const text = readFileSync(path, "utf8");
    this.#versions.set(uri, 1);
    this.#texts.set(uri, text);
    await this.#connection.sendNotification("textDocument/didOpen", {
      textDocument: { uri, languageId: "typescript", version: 1, text },
    });
  }

  /** Replaces the number and says that the document was saved, which ends the wait for more typing. */
  async edit({ path, start, text }: EditedFile, number: string): Promise<void> {
    const uri = pathToFileURL(path).href;
    const version = (this.#versions.get(uri) ?? 0) + 1;
    const current = this.#texts.get(uri) ?? text;
    const end = current.indexOf(";", start);
    this.#versions.set(uri, version);
    this.#texts.set(uri, current.slice(0, start) + number + current.slice(end));
    const lines = current.slice(0, start).split("\n");
    const line = lines.length - 1;
    const character = lines.at(-1)?.length ?? 0;
    const range = { start: { line, character }, end: { line, character: character + end - start } };
    const textDocument = { uri, version };
    await this.#connection.sendNotification("textDocument/didChange", {
      textDocument,
      contentChanges: [{ range, text: number }],
    });
    await this.#connection.sendNotification("textDocument/didSave", { textDocument: { uri } });
  }

  request<Answer>(method: string, params: unknown): Promise<Answer> {
    return this.#connection.sendRequest(method, params);
  }

  /** Until it has told what comes after findings, such as the state of its views. */
  whenQuiet(): Promise<void> {
    return this.#isQuiet ? Promise.resolve() : new Promise((resolve) => this.#waiting.push(resolve));
  }

  /** Until each of the files was published after this call. */
  published(paths: readonly string[]): Promise<void> {
    const waiting = new Set(paths.map((path) => pathToFileURL(path).href));
    return this.until(({ uri }) => {
      waiting.delete(uri);
      return waiting.size === 0;
    });
  }

  until(isSo: (published: PublishDiagnosticsParams) => boolean): Promise<void> {
    return new Promise((resolve) => {
      this.#heard = (published) => {
        if (!isSo(published)) return;
        this.#heard = () => {};
        resolve();
      };
    });
  }

  async stop(): Promise<void> {
    await this.#connection.sendRequest("shutdown");
    await this.#connection.sendNotification("exit");
    this.#connection.dispose();
  }
}
