/**
 * The mechanisms as the last commit has them, for those who show what changed since.
 *
 * The texts are asked of the client when somebody looks, and kept, analysed, until it says that the commit moved. Nothing polls, and
 * nothing waits here while text is being typed: who looks too early gets nothing, and is told when there is more.
 */
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";
import type { Snapshot } from "../evaluator/value.js";
import { type Committed, NO_COMMIT } from "../features/sinceCommit.js";
import { type CommittedAnswer, MOST_ASKED } from "../protocol/committed.js";
import type { Result } from "./session.js";

export interface CommittedParts {
  /** The client's answer; rejects, or gives `null`, where it knows no commit. */
  readonly ask: (uris: readonly string[]) => Promise<CommittedAnswer>;
  readonly uriOf: (file: string) => string;
  /** Resolves with the newest result once nothing is being typed. */
  readonly whenQuiet: () => Promise<Result | undefined>;
  /** More is known than before. */
  readonly onMore: () => void;
  readonly onError: (what: string, error: unknown) => void;
}

/** Each round asks for what the imports of the one before lead to. */
const MOST_ROUNDS = 50;

export class CommittedMechanisms {
  readonly #parts: CommittedParts;
  /** By file: the commit's text; `null` for none. */
  #texts = new Map<string, string | null>();
  #outside = new Set<string>();
  /** Files whose mechanisms somebody looked for. */
  #roots = new Set<string>();
  #known: { readonly mechanisms: ReadonlyMap<string, AnalysedMechanism>; readonly roots: ReadonlySet<string> } | undefined;
  #loading: Promise<void> | undefined;
  /** The client has no commit to tell of, until it says otherwise. */
  #isNone = false;
  /** Counts the commits; an answer about an older one is dropped. */
  #moment = 0;

  constructor(parts: CommittedParts) {
    this.#parts = parts;
  }

  /** What is known now; what is not is looked for from here on. */
  of({ analysis }: Result): Committed {
    return (mechanism) => {
      const roots = rootsOf(analysis, mechanism);
      const known = this.#find(mechanism, roots);
      if (known !== undefined || this.#isNone || roots.every((root) => this.#known?.roots.has(root))) return known;
      for (const root of roots) this.#roots.add(root);
      this.#loading ??= this.#load();
      return undefined;
    };
  }

  /** What is known now; nothing is looked for. */
  knownOf({ analysis }: Result): Committed {
    if (this.#known === undefined) return NO_COMMIT;
    return (mechanism) => this.#find(mechanism, rootsOf(analysis, mechanism));
  }

  #find({ name, call }: AnalysedMechanism, roots: readonly string[]): AnalysedMechanism | null | undefined {
    const { file } = call.span;
    if (this.#known === undefined || this.#outside.has(file)) return undefined;
    if (!roots.every((root) => this.#known?.roots.has(root))) return undefined;
    return this.#known.mechanisms.get(keyOf(file, name)) ?? null;
  }

  /** Resolves when nothing is looked for any more, or after the time given. False: there was nothing to wait for. */
  async settled(timeoutMs: number): Promise<boolean> {
    if (this.#loading === undefined) return false;
    let handle: ReturnType<typeof setTimeout> | undefined;
    const timeout = new Promise<void>((resolve) => {
      handle = setTimeout(resolve, timeoutMs);
    });
    await Promise.race([this.#loading, timeout]);
    clearTimeout(handle);
    return true;
  }

  /** The commit is another one: everything is looked for anew when somebody looks. */
  moved(): void {
    this.#moment += 1;
    this.#texts = new Map();
    this.#outside = new Set();
    this.#roots = new Set();
    this.#known = undefined;
    this.#loading = undefined;
    this.#isNone = false;
    this.#parts.onMore();
  }

  async #load(): Promise<void> {
    const moment = this.#moment;
    try {
      for (let round = 0; round < MOST_ROUNDS; round++) {
        const result = await this.#parts.whenQuiet();
        if (result === undefined || moment !== this.#moment) return;
        const roots = new Set(this.#roots);
        const wanted = new Set([...roots].filter((file) => !this.#texts.has(file)));
        if (wanted.size === 0) {
          const analysis = result.analyse([...roots], this.#snapshotBeside(result), true);
          for (const file of analysis.wanted) if (!this.#texts.has(file)) wanted.add(file);
          if (wanted.size === 0) {
            const entries = analysis.mechanisms.map((one) => [keyOf(one.call.span.file, one.name), one] as const);
            this.#known = { mechanisms: new Map(entries), roots };
            this.#parts.onMore();
            return;
          }
        }
        if (!(await this.#askFor([...wanted], result, moment))) return;
      }
    } catch (error) {
      this.#parts.onError("Reading the last commit", error);
      if (moment === this.#moment) this.#isNone = true;
    } finally {
      if (moment === this.#moment) this.#loading = undefined;
    }
  }

  /** False where there is no commit, or another one meanwhile. */
  async #askFor(files: readonly string[], result: Result, moment: number): Promise<boolean> {
    for (let from = 0; from < files.length; from += MOST_ASKED) {
      const asked = files.slice(from, from + MOST_ASKED);
      const answer = await this.#parts.ask(asked.map(this.#parts.uriOf));
      if (moment !== this.#moment) return false;
      if (answer === null) {
        this.#isNone = true;
        return false;
      }
      for (const [index, file] of asked.entries()) {
        const one = answer[index] ?? { kind: "absent" };
        // Installed packages lie in the repository's folder, but not in the repository.
        const asSaved = one.kind === "outside" || (one.kind === "absent" && file.includes("/node_modules/"));
        if (one.kind === "outside") this.#outside.add(file);
        this.#texts.set(file, one.kind === "text" ? one.text : asSaved ? (result.snapshot.saved.read(file) ?? null) : null);
      }
    }
    return true;
  }

  /** Who imports whom is taken from now: it decides only whether an exported object may have been changed elsewhere. */
  #snapshotBeside({ snapshot }: Result): Snapshot {
    const texts = this.#texts;
    return { ...snapshot, read: (file) => texts.get(file) };
  }
}

function keyOf(file: string, name: string): string {
  return JSON.stringify([file, name]);
}

/** Its file, and those of robots that may lend it their supply. */
function rootsOf(analysis: Analysis, { declared, call: { span } }: AnalysedMechanism): string[] {
  if (declared === undefined || declared.supply !== undefined) return [span.file];
  const listing = analysis.robots.filter((robot) => robot.declared?.mechanisms.includes(declared));
  return [span.file, ...listing.map(({ call }) => call.span.file)];
}
