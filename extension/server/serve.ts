/**
 * Wires a connection to a session: what the client says goes in, results and answers go out.
 *
 * Every handler is guarded. Knows no host: files and the engine are given.
 */
import {
  CodeActionKind,
  type Connection,
  type InitializeParams,
  type InitializeResult,
  TextDocumentSyncKind,
} from "vscode-languageserver";
import { createIndexReader, createMechanismsReader } from "../features/mechanismIndex.js";
import { committedAnswerSchema, READ_COMMITTED } from "../protocol/committed.js";
import { readMessage } from "../protocol/readMessage.js";
import { createLensReader } from "./answers/codeLenses.js";
import { createHintReader } from "./answers/inlayHints.js";
import { CommittedMechanisms } from "./committed.js";
import type { FileHost } from "./discovery.js";
import { DisplaySettingsReader } from "./displaySettings.js";
import type { Engine } from "./engine.js";
import { keyOf } from "./fileKeys.js";
import { createGuard, describeError, type Guard } from "./guard.js";
import { answerRequests } from "./requests.js";
import { showResults } from "./results.js";
import { Session } from "./session.js";
import { eventsOf, watchFiles } from "./watching.js";

export interface ServerParts {
  readonly host: FileHost;
  readonly loadEngine: () => Promise<Engine>;
}

/** Starts listening on the connection. */
export function serve(connection: Connection, { host, loadEngine }: ServerParts): void {
  const report = (what: string, error: unknown) => connection.console.error(`${what}: ${describeError(error)}`);
  const guard = createGuard(report);
  connection.onInitialize((params) => {
    const settings = new DisplaySettingsReader(connection, params.capabilities.workspace?.configuration === true);
    const { capabilities } = params;
    const indexOf = createIndexReader();
    const mechanismsIn = createMechanismsReader(indexOf);
    const [hintsOf, lensesOf] = [createHintReader(mechanismsIn), createLensReader(mechanismsIn)];
    const committed: CommittedMechanisms = new CommittedMechanisms({
      ask: async (uris) => readMessage(committedAnswerSchema, await connection.sendRequest(READ_COMMITTED, { uris })) ?? null,
      uriOf: (file) => session.texts.uriOf(file),
      whenQuiet: () => session.whenCurrent(QUIET_PATIENCE_MS),
      onMore: () => results.refreshLenses(),
      // A client that knows no commits does not know the question.
      onError: (what, error) => connection.console.debug(`${what}: ${describeError(error)}`),
    });
    const results = showResults({
      connection,
      capabilities,
      indexOf,
      hintsOf,
      lensesOf,
      committedOf: (result) => committed.knownOf(result),
      report,
    });
    const session = new Session({ host, loadEngine, onResult: (result) => results.show(session.texts, result), onError: report });
    followTexts(connection, guard, session, settings);
    const commands = commandsOf(params);
    answerRequests({ connection, guard, session, settings, hintsOf, lensesOf, capabilities, committed, commands });
    connection.onDidChangeConfiguration(
      guard.act("Reading changed settings", () => {
        settings.forget();
        results.refresh();
      }),
    );
    connection.onInitialized(guard.act("Starting", () => start(connection, params, session, settings)));
    connection.onShutdown(() => {
      session.dispose();
      results.dispose();
    });
    return CAPABILITIES;
  });
  connection.listen();
}

/** The last commit is looked at once typing has stopped for a while, or after this time. */
const QUIET_PATIENCE_MS = 10_000;

const CAPABILITIES: InitializeResult = {
  serverInfo: { name: "Loadmark" },
  capabilities: {
    textDocumentSync: { openClose: true, change: TextDocumentSyncKind.Incremental, save: true },
    hoverProvider: true,
    inlayHintProvider: true,
    completionProvider: { triggerCharacters: [" "] },
    codeActionProvider: { codeActionKinds: [CodeActionKind.QuickFix] },
    codeLensProvider: { resolveProvider: true },
    workspaceSymbolProvider: true,
    workspace: { workspaceFolders: { supported: true, changeNotifications: true } },
  },
};

function followTexts(connection: Connection, guard: Guard, session: Session, settings: DisplaySettingsReader): void {
  connection.onDidOpenTextDocument(
    guard.act("Opening a document", ({ textDocument }) =>
      session.open(textDocument.uri, textDocument.version, textDocument.text),
    ),
  );
  connection.onDidChangeTextDocument(
    guard.act("Changing a document", ({ textDocument, contentChanges }) =>
      session.change(textDocument.uri, textDocument.version, contentChanges),
    ),
  );
  connection.onDidSaveTextDocument(guard.act("Saving a document", () => session.save()));
  connection.onDidCloseTextDocument(
    guard.act("Closing a document", ({ textDocument }) => {
      settings.forget(textDocument.uri);
      return session.close(textDocument.uri);
    }),
  );
  connection.onDidChangeWatchedFiles(
    guard.act("Following files on disk", ({ changes }) => session.handleFileEvents(eventsOf(changes))),
  );
}

async function start(
  connection: Connection,
  { capabilities, workspaceFolders, rootUri }: InitializeParams,
  session: Session,
  settings: DisplaySettingsReader,
): Promise<void> {
  const { workspace } = capabilities;
  let folders = workspaceFolders ?? (rootUri ? [{ uri: rootUri }] : []);
  const readFolders = () => session.setFolders(folders.map(({ uri }) => keyOf(uri)));
  if (workspace?.workspaceFolders) {
    connection.workspace.onDidChangeWorkspaceFolders(({ added, removed }) => {
      const gone = new Set(removed.map(({ uri }) => keyOf(uri)));
      folders = [...folders.filter(({ uri }) => !gone.has(keyOf(uri))), ...added];
      readFolders().catch((error) => connection.console.error(`Reading workspace folders: ${describeError(error)}`));
    });
  }
  // Watching begins before reading, so that nothing that happens meanwhile is missed.
  if (workspace?.didChangeWatchedFiles?.dynamicRegistration) await watchFiles(connection);
  if (workspace?.didChangeConfiguration?.dynamicRegistration) await settings.watch();
  const start = performance.now();
  await readFolders();
  const seconds = ((performance.now() - start) / 1000).toFixed(1);
  connection.console.info(`Read the workspace in ${seconds} s: ${session.fileCount} files mention the declarations.`);
}

function commandsOf({ initializationOptions }: InitializeParams): readonly string[] {
  const commands = (initializationOptions as { readonly commands?: unknown } | undefined)?.commands;
  return Array.isArray(commands) ? commands.filter((command) => typeof command === "string") : [];
}
