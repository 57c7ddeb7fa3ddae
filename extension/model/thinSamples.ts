/**
 * Fewer samples of a robot's run, such that lines between those that are kept pass each one that is not within a tolerance.
 *
 * A swinging door over all series at once: from the last kept sample a cone of slopes narrows with each that is passed, and a sample is
 * kept where the next one would leave it. Jumps, two samples at one time, and the extremes of voltage and of each power are always
 * kept. Source: E. H. Bristol, "Swinging Door Trending: Adaptive Trend Recording?", ISA National Conference 1990.
 */
import type { RobotSample } from "./robotSolution.js";

/** What lines may be off, as a share of the greatest voltage, the greatest power and 1000 K, to begin with; it grows until few enough are left. */
const FINEST = 1e-5;
const GROWTH = 3;
const KELVINS = 1000;

/** At most `most` of them, or those that are always kept. */
export function thinSamples(samples: readonly RobotSample[], most: number): RobotSample[] {
  const series = seriesOf(samples);
  const forced = extremesOf(series);
  let kept: readonly number[] = samples.map((_, index) => index);
  for (let share = FINEST; kept.length > most && share < 1; share *= GROWTH) kept = throughDoor(samples, series, share, forced);
  return kept.flatMap((index) => samples[index] ?? []);
}

interface Series {
  readonly values: readonly number[];
  /** What it may be off at a share of 1. */
  readonly scale: number;
}

function seriesOf(samples: readonly RobotSample[]): readonly Series[] {
  const count = samples[0]?.powerW.length ?? 0;
  const voltages = samples.map(({ supplyVoltageV }) => supplyVoltageV);
  const powers = Array.from({ length: count }, (_, i) => samples.map(({ powerW }) => powerW[i] ?? 0));
  const greatestV = greatest(voltages);
  const greatestW = Math.max(...powers.map(greatest), 0);
  const windings = Array.from({ length: count }, (_, i) => samples.map(({ windingC }) => windingC[i] ?? 0));
  return [
    { values: voltages, scale: greatestV },
    ...powers.map((values) => ({ values, scale: greatestW })),
    ...windings.map((values) => ({ values, scale: KELVINS })),
  ];
}

function greatest(values: readonly number[]): number {
  return values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}

function extremesOf(series: readonly Series[]): ReadonlySet<number> {
  const found = new Set<number>();
  for (const { values } of series) {
    let [lowest, highest] = [0, 0];
    for (const [index, value] of values.entries()) {
      if (value < (values[lowest] ?? 0)) lowest = index;
      if (value > (values[highest] ?? 0)) highest = index;
    }
    found.add(lowest).add(highest);
  }
  return found;
}

function throughDoor(
  samples: readonly RobotSample[],
  series: readonly Series[],
  share: number,
  forced: ReadonlySet<number>,
): number[] {
  const tolerances = series.map(({ scale }) => scale * share);
  const timeAt = (index: number): number => samples[index]?.timeS ?? 0;
  const low = new Float64Array(series.length);
  const high = new Float64Array(series.length);
  const kept = [0];
  let pivot = 0;
  const open = (at: number): void => {
    pivot = at;
    low.fill(Number.NEGATIVE_INFINITY);
    high.fill(Number.POSITIVE_INFINITY);
    if (kept.at(-1) !== at) kept.push(at);
  };
  /** Whether a line from the pivot to the sample passes all between; narrows the cone where it does. */
  const passes = (index: number): boolean => {
    const lasts = timeAt(index) - timeAt(pivot);
    for (let s = 0; s < series.length; s++) {
      const from = series[s]?.values[pivot] ?? 0;
      const to = series[s]?.values[index] ?? 0;
      const off = tolerances[s] ?? 0;
      if (lasts <= 0) {
        if (Math.abs(to - from) > off) return false;
        continue;
      }
      const slope = (to - from) / lasts;
      if (slope < (low[s] ?? 0) || slope > (high[s] ?? 0)) return false;
    }
    if (lasts <= 0) return true;
    for (let s = 0; s < series.length; s++) {
      const rise = (series[s]?.values[index] ?? 0) - (series[s]?.values[pivot] ?? 0);
      const off = tolerances[s] ?? 0;
      low[s] = Math.max(low[s] ?? 0, (rise - off) / lasts);
      high[s] = Math.min(high[s] ?? 0, (rise + off) / lasts);
    }
    return true;
  };
  open(0);
  for (let index = 1; index < samples.length; index++) {
    if (!passes(index)) {
      open(index - 1);
      if (!passes(index)) open(index);
    }
    if (forced.has(index) && pivot !== index) open(index);
  }
  open(samples.length - 1);
  return kept;
}
