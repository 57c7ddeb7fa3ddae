/** The least value of a function with one minimum, in few calls: each of them may be a travel. */

/** The share of an interval that a golden-section step goes into its longer part. */
const GOLDEN = (3 - Math.sqrt(5)) / 2;

/**
 * Calls `valueAt` between `low` and `high` until the place of its least value is known to about `tolerance`, or `most` times: by parabolas
 * through the three best places, and by golden section where these lead nowhere (R. P. Brent, Algorithms for Minimization without Derivatives,
 * 1973, chapter 5). Values may be infinite. Whoever asks keeps the best.
 */
export function searchLeast(
  valueAt: (x: number) => number,
  low: number,
  high: number,
  { tolerance, most }: { readonly tolerance: number; readonly most: number },
): void {
  let [from, to] = [low, high];
  // The best place so far, the second best, and the one that was second best before.
  let best = from + GOLDEN * (to - from);
  let [second, third] = [best, best];
  let atBest = valueAt(best);
  let [atSecond, atThird] = [atBest, atBest];
  let [step, stepBefore] = [0, 0];
  for (let calls = 1; calls < most; calls++) {
    const middle = (from + to) / 2;
    if (Math.abs(best - middle) <= 2 * tolerance - (to - from) / 2) return;
    const byParabola = parabolaStep(best - second, best - third, atBest - atSecond, atBest - atThird);
    const isInside = best + byParabola > from && best + byParabola < to;
    if (Math.abs(stepBefore) > tolerance && isInside && Math.abs(byParabola) < Math.abs(stepBefore) / 2) {
      stepBefore = step;
      step = byParabola;
      const next = best + step;
      if (next - from < 2 * tolerance || to - next < 2 * tolerance) step = Math.sign(middle - best) * tolerance;
    } else {
      stepBefore = (best >= middle ? from : to) - best;
      step = GOLDEN * stepBefore;
    }
    const next = best + (Math.abs(step) >= tolerance ? step : Math.sign(step) * tolerance);
    const atNext = valueAt(next);
    if (atNext <= atBest) {
      if (next >= best) from = best;
      else to = best;
      [third, second, best] = [second, best, next];
      [atThird, atSecond, atBest] = [atSecond, atBest, atNext];
      continue;
    }
    if (next < best) from = next;
    else to = next;
    if (atNext <= atSecond || second === best) {
      [third, second] = [second, next];
      [atThird, atSecond] = [atSecond, atNext];
    } else if (atNext <= atThird || third === best || third === second) {
      third = next;
      atThird = atNext;
    }
  }
}

/** From the best of three places to the vertex of the parabola through them; not a number where there is none. */
function parabolaStep(toSecond: number, toThird: number, overSecond: number, overThird: number): number {
  const r = toSecond * overThird;
  const q = toThird * overSecond;
  return -(toThird * q - toSecond * r) / (2 * (q - r));
}
