// Medians and spreads of measured times, and how they are printed. It measures nothing.

export interface Spread {
  readonly median: number;
  /** The tenth and the ninetieth per cent. */
  readonly low: number;
  readonly high: number;
  readonly count: number;
}

export function spreadOf(values: readonly number[]): Spread {
  const sorted = values.toSorted((a, b) => a - b);
  const at = (share: number) => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? Number.NaN;
  return { median: at(0.5), low: at(0.1), high: at(0.9), count: sorted.length };
}

/** Such as "4.2 ms (3.9 to 6.1)". */
export function tellSpread({ median, low, high }: Spread, unit: string): string {
  return `${tellNumber(median)} ${unit} (${tellNumber(low)} to ${tellNumber(high)})`;
}

/** Three digits. */
export function tellNumber(value: number): string {
  if (value >= 100) return value.toFixed(0);
  return value >= 10 ? value.toFixed(1) : value.toFixed(2);
}

/** A ratio beside its bar, and whether it holds. */
export function tellRatio(what: string, ratio: number, bar: number | undefined): string {
  const written = `  ${what}: ${ratio >= 0.1 ? tellNumber(ratio) : ratio.toFixed(3)}`;
  if (bar === undefined) return written;
  return `${written}, bar ${tellNumber(bar)}: ${ratio <= bar ? "holds" : "DOES NOT HOLD"}`;
}
