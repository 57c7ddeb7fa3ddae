/** What work that hands back control comes to, without a stop: for hosts that have nothing else to do. */
export function runThrough<Result>(work: Generator<undefined, Result>): Result {
  for (;;) {
    const next = work.next();
    if (next.done === true) return next.value;
  }
}
