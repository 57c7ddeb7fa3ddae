/**
 * The texts that the server knows: open documents, unsaved text and all, over what was read from disk.
 *
 * Hands out immutable snapshots. Reads nothing itself, and doesn't know which texts matter.
 */
import { TextDocument, type TextDocumentContentChangeEvent } from "vscode-languageserver-textdocument";
import type { Snapshot } from "../evaluator/value.js";
import type { Edit } from "./editTrail.js";
import { keyOf, uriOf } from "./fileKeys.js";
import { Imports, type ImportsView } from "./imports.js";
import { createLineMap, type LineMap } from "./lineMap.js";
import { TextChanges } from "./textChanges.js";

export interface OpenText {
  /** The address that the client uses for it. */
  readonly uri: string;
  readonly version: number;
  readonly text: string;
}

export interface TextSnapshot extends Snapshot {
  /** Versions of the documents that were open. */
  readonly versions: ReadonlyMap<string, number>;
  /** The disk's texts alone; the same object as long as they stay the same. */
  readonly saved: Snapshot;
  /** False while an open document differs from its file. */
  readonly isSaved: boolean;
  lineMap(file: string): LineMap;
}

export interface TextsOptions {
  /** Of files that import another, those that count. */
  readonly keepImporters: (files: readonly string[], snapshot: Snapshot) => readonly string[];
  /** The name of a file behind links. */
  readonly canonical: (file: string) => string;
}

interface OpenDocument {
  readonly document: TextDocument;
  readonly edits: { readonly version: number; readonly edit: Edit }[];
}

export class Texts {
  readonly imports = new Imports();
  readonly #options: TextsOptions;
  readonly #open = new Map<string, OpenDocument>();
  #disk = new Map<string, string | null>();
  /** True while a snapshot shares the map of disk texts: the next change then works on a copy. */
  #diskIsShared = false;
  #saved:
    | { readonly disk: ReadonlyMap<string, string | null>; readonly imports: ImportsView["saved"]; readonly snapshot: Snapshot }
    | undefined;
  readonly #lineMaps = new Map<string, LineMap>();
  readonly #changes = new TextChanges();
  readonly #addresses = new Map<string, string>();

  constructor(options: TextsOptions) {
    this.#options = options;
  }

  /** Gives the document's key. */
  open(uri: string, version: number, text: string): string {
    const key = keyOf(uri);
    this.#changes.note(key);
    this.#open.set(key, { document: TextDocument.create(uri, "", version, text), edits: [] });
    return key;
  }

  /** Gives the document's key, or `undefined` when it is not open. */
  change(uri: string, version: number, changes: readonly TextDocumentContentChangeEvent[]): string | undefined {
    const key = keyOf(uri);
    const opened = this.#open.get(key);
    if (opened === undefined) return undefined;
    const { document, edits } = opened;
    this.#changes.note(key);
    for (const change of changes) {
      edits.push({ version, edit: editOf(document, change) });
      TextDocument.update(document, [change], version);
    }
    return key;
  }

  close(uri: string): string {
    const key = keyOf(uri);
    this.#changes.note(key);
    this.#open.delete(key);
    this.#lineMaps.delete(key);
    return key;
  }

  openText(key: string): OpenText | undefined {
    const document = this.#open.get(key)?.document;
    return document && { uri: document.uri, version: document.version, text: document.getText() };
  }

  openKeys(): readonly string[] {
    return [...this.#open.keys()];
  }

  /** What happened to an open document after a version; empty when it is not open. */
  editsSince(key: string, version: number): readonly Edit[] {
    const edits = this.#open.get(key)?.edits ?? [];
    return edits.filter((one) => one.version > version).map((one) => one.edit);
  }

  /** Drops what led up to the versions: nobody will ask for it again. */
  forgetEditsUpTo(versions: ReadonlyMap<string, number>): void {
    for (const [key, version] of versions) {
      const edits = this.#open.get(key)?.edits;
      const firstKept = edits?.findIndex((one) => one.version > version) ?? -1;
      edits?.splice(0, firstKept < 0 ? edits.length : firstKept);
    }
  }

  /** `null`: there is no such file on disk; `undefined`: not known. */
  diskText(key: string): string | null | undefined {
    return this.#disk.get(key);
  }

  diskKeys(): Iterable<string> {
    return this.#disk.keys();
  }

  get diskSize(): number {
    return this.#disk.size;
  }

  setDiskText(key: string, text: string | null): void {
    if (this.#disk.get(key) === text) return;
    this.#changes.note(key);
    this.#ownDisk().set(key, text);
  }

  forgetDiskText(key: string): void {
    if (this.#disk.has(key)) {
      this.#changes.note(key);
      this.#ownDisk().delete(key);
    }
    this.#addresses.delete(key);
    this.#lineMaps.delete(key);
  }

  /** The client's address of a file, as far as it gave one. */
  uriOf(key: string): string {
    const open = this.#open.get(key);
    if (open !== undefined) return open.document.uri;
    // Writing an address costs more than all else that is done for a place.
    const known = this.#addresses.get(key) ?? uriOf(key);
    this.#addresses.set(key, known);
    return known;
  }

  capture(): TextSnapshot {
    const open = new Map([...this.#open].map(([key, { document }]) => [key, document.getText()]));
    const versions = new Map([...this.#open].map(([key, { document }]) => [key, document.version]));
    const disk = this.#disk;
    this.#diskIsShared = true;
    const imports = this.imports.capture(open);
    const read = (file: string) => open.get(file) ?? disk.get(file);
    this.#changes.mark(read, imports);
    return {
      ...this.#snapshotOf(read, imports.importersOf),
      changes: this.#changes,
      versions,
      saved: this.#savedSnapshot(disk, imports.saved),
      isSaved: [...open].every(([file, text]) => text === (disk.get(file) ?? text)),
      lineMap: (file) => this.#lineMap(file, read(file) ?? ""),
    };
  }

  #savedSnapshot(disk: ReadonlyMap<string, string | null>, imports: ImportsView["saved"]): Snapshot {
    if (this.#saved?.disk !== disk || this.#saved.imports !== imports) {
      const snapshot = this.#snapshotOf(
        (file) => disk.get(file),
        (file, aliases) => imports?.importersOf(file, aliases),
      );
      this.#saved = { disk, imports, snapshot };
    }
    return this.#saved.snapshot;
  }

  /** Answers are kept, so that they stay the same for good. */
  #snapshotOf(read: Snapshot["read"], importersOf: ImportsView["importersOf"]): Snapshot {
    const { keepImporters, canonical } = this.#options;
    const snapshot: Snapshot = {
      read,
      canonical: keepAnswers(canonical),
      importersOf: keepAnswers((file, aliases) => {
        const importers = importersOf(file, aliases);
        return importers && keepImporters(importers, snapshot);
      }),
    };
    return snapshot;
  }

  #lineMap(file: string, text: string): LineMap {
    const known = this.#lineMaps.get(file);
    if (known?.text === text) return known;
    const lineMap = createLineMap(text);
    this.#lineMaps.set(file, lineMap);
    return lineMap;
  }

  #ownDisk(): Map<string, string | null> {
    if (this.#diskIsShared) this.#disk = new Map(this.#disk);
    this.#diskIsShared = false;
    return this.#disk;
  }
}

function keepAnswers<Answer>(
  ask: (file: string, aliases: readonly string[]) => Answer,
): (file: string, aliases?: readonly string[]) => Answer {
  const answers = new Map<string, Answer>();
  return (file, aliases = []) => {
    const key = [file, ...aliases].join("\n");
    const known = answers.get(key);
    if (known !== undefined) return known;
    const answer = ask(file, aliases);
    answers.set(key, answer);
    return answer;
  };
}

function editOf(document: TextDocument, change: TextDocumentContentChangeEvent): Edit {
  if (!("range" in change)) return smallestEdit(document.getText(), change.text);
  const start = document.offsetAt(change.range.start);
  return { start, removed: document.offsetAt(change.range.end) - start, inserted: change.text.length };
}

/** What differs between two whole texts, as one edit. */
function smallestEdit(before: string, after: string): Edit {
  const shorter = Math.min(before.length, after.length);
  let start = 0;
  while (start < shorter && before[start] === after[start]) start += 1;
  let kept = 0;
  while (kept < shorter - start && before.at(-1 - kept) === after.at(-1 - kept)) kept += 1;
  return { start, removed: before.length - start - kept, inserted: after.length - start - kept };
}
