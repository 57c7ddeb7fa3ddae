/** The likeliest intended word for a mistyped one: for "did you mean". */

/** The candidate within a third of the word's length (at least one edit, transpositions count once), or `undefined`. */
export function nearest(word: string, candidates: readonly string[]): string | undefined {
  const limit = Math.max(1, Math.floor(Math.max(word.length, 3) / 3));
  let best: { readonly candidate: string; readonly distance: number } | undefined;
  for (const candidate of candidates) {
    if (Math.abs(candidate.length - word.length) > limit) continue;
    const distance = candidate.toLowerCase() === word.toLowerCase() ? 0.5 : editDistance(word, candidate);
    if (distance <= limit && distance < (best?.distance ?? Number.POSITIVE_INFINITY)) best = { candidate, distance };
  }
  return best?.candidate;
}

/** Optimal string alignment distance (Damerau 1964): insertions, deletions, substitutions, swaps of neighbours. */
function editDistance(a: string, b: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, column) => column);
  for (let row = 1; row <= a.length; row++) {
    const current = [row];
    for (let column = 1; column <= b.length; column++) {
      const same = a[row - 1] === b[column - 1];
      let cost = Math.min(at(last, column) + 1, at(current, column - 1) + 1, at(last, column - 1) + (same ? 0 : 1));
      const swapped = row > 1 && column > 1 && a[row - 1] === b[column - 2] && a[row - 2] === b[column - 1];
      if (swapped) cost = Math.min(cost, at(beforeLast, column - 2) + 1);
      current.push(cost);
    }
    beforeLast = last;
    last = current;
  }
  return at(last, b.length);
}

function at(row: readonly number[], column: number): number {
  return row[column] ?? Number.POSITIVE_INFINITY;
}
