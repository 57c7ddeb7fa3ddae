/**
 * What the client was told about each file's diagnostics, so that only changes are sent and nothing stays behind.
 *
 * Decides when to send; what diagnostics say is not its business.
 */
import type { Diagnostic, PublishDiagnosticsParams } from "vscode-languageserver";
import { sameItems } from "./diagnostics.js";

export interface FileDiagnostics {
  readonly uri: string;
  /** The version of the open document that they are for; absent when it isn't open. */
  readonly version?: number | undefined;
  readonly diagnostics: readonly Diagnostic[];
}

interface Published {
  readonly uri: string;
  readonly version: number | undefined;
  readonly diagnostics: readonly Diagnostic[];
  readonly content: string;
}

const NOTHING = "[]";

export class Publisher {
  readonly #published = new Map<string, Published>();
  readonly #send: (params: PublishDiagnosticsParams) => void;

  constructor(send: (params: PublishDiagnosticsParams) => void) {
    this.#send = send;
  }

  /** Replaces everything; files that are absent have none. */
  publish(current: ReadonlyMap<string, FileDiagnostics>): void {
    for (const [file, before] of this.#published) {
      const now = current.get(file);
      if (now !== undefined && now.uri === before.uri) continue;
      if (before.content !== NOTHING) this.#send({ uri: before.uri, diagnostics: [] });
      this.#published.delete(file);
    }
    for (const [file, { uri, version, diagnostics }] of current) {
      const before = this.#published.get(file);
      const isAsBefore = before !== undefined && sameItems(before.diagnostics, diagnostics);
      const content = isAsBefore ? before.content : JSON.stringify(diagnostics);
      // A newer version is told even of the same diagnostics: typing may have moved what the editor shows of the old ones.
      const same = content === (before?.content ?? NOTHING) && (content === NOTHING || version === before?.version);
      if (!same) this.#send({ uri, ...(version === undefined ? {} : { version }), diagnostics: [...diagnostics] });
      this.#published.set(file, { uri, version, diagnostics, content });
    }
  }
}
