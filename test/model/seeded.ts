/** A small seeded generator of random numbers, so that random mechanisms are the same in every run. Source: Lehmer, modulus 2³¹ − 1. */
export function seeded(seed: number): (low: number, high: number) => number {
  let state = (seed * 7919 + 1) % 2147483647;
  const next = (): number => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
  for (let i = 0; i < 8; i++) next();
  return (low, high) => low + (high - low) * next();
}
