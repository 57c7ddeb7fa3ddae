/**
 * Hands a new result to every surface: diagnostics at once, the rest when they are on their way, since findings are what people wait for.
 *
 * The rest is the client's view, and a nudge for charts, and for hints and lenses where they differ. Where a newer result comes before its
 * turn, it is done once, for the newest. What the surfaces say is built elsewhere; this decides what is sent, and when.
 */
import type { ClientCapabilities, Connection } from "vscode-languageserver";
import type { IndexOf } from "../features/mechanismIndex.js";
import type { Committed } from "../features/sinceCommit.js";
import { CHART_MAY_DIFFER } from "../protocol/chartMessages.js";
import { STATE } from "../protocol/state.js";
import { changesCodeLenses, type LensesOf } from "./answers/codeLenses.js";
import { changesInlayHints, type HintsOf } from "./answers/inlayHints.js";
import { type CurrentFile, currentFile } from "./current.js";
import { createDiagnosticsReader } from "./diagnostics.js";
import type { Report } from "./guard.js";
import { Publisher } from "./publisher.js";
import { type ResultChanges, resultChanges, retoldFiles } from "./resultChanges.js";
import type { Result } from "./session.js";
import { createStateReader } from "./stateMessage.js";
import type { Texts } from "./texts.js";

export interface ResultsParts {
  readonly connection: Connection;
  readonly capabilities: ClientCapabilities;
  readonly indexOf: IndexOf;
  readonly hintsOf: HintsOf;
  readonly lensesOf: LensesOf;
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
  /** Drops what is not told yet. */
  dispose(): void;
}

/** A result whose diagnostics are told, and nothing else. */
interface Untold {
  readonly result: Result;
  readonly texts: Texts;
  /** What was shown beside open documents, moved along with their texts; `undefined` where results came between. */
  readonly shown: ReadonlyMap<string, CurrentFile | undefined> | undefined;
}

export function showResults(parts: ResultsParts): Results {
  const { connection, capabilities, indexOf, hintsOf, lensesOf, committedOf, report } = parts;
  const attempt = createAttempt(report);
  let writes: Promise<void>[] = [];
  const publisher = new Publisher((params) => writes.push(connection.sendDiagnostics(params)));
  const diagnosticsOf = createDiagnosticsReader();
  let stateOf = createStateReader(indexOf, true);
  const tellAllAnew = () => {
    stateOf = createStateReader(indexOf, false);
  };
  const { refreshHints, refreshLenses } = createRefresher(connection, capabilities, report);
  let untold: Untold | undefined;
  /** The last one that all was told of. */
  let told: Result | undefined;

  const tellState = ({ result, texts }: Untold, changes: ResultChanges | undefined) => {
    const send = () => {
      const message = stateOf(result, (file) => texts.uriOf(file), changes);
      return message && connection.sendNotification(STATE, message);
    };
    const fail = (error: unknown) => {
      tellAllAnew();
      report("Telling the state", error);
    };
    try {
      send()?.catch(fail);
    } catch (error) {
      fail(error);
    }
  };
  const refreshWhatDiffers = ({ result, shown }: Untold, files: ReadonlySet<string> | undefined) => {
    // Between two results that were told, somebody may have been shown a third.
    if (shown === undefined) {
      refreshHints();
      refreshLenses();
      return;
    }
    const beside = [...shown].filter(([file]) => files?.has(file) ?? true);
    attempt("Comparing hints", () => {
      if (beside.some(([file, before]) => changesInlayHints(hintsOf, before, result, file))) refreshHints();
    });
    attempt("Comparing lenses", () => {
      const differs = ([file, before]: [string, CurrentFile | undefined]) =>
        changesCodeLenses(lensesOf, before, result, file, committedOf);
      if (beside.some(differs)) refreshLenses();
    });
  };
  const tellRest = (of: Result) => {
    if (untold?.result !== of) return;
    const rest = untold;
    const before = told;
    untold = undefined;
    told = of;
    const changes = before && attempt("Comparing results", () => resultChanges(before, of, indexOf));
    tellState(rest, changes);
    attempt("Telling of a result", () => {
      connection.sendNotification(CHART_MAY_DIFFER).catch((error) => report("Telling of a result", error));
    });
    refreshWhatDiffers(rest, before && changes && attempt("Comparing files", () => retoldFiles(before, of, changes)));
    const { files, mechanisms, findings } = of.analysis;
    connection.tracer.log(`${files.size} files, ${mechanisms.length} mechanisms, ${findings.length} findings.`);
  };

  return {
    show(texts, result) {
      writes = [];
      attempt("Publishing findings", () => publisher.publish(diagnosticsOf(result, (file) => texts.uriOf(file))));
      // Edits up to this result are forgotten as soon as it is shown.
      const shown = untold === undefined ? attempt("Looking at what is shown", () => shownBeside(texts, told)) : undefined;
      untold = { result, texts, shown };
      void whenWritten(writes, report).then(() => tellRest(result));
    },
    refresh() {
      refreshHints();
      refreshLenses();
    },
    refreshLenses,
    dispose() {
      untold = undefined;
    },
  };
}

/** One surface that fails must not keep the others from the result. */
function createAttempt(report: Report): <T>(what: string, work: () => T) => T | undefined {
  return (what, work) => {
    try {
      return work();
    } catch (error) {
      report(what, error);
      return undefined;
    }
  };
}

function createRefresher(connection: Connection, { workspace }: ClientCapabilities, report: Report) {
  const canRefreshHints = workspace?.inlayHint?.refreshSupport === true;
  const canRefreshLenses = workspace?.codeLens?.refreshSupport === true;
  return {
    refreshHints() {
      if (canRefreshHints) connection.languages.inlayHint.refresh().catch((error) => report("Refreshing hints", error));
    },
    refreshLenses() {
      if (!canRefreshLenses) return;
      connection.sendRequest("workspace/codeLens/refresh").catch((error) => report("Refreshing lenses", error));
    },
  };
}

function shownBeside(texts: Texts, told: Result | undefined): ReadonlyMap<string, CurrentFile | undefined> {
  return new Map(texts.openKeys().map((file) => [file, told && currentFile(texts, told, file)]));
}

/** After the writing, and in any case not before whoever waits for the result has it. */
async function whenWritten(writes: readonly Promise<void>[], report: Report): Promise<void> {
  const nextTurn = new Promise<void>((resolve) => setTimeout(resolve, 0));
  const written = writes.map((write) => write.catch((error) => report("Publishing findings", error)));
  await Promise.all([nextTurn, ...written]);
}
