/**
 * Which of many moments a chart keeps: few enough to send and draw, with every extreme that a reader would look for.
 *
 * Time is cut into equal spans; of each the first and the last moment are kept, and those where one of the guiding series is lowest
 * or highest. Moments themselves are never changed or averaged.
 */

/** Rising indices. `guides`: series that keep their extremes in every span; `others`: those that keep theirs of the whole. */
export function keptMoments(
  timesS: readonly number[],
  guides: readonly (readonly number[])[],
  others: readonly (readonly number[])[],
  spans: number,
): readonly number[] {
  const all = timesS.map((_, index) => index);
  const [fromS = 0, toS = 0] = [timesS[0], timesS.at(-1)];
  if (all.length <= spans * 2 || !(toS > fromS)) return all;
  const kept = new Set<number>();
  let group: number[] = [];
  let span = 0;
  const close = (): void => {
    const [first, last] = [group[0], group.at(-1)];
    if (first === undefined || last === undefined) return;
    kept.add(first).add(last);
    for (const guide of guides) for (const index of extremesOf(guide, group)) kept.add(index);
    group = [];
  };
  for (const index of all) {
    const at = Math.min(Math.floor((((timesS[index] ?? fromS) - fromS) / (toS - fromS)) * spans), spans - 1);
    if (at !== span) close();
    span = at;
    group.push(index);
  }
  close();
  for (const other of others) for (const index of extremesOf(other, all)) kept.add(index);
  return [...kept].sort((one, next) => one - next);
}

/** Where a series is lowest and highest among some indices. */
function extremesOf(series: readonly number[], indices: readonly number[]): [number, number] {
  let [lowest = 0, highest = 0] = [indices[0], indices[0]];
  for (const index of indices) {
    if ((series[index] ?? 0) < (series[lowest] ?? 0)) lowest = index;
    if ((series[index] ?? 0) > (series[highest] ?? 0)) highest = index;
  }
  return [lowest, highest];
}
