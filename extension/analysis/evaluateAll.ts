/**
 * Which files an analysis evaluates: the roots, what they import, and the files that use declarations through one of these.
 *
 * A file may declare mechanisms without naming the library: through a file that passes the builders on, or through a shared helper. Such
 * files are found by who imports whom, as far as the snapshot knows.
 */
import { SPECIFIER } from "../declarations/table.js";
import type { Evaluator } from "../evaluator/evaluator.js";
import type { FileEvaluation, Snapshot } from "../evaluator/value.js";
import { mentionsDeclarations } from "./sources.js";

/** More files than these are not looked into for the one helper that they may use. */
const MOST_IMPORTERS = 2000;

export interface Evaluated {
  /** In order of name. */
  readonly files: ReadonlyMap<string, FileEvaluation>;
  readonly wanted: ReadonlySet<string>;
}

export function evaluateAll(evaluator: Evaluator, roots: readonly string[], snapshot: Snapshot): Evaluated {
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
