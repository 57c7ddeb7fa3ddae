/**
 * The requests that the client makes, each answered from the last good result.
 *
 * Waits for the result of the newest text only where an older one would mislead, and never for long.
 */
import type { ClientCapabilities, Connection } from "vscode-languageserver";
import { CHART, CHART_EDITS, chartQuestionSchema } from "../protocol/chartMessages.js";
import { COMMIT_MOVED } from "../protocol/committed.js";
import { FIND_PLACE, spanSchema } from "../protocol/place.js";
import { readMessage } from "../protocol/readMessage.js";
import { ChartAnswers } from "./answers/chart.js";
import { answerCodeActions } from "./answers/codeActions.js";
import { answerCodeLenses, type LensesOf, resolveCodeLens } from "./answers/codeLenses.js";
import { answerCompletions, mayHoldUnit } from "./answers/completions.js";
import { answerFindPlace } from "./answers/findPlace.js";
import { answerHover } from "./answers/hover.js";
import { answerInlayHints, type HintsOf } from "./answers/inlayHints.js";
import { answerWorkspaceSymbols } from "./answers/workspaceSymbols.js";
import type { CommittedMechanisms } from "./committed.js";
import { type CurrentFile, currentFile } from "./current.js";
import type { DisplaySettingsReader } from "./displaySettings.js";
import { keyOf } from "./fileKeys.js";
import type { Guard } from "./guard.js";
import { createLineMap } from "./lineMap.js";
import { createProposer } from "./proposer.js";
import type { Session } from "./session.js";

export interface RequestParts {
  readonly connection: Connection;
  readonly guard: Guard;
  readonly session: Session;
  readonly settings: DisplaySettingsReader;
  readonly hintsOf: HintsOf;
  readonly lensesOf: LensesOf;
  readonly capabilities: ClientCapabilities;
  readonly committed: CommittedMechanisms;
  /** Commands that the client has. */
  readonly commands: readonly string[];
}

/** How long an answer may wait for the first result, or for that of an edit just made. */
const PATIENCE_MS = 2000;

export function answerRequests({
  connection,
  guard,
  session,
  settings,
  hintsOf,
  lensesOf,
  capabilities,
  committed,
  commands,
}: RequestParts): void {
  const { texts } = session;
  const lastOf = (uri: string): CurrentFile | undefined => session.result && currentFile(texts, session.result, keyOf(uri));
  /** Whatever is known of the file; waits only when that is nothing. */
  const anyOf = async (uri: string) => {
    const known = lastOf(uri);
    if (known !== undefined) return known;
    await session.whenCurrent(PATIENCE_MS);
    return lastOf(uri);
  };
  const newestOf = async (uri: string) => {
    await session.whenCurrent(PATIENCE_MS);
    return lastOf(uri);
  };

  connection.onHover(
    guard.answer("A hover", null, async ({ textDocument, position }) => {
      const current = await newestOf(textDocument.uri);
      return current ? answerHover(current, position, commands, committed) : null;
    }),
  );
  connection.languages.inlayHint.on(
    guard.answer("Inlay hints", [], async ({ textDocument, range }) => {
      const [current, wish] = await Promise.all([anyOf(textDocument.uri), settings.of(textDocument.uri)]);
      return current ? answerInlayHints(hintsOf, current, { range, hints: wish.hints }) : [];
    }),
  );
  connection.onCodeLens(
    guard.answer("Code lenses", [], async ({ textDocument }) => {
      const [current, wish] = await Promise.all([anyOf(textDocument.uri), settings.of(textDocument.uri)]);
      return current && wish.codeLens ? answerCodeLenses(lensesOf, current) : [];
    }),
  );
  connection.onCodeLensResolve((lens) =>
    guard.answer("A code lens", lens, () =>
      session.result
        ? resolveCodeLens(lensesOf, session.result, lens, { commands, committed: committed.of(session.result) })
        : lens,
    )(),
  );
  connection.onCompletion(
    guard.answer("Completions", [], async ({ textDocument, position }) => {
      const open = texts.openText(keyOf(textDocument.uri));
      if (open === undefined || !mayHoldUnit(createLineMap(open.text), position)) return [];
      const current = await newestOf(textDocument.uri);
      return current ? answerCompletions(current, position) : [];
    }),
  );
  const canFillIn = capabilities.workspace?.workspaceEdit?.snippetEditSupport === true;
  const slices = { moment: () => session.moment };
  const propose = createProposer(slices);
  connection.onCodeAction(
    guard.answer("Quick fixes", [], async ({ textDocument, range, context }) => {
      const current = await newestOf(textDocument.uri);
      return current
        ? answerCodeActions(current, range, { texts, canFillIn, propose, commands, shown: context.diagnostics })
        : [];
    }),
  );
  connection.onWorkspaceSymbol(
    guard.answer("Symbols", [], async ({ query }) => {
      const result = await session.whenCurrent(PATIENCE_MS);
      return result ? answerWorkspaceSymbols(result, query, (file) => texts.uriOf(file)) : [];
    }),
  );
  const charts = new ChartAnswers(texts, slices);
  connection.onRequest(
    CHART,
    guard.answer("A chart", null, async (message: unknown) => {
      const question = readMessage(chartQuestionSchema, message);
      if (question !== undefined) await session.loadSaved();
      const result = question && (await session.whenCurrent(PATIENCE_MS));
      return question && result ? ((await charts.answer(result, question)) ?? null) : null;
    }),
  );
  connection.onNotification(
    COMMIT_MOVED,
    guard.act("Following commits", () => committed.moved()),
  );
  connection.onRequest(
    CHART_EDITS,
    guard.answer("Edits of a chart", null, async (message: unknown) => {
      const question = readMessage(chartQuestionSchema, message);
      const result = question && (await session.whenCurrent(PATIENCE_MS));
      return question && result ? charts.editsFor(result, question) : null;
    }),
  );
  connection.onRequest(
    FIND_PLACE,
    guard.answer("A link", null, async (message: unknown) => {
      const query = readMessage(spanSchema, message);
      return query && session.result ? answerFindPlace(texts, session.result, query) : null;
    }),
  );
}
