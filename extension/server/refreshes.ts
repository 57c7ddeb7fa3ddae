/** Wishes that the client ask anew for hints and lenses: on request, or where they differ from those shown. */
import type { ClientCapabilities, Connection } from "vscode-languageserver";
import type { Committed } from "../features/sinceCommit.js";
import { changesCodeLenses, type LensesOf } from "./answers/codeLenses.js";
import { changesInlayHints, type HintsOf } from "./answers/inlayHints.js";
import type { CurrentFile } from "./current.js";
import type { Attempt, Report } from "./guard.js";
import type { Result } from "./session.js";

export interface RefreshParts {
  readonly connection: Connection;
  readonly capabilities: ClientCapabilities;
  readonly hintsOf: HintsOf;
  readonly lensesOf: LensesOf;
  /** What is known of the last commit. */
  readonly committedOf: (result: Result) => Committed;
  readonly report: Report;
}

/** What is shown beside each open document, moved along with its text; `undefined` for a text that nothing is known of. */
export type Shown = ReadonlyMap<string, CurrentFile | undefined>;

export interface Refreshes {
  all(): void;
  lenses(): void;
  /**
   * `shown`: `undefined` where it is not known, as between two results that were told, when somebody may have been shown a third.
   * `files`: where something else may be shown; `undefined`: anywhere.
   */
  whereOther(shown: Shown | undefined, next: Result, files: ReadonlySet<string> | undefined): void;
}

export function createRefreshes(parts: RefreshParts, attempt: Attempt): Refreshes {
  const { connection, capabilities, hintsOf, lensesOf, committedOf, report } = parts;
  const canRefreshHints = capabilities.workspace?.inlayHint?.refreshSupport === true;
  const canRefreshLenses = capabilities.workspace?.codeLens?.refreshSupport === true;
  const hints = () => {
    if (canRefreshHints) connection.languages.inlayHint.refresh().catch((error) => report("Refreshing hints", error));
  };
  const lenses = () => {
    if (canRefreshLenses)
      connection.sendRequest("workspace/codeLens/refresh").catch((error) => report("Refreshing lenses", error));
  };
  const all = () => {
    hints();
    lenses();
  };
  return {
    all,
    lenses,
    whereOther(shown, next, files) {
      if (shown === undefined) return all();
      const beside = [...shown].filter(([file]) => files?.has(file) ?? true);
      attempt("Comparing hints", () => {
        if (beside.some(([file, before]) => changesInlayHints(hintsOf, before, next, file))) hints();
      });
      attempt("Comparing lenses", () => {
        if (beside.some(([file, before]) => changesCodeLenses(lensesOf, before, next, file, committedOf))) lenses();
      });
    },
  };
}
