/** The name that a mistyped one was probably meant to be: for "did you mean". */

/** The candidate at most a third of the word's letters away (at least one), or `undefined`. */
export function findNearest(word: string, candidates: Iterable<string>): string | undefined {
  let best: string | undefined;
  let bestDistance = Math.max(1, Math.floor(word.length / 3)) + 1;
  for (const candidate of candidates) {
    if (candidate === word || Math.abs(candidate.length - word.length) >= bestDistance) continue;
    const distance = word.toLowerCase() === candidate.toLowerCase() ? 0 : countEdits(word, candidate);
    if (distance < bestDistance) {
      best = candidate;
      bestDistance = distance;
    }
  }
  return best;
}

/** Edits between two words, a swap of neighbours counting once (optimal string alignment). */
function countEdits(from: string, to: string): number {
  let previous: number[] = [];
  let current = Array.from({ length: to.length + 1 }, (_, index) => index);
  for (let row = 1; row <= from.length; row++) {
    const next = [row];
    for (let column = 1; column <= to.length; column++) {
      const substituted = (current[column - 1] ?? 0) + (from[row - 1] === to[column - 1] ? 0 : 1);
      let least = Math.min((current[column] ?? 0) + 1, (next[column - 1] ?? 0) + 1, substituted);
      const swapped = row > 1 && column > 1 && from[row - 1] === to[column - 2] && from[row - 2] === to[column - 1];
      if (swapped) least = Math.min(least, (previous[column - 2] ?? 0) + 1);
      next.push(least);
    }
    previous = current;
    current = next;
  }
  return current[to.length] ?? 0;
}
