/**
 * What an analysis works out for each file, kept for as long as what it is made of stays the same.
 *
 * Every step of an analysis hands such a record to the next one, so that an edit costs the files that it changed.
 */

export interface ByFile<Result> {
  /** In order of name. */
  readonly of: ReadonlyMap<string, Result>;
  /** Files whose result is another than in the round before, or that came or went. */
  readonly changed: ReadonlySet<string>;
}

/** Keeps a step's results from round to round. */
export interface Keeper<Result> {
  readonly of: ReadonlyMap<string, Result>;
  /**
   * Ends a round. `order`: all files of now; `touched`: those whose result may be another; `make`: the result of one of them, `undefined`
   * where there is none; `isSame`: whether a result says the same as the one before, which then stays.
   */
  update(
    order: ReadonlyMap<string, unknown>,
    touched: Iterable<string>,
    make: (file: string) => Result | undefined,
    isSame?: (one: Result, other: Result) => boolean,
  ): ByFile<Result>;
}

export function createKeeper<Result>(): Keeper<Result> {
  let kept = new Map<string, Result>();
  return {
    get of() {
      return kept;
    },
    update(order, touched, make, isSame = (one, other) => one === other) {
      const changed = new Set<string>();
      let isInOrder = true;
      for (const file of touched) {
        const before = kept.get(file);
        const now = order.has(file) ? make(file) : undefined;
        if (now === before || (now !== undefined && before !== undefined && isSame(before, now))) continue;
        changed.add(file);
        if (now === undefined) kept.delete(file);
        else {
          if (before === undefined) isInOrder = false;
          kept.set(file, now);
        }
      }
      if (!isInOrder) kept = inOrder(kept, order);
      return { of: kept, changed };
    },
  };
}

function inOrder<Result>(results: ReadonlyMap<string, Result>, order: ReadonlyMap<string, unknown>): Map<string, Result> {
  const sorted = new Map<string, Result>();
  for (const file of order.keys()) {
    const result = results.get(file);
    if (result !== undefined) sorted.set(file, result);
  }
  return sorted;
}
