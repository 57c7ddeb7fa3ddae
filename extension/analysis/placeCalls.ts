/**
 * Every call to a definition once, under the file that it stands in.
 *
 * A call in a shared helper is evaluated by the files that call the helper, for they know its parameters; in its own file there is but an
 * open run, in which nothing is known. That one counts only while there is no other.
 */
import type { DefinitionCall, FileEvaluation } from "../evaluator/value.js";

type Evaluations = ReadonlyMap<string, FileEvaluation>;

/**
 * `files` in order of name, calls in order of position; several runs of one call stand together, in the order in which they were met. An
 * evaluation whose calls are the same as before is the same object.
 */
export function createCallPlacer(): (files: Evaluations) => Evaluations {
  const known = new WeakMap<FileEvaluation, FileEvaluation>();
  return (files) => {
    const all = [...files.values()];
    const moved = all.flatMap(({ file, calls }) => calls.filter(({ span }) => span.file !== file));
    if (moved.length === 0 && !all.some(({ calls }) => calls.some(({ open }) => open))) return files;
    const counts = createCounter(all);
    const arrived = groupByFile(moved);
    const placed = new Map<string, FileEvaluation>();
    for (const [file, evaluation] of files) {
      // Where the helper's file is not among the files, its calls stay with the first who reaches it.
      const own = evaluation.calls.filter(({ span }) => span.file === file || !files.has(span.file));
      const calls = [...own, ...(arrived.get(file) ?? [])].filter(counts).sort(byPlace);
      const like = [evaluation, known.get(evaluation)].find((one) => one !== undefined && sameCalls(one.calls, calls));
      const result = like ?? { ...evaluation, calls };
      known.set(evaluation, result);
      placed.set(file, result);
    }
    return placed;
  };
}

/** Says of each call once whether it counts. */
function createCounter(evaluations: readonly FileEvaluation[]): (call: DefinitionCall) => boolean {
  const closed = new Set<string>();
  for (const { calls } of evaluations) for (const call of calls) if (call.open !== true) closed.add(keyOf(call));
  const seen = new Set<DefinitionCall>();
  return (call) => seen.size < seen.add(call).size && (call.open !== true || !closed.has(keyOf(call)));
}

function groupByFile(calls: readonly DefinitionCall[]): ReadonlyMap<string, DefinitionCall[]> {
  const groups = new Map<string, DefinitionCall[]>();
  for (const call of calls) {
    const group = groups.get(call.span.file);
    if (group === undefined) groups.set(call.span.file, [call]);
    else group.push(call);
  }
  return groups;
}

function sameCalls(a: readonly DefinitionCall[], b: readonly DefinitionCall[]): boolean {
  return a.length === b.length && a.every((call, index) => call === b[index]);
}

function byPlace({ span: a }: DefinitionCall, { span: b }: DefinitionCall): number {
  return a.file === b.file ? a.start - b.start || b.end - a.end : a.file < b.file ? -1 : 1;
}

function keyOf({ span: { file, start, end } }: DefinitionCall): string {
  return `${start} ${end} ${file}`;
}
