/** Golden-section search for the least value of a function with one minimum (Kiefer 1953), a step at a time. */

/** To a ten-thousandth of the span. */
const STEPS = 20;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** Yields before each value; whoever asks keeps the best. */
export function* goldenLeast(from: number, to: number, valueAt: (x: number) => number): Generator<undefined, void> {
  if (!(to > from)) return;
  let [low, high] = [from, to];
  let inner = high - GOLDEN * (high - low);
  let outer = low + GOLDEN * (high - low);
  yield;
  let [atInner, atOuter] = [valueAt(inner), valueAt(outer)];
  for (let step = 0; step < STEPS; step++) {
    yield;
    if (atInner <= atOuter) {
      high = outer;
      [outer, atOuter] = [inner, atInner];
      inner = high - GOLDEN * (high - low);
      atInner = valueAt(inner);
    } else {
      low = inner;
      [inner, atInner] = [outer, atOuter];
      outer = low + GOLDEN * (high - low);
      atOuter = valueAt(outer);
    }
  }
}
