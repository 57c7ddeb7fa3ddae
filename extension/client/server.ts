/**
 * The server as the rest of the client sees it: started once it is needed, started anew on request, and what it last said.
 *
 * Knows no host; how a language client is made is given.
 */
import * as vscode from "vscode";
import type { BaseLanguageClient } from "vscode-languageclient";
import {
  CHART,
  CHART_EDITS,
  CHART_MAY_DIFFER,
  type ChartAnswer,
  type ChartEdits,
  type ChartQuestion,
  chartAnswerSchema,
  chartEditsSchema,
} from "../protocol/chartMessages.js";
import { FIND_PLACE, type Place, type PlaceQuery, placeSchema } from "../protocol/place.js";
import { readMessage } from "../protocol/readMessage.js";
import { NO_STATE, resolveState, STATE, type State, stateMessageSchema } from "../protocol/state.js";

export type MakeClient = (onGivenUp: () => void) => Promise<BaseLanguageClient>;

export class Server implements vscode.Disposable {
  readonly #makeClient: MakeClient;
  readonly #log: vscode.LogOutputChannel;
  readonly #stateChanged = new vscode.EventEmitter<State>();
  readonly #chartMayDiffer = new vscode.EventEmitter<void>();
  #state = NO_STATE;
  /** What the server may ask, by method. */
  readonly #answers = new Map<string, (message: unknown) => Promise<unknown>>();
  #client: BaseLanguageClient | undefined;
  /** Starting and stopping happen one after the other. */
  #queue: Promise<void> = Promise.resolve();
  #wanted = false;

  constructor(makeClient: MakeClient, log: vscode.LogOutputChannel) {
    this.#makeClient = makeClient;
    this.#log = log;
  }

  readonly onDidChangeState = this.#stateChanged.event;

  /** After each result: a chart asked for before may be another one now. */
  readonly onChartMayDiffer = this.#chartMayDiffer.event;

  get state(): State {
    return this.#state;
  }

  /** True from the first wish to start it. */
  get isWanted(): boolean {
    return this.#wanted;
  }

  start(): Promise<void> {
    if (this.#wanted) return this.#queue;
    this.#wanted = true;
    return this.#next(() => this.#startClient());
  }

  restart(): Promise<void> {
    this.#wanted = true;
    return this.#next(async () => {
      await this.#stopClient();
      await this.#startClient();
    });
  }

  stop(): Promise<void> {
    this.#wanted = false;
    return this.#next(() => this.#stopClient());
  }

  dispose(): void {
    void this.stop();
    this.#stateChanged.dispose();
    this.#chartMayDiffer.dispose();
  }

  /** Answers the server's requests, each server's that is started from here on. */
  answer(method: string, handler: (message: unknown) => Promise<unknown>): void {
    this.#answers.set(method, handler);
  }

  /** Nothing while there is no server: one that starts knows nothing yet. */
  tell(method: string): void {
    if (this.#client?.isRunning()) void this.#client.sendNotification(method);
  }

  async findPlace(query: PlaceQuery): Promise<Place | undefined> {
    return readMessage(placeSchema, await this.#client?.sendRequest(FIND_PLACE, query));
  }

  /** `undefined` while there is no server, or where its answer cannot be read. */
  async askForChart(question: ChartQuestion): Promise<ChartAnswer | undefined> {
    const message = (await this.#client?.sendRequest(CHART, question)) ?? undefined;
    const answer = readMessage(chartAnswerSchema, message);
    if (message !== undefined && answer === undefined) this.#log.warn("The server sent a chart that cannot be read.");
    return answer;
  }

  /** What would write to the code what a chart wants; `undefined` where nothing would. */
  async askForChartEdits(question: ChartQuestion): Promise<ChartEdits | undefined> {
    return readMessage(chartEditsSchema, await this.#client?.sendRequest(CHART_EDITS, question)) ?? undefined;
  }

  async #startClient(): Promise<void> {
    const client = await this.#makeClient(() => void this.#giveUp());
    client.onNotification(STATE, (message) => {
      const told = readMessage(stateMessageSchema, message);
      const state = told && resolveState(this.#state, told);
      if (state === undefined) this.#log.warn("The server sent a state that cannot be read.");
      else this.#setState(state);
    });
    client.onNotification(CHART_MAY_DIFFER, () => this.#chartMayDiffer.fire());
    for (const [method, handler] of this.#answers) client.onRequest(method, handler);
    this.#client = client;
    await client.start();
  }

  async #stopClient(): Promise<void> {
    const client = this.#client;
    this.#client = undefined;
    this.#setState(NO_STATE);
    try {
      await client?.dispose();
    } catch (error) {
      // One that ended by itself cannot be stopped any more.
      this.#log.debug(`Stopping the server: ${String(error)}`);
    }
  }

  async #giveUp(): Promise<void> {
    this.#setState(NO_STATE);
    const restart = vscode.l10n.t("Restart Server");
    const showLog = vscode.l10n.t("Show Log");
    const message = vscode.l10n.t("The Loadmark server ended several times and was not started again.");
    const choice = await vscode.window.showErrorMessage(message, restart, showLog);
    if (choice === restart) await this.restart();
    if (choice === showLog) this.#log.show();
  }

  #next(work: () => Promise<void>): Promise<void> {
    this.#queue = this.#queue.then(work).catch((error) => this.#log.error(error));
    return this.#queue;
  }

  #setState(state: State): void {
    this.#state = state;
    this.#stateChanged.fire(state);
  }
}
