/**
 * Which files' texts changed between two snapshots, so that an analysis need not compare all of them.
 *
 * Names a file too many rather than one too few, and says that it does not know where more than sources changed.
 */
import { isSourceName } from "../analysis/sources.js";
import type { Changes, Snapshot } from "../evaluator/value.js";
import type { ImportsView } from "./imports.js";

/** Changes that are kept. */
const MOST = 1000;

interface Moment {
  readonly at: number;
  readonly imports: ImportsView;
}

export class TextChanges implements Changes {
  #files: string[] = [];
  /** How many were noted before those. */
  #forgotten = 0;
  /** By what reads the texts: a snapshot that was made out of another one reads in its own way. */
  readonly #moments = new WeakMap<Snapshot["read"], Moment>();

  note(file: string): void {
    this.#files.push(file);
    if (this.#files.length <= 2 * MOST) return;
    this.#forgotten += this.#files.length - MOST;
    this.#files = this.#files.slice(-MOST);
  }

  /** Marks what reads the texts of now. */
  mark(read: Snapshot["read"], imports: ImportsView): void {
    this.#moments.set(read, { at: this.#forgotten + this.#files.length, imports });
  }

  between(one: Snapshot, other: Snapshot): ReadonlySet<string> | undefined {
    const [before, after] = [this.#moments.get(one.read), this.#moments.get(other.read)];
    if (before === undefined || after === undefined) return undefined;
    const isSame = before.imports.open === after.imports.open && before.imports.saved === after.imports.saved;
    const from = Math.min(before.at, after.at) - this.#forgotten;
    if (!isSame || from < 0) return undefined;
    const changed = new Set(this.#files.slice(from));
    // Settings, projects and packages decide about other files.
    return [...changed].every(isSourceName) ? changed : undefined;
  }
}
