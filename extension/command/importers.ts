/**
 * Who imports whom among the files around what is checked, read when it is first asked for: most checks never ask.
 *
 * A file beside the checked ones may change an object that they rest on, or call a helper of theirs. Keeps no text.
 */
import { createImportIndex, type ImportIndex } from "../analysis/importIndex.js";

/** `listFiles` may name a file twice; `read` gives `null` for what is not there. */
export function createImporters(
  listFiles: () => Iterable<string>,
  read: (file: string) => string | null,
): (file: string, aliases: readonly string[]) => readonly string[] {
  let index: ImportIndex | undefined;
  const build = (): ImportIndex => {
    const built = createImportIndex();
    for (const file of listFiles()) {
      const text = built.has(file) ? null : read(file);
      if (text !== null) built.set(file, text);
    }
    return built;
  };
  return (file, aliases) => {
    index ??= build();
    return index.importersOf(file, aliases);
  };
}
