/**
 * One client's session: what is open, what is on disk, and the last good analysis of it all.
 *
 * One delay serves every surface: a result is handed on when it is whole, and kept until the next one is. Knows nothing of the
 * connection or of what is shown; the host gives it files, and the engine is loaded when the first file mentions the declarations.
 */
import type { TextDocumentContentChangeEvent } from "vscode-languageserver-textdocument";
import type { Analysis } from "../analysis/analysis.js";
import { nameBehindLinks } from "../analysis/linkedName.js";
import { SETTINGS_FILE } from "../analysis/settings.js";
import { mentionsDeclarations } from "../analysis/sources.js";
import type { FileHost } from "./discovery.js";
import type { Engine } from "./engine.js";
import { withoutLeftOut } from "./leaveOut.js";
import { resultOfNothing } from "./resultOfNothing.js";
import { type TextSnapshot, Texts } from "./texts.js";
import { type FileEvent, WorkspaceFiles } from "./workspaceFiles.js";

export const TYPING_DELAY_MS = 150;

/** How long documents that are opened while the workspace is read for the first time wait for the rest of it. */
export const READING_PATIENCE_MS = 100;

/** An analysis of everything, as it was at one moment. */
export interface Result {
  readonly analysis: Analysis;
  readonly snapshot: TextSnapshot;
  /** How the analysis was made, for those who ask what another text would give. */
  readonly analyse: Engine["analyse"];
}

export interface SessionOptions {
  readonly host: FileHost;
  readonly loadEngine: () => Promise<Engine>;
  /** Called with each new result, once it is whole. */
  readonly onResult: (result: Result) => void;
  readonly onError: (what: string, error: unknown) => void;
}

/** Disk texts are gone through when there are this many more than before. */
const FORGET_STEP = 256;

export class Session {
  readonly texts: Texts;
  readonly #files: WorkspaceFiles;
  readonly #options: SessionOptions;
  #engine: Promise<Engine> | undefined;
  #isLoaded = false;
  /** Wherever a settings file was looked for. */
  readonly #settingsFiles = new Set<string>();
  #forgetAbove = FORGET_STEP;
  #result: Result | undefined;
  /** Counts what happened to texts; a result of an older count is out of date. */
  #moment = 0;
  #resultMoment = -1;
  /** What the result rests on, once somebody asked. */
  #resultReads: ReadonlySet<string> | undefined;
  #timer: { readonly handle: ReturnType<typeof setTimeout>; readonly due: number } | undefined;
  #running = false;
  /** How many readings of the disk are under way; what they find may change the result. */
  #readings = 0;
  /** That of the workspace, under way or to come. */
  #isFirstReading = true;
  #waiting: (() => void)[] = [];
  #disposed = false;

  constructor(options: SessionOptions) {
    const { host } = options;
    this.#options = options;
    this.texts = new Texts({
      keepImporters: (files, snapshot) => this.#withoutLeftOut(files, snapshot).filter((file) => this.#files.accepts(file)),
      canonical: (file) => nameBehindLinks(file, (name) => host.realPath?.(name)),
    });
    // The parser loads while the other files are read.
    this.#files = new WorkspaceFiles(this.texts, host, () => void this.#load().catch(() => undefined));
  }

  /** The last good result, if there is one yet. */
  get result(): Result | undefined {
    return this.#result;
  }

  /** Counts what happened to texts: another number than before means that long work is out of date. */
  get moment(): number {
    return this.#moment;
  }

  /** Files on disk that mention the declarations. */
  get fileCount(): number {
    return this.#files.mentioning.size;
  }

  open(uri: string, version: number, text: string): void {
    this.#touch(this.texts.open(uri, version, text), this.#isFirstReading ? READING_PATIENCE_MS : 0);
  }

  change(uri: string, version: number, changes: readonly TextDocumentContentChangeEvent[]): void {
    const key = this.texts.change(uri, version, changes);
    if (key !== undefined) this.#touch(key, TYPING_DELAY_MS);
  }

  save(): void {
    if (this.#timer !== undefined) this.#start();
  }

  /** Reads what is saved of the open documents, as far as that is not known: an analysis needs only what is open. */
  async loadSaved(): Promise<void> {
    await this.#files.load(this.texts.openKeys().filter((file) => !file.startsWith("untitled:")));
  }

  /** What counts now is the disk. */
  async close(uri: string): Promise<void> {
    const key = this.texts.close(uri);
    await this.#reading(() => this.#files.refresh([key]));
    this.#touch(key, 0);
    this.#releaseIfCurrent();
  }

  async handleFileEvents(events: readonly FileEvent[]): Promise<void> {
    if (await this.#reading(() => this.#files.handle(events))) this.#schedule(TYPING_DELAY_MS);
    else this.#releaseIfCurrent();
  }

  /** Reads the workspace; the result follows when all of it is read. */
  async setFolders(folders: readonly string[]): Promise<void> {
    try {
      await this.#reading(() => this.#files.setFolders(folders));
    } finally {
      const isFirst = this.#isFirstReading;
      this.#isFirstReading = false;
      this.#schedule(0);
      if (isFirst) this.#start();
    }
  }

  /** The result for the texts of now, or the last one when that takes longer than the time given. */
  async whenCurrent(timeoutMs: number): Promise<Result | undefined> {
    if (this.#isCurrent() || this.#disposed) return this.#result;
    await new Promise<void>((resolve) => {
      const handle = setTimeout(resolve, timeoutMs);
      this.#waiting.push(() => {
        clearTimeout(handle);
        resolve();
      });
    });
    return this.#result;
  }

  dispose(): void {
    this.#disposed = true;
    clearTimeout(this.#timer?.handle);
    this.#timer = undefined;
    this.#release();
  }

  /** Most documents of a workspace have nothing to do with the result, and cost nothing. */
  #touch(key: string, delayMs: number): void {
    if (this.#mayMatter(key)) this.#schedule(delayMs);
  }

  #mayMatter(key: string): boolean {
    if (this.#result === undefined || this.#resultMoment !== this.#moment) return true;
    if (this.#files.mentioning.has(key) || this.#settingsFiles.has(key)) return true;
    const text = this.texts.openText(key)?.text;
    if (text !== undefined && this.#files.accepts(key) && mentionsDeclarations(text)) return true;
    this.#resultReads ??= filesRead(this.#result.analysis);
    return this.#resultReads.has(key) || this.texts.imports.differs(key, text);
  }

  /** Later work replaces what is planned; work that can wait less never hurries text that is being typed. */
  #schedule(delayMs: number): void {
    if (this.#disposed) return;
    this.#moment += 1;
    const due = Math.max(Date.now() + delayMs, this.#timer?.due ?? 0);
    clearTimeout(this.#timer?.handle);
    this.#timer = { due, handle: setTimeout(() => this.#start(), due - Date.now()) };
  }

  #start(): void {
    clearTimeout(this.#timer?.handle);
    this.#timer = undefined;
    if (!this.#running) void this.#run();
  }

  async #run(): Promise<void> {
    this.#running = true;
    try {
      // Texts that changed meanwhile without a timer of their own are due as well.
      while (this.#resultMoment !== this.#moment && this.#timer === undefined && !this.#disposed) await this.#analyse();
    } catch (error) {
      this.#options.onError("The analysis failed; the last result stays", error);
      this.#resultMoment = this.#moment;
    } finally {
      this.#running = false;
      this.#releaseIfCurrent();
    }
  }

  async #reading<T>(read: () => Promise<T>): Promise<T> {
    this.#readings += 1;
    try {
      return await read();
    } finally {
      this.#readings -= 1;
    }
  }

  #isCurrent(): boolean {
    return this.#resultMoment === this.#moment && this.#readings === 0 && !this.#isFirstReading;
  }

  #releaseIfCurrent(): void {
    if (this.#isCurrent()) this.#release();
  }

  /** Ends early, without a result, when newer text is waiting for its turn. */
  async #analyse(): Promise<void> {
    while (!this.#disposed) {
      if (!this.#isLoaded && this.#mentioning(this.texts.capture()).length > 0) await this.#load();
      if (this.#timer !== undefined) return;
      const moment = this.#moment;
      const snapshot = this.texts.capture();
      const mentioning = this.#mentioning(snapshot);
      if (mentioning.length === 0) return this.#accept(resultOfNothing(snapshot), moment);
      const engine = await this.#load();
      const analysis = engine.analyse(this.#withoutLeftOut(mentioning, snapshot), snapshot);
      const wanted = analysis.wanted.filter((file) => snapshot.read(file) === undefined);
      if (wanted.length === 0) return this.#accept({ analysis, snapshot, analyse: engine.analyse }, moment);
      for (const file of wanted) if (file.endsWith(`/${SETTINGS_FILE}`)) this.#settingsFiles.add(file);
      await this.#files.load(wanted);
      if (this.#timer !== undefined) return;
    }
  }

  /** Settings above the workspace leave nothing out of it, as with the command in its folder. */
  #withoutLeftOut(files: readonly string[], snapshot: Analysis["snapshot"]): readonly string[] {
    const settingsFiles = [...this.#settingsFiles].filter((file) => this.#files.isInWorkspace(file));
    return withoutLeftOut(files, settingsFiles, snapshot);
  }

  #accept(result: Result, moment: number): void {
    this.#result = result;
    this.#resultReads = undefined;
    this.#resultMoment = moment;
    this.#options.onResult(result);
    this.texts.forgetEditsUpTo(result.snapshot.versions);
    this.#forgetUnused(result.analysis);
  }

  #mentioning(snapshot: TextSnapshot): readonly string[] {
    const open = [...snapshot.versions.keys()].filter(
      (file) => this.#files.accepts(file) && mentionsDeclarations(snapshot.read(file) ?? ""),
    );
    // What people look at comes first; the rest follows when all of it is read.
    if (this.#isFirstReading) return open;
    return [...open, ...[...this.#files.mentioning].filter((file) => !snapshot.versions.has(file))];
  }

  /** Half-typed imports ask for many files that never were. */
  #forgetUnused(analysis: Analysis): void {
    if (this.texts.diskSize < this.#forgetAbove) return;
    this.#resultReads ??= filesRead(analysis);
    const needed = new Set([...this.#settingsFiles, ...this.#resultReads]);
    this.#files.forgetAllBut(needed);
    this.#forgetAbove = 2 * this.texts.diskSize + FORGET_STEP;
  }

  /** A failure is not kept: the next analysis tries again. */
  #load(): Promise<Engine> {
    this.#engine ??= this.#options.loadEngine().then(
      (engine) => {
        this.#isLoaded = true;
        return engine;
      },
      (error) => {
        this.#engine = undefined;
        throw error;
      },
    );
    return this.#engine;
  }

  #release(): void {
    const waiting = this.#waiting;
    this.#waiting = [];
    for (const resolve of waiting) resolve();
  }
}

/** Every file that an analysis read, or looked for in vain. */
function filesRead({ files }: Analysis): ReadonlySet<string> {
  const read = new Set<string>();
  for (const { file, dependencies, missing } of files.values()) {
    read.add(file);
    for (const one of dependencies) read.add(one);
    for (const one of missing) read.add(one);
  }
  return read;
}
