/**
 * What the client was told about each file's diagnostics, so that only changes are sent and nothing stays behind.
 *
 * Decides when to send; what diagnostics say is not its business.
 */
import type { PublishDiagnosticsParams } from "vscode-languageserver";
import type { FileDiagnostics } from "./diagnostics.js";

export class Publisher {
  readonly #published = new Map<string, FileDiagnostics>();
  readonly #send: (params: PublishDiagnosticsParams) => void;

  constructor(send: (params: PublishDiagnosticsParams) => void) {
    this.#send = send;
  }

  /** Replaces everything; files that are absent have none. What is the same object as before is known to be told. */
  publish(current: ReadonlyMap<string, FileDiagnostics>): void {
    const others: string[] = [];
    let inBoth = 0;
    for (const [file, now] of current) {
      const before = this.#published.get(file);
      if (before !== undefined) inBoth += 1;
      if (before !== now) others.push(file);
    }
    if (inBoth < this.#published.size) {
      for (const [file, before] of this.#published) if (!current.has(file)) this.#clear(file, before);
    }
    for (const file of others) {
      const now = current.get(file);
      if (now !== undefined) this.#replace(file, now);
    }
  }

  #clear(file: string, { uri, diagnostics }: FileDiagnostics): void {
    if (diagnostics.length > 0) this.#send({ uri, diagnostics: [] });
    this.#published.delete(file);
  }

  #replace(file: string, now: FileDiagnostics): void {
    const last = this.#published.get(file);
    if (last !== undefined && last.uri !== now.uri) this.#clear(file, last);
    const before = this.#published.get(file);
    if (!isTold(before, now)) {
      const { uri, version, diagnostics } = now;
      this.#send({ uri, ...(version === undefined ? {} : { version }), diagnostics: [...diagnostics] });
    }
    this.#published.set(file, now);
  }
}

/** A newer version is told even of the same diagnostics: typing may have moved what the editor shows of the old ones. */
function isTold(before: FileDiagnostics | undefined, { version, diagnostics }: FileDiagnostics): boolean {
  if (diagnostics.length === 0) return before === undefined || before.diagnostics.length === 0;
  return before?.version === version && JSON.stringify(before?.diagnostics) === JSON.stringify(diagnostics);
}
