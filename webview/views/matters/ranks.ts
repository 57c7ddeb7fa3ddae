/** The bars of what matters as plain data: the inputs that move a result, by falling effect. */
import type { MattersChart, MattersOutput } from "../../../extension/protocol/charts/matters.js";

export interface Bar {
  readonly words: string;
  /** Per cent of the result for one per cent of the input. */
  readonly effect: number;
  /** The same of the saved result; null where it is not known. */
  readonly was: number | null;
}

/** Bars that are drawn; the table has all. */
export const MOST_BARS = 12;

export function barsOf({ inputs }: MattersChart, saved: MattersChart | null, output: MattersOutput): Bar[] {
  const before = new Map(saved?.inputs.map((one) => [one.words, one[output]]));
  return inputs
    .flatMap((one) => {
      const effect = one[output];
      return effect === null ? [] : [{ words: one.words, effect, was: before.get(one.words) ?? null }];
    })
    .sort((one, other) => Math.abs(other.effect) - Math.abs(one.effect));
}

/** Results that any input moves, in their order. */
export function outputsIn({ inputs }: MattersChart): MattersOutput[] {
  return (["current", "time", "share"] as const).filter((output) => inputs.some((one) => one[output] !== null));
}

export const OUTPUT_WORDS: Readonly<Record<MattersOutput, string>> = {
  current: "Current",
  time: "Travel time",
  share: "Share of stall",
};

/** "+1.02", with a true minus. */
export function writeEffect(effect: number): string {
  const size = Math.abs(effect);
  const digits = size >= 0.1 ? size.toFixed(2) : size.toPrecision(2);
  return `${effect < 0 ? "−" : "+"}${digits}`;
}
