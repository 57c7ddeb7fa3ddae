/**
 * Who imports whom in the workspace: open documents, unsaved text and all, over the sources on disk.
 *
 * Keeps no text but those of open documents, and hands out views that never change. Reads nothing, and does not know which files count.
 */
import { createImportIndex, type ImportView, sameWords } from "../evaluator/importIndex.js";

type ImportersOf = (file: string, aliases: readonly string[]) => readonly string[] | undefined;

export interface ImportsView {
  /** Sorted; `undefined` while the workspace is being read. */
  readonly importersOf: ImportersOf;
  /** The disk's alone; `undefined` while the workspace is being read, else the same object as long as nothing changes. */
  readonly saved: ImportView | undefined;
  /** The same for the open documents alone. */
  readonly open: ImportView | undefined;
}

export class Imports {
  readonly #disk = createImportIndex();
  readonly #open = createImportIndex();
  /** As they were when they were last looked at. */
  readonly #openTexts = new Map<string, string>();
  #isWhole = false;

  /** Sources on disk that were looked at. */
  diskFiles(): Iterable<string> {
    return this.#disk.files();
  }

  /** `null`: there is no such file, or it no longer counts. Says whether it imports something else than before. */
  setDiskText(file: string, text: string | null): boolean {
    return text === null ? this.#disk.delete(file) : this.#disk.set(file, text);
  }

  /** The workspace was read: from now on, who is not known here is not there. */
  markWhole(): void {
    this.#isWhole = true;
  }

  /** Whether a file imports something else than when a view was last taken; `text` is undefined where it is not open. */
  differs(file: string, text: string | undefined): boolean {
    const index = this.#open.has(file) ? this.#open : this.#disk;
    if (text !== undefined) return text !== this.#openTexts.get(file) && index.differs(file, text);
    return !sameWords(index.wordsOf(file), this.#disk.wordsOf(file));
  }

  /** `open`: the texts of the open documents. */
  capture(open: ReadonlyMap<string, string>): ImportsView {
    for (const file of [...this.#openTexts.keys()]) if (!open.has(file)) this.#forgetOpen(file);
    for (const [file, text] of open) {
      if (this.#openTexts.get(file) === text) continue;
      this.#openTexts.set(file, text);
      this.#open.set(file, text);
    }
    if (!this.#isWhole) return { importersOf: () => undefined, saved: undefined, open: undefined };
    const [now, saved] = [this.#open.capture(), this.#disk.capture()];
    const importersOf = (file: string, aliases: readonly string[]): string[] => {
      const closed = saved.importersOf(file, aliases).filter((importer) => !now.has(importer));
      return [...closed, ...now.importersOf(file, aliases)].sort();
    };
    return { importersOf, saved, open: now };
  }

  #forgetOpen(file: string): void {
    this.#openTexts.delete(file);
    this.#open.delete(file);
  }
}
