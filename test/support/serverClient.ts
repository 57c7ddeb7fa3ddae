/**
 * A client for tests of the built server: a folder on disk, documents opened in it, and what the server says about them.
 *
 * Watches files as an editor does: only what the server asked for is told to it.
 */
import { type ChildProcess, spawn } from "node:child_process";
import { mkdirSync, mkdtempSync, readFileSync, realpathSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { pathToFileURL } from "node:url";
import {
  createProtocolConnection,
  type Diagnostic,
  FileChangeType,
  type InitializeResult,
  type Position,
  type ProtocolConnection,
  type PublishDiagnosticsParams,
  StreamMessageReader,
  StreamMessageWriter,
} from "vscode-languageserver/node";
import { CHART_MAY_DIFFER } from "../../extension/protocol/chartMessages.js";
import { NO_STATE, resolveState, STATE, type State, type StateMessage } from "../../extension/protocol/state.js";

export interface ServerClient {
  readonly connection: ProtocolConnection;
  readonly process: ChildProcess;
  readonly folder: string;
  readonly initialized: InitializeResult;
  /** Everything that was published, in order. */
  readonly published: readonly PublishDiagnosticsParams[];
  /** The server's states, and its wishes that hints and lenses be asked for anew, in order. */
  readonly said: readonly { readonly method: string; readonly params: unknown }[];
  /** Errors in the server's log. */
  readonly errors: readonly string[];
  uri(file: string): string;
  open(file: string, text?: string): Promise<void>;
  /** Replaces the first `text` in the open document by `replacement`, as typing does. */
  retype(file: string, text: string, replacement: string): Promise<void>;
  /** The open document's text. */
  text(file: string): string;
  save(file: string): Promise<void>;
  close(file: string): Promise<void>;
  /** Writes to disk, and tells of it. */
  write(file: string, text: string): Promise<void>;
  /** Removes a file or a folder from disk, and tells of it alone. */
  remove(file: string): Promise<void>;
  /** Tells of changes on disk, as far as the server watches them. */
  tell(changes: readonly { readonly file: string; readonly type: FileChangeType }[]): Promise<void>;
  findings(file: string): readonly Diagnostic[];
  /**
   * Waits until the file's findings have exactly these rules, in order of position, and gives them. Of rules other than those that the tests
   * of the server are about there may be any number.
   */
  waitForRules(file: string, rules: readonly string[]): Promise<readonly Diagnostic[]>;
  /** The place of the first `text` in the open document or else on disk; `into` characters into it. */
  at(file: string, text: string, into?: number): Position;
  lastState(): State | undefined;
  stop(): Promise<void>;
}

export interface ClientOptions {
  readonly server: string;
  readonly files: Readonly<Record<string, string>>;
  readonly settings?: Readonly<Record<string, unknown>>;
  readonly commands?: readonly string[];
  readonly arguments?: readonly string[];
}

const PATIENCE_MS = 15_000;

/** Enough to see findings come, change and go; what each rule says is held to other tests. */
const RULES: ReadonlySet<unknown> = new Set(["stalls", "past-peak", "not-constant", "bad-declaration"]);

export async function startServerClient(options: ClientOptions): Promise<ServerClient> {
  const { server, files, settings = {}, commands = [] } = options;
  const folder = realpathSync(mkdtempSync(path.join(tmpdir(), "loadmark-server-")));
  const onDisk = (file: string) => path.join(folder, file);
  const uri = (file: string) => pathToFileURL(onDisk(file)).href;
  const put = (file: string, text: string) => {
    mkdirSync(path.dirname(onDisk(file)), { recursive: true });
    writeFileSync(onDisk(file), text);
  };
  for (const [file, text] of Object.entries(files)) put(file, text);

  const child = spawn(process.execPath, [server, "--stdio", ...(options.arguments ?? [])], {
    stdio: ["pipe", "pipe", "inherit"],
  });
  const connection = createProtocolConnection(new StreamMessageReader(child.stdout), new StreamMessageWriter(child.stdin));
  const published: PublishDiagnosticsParams[] = [];
  const said: { method: string; params: unknown }[] = [];
  const errors: string[] = [];
  const latest = new Map<string, readonly Diagnostic[]>();
  const watches: { globPattern: string; kind: number }[] = [];
  const open = new Map<string, { version: number; text: string }>();
  let wake = () => {};
  const heard = (method: string, params: unknown) => {
    said.push({ method, params });
    wake();
  };
  connection.onNotification("textDocument/publishDiagnostics", (params: PublishDiagnosticsParams) => {
    published.push(params);
    latest.set(params.uri, params.diagnostics);
    wake();
  });
  connection.onNotification("window/logMessage", ({ type, message }: { type: number; message: string }) => {
    if (type === 1) errors.push(message);
  });
  connection.onRequest("client/registerCapability", ({ registrations }) => {
    for (const { method, registerOptions } of registrations) {
      if (method === "workspace/didChangeWatchedFiles") watches.push(...registerOptions.watchers);
    }
  });
  connection.onRequest("workspace/configuration", ({ items }: { items: unknown[] }) => items.map(() => settings));
  for (const method of ["workspace/inlayHint/refresh", "workspace/codeLens/refresh"]) {
    connection.onRequest(method, () => {
      heard(method, undefined);
      return null;
    });
  }
  for (const method of [STATE, CHART_MAY_DIFFER]) connection.onNotification(method, (params) => heard(method, params));
  connection.listen();

  const initialized = await connection.sendRequest<InitializeResult>("initialize", {
    processId: process.pid,
    rootUri: null,
    workspaceFolders: [{ uri: pathToFileURL(folder).href, name: "robot" }],
    initializationOptions: { commands },
    capabilities: {
      workspace: {
        configuration: true,
        workspaceFolders: true,
        didChangeWatchedFiles: { dynamicRegistration: true },
        didChangeConfiguration: { dynamicRegistration: true },
        inlayHint: { refreshSupport: true },
        codeLens: { refreshSupport: true },
        workspaceEdit: { documentChanges: true, snippetEditSupport: true },
      },
    },
  });
  await connection.sendNotification("initialized", {});

  const textOf = (file: string) => open.get(file)?.text ?? readFileSync(onDisk(file), "utf8");
  const documentOf = (file: string) => {
    const document = open.get(file);
    if (document === undefined) throw new Error(`${file} is not open.`);
    return document;
  };
  const waitUntil = async (what: () => string, isSo: () => boolean) => {
    const end = Date.now() + PATIENCE_MS;
    while (!isSo()) {
      if (Date.now() > end) throw new Error(`Not so after ${PATIENCE_MS / 1000} s: ${what()}`);
      await new Promise<void>((resolve) => {
        const timer = setTimeout(resolve, 1000);
        wake = () => {
          clearTimeout(timer);
          resolve();
        };
      });
    }
  };
  const findings = (file: string) => latest.get(uri(file)) ?? [];
  const judged = (file: string) => findings(file).filter(({ code }) => RULES.has(code));
  const rulesOf = (file: string) => judged(file).map(({ code }) => code);
  const positionAt = (text: string, offset: number): Position => {
    const lines = text.slice(0, offset).split("\n");
    return { line: lines.length - 1, character: lines.at(-1)?.length ?? 0 };
  };
  const find = (file: string, text: string) => {
    const offset = textOf(file).indexOf(text);
    if (offset < 0) throw new Error(`${file} does not hold ${JSON.stringify(text)}.`);
    return offset;
  };

  const client: ServerClient = {
    connection,
    process: child,
    folder,
    initialized,
    published,
    said,
    errors,
    uri,
    findings,
    text: textOf,
    async open(file, text = textOf(file)) {
      open.set(file, { version: 1, text });
      const textDocument = { uri: uri(file), languageId: "typescript", version: 1, text };
      await connection.sendNotification("textDocument/didOpen", { textDocument });
    },
    async retype(file, text, replacement) {
      const document = documentOf(file);
      const offset = find(file, text);
      const range = { start: positionAt(document.text, offset), end: positionAt(document.text, offset + text.length) };
      const changed = document.text.slice(0, offset) + replacement + document.text.slice(offset + text.length);
      open.set(file, { version: document.version + 1, text: changed });
      const textDocument = { uri: uri(file), version: document.version + 1 };
      const contentChanges = [{ range, text: replacement }];
      await connection.sendNotification("textDocument/didChange", { textDocument, contentChanges });
    },
    async save(file) {
      put(file, documentOf(file).text);
      await connection.sendNotification("textDocument/didSave", { textDocument: { uri: uri(file) } });
      await client.tell([{ file, type: FileChangeType.Changed }]);
    },
    async close(file) {
      open.delete(file);
      await connection.sendNotification("textDocument/didClose", { textDocument: { uri: uri(file) } });
    },
    async write(file, text) {
      put(file, text);
      await client.tell([
        { file, type: FileChangeType.Created },
        { file, type: FileChangeType.Changed },
      ]);
    },
    async remove(file) {
      rmSync(onDisk(file), { recursive: true });
      await client.tell([{ file, type: FileChangeType.Deleted }]);
    },
    async tell(changes) {
      await waitUntil(
        () => "the server watches files",
        () => watches.length > 0,
      );
      const seen = changes.filter(({ file, type }) =>
        watches.some(({ globPattern, kind }) => matches(globPattern, file) && (kind & (1 << (type - 1))) !== 0),
      );
      const told = seen.map(({ file, type }) => ({ uri: uri(file), type }));
      if (told.length > 0) await connection.sendNotification("workspace/didChangeWatchedFiles", { changes: told });
    },
    async waitForRules(file, rules) {
      await waitUntil(
        () => `${file} has ${JSON.stringify(rules)}, but it has ${JSON.stringify(findings(file))}; log: ${errors.join("\n")}`,
        () => JSON.stringify(rulesOf(file)) === JSON.stringify(rules),
      );
      return judged(file);
    },
    at: (file, text, into = 0) => positionAt(textOf(file), find(file, text) + into),
    lastState() {
      const messages = said.filter(({ method }) => method === STATE).map(({ params }) => params as StateMessage);
      return messages.length === 0 ? undefined : messages.reduce(resolveOrFail, NO_STATE);
    },
    async stop() {
      if (child.exitCode === null && child.signalCode === null) {
        const ended = new Promise((resolve) => child.once("exit", resolve));
        await connection.sendRequest("shutdown");
        await connection.sendNotification("exit");
        await ended;
      }
      connection.dispose();
      rmSync(folder, { recursive: true, force: true });
    },
  };
  return client;
}

function resolveOrFail(before: State, message: StateMessage): State {
  const state = resolveState(before, message);
  if (state === undefined) throw new Error("The server told of a state by one that it never told.");
  return state;
}

/** As much of glob patterns as the server uses. */
function matches(pattern: string, file: string): boolean {
  const endings = /^\*\*\/\*\.\{(.+)\}$/.exec(pattern)?.[1];
  if (endings === undefined) return pattern === "**/*";
  return endings.split(",").includes(path.extname(file).slice(1));
}
