/** The ratio of stages with teeth as a fraction of whole numbers: products of rounded ratios would not meet it. Does not know losses. */
import type { Stage } from "./stages.js";

/** In lowest terms: motor turns per turns of the output shaft. */
export interface Fraction {
  readonly numerator: number;
  readonly denominator: number;
}

/** `undefined` where a stage is known only by a plain ratio, or the whole numbers grow past what a double counts exactly. */
export function exactRatio(stages: readonly Pick<Stage, "kind" | "given">[]): Fraction | undefined {
  let whole: Fraction = { numerator: 1, denominator: 1 };
  for (const stage of stages) {
    const one = fractionOf(stage);
    if (one === undefined) return undefined;
    whole = lowest(whole.numerator * one.numerator, whole.denominator * one.denominator);
    if (!Number.isSafeInteger(whole.numerator) || !Number.isSafeInteger(whole.denominator)) return undefined;
  }
  return whole;
}

function fractionOf({ kind, given: [first, second] }: Pick<Stage, "kind" | "given">): Fraction | undefined {
  if (kind === "reduction" || typeof first !== "number" || typeof second !== "number") return undefined;
  // Sun and ring, the ring fixed: the carrier turns once for 1 + ring/sun turns of the sun.
  return lowest(kind === "planetary" ? first + second : second, first);
}

function lowest(numerator: number, denominator: number): Fraction {
  let [large, small] = [numerator, denominator];
  while (small > 0) [large, small] = [small, large % small];
  return { numerator: numerator / large, denominator: denominator / large };
}
