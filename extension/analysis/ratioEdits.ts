/** The edits that give a mechanism another ratio: a plain reduction's number, or gears in stock, the nearest that can be written. */

import { COMMON_TOOTH_COUNTS } from "../proposals/stock.js";
import { changesForRatio } from "../proposals/stockRatios.js";
import type { Analysis } from "./analysis.js";
import { type Edit, editsFor } from "./writeChange.js";

export interface RatioEdits {
  readonly ratio: number;
  /** Such as "stage 1 with 16 and 48 teeth". */
  readonly words: string;
  readonly edits: readonly Edit[];
}

/** `undefined` where nothing near can be written, or the ratio is the one that is. */
export function ratioEdits(analysis: Analysis, name: string, ratio: number): RatioEdits | undefined {
  const mechanism = analysis.mechanisms.find((one) => one.name === name && one.declared !== undefined);
  if (mechanism?.declared === undefined) return undefined;
  const toothCounts = analysis.toothCounts.get(mechanism.at.file) ?? COMMON_TOOTH_COUNTS;
  for (const { ratio: found, change } of changesForRatio({ mechanism: mechanism.declared, toothCounts }, ratio)) {
    const edits = editsFor(mechanism.call, change, analysis.snapshot);
    if (edits !== undefined) return { ratio: found, words: change.words, edits };
  }
  return undefined;
}
