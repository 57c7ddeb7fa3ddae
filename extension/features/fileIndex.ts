/**
 * Which files have something, kept up to date file by file.
 *
 * Knows nothing of what the things are; asks no file again that did not change.
 */

export class FileIndex<Key> {
  readonly #keys = new Map<string, readonly Key[]>();
  readonly #files = new Map<Key, Set<string>>();

  /** Replaces what a file has. */
  set(file: string, keys: Iterable<Key>): void {
    for (const key of this.#keys.get(file) ?? []) this.#drop(key, file);
    const own = [...new Set(keys)];
    if (own.length === 0) this.#keys.delete(file);
    else this.#keys.set(file, own);
    for (const key of own) {
      const files = this.#files.get(key);
      if (files === undefined) this.#files.set(key, new Set([file]));
      else files.add(file);
    }
  }

  has(key: Key): boolean {
    return this.#files.has(key);
  }

  filesOf(key: Key): Iterable<string> {
    return this.#files.get(key) ?? [];
  }

  #drop(key: Key, file: string): void {
    const files = this.#files.get(key);
    files?.delete(file);
    if (files?.size === 0) this.#files.delete(key);
  }
}

/** Files that one of the two has another thing for than the other, or none. Things are compared by identity. */
export function differingFiles<Thing>(one: ReadonlyMap<string, Thing>, other: ReadonlyMap<string, Thing>): Set<string> {
  const files = new Set<string>();
  if (one === other) return files;
  let inBoth = 0;
  for (const [file, thing] of other) {
    const before = one.get(file);
    if (before !== undefined) inBoth += 1;
    if (before !== thing) files.add(file);
  }
  if (inBoth < one.size) for (const file of one.keys()) if (!other.has(file)) files.add(file);
  return files;
}
