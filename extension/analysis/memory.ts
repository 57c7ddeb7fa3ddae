/** Results kept by content, as many as were asked for most recently: undo, and the round trips of an editor's what-if, come back soon. */

export interface Memory<Result> {
  /** The remembered result, or a new one. */
  get(key: string, make: () => Result): Result;
}

/** `most`: how many are kept. */
export function createMemory<Result>(most: () => number): Memory<Result> {
  // In the order in which they were last asked for.
  const kept = new Map<string, Result>();
  return {
    get(key, make) {
      const result = kept.get(key) ?? make();
      kept.delete(key);
      kept.set(key, result);
      const [oldest] = kept.keys();
      if (oldest !== undefined && kept.size > most()) kept.delete(oldest);
      return result;
    },
  };
}
