/**
 * Which files an analysis evaluates: the roots, what they import, and the files that use declarations through one of these.
 *
 * A file may declare mechanisms without naming the library: through a file that passes the builders on, or through a shared helper. Such
 * files are found by who imports whom, as far as the snapshot knows. Where the snapshot tells which texts changed, only what rests on
 * them is looked at again.
 */
import { SPECIFIER } from "../declarations/table.js";
import type { Evaluator } from "../evaluator/evaluator.js";
import type { FileEvaluation, Snapshot } from "../evaluator/value.js";
import { type ByFile, createKeeper } from "./byFile.js";
import { sameItems } from "./lists.js";
import { mentionsDeclarations } from "./sources.js";

/** More files than these are not looked into for the one helper that they may use. */
const MOST_IMPORTERS = 2000;

export interface Evaluated extends ByFile<FileEvaluation> {
  readonly wanted: ReadonlySet<string>;
  /** Only texts of the same sources changed: no settings, and no file came or went. */
  readonly isSameProject: boolean;
}

type Evaluations = ReadonlyMap<string, FileEvaluation>;

interface Round {
  readonly roots: readonly string[];
  readonly snapshot: Snapshot;
  readonly wanted: ReadonlySet<string>;
  /** By file, read or looked for, those whose evaluations rest on it. */
  readonly users: ReadonlyMap<string, readonly string[]>;
}

export function createEvaluations(evaluator: Evaluator): (roots: readonly string[], snapshot: Snapshot) => Evaluated {
  const kept = createKeeper<FileEvaluation>();
  let last: Round | undefined;
  return (roots, snapshot) => {
    const before = last;
    const changes = before && evaluateChanged(evaluator, kept.of, before, roots, snapshot);
    if (before !== undefined && changes !== undefined) {
      last = { ...before, snapshot };
      const result = kept.update(kept.of, changes.keys(), (file) => changes.get(file));
      return { ...result, wanted: before.wanted, isSameProject: true };
    }
    const { files, wanted } = evaluateAll(evaluator, roots, snapshot);
    last = { roots, snapshot, wanted, users: indexUsers(files) };
    const touched = new Set([...kept.of.keys(), ...files.keys()]);
    return { ...kept.update(files, touched, (file) => files.get(file)), wanted, isSameProject: false };
  };
}

/** The evaluations that changed; `undefined` where other files may have to be evaluated than before. */
function evaluateChanged(
  evaluator: Evaluator,
  files: Evaluations,
  last: Round,
  roots: readonly string[],
  snapshot: Snapshot,
): Evaluations | undefined {
  const texts = snapshot.changes?.between(last.snapshot, snapshot);
  if (texts === undefined || !sameItems(roots, last.roots)) return undefined;
  const touched = new Set<string>();
  for (const file of texts) {
    const users = last.users.get(file);
    const isWorth = isWorthEvaluating(file, snapshot);
    const isRoot = roots.includes(file);
    if (files.has(file) ? !isWorth && !(isRoot && isThere(file, snapshot)) : isRoot || (isWorth && users !== undefined)) {
      return undefined;
    }
    for (const user of users ?? []) touched.add(user);
  }
  const changed = new Map<string, FileEvaluation>();
  for (const file of touched) {
    const before = files.get(file);
    const now = evaluator.evaluateFile(file, snapshot);
    if (now === before) continue;
    if (before === undefined || !leadsToTheSame(before, now)) return undefined;
    changed.set(file, now);
  }
  return changed;
}

function leadsToTheSame(one: FileEvaluation, other: FileEvaluation): boolean {
  return (
    sameItems(one.dependencies, other.dependencies) &&
    sameItems(one.wanted, other.wanted) &&
    sameItems(one.missing, other.missing) &&
    sameItems(one.passesOn ?? [], other.passesOn ?? []) &&
    isPasser(one) === isPasser(other)
  );
}

function indexUsers(files: Evaluations): ReadonlyMap<string, readonly string[]> {
  const users = new Map<string, string[]>();
  for (const [file, { dependencies, wanted, missing }] of files) {
    for (const list of [dependencies, wanted, missing]) {
      for (const one of list) {
        const known = users.get(one);
        if (known === undefined) users.set(one, [file]);
        else known.push(file);
      }
    }
  }
  return users;
}

/** In order of name, with what the snapshot lacks. */
function evaluateAll(evaluator: Evaluator, roots: readonly string[], snapshot: Snapshot) {
  const files = new Map<string, FileEvaluation>();
  const wanted = new Set<string>();
  const passers = new Set<string>();
  const evaluateFrom = (starts: readonly string[]): void => {
    const queue = [...starts];
    for (let file = queue.pop(); file !== undefined; file = queue.pop()) {
      if (files.has(file)) continue;
      const text = snapshot.read(file);
      if (text === undefined) wanted.add(file);
      if (typeof text !== "string") continue;
      const evaluation = evaluator.evaluateFile(file, snapshot);
      files.set(file, evaluation);
      for (const one of evaluation.wanted) wanted.add(one);
      queue.push(...evaluation.dependencies.filter((one) => !files.has(one) && isWorthEvaluating(one, snapshot)));
      if (isPasser(evaluation)) passers.add(file);
    }
  };
  evaluateFrom(roots);
  let looked = 0;
  // What is found to pass something on joins at the end.
  for (const passer of passers) {
    for (const importer of evaluator.importersOf(passer, snapshot, wanted)) {
      if (!files.has(importer) && looked++ < MOST_IMPORTERS) evaluateFrom([importer]);
      if (files.get(importer)?.passesOn?.includes(passer)) passers.add(importer);
    }
  }
  return { files: new Map([...files].sort(([a], [b]) => (a < b ? -1 : 1))), wanted };
}

/** Whether a file hands out the builders, or a helper that declares with the parameters of its callers. */
function isPasser({ passesOn, calls }: FileEvaluation): boolean {
  return passesOn?.includes(SPECIFIER) === true || calls.some(({ open }) => open);
}

/** A file that was found through a link is evaluated under its own name. */
function isWorthEvaluating(file: string, snapshot: Snapshot): boolean {
  const text = snapshot.read(file);
  return typeof text === "string" && mentionsDeclarations(text) && (snapshot.canonical?.(file) ?? file) === file;
}

function isThere(file: string, snapshot: Snapshot): boolean {
  return typeof snapshot.read(file) === "string";
}
