/**
 * Every call to a definition once, under the file that it stands in.
 *
 * A call in a shared helper is evaluated by the files that call the helper, for they know its parameters; in its own file there is but an
 * open run, in which nothing is known. That one counts only while there is no other.
 */
import type { DefinitionCall, FileEvaluation } from "../evaluator/value.js";
import { type ByFile, createKeeper } from "./byFile.js";
import { groupBy, sameItems, union } from "./lists.js";
import { spanKey } from "./spans.js";

type Evaluations = ReadonlyMap<string, FileEvaluation>;

/**
 * Calls of a file in order of position; several runs of one call stand together, in the order in which they were met. An evaluation
 * whose calls are the same as before is the same object.
 */
export function createCallPlacer(): (evaluated: ByFile<FileEvaluation>) => ByFile<FileEvaluation> {
  const kept = createKeeper<FileEvaluation>();
  /** Files with calls that stand elsewhere or may not count. */
  const special = new Set<string>();
  return ({ of, changed }) => {
    const wasSpecial = special.size > 0;
    for (const file of changed) {
      if (isSpecial(of.get(file))) special.add(file);
      else special.delete(file);
    }
    if (!wasSpecial && special.size === 0) return kept.update(of, changed, (file) => of.get(file));
    const placed = placeAll(of);
    // An evaluation that is made anew with the calls that it had is not another one.
    return kept.update(of, union(kept.of.keys(), of.keys()), (file) => {
      const [own, now, before] = [of.get(file), placed.get(file), kept.of.get(file)];
      if (own === undefined || now === undefined) return undefined;
      if (sameItems(own.calls, now)) return own;
      return before !== undefined && !changed.has(file) && sameItems(before.calls, now) ? before : { ...own, calls: now };
    });
  };
}

function isSpecial(evaluation: FileEvaluation | undefined): boolean {
  return evaluation?.calls.some(({ span, open }) => span.file !== evaluation.file || open === true) === true;
}

/** The calls of every file. */
function placeAll(files: Evaluations): ReadonlyMap<string, readonly DefinitionCall[]> {
  const all = [...files.values()];
  const moved = all.flatMap(({ file, calls }) => calls.filter(({ span }) => span.file !== file));
  const counts = createCounter(all);
  const arrived = groupBy(moved, ({ span }) => span.file);
  const placed = new Map<string, readonly DefinitionCall[]>();
  for (const [file, evaluation] of files) {
    // Where the helper's file is not among the files, its calls stay with the first who reaches it.
    const own = evaluation.calls.filter(({ span }) => span.file === file || !files.has(span.file));
    placed.set(file, [...own, ...(arrived.get(file) ?? [])].filter(counts).sort(byPlace));
  }
  return placed;
}

/** Says of each call once whether it counts. */
function createCounter(evaluations: readonly FileEvaluation[]): (call: DefinitionCall) => boolean {
  const closed = new Set<string>();
  for (const { calls } of evaluations) for (const call of calls) if (call.open !== true) closed.add(spanKey(call.span));
  const seen = new Set<DefinitionCall>();
  return (call) => seen.size < seen.add(call).size && (call.open !== true || !closed.has(spanKey(call.span)));
}

function byPlace({ span: a }: DefinitionCall, { span: b }: DefinitionCall): number {
  return a.file === b.file ? a.start - b.start || b.end - a.end : a.file < b.file ? -1 : 1;
}
