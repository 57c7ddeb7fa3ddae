/**
 * Numbers that look random and are the same on every machine, and points spread evenly by them.
 *
 * Source: S. K. Park, K. W. Miller, Random number generators: good ones are hard to find, CACM 31 (1988), with the multiplier of their
 * remark in CACM 36 (1993). Deliberately not for secrets.
 */

const MODULUS = 2 ** 31 - 1;
const MULTIPLIER = 48_271;
/** Neighbouring seeds begin alike: these are thrown away. */
const FIRST = 8;

/** From above 0 to below 1. */
export function createRandom(seed: number): () => number {
  let state = (Math.abs(Math.trunc(seed)) % (MODULUS - 1)) + 1;
  const next = (): number => {
    state = (state * MULTIPLIER) % MODULUS;
    return state / MODULUS;
  };
  for (let i = 0; i < FIRST; i++) next();
  return next;
}

/**
 * `count` points of the unit cube with `dimensions` coordinates, uniform in each: every coordinate has one point in each of `count` equal
 * slices, in a random order of its own. Source: M. D. McKay, R. J. Beckman, W. J. Conover, Technometrics 21 (1979), Latin hypercube
 * sampling; quantiles of its results wobble less than those of independent draws.
 */
export function spreadPoints(count: number, dimensions: number, random: () => number): number[][] {
  const columns = Array.from({ length: dimensions }, () => {
    const slices = shuffled(count, random);
    return slices.map((slice) => (slice + random()) / count);
  });
  return Array.from({ length: count }, (_, point) => columns.map((column) => column[point] as number));
}

/** 0 to count − 1 in a random order (Fisher and Yates). */
function shuffled(count: number, random: () => number): number[] {
  const order = Array.from({ length: count }, (_, index) => index);
  for (let last = count - 1; last > 0; last--) {
    const other = Math.floor(random() * (last + 1));
    [order[last], order[other]] = [order[other] as number, order[last] as number];
  }
  return order;
}
