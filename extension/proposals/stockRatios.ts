/**
 * The ratios that a mechanism can have with gears in stock: one gear of a stage changed, or both; and the change for each.
 *
 * A plain reduction can have any ratio, which is then not listed. Simulates nothing.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Change } from "./change.js";
import { type Gearing, oneGear, oneMoreStage, twoGears } from "./gears.js";

export interface StockRatio {
  readonly ratio: number;
  readonly change: Change;
  /** Gears to change. */
  readonly gears: 1 | 2;
}

/** Ratios nearer to each other than this share are one choice. */
const SAME = 0.004;

/** Rising; of those that are as good as the same the one with fewer gears to change. Without any stage: one pair is put in. */
export function stockRatios(gearing: Gearing, from: number, to: number): StockRatio[] {
  const { ratio } = gearing.mechanism;
  const wanted = { atLeast: from / ratio, atMost: to / ratio };
  const sized = (changes: readonly Change[], gears: 1 | 2): StockRatio[] =>
    changes.map((change) => ({ ratio: ratioWith(gearing.mechanism, change), change, gears }));
  const toothed = (changes: readonly Change[]) => changes.filter((change) => !isPlain(gearing.mechanism, change));
  const one = sized(toothed(oneGear(gearing, wanted)), 1);
  const pairs = gearing.mechanism.stages.length === 0 ? oneMoreStage(gearing, wanted) : twoGears(gearing, wanted);
  const kept: StockRatio[] = [];
  for (const next of [...one, ...sized(pairs, 2)].sort((a, b) => a.ratio - b.ratio || a.gears - b.gears)) {
    const last = kept.at(-1);
    if (last === undefined || next.ratio > last.ratio * (1 + SAME)) kept.push(next);
    else if (next.gears < last.gears) kept[kept.length - 1] = next;
  }
  return kept;
}

/**
 * Changes that give about this ratio, the nearest first: a plain reduction set to it, or gears in stock. What of them can be written
 * is found elsewhere.
 */
export function changesForRatio(gearing: Gearing, ratio: number): StockRatio[] {
  const near = [...plainRatios(gearing.mechanism, ratio), ...stockRatios(gearing, ratio * 0.8, ratio * 1.25)];
  return near.sort((one, other) => distance(one, ratio) - distance(other, ratio));
}

/** A plain reduction set to about this ratio, in three digits, to either side of it; empty where there is none. */
export function plainRatios(mechanism: Mechanism, ratio: number): StockRatio[] {
  const stage = mechanism.stages.findIndex(({ kind }) => kind === "reduction");
  const before = mechanism.stages[stage];
  if (before === undefined) return [];
  const exact = (before.ratio * ratio) / mechanism.ratio;
  const step = 10 ** (Math.floor(Math.log10(exact)) - 2);
  const values = [Math.floor(exact / step), Math.ceil(exact / step)].map((count) => Number((count * step).toPrecision(3)));
  return [...new Set(values)].map((value) => {
    const change = { sets: [{ stage, argument: 0, value }], words: `stage ${stage + 1} with a ratio of ${value}` };
    return { ratio: ratioWith(mechanism, change), change, gears: 1 };
  });
}

export function ratioWith({ ratio, stages }: Mechanism, { sets }: Change): number {
  let result = ratio;
  const teeth = new Map<number, (number | undefined)[]>();
  for (const set of sets) {
    if ("addSpur" in set) result *= set.addSpur[1] / set.addSpur[0];
    if (!("stage" in set)) continue;
    const stage = stages[set.stage];
    const given =
      teeth.get(set.stage) ?? [stage?.given[0], stage?.given[1]].map((one) => (typeof one === "number" ? one : undefined));
    given[set.argument] = set.value;
    teeth.set(set.stage, given);
  }
  for (const [index, [first, second]] of teeth) {
    const stage = stages[index];
    if (stage === undefined || first === undefined) continue;
    result *= (stage.kind === "reduction" ? first : (second ?? first) / first) / stage.ratio;
  }
  return result;
}

function isPlain({ stages }: Mechanism, { sets }: Change): boolean {
  return sets.some((set) => "stage" in set && stages[set.stage]?.kind === "reduction");
}

function distance({ ratio }: StockRatio, wanted: number): number {
  return Math.abs(Math.log(ratio / wanted));
}
