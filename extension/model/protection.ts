/**
 * Breakers, PTCs and fuses: how fast they use up what they bear, and when a steady current opens them.
 *
 * Deliberately not here: currents that change (motionSystem.ts).
 */
import type { Protection } from "./drive.js";

/** θ′ = ((I/hold)² − θ)/τ, open at θ = 1. */
export interface ThermalReplica {
  readonly holdCurrentA: number;
  readonly timeConstantS: number;
}

/** Nearer to the held current than this share, no time can be told. */
export const BORDERLINE_SHARE = 0.05;

/** When a protector opens. */
export interface TripVerdict {
  /** s; null: it stays closed, or no time can be told. A fuse's slow gate. */
  readonly opensAfterS: number | null;
  /** A fuse's fast gate: it may open from here on; for others the same as `opensAfterS`. */
  readonly mayOpenAfterS: number | null;
  /** True where the current is within 5 % of what is held for ever. */
  readonly borderline: boolean;
}

export const NEVER: TripVerdict = { opensAfterS: null, mayOpenAfterS: null, borderline: false };

/** τ = after/ln(at²/(at² − holds²)): cold characteristic through the declared trip point. Source: IEC 60255-149. */
export function thermalReplica(protection: Exclude<Protection, { kind: "fuse" }>): ThermalReplica {
  const hold = protection.holdCurrentA;
  const at = Math.max(protection.tripsAtA, hold * (1 + 1e-9));
  return { holdCurrentA: hold, timeConstantS: protection.tripsAfterS / Math.log((at * at) / (at * at - hold * hold)) };
}

/** Time at a steady current from state θ, s; null: never. t = τ·ln((m² − θ)/(m² − 1)), m = I/hold. Source: IEC 60255-149. */
export function replicaTripTime(replica: ThermalReplica, currentA: number, state = 0): number | null {
  const square = (currentA / replica.holdCurrentA) ** 2;
  if (state >= 1) return 0;
  if (square <= 1) return null;
  return replica.timeConstantS * Math.log((square - state) / (square - 1));
}

/** Replica state when it closes again after having been open, ambient cooling with the same τ. */
export function replicaStateAfterReset(replica: ThermalReplica, openS: number): number {
  return Math.exp(-openS / replica.timeConstantS);
}

/** Least time that a breaker stays open, s. */
export const LEAST_OPEN_S = 0.1;

/** What a protector at rest does under a steady current. */
export function tripVerdict(protection: Protection, currentA: number): TripVerdict {
  if (protection.kind === "fuse") {
    const [fast, slow] = [
      fuseRate(protection.ratingA, currentA, "fast").rate,
      fuseRate(protection.ratingA, currentA, "slow").rate,
    ];
    return { opensAfterS: slow > 0 ? 1 / slow : null, mayOpenAfterS: fast > 0 ? 1 / fast : null, borderline: false };
  }
  if (isBorderline(protection, currentA)) return { ...NEVER, borderline: true };
  const opensAfterS = replicaTripTime(thermalReplica(protection), currentA);
  return { opensAfterS, mayOpenAfterS: opensAfterS, borderline: false };
}

/** True where the current is so near to the held one that a time would mean nothing. */
export function isBorderline(protection: Protection, currentA: number): boolean {
  return protection.kind !== "fuse" && Math.abs(currentA / protection.holdCurrentA - 1) <= BORDERLINE_SHARE;
}

/**
 * Opening times of blade fuses by multiples of the rating: [multiple, least s, greatest s]. Source: gates of the ISO 8820-3
 * family as makers of blade fuses print them, up to 30 A and above.
 */
const GATES: readonly (readonly [multiple: number, fastS: number, slowS: number])[] = [
  [1.1, 360_000, 360_000],
  [1.35, 0.75, 600],
  [1.6, 0.25, 50],
  [2, 0.15, 5],
  [3.5, 0.04, 0.5],
  [6, 0.02, 0.1],
];
const LARGE_GATES: typeof GATES = [
  [1.1, 360_000, 360_000],
  [1.35, 0.75, 600],
  [2, 0.15, 5],
  [3.5, 0.08, 0.5],
  [6, 0.04, 0.15],
];
const LARGE_RATING_A = 30;

/** Multiples of the rating at which the gates bend. */
export function fuseGates(ratingA: number): typeof GATES {
  return ratingA > LARGE_RATING_A ? LARGE_GATES : GATES;
}

/**
 * Damage per second, 1/t(I), and its slope over the current, 1/(A·s). Log-log between gates, none below 110 %, I²t constant
 * above 600 %. The damage of a changing current is the integral, as Miner's rule sums parts of a life.
 */
export function fuseRate(
  ratingA: number,
  currentA: number,
  gate: "fast" | "slow",
): { readonly rate: number; readonly slope: number } {
  const gates = fuseGates(ratingA);
  const column = gate === "fast" ? 1 : 2;
  const multiple = currentA / ratingA;
  const first = gates[0] as (typeof gates)[number];
  const last = gates.at(-1) as (typeof gates)[number];
  if (!(multiple >= first[0])) return { rate: 0, slope: 0 };
  const exponentOf = (low: (typeof gates)[number], high: (typeof gates)[number]): number =>
    Math.log(low[column] / high[column]) / Math.log(high[0] / low[0]);
  const above = gates.findIndex(([at]) => at > multiple);
  const from = above < 0 ? last : (gates[above - 1] as (typeof gates)[number]);
  const exponent = above < 0 ? 2 : exponentOf(from, gates[above] as (typeof gates)[number]);
  const rate = (multiple / from[0]) ** exponent / from[column];
  return { rate, slope: (exponent * rate) / currentA };
}
