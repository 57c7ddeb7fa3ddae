/**
 * Hands a new result to every surface: diagnostics at once, the rest when they are on their way, since findings are what people wait for.
 *
 * The rest is the client's view, and a nudge for charts, and for hints and lenses where they differ. Where a newer result comes before its
 * turn, it is done once, for the newest. What the surfaces say is built elsewhere; this decides what is sent, and when.
 */
import type { IndexOf } from "../features/mechanismIndex.js";
import { CHART_MAY_DIFFER } from "../protocol/chartMessages.js";
import { STATE } from "../protocol/state.js";
import { currentFile } from "./current.js";
import { createDiagnosticsReader } from "./diagnostics.js";
import { createAttempt, type Report } from "./guard.js";
import { Publisher } from "./publisher.js";
import { createRefreshes, type RefreshParts, type Shown } from "./refreshes.js";
import { type ResultChanges, resultChanges, retoldFiles } from "./resultChanges.js";
import type { Result } from "./session.js";
import { createStateReader } from "./stateMessage.js";
import type { Texts } from "./texts.js";

export interface ResultsParts extends RefreshParts {
  readonly indexOf: IndexOf;
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
  readonly shown: Shown | undefined;
}

export function showResults(parts: ResultsParts): Results {
  const { connection, indexOf, report } = parts;
  const attempt = createAttempt(report);
  const refreshes = createRefreshes(parts, attempt);
  let writes: Promise<void>[] = [];
  const publisher = new Publisher((params) => writes.push(connection.sendDiagnostics(params)));
  const diagnosticsOf = createDiagnosticsReader();
  let stateOf = createStateReader(indexOf, true);
  let untold: Untold | undefined;
  /** The last one that all was told of. */
  let told: Result | undefined;

  const tellState = ({ result, texts }: Untold, changes: ResultChanges | undefined) => {
    const send = () => {
      const message = stateOf(result, (file) => texts.uriOf(file), changes);
      return message && connection.sendNotification(STATE, message);
    };
    const fail = (error: unknown) => {
      // What the client has is not known now: the next state is told whole.
      stateOf = createStateReader(indexOf, false);
      report("Telling the state", error);
    };
    try {
      send()?.catch(fail);
    } catch (error) {
      fail(error);
    }
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
    const retold = before && changes && attempt("Comparing files", () => retoldFiles(before, of, changes));
    // Whoever asked before there was anything is asked to ask again.
    if (before === undefined) refreshes.all();
    else refreshes.whereOther(rest.shown, of, retold);
    connection.tracer.log(`${of.analysis.inFile.size} files, ${of.analysis.findingsIn.size} of them with findings.`);
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
    refresh: () => refreshes.all(),
    refreshLenses: () => refreshes.lenses(),
    dispose() {
      untold = undefined;
    },
  };
}

function shownBeside(texts: Texts, told: Result | undefined): Shown {
  return new Map(texts.openKeys().map((file) => [file, told && currentFile(texts, told, file)]));
}

/** After the writing, and in any case not before whoever waits for the result has it. */
async function whenWritten(writes: readonly Promise<void>[], report: Report): Promise<void> {
  const nextTurn = new Promise<void>((resolve) => setTimeout(resolve, 0));
  const written = writes.map((write) => write.catch((error) => report("Publishing findings", error)));
  await Promise.all([nextTurn, ...written]);
}
