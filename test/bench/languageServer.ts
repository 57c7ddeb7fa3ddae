// The product's own server as a process, spoken to as an editor does, with what it says about findings. It counts no time.

import { type ChildProcessByStdio, spawn } from "node:child_process";
import { readFileSync } from "node:fs";
import { join } from "node:path";
import type { Readable, Writable } from "node:stream";
import { pathToFileURL } from "node:url";
import type { Diagnostic, PublishDiagnosticsParams } from "vscode-languageserver/node";
import { ENGINE_OPTIONS, serverArguments } from "../../extension/client/serverProcess.js";
import { CHART_MAY_DIFFER } from "../../extension/protocol/chartMessages.js";
import { cacheFolder, repositoryRoot } from "../workbench/paths.js";
import { readFrames, writeFrame } from "./frames.js";
import type { EditedFile } from "./workspace.js";

/** A notification, a request or an answer. */
interface Message {
  readonly id?: number;
  readonly method?: string;
  readonly params?: unknown;
  readonly result?: unknown;
}

export class LanguageServer {
  readonly process: ChildProcessByStdio<Writable, Readable, null>;
  readonly findings = new Map<string, readonly Diagnostic[]>();
  readonly #versions = new Map<string, number>();
  readonly #texts = new Map<string, string>();
  readonly #asked: ((result: unknown) => void)[] = [];
  #heard: (published: PublishDiagnosticsParams) => void = () => {};
  /** Whether nothing comes any more of the last findings. */
  #isQuiet = true;
  readonly #waiting: (() => void)[] = [];

  constructor() {
    const server = join(repositoryRoot, "dist/server.cjs");
    const args = [...ENGINE_OPTIONS, server, "--stdio", ...serverArguments(join(cacheFolder, "../bench/compiled"))];
    this.process = spawn(process.execPath, args, { stdio: ["pipe", "pipe", "inherit"] });
    readFrames<Message>(this.process.stdout, (message) => this.#hear(message));
  }

  async start(folder: string): Promise<void> {
    await this.request("initialize", {
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
    this.#notify("initialized", {});
  }

  open(path: string): void {
    const uri = pathToFileURL(path).href;
    const text = readFileSync(path, "utf8");
    this.#versions.set(uri, 1);
    this.#texts.set(uri, text);
    this.#notify("textDocument/didOpen", {
      textDocument: { uri, languageId: "typescript", version: 1, text },
    });
  }

  /** Replaces the number and says that the document was saved, which ends the wait for more typing. */
  edit({ path, start, text }: EditedFile, number: string): void {
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
    this.#notify("textDocument/didChange", { textDocument, contentChanges: [{ range, text: number }] });
    this.#notify("textDocument/didSave", { textDocument: { uri } });
  }

  request<Answer>(method: string, params?: unknown): Promise<Answer> {
    return new Promise((resolve) => {
      this.#asked.push(resolve as (result: unknown) => void);
      this.#write({ id: this.#asked.length - 1, method, params });
    });
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
    const ended = new Promise((resolve) => this.process.once("exit", resolve));
    await this.request("shutdown");
    this.#notify("exit");
    await ended;
  }

  #hear({ id, method, params, result }: Message): void {
    if (method === undefined) this.#asked[id ?? -1]?.(result);
    else if (id !== undefined) this.#write({ id, result: answerTo(method, params) });
    else if (method === "textDocument/publishDiagnostics") {
      const published = params as PublishDiagnosticsParams;
      this.#isQuiet = false;
      this.findings.set(published.uri, published.diagnostics);
      this.#heard(published);
    } else if (method === CHART_MAY_DIFFER) {
      this.#isQuiet = true;
      for (const resolve of this.#waiting.splice(0)) resolve();
    } else if (method === "window/logMessage") {
      const { type, message } = params as { readonly type: number; readonly message: string };
      if (type === 1) console.error(`The server says: ${message}`);
    }
  }

  #notify(method: string, params?: unknown): void {
    this.#write({ method, params });
  }

  #write(message: Message): void {
    writeFrame(this.process.stdin, { jsonrpc: "2.0", ...message });
  }
}

/** Of an editor that takes every wish and has no settings of its own. */
function answerTo(method: string, params: unknown): unknown {
  return method === "workspace/configuration" ? (params as { readonly items: readonly unknown[] }).items.map(() => ({})) : null;
}
