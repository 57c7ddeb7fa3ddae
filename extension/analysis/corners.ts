/**
 * The corners of a declaration that holds ranges: every range at one of its ends.
 *
 * Few ranges: every combination. Many: all low, all high, each range alone at its other end, and seeded draws, and the result says so.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { DefinitionCall } from "../evaluator/value.js";
import type { Supply } from "../model/drive.js";
import { createRandom } from "./random.js";
import { type Leaf, leavesBelow, type Replacements, rebuild } from "./rebuild.js";

export interface Corner {
  readonly mechanism: Mechanism;
  /** The robot's supply at this corner, where the mechanism has none of its own. */
  readonly supply: Supply | undefined;
  /** Such as `mass "5 kg", friction 0.2`. */
  readonly told: string;
}

/** Combinations up to this many ranges are all tried: 2⁵ = 32. */
const MOST_EXHAUSTIVE = 5;
const DRAWS = 16;

/** `supplyCall`: the battery that the robot lends. Without ranges there is no corner. */
export function cornersOf(call: DefinitionCall, supplyCall: DefinitionCall | undefined): readonly Corner[] {
  const ranges = [...leavesBelow(call), ...(supplyCall === undefined ? [] : leavesBelow(supplyCall))].filter(
    (leaf) => leaf.range,
  );
  if (ranges.length === 0) return [];
  return choicesFor(ranges.length).flatMap((highs): Corner[] => {
    const chosen = ranges.map((leaf, index) => [leaf, leaf.range?.[highs[index] === true ? 1 : 0] ?? leaf.plain] as const);
    const replacements: Replacements = new Map(chosen);
    const mechanism = rebuild(call, replacements) as Mechanism | undefined;
    const supply = supplyCall && (rebuild(supplyCall, replacements) as { readonly si: Supply } | undefined)?.si;
    return mechanism === undefined ? [] : [{ mechanism, supply, told: chosen.map(tell).join(", ") }];
  });
}

/** Whether every combination of that many ranges is tried. */
export function isExhaustive(ranges: number): boolean {
  return ranges <= MOST_EXHAUSTIVE;
}

function choicesFor(count: number): boolean[][] {
  if (isExhaustive(count))
    return Array.from({ length: 2 ** count }, (_, code) => bits(count, (index) => (code >> index) % 2 === 1));
  const single = Array.from({ length: count }, (_, one) => bits(count, (index) => index === one));
  const others = single.map((choice) => choice.map((high) => !high));
  const next = createRandom(count);
  const draws = Array.from({ length: DRAWS }, () => bits(count, () => next() < 0.5));
  return [bits(count, () => false), bits(count, () => true), ...single, ...others, ...draws];
}

function bits(count: number, isHigh: (index: number) => boolean): boolean[] {
  return Array.from({ length: count }, (_, index) => isHigh(index));
}

function tell([{ label }, plain]: readonly [Leaf, string | number]): string {
  return `${label} ${typeof plain === "string" ? plain.replaceAll("*", "·") : plain}`;
}
