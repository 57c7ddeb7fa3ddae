/**
 * How far current and time spread over what is declared as uncertain: the motor's `tolerance`, and every range.
 *
 * Draws are uniform within tolerance and ranges, independent of each other, and the same in every run. Each is a mechanism of its own, so
 * that this costs hundreds of solutions and is computed when asked for. Deliberately not here: the worst case (corners.ts).
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Drive, Supply } from "../model/drive.js";
import { effectsOf } from "../model/effects.js";
import { hardestNumbers } from "../model/hardestNumbers.js";
import { offSheet } from "../model/offSheet.js";
import { solveRepeats } from "../model/repeats.js";
import { solveHold, solveTurning } from "../model/runs.js";
import { solveTravel } from "../model/travel.js";
import { opensInUse } from "../rules/trips.js";
import { fromSi, parseAnyQuantity } from "../units/parse.js";
import type { AnalysedMechanism, Analysis } from "./analysis.js";
import { robotOf, supplyCallOf } from "./lentSupply.js";
import { createRandom, spreadPoints } from "./random.js";
import { type Leaf, leavesBelow, rebuild } from "./rebuild.js";
import { runThrough } from "./runThrough.js";

/** 5, 50 and 95 % of the draws lie below. */
export interface Percentiles<Value> {
  readonly p5: Value;
  readonly p50: Value;
  readonly p95: Value;
}

export interface Spread {
  readonly draws: number;
  readonly seed: number;
  /** The motor's declared tolerance, 0 without one, and the number of ranges that were drawn from. */
  readonly tolerance: number;
  readonly ranges: number;
  /** One motor's at the hardest position. */
  readonly motorCurrentA: Percentiles<number>;
  /** Of the travel; null within: that many never arrive; null as a whole: there is no travel. */
  readonly timeS: Percentiles<number | null> | null;
  /** Share of the draws in which protection opens in use; null without protection. */
  readonly trippingShare: number | null;
}

const DRAWS = 200;
/** The same where each is followed through many repeats for protection's sake. */
const DRAWS_OF_REPEATS = 40;
const SEED = 1;

/** `undefined` where nothing is declared as uncertain, or the mechanism has no numbers. */
export function spreadOf(analysis: Analysis, mechanism: AnalysedMechanism): Spread | undefined {
  return runThrough(drawSpread(analysis, mechanism));
}

/** The same a draw at a time, so that a host can stop it. */
export function* drawSpread(
  analysis: Analysis,
  { call, declared, numbers }: AnalysedMechanism,
): Generator<undefined, Spread | undefined> {
  if (declared === undefined || numbers === undefined) return undefined;
  const robot = declared.si.supply === undefined ? robotOf(declared, analysis.robots) : undefined;
  const supplyCall = robot && supplyCallOf(robot);
  const ranges = [...leavesBelow(call), ...(supplyCall === undefined ? [] : leavesBelow(supplyCall))].filter(
    ({ range }) => range,
  );
  const tolerance = declared.si.motor.tolerance ?? 0;
  if (tolerance === 0 && ranges.length === 0) return undefined;
  const lent = robot?.declared?.supply.si;
  const driveWith = (shares: readonly number[]): Drive | undefined => {
    const replacements = new Map(ranges.map((leaf, index) => [leaf, within(leaf, shares[index] ?? 0.5)]));
    const mechanism = ranges.length === 0 ? declared : (rebuild(call, replacements) as Mechanism | undefined);
    const supply =
      supplyCall && ranges.length > 0 ? (rebuild(supplyCall, replacements) as { readonly si: Supply } | undefined)?.si : lent;
    return mechanism && (supply === undefined ? mechanism.si : { ...mechanism.si, supply });
  };
  const repeats = declared.si.everyS !== undefined && declared.si.protection !== undefined;
  const count = repeats ? DRAWS_OF_REPEATS : DRAWS;
  const away = (share: number): number => tolerance * (2 * share - 1);
  const draws: Draw[] = [];
  for (const point of spreadPoints(count, ranges.length + 2, createRandom(SEED))) {
    yield;
    const drive = driveWith(point.slice(2));
    const [resistance = 0.5, backEmf = 0.5] = point;
    if (drive === undefined) continue;
    draws.push(solveDraw({ ...drive, motor: offSheet(drive.motor, away(resistance), away(backEmf)) }));
  }
  return draws.length === 0
    ? undefined
    : { draws: draws.length, seed: SEED, tolerance, ranges: ranges.length, ...summarise(draws, declared.si) };
}

interface Draw {
  readonly currentA: number;
  readonly timeS: number | null;
  readonly trips: boolean;
}

function solveDraw(drive: Drive): Draw {
  if (drive.protection === undefined) return { ...effectsOf(drive), trips: false };
  const travel = solveTravel(drive, { coarse: true });
  const hold = drive.holdForS === undefined ? null : solveHold(drive);
  const trips = opensInUse({ drive, travel, hold, turning: solveTurning(drive), repeats: solveRepeats(drive) });
  return { currentA: hardestNumbers(drive).motorCurrentA, timeS: travel?.timeS ?? null, trips };
}

function summarise(
  draws: readonly Draw[],
  { load, protection }: Drive,
): Pick<Spread, "motorCurrentA" | "timeS" | "trippingShare"> {
  const times = percentiles(draws.map(({ timeS }) => timeS ?? Number.POSITIVE_INFINITY));
  const orNever = (timeS: number): number | null => (Number.isFinite(timeS) ? timeS : null);
  return {
    motorCurrentA: percentiles(draws.map(({ currentA }) => currentA)),
    timeS: load.kind === "roller" ? null : { p5: orNever(times.p5), p50: orNever(times.p50), p95: orNever(times.p95) },
    trippingShare: protection === undefined ? null : draws.filter(({ trips }) => trips).length / draws.length,
  };
}

function percentiles(values: readonly number[]): Percentiles<number> {
  const sorted = values.toSorted((a, b) => a - b);
  return { p5: quantile(sorted, 0.05), p50: quantile(sorted, 0.5), p95: quantile(sorted, 0.95) };
}

/** Of sorted values: the k-th of n stands at share (k − ½)/n, linear between (definition 5 of Hyndman and Fan, Am. Stat. 50, 1996). */
function quantile(sorted: readonly number[], share: number): number {
  const place = Math.min(Math.max(share * sorted.length - 0.5, 0), sorted.length - 1);
  const [below, above] = [sorted[Math.floor(place)] as number, sorted[Math.ceil(place)] as number];
  const rest = place - Math.floor(place);
  return rest === 0 ? below : below + (above - below) * rest;
}

/** A share of the way from a range's low end to its high one, written in the low end's unit. */
function within({ range, plain }: Leaf, share: number): string | number {
  const [low, high] = range ?? [plain, plain];
  if (typeof low === "number" || typeof high === "number") return Number(low) + (Number(high) - Number(low)) * share;
  const [from, to] = [parseAnyQuantity(low), parseAnyQuantity(high)];
  if (from === undefined || to === undefined) return low;
  return `${fromSi(from.si + (to.si - from.si) * share, from.unit)} ${from.unit.symbol}`;
}
