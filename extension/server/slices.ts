/** Long work a slice at a time, so that the server goes on answering; a change of any text stops it. */

/** Longest time between two chances for others, ms: a little more than one step of such work takes. */
export const SLICE_MS = 15;

export interface Slices {
  /** Counts what happened to texts. */
  readonly moment: () => number;
  readonly sliceMs?: number;
}

/** What the work comes to; `undefined` where a text changed meanwhile. */
export async function runInSlices<T>(
  work: Generator<undefined, T>,
  { moment, sliceMs = SLICE_MS }: Slices,
): Promise<{ readonly result: T } | undefined> {
  const started = moment();
  for (;;) {
    const end = performance.now() + sliceMs;
    do {
      const next = work.next();
      if (next.done === true) return { result: next.value };
    } while (performance.now() < end);
    await new Promise<void>((resolve) => setTimeout(resolve, 0));
    if (moment() !== started) return undefined;
  }
}
