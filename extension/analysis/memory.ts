/** Results kept by content for as long as they are used: what one round of analyses did not ask for is dropped after the next one. */

export interface Memory<Result> {
  /** The remembered result, or a new one. */
  get(key: string, make: () => Result): Result;
  /** Ends a round. */
  forgetUnused(): void;
}

/** Rounds that an unused result survives: undo, and the round trips of an editor's what-if, come back soon. */
const ROUNDS = 20;

export function createMemory<Result>(): Memory<Result> {
  const kept = new Map<string, { readonly result: Result; round: number }>();
  let round = 0;
  return {
    get(key, make) {
      const known = kept.get(key);
      if (known !== undefined) {
        known.round = round;
        return known.result;
      }
      const result = make();
      kept.set(key, { result, round });
      return result;
    },
    forgetUnused() {
      round += 1;
      if (round % ROUNDS !== 0) return;
      for (const [key, entry] of kept) if (entry.round < round - ROUNDS) kept.delete(key);
    },
  };
}
