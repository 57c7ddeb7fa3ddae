/**
 * Hands a new result to every surface at once: diagnostics, the client's view, and a nudge for hints and lenses where they differ.
 *
 * What the surfaces say is built elsewhere; this decides what is sent.
 */
import type { ClientCapabilities, Connection } from "vscode-languageserver";
import type { Committed } from "../features/sinceCommit.js";
import { CHART_MAY_DIFFER } from "../protocol/chartMessages.js";
import { NO_STATE, STATE } from "../protocol/state.js";
import { changesCodeLenses } from "./answers/codeLenses.js";
import { changesInlayHints, type HintsOf } from "./answers/inlayHints.js";
import { currentFile } from "./current.js";
import { createDiagnosticsReader, type DiagnosticsOf } from "./diagnostics.js";
import type { Report } from "./guard.js";
import { type FileDiagnostics, Publisher } from "./publisher.js";
import type { Result } from "./session.js";
import { createStateReader, sameState } from "./stateMessage.js";
import type { Texts } from "./texts.js";

export interface ResultsParts {
  readonly connection: Connection;
  readonly capabilities: ClientCapabilities;
  readonly hintsOf: HintsOf;
  /** What is known of the last commit. */
  readonly committedOf: (result: Result) => Committed;
  readonly report: Report;
}

export interface Results {
  show(texts: Texts, result: Result): void;
  /** Asks for hints and lenses anew, as after changed settings. */
  refresh(): void;
  /** The same for lenses alone. */
  refreshLenses(): void;
}

export function showResults({ connection, capabilities, hintsOf, committedOf, report }: ResultsParts): Results {
  const publisher = new Publisher((params) => void connection.sendDiagnostics(params));
  const canRefreshHints = capabilities.workspace?.inlayHint?.refreshSupport === true;
  const canRefreshLenses = capabilities.workspace?.codeLens?.refreshSupport === true;
  const refreshHints = () => {
    if (canRefreshHints) connection.languages.inlayHint.refresh().catch((error) => report("Refreshing hints", error));
  };
  const refreshLenses = () => {
    if (canRefreshLenses)
      connection.sendRequest("workspace/codeLens/refresh").catch((error) => report("Refreshing lenses", error));
  };
  const diagnosticsOf = createDiagnosticsReader();
  let shown: Result | undefined;
  const stateOf = createStateReader();
  let stateSent = NO_STATE;
  /** One surface that fails must not keep the others from the result. */
  const attempt = (what: string, work: () => void) => {
    try {
      work();
    } catch (error) {
      report(what, error);
    }
  };
  return {
    show(texts, result) {
      const uriOf = (file: string) => texts.uriOf(file);
      attempt("Publishing findings", () => publisher.publish(fileDiagnosticsOf(diagnosticsOf, texts, result)));
      attempt("Telling the state", () => {
        const state = stateOf(result, uriOf);
        if (sameState(state, stateSent)) return;
        stateSent = state;
        connection.sendNotification(STATE, state).catch((error) => report("Telling the state", error));
      });
      attempt("Telling of a result", () => {
        connection.sendNotification(CHART_MAY_DIFFER).catch((error) => report("Telling of a result", error));
      });
      const before = (file: string) => shown && currentFile(texts, shown, file);
      attempt("Comparing hints", () => {
        if (texts.openKeys().some((file) => changesInlayHints(hintsOf, before(file), result, file))) refreshHints();
      });
      attempt("Comparing lenses", () => {
        if (texts.openKeys().some((file) => changesCodeLenses(before(file), result, file, committedOf))) refreshLenses();
      });
      shown = result;
      const { files, mechanisms, findings } = result.analysis;
      connection.tracer.log(`${files.size} files, ${mechanisms.length} mechanisms, ${findings.length} findings.`);
    },
    refresh() {
      refreshHints();
      refreshLenses();
    },
    refreshLenses,
  };
}

/** Open documents are told of whether they have findings or not, so that what they are told carries their version. */
function fileDiagnosticsOf(diagnosticsOf: DiagnosticsOf, texts: Texts, result: Result): Map<string, FileDiagnostics> {
  const { versions } = result.snapshot;
  const uriOf = (file: string) => texts.uriOf(file);
  const byFile = diagnosticsOf(result, uriOf);
  const files = new Set([...byFile.keys(), ...versions.keys()]);
  return new Map(
    [...files].map((file) => [file, { uri: uriOf(file), version: versions.get(file), diagnostics: byFile.get(file) ?? [] }]),
  );
}
