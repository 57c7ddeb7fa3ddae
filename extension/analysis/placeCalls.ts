/**
 * Every call to a definition once, under the file that it stands in.
 *
 * A call in a shared helper is evaluated by the files that call the helper, for they know its parameters; in its own file there is but an
 * open run, in which nothing is known. That one counts only while there is no other.
 */
import type { DefinitionCall, FileEvaluation } from "../evaluator/value.js";

/** `files` in order of name, calls in order of position; several runs of one call stand together, in the order in which they were met. */
export function placeCalls(files: ReadonlyMap<string, FileEvaluation>): ReadonlyMap<string, FileEvaluation> {
  const moved = [...files.values()].flatMap(({ file, calls }) => calls.filter(({ span }) => span.file !== file));
  const isOpen = [...files.values()].some(({ calls }) => calls.some(({ open }) => open));
  if (moved.length === 0 && !isOpen) return files;
  const closed = new Set<string>();
  for (const { calls } of files.values()) for (const call of calls) if (call.open !== true) closed.add(keyOf(call));
  const arrived = new Map<string, DefinitionCall[]>();
  for (const call of moved) arrived.set(call.span.file, [...(arrived.get(call.span.file) ?? []), call]);
  const placed = new Set<DefinitionCall>();
  const isNew = (call: DefinitionCall): boolean => placed.size < placed.add(call).size;
  return new Map(
    [...files].map(([file, evaluation]) => {
      // Where the helper's file is not among the files, its calls stay with the first who reaches it.
      const own = evaluation.calls.filter(({ span }) => span.file === file || !files.has(span.file));
      const all = [...own, ...(arrived.get(file) ?? [])].filter(isNew);
      const counting = all.filter((call) => call.open !== true || !closed.has(keyOf(call)));
      return [file, { ...evaluation, calls: counting.sort(byPlace) }];
    }),
  );
}

function byPlace({ span: a }: DefinitionCall, { span: b }: DefinitionCall): number {
  return a.file === b.file ? a.start - b.start || b.end - a.end : a.file < b.file ? -1 : 1;
}

function keyOf({ span: { file, start, end } }: DefinitionCall): string {
  return `${start} ${end} ${file}`;
}
