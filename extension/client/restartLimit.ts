/** How often a server that ended by itself is started again: not in a circle. */

const WINDOW_MS = 3 * 60_000;
const MOST_RESTARTS = 4;

/** Gives a question to be asked once for each unexpected end: may it be started again? */
export function createRestartLimit(now: () => number = Date.now): () => boolean {
  let ends: number[] = [];
  return () => {
    const time = now();
    ends = [...ends.filter((end) => time - end < WINDOW_MS), time];
    return ends.length <= MOST_RESTARTS;
  };
}
