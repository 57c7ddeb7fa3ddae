/**
 * The files of the workspace that mention the declarations, who imports whom, and the disk texts that were asked for, kept true by change
 * events.
 *
 * Every event leads to reading the file again, so that their order doesn't matter. Never watches or polls; unsaved text is not its business.
 */
import { isSourceName, mentionsDeclarations } from "../analysis/sources.js";
import { type FileHost, isBelowSkippedFolder } from "./discovery.js";
import { pathBelow } from "./fileKeys.js";
import type { Texts } from "./texts.js";

export type FileEventKind = "created" | "changed" | "deleted";

export interface FileEvent {
  readonly file: string;
  readonly kind: FileEventKind;
}

const READS_AT_ONCE = 32;

export class WorkspaceFiles {
  readonly #texts: Texts;
  readonly #host: FileHost;
  readonly #onMention: () => void;
  readonly #mentioning = new Set<string>();
  /** The latest read of each file that is being read: an earlier one that ends later is thrown away. */
  readonly #reads = new Map<string, symbol>();
  #folders: readonly string[] = [];

  /** `onMention`: called at each file that mentions the declarations, before the others are read. */
  constructor(texts: Texts, host: FileHost, onMention: () => void) {
    this.#texts = texts;
    this.#host = host;
    this.#onMention = onMention;
  }

  /** Files on disk that mention the declarations. */
  get mentioning(): ReadonlySet<string> {
    return this.#mentioning;
  }

  isInWorkspace(file: string): boolean {
    return this.#pathInWorkspace(file) !== undefined;
  }

  /** True where a file may declare something: outside of installed packages, and of the workspace's hidden folders. */
  accepts(file: string): boolean {
    if (file.startsWith("untitled:")) return true;
    if (!isSourceName(file)) return false;
    const path = this.#pathInWorkspace(file);
    return path === undefined ? !file.includes("/node_modules/") : !isBelowSkippedFolder(path);
  }

  /** Replaces the workspace folders, forgets files outside of them and reads the new ones. */
  async setFolders(folders: readonly string[]): Promise<void> {
    const { imports } = this.#texts;
    const added = folders.filter((folder) => !this.#folders.includes(folder));
    // A folder inside another one counts for itself.
    this.#folders = folders.toSorted((a, b) => b.length - a.length);
    for (const file of this.#mentioning) if (!this.isInWorkspace(file)) this.#mentioning.delete(file);
    for (const file of [...imports.diskFiles()]) if (!this.isInWorkspace(file)) imports.setDiskText(file, null);
    for (const folder of added) await this.#scan(folder);
    imports.markWhole();
  }

  /** Loads texts that an analysis asked for; what is known already stays. */
  async load(files: readonly string[]): Promise<void> {
    const unknown = files.filter((file) => this.#texts.diskText(file) === undefined);
    await inBatches(unknown, async (file) => {
      const text = await this.#read(file);
      if (text !== undefined) this.#texts.setDiskText(file, text);
    });
  }

  /** Makes what is known true again after changes on disk; says whether anything changed. */
  async handle(events: readonly FileEvent[]): Promise<boolean> {
    const stale = new Set<string>();
    for (const { file } of events) if (this.#isKnown(file) || this.#isCandidate(file)) stale.add(file);
    // A folder that comes or goes may be announced alone, without what it holds.
    const folders = new Set(events.flatMap(({ file, kind }) => (kind === "changed" || isSourceName(file) ? [] : [file])));
    if (folders.size > 0) for (const file of this.#known()) if (hasFolder(file, folders)) stale.add(file);
    let changed = await this.refresh([...stale]);
    for (const { file, kind } of events) {
      if (kind !== "created" || isSourceName(file) || !this.#mayHoldSources(file)) continue;
      if (await this.#scan(file)) changed = true;
    }
    return changed;
  }

  /** Reads files again; says whether anything changed. */
  async refresh(files: readonly string[]): Promise<boolean> {
    let changed = false;
    await inBatches(files, async (file) => {
      const text = await this.#read(file);
      if (text !== undefined && this.#apply(file, text)) changed = true;
    });
    return changed;
  }

  /** Drops the disk texts that nothing needs any more. */
  forgetAllBut(needed: ReadonlySet<string>): void {
    for (const file of [...this.#texts.diskKeys()]) {
      if (!needed.has(file) && !this.#mentioning.has(file)) this.#texts.forgetDiskText(file);
    }
  }

  async #scan(folder: string): Promise<boolean> {
    let changed = false;
    for await (const files of this.#host.listSources(folder)) {
      const unread = files.filter((file) => !this.#mentioning.has(file) && this.#isCandidate(file));
      if (await this.refresh(unread)) changed = true;
    }
    return changed;
  }

  /** `undefined` when a later read of the same file has started meanwhile. */
  async #read(file: string): Promise<string | null | undefined> {
    const read = Symbol(file);
    this.#reads.set(file, read);
    const text = await this.#host.readFile(file);
    if (this.#reads.get(file) !== read) return undefined;
    this.#reads.delete(file);
    return text;
  }

  #apply(file: string, text: string | null): boolean {
    const source = this.#isCandidate(file) ? text : null;
    const mentions = source !== null && mentionsDeclarations(source);
    const importsOthers = this.#texts.imports.setDiskText(file, source);
    const before = this.#texts.diskText(file);
    const mattered = this.#isKnown(file);
    if (mentions) {
      this.#mentioning.add(file);
      this.#onMention();
    } else this.#mentioning.delete(file);
    if (mentions || mattered) this.#texts.setDiskText(file, text);
    return importsOthers || ((mentions || mattered) && before !== text);
  }

  #isKnown(file: string): boolean {
    return this.#mentioning.has(file) || this.#texts.diskText(file) !== undefined;
  }

  *#known(): Iterable<string> {
    yield* this.#mentioning;
    yield* this.#texts.diskKeys();
    yield* this.#texts.imports.diskFiles();
  }

  #isCandidate(file: string): boolean {
    return this.isInWorkspace(file) && this.accepts(file);
  }

  #mayHoldSources(folder: string): boolean {
    const path = this.#pathInWorkspace(`${folder}/x`);
    return path !== undefined && !isBelowSkippedFolder(path);
  }

  #pathInWorkspace(file: string): string | undefined {
    for (const folder of this.#folders) {
      const path = pathBelow(folder, file);
      if (path !== undefined) return path;
    }
    return undefined;
  }
}

function hasFolder(file: string, folders: ReadonlySet<string>): boolean {
  for (let end = file.lastIndexOf("/"); end > 0; end = file.lastIndexOf("/", end - 1)) {
    if (folders.has(file.slice(0, end))) return true;
  }
  return false;
}

async function inBatches(files: readonly string[], work: (file: string) => Promise<void>): Promise<void> {
  for (let start = 0; start < files.length; start += READS_AT_ONCE) {
    await Promise.all(files.slice(start, start + READS_AT_ONCE).map(work));
  }
}
