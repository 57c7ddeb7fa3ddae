/**
 * Round numbers along an axis that starts at 0.
 *
 * Finite numbers of any size give finite, rising ticks. Does not know units and writes no text.
 */

export interface Scale {
  readonly max: number;
  /** From 0 on, rising. */
  readonly ticks: readonly number[];
}

const MULTIPLES = [1, 1.5, 2, 2.5, 3, 4, 5, 10];
/** Coarser: an axis that ends where it must has room for any. */
const AXIS_MULTIPLES = [1, 2, 2.5, 5, 10];
/** Both divide 100 per cent into round parts. */
const INTERVALS = [4, 5];

/** Scales with the same number of intervals, so that one grid serves all; each ends at a tick not below its value. */
export function alignedScales(greatest: readonly number[]): readonly Scale[] {
  const choices = INTERVALS.map((intervals) => greatest.map((value) => scaleOf(intervals, roundStep(value / intervals))));
  const waste = (scales: readonly Scale[]): number =>
    scales.reduce((sum, { max }, index) => sum + max / (positive(greatest[index]) ?? max), 0);
  return choices.reduce((best, scales) => (waste(scales) < waste(best) ? scales : best));
}

/** Ticks inside an axis that ends where it must. */
export function ticksWithin(max: number): readonly number[] {
  const step = roundStep(max / 6, AXIS_MULTIPLES);
  return scaleOf(Math.floor(max / step + 1e-9), step).ticks;
}

/** Round numbers between two ends, `around` them or `within` them, with about as many intervals as asked for. */
export function ticksBetween(from: number, to: number, intervals: number, place: "around" | "within"): readonly number[] {
  const step = roundStep((to - from) / intervals, AXIS_MULTIPLES);
  // A hair, so that an end that is a tick but for rounding counts as one.
  const first = place === "around" ? Math.floor(from / step + 1e-9) : Math.ceil(from / step - 1e-9);
  const last = place === "around" ? Math.ceil(to / step - 1e-9) : Math.floor(to / step + 1e-9);
  if (!(last >= first && last - first < 100)) return [from, to];
  return Array.from({ length: last - first + 1 }, (_, index) => Number(((first + index) * step).toPrecision(12)));
}

function scaleOf(intervals: number, step: number): Scale {
  // Twelve digits take off what 3 · 0.1 has too much.
  const ticks = Array.from({ length: intervals + 1 }, (_, index) => Number((index * step).toPrecision(12)));
  return { max: ticks.at(-1) ?? step, ticks };
}

/** The least round step that is not below a value; 1 where there is nothing to show. */
function roundStep(value: number, multiples: readonly number[] = MULTIPLES): number {
  const size = positive(value);
  if (size === undefined) return 1;
  const decade = 10 ** Math.floor(Math.log10(size));
  const multiple = multiples.find((candidate) => candidate * decade >= size * (1 - 1e-9)) ?? 10;
  const step = multiple * decade;
  return step > 0 && Number.isFinite(step * 6) ? step : size;
}

/** Below this, steps would lose their digits. */
const NOTHING = 1e-300;

function positive(value: number | undefined): number | undefined {
  return value !== undefined && value > NOTHING && Number.isFinite(value) ? value : undefined;
}
