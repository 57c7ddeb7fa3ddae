/**
 * The few numbers that what-if questions about a mechanism are asked for again and again: current, share of stall, time.
 *
 * Deliberately not here: everything else of a mechanism's numbers (solve.ts), which costs many times as much.
 */
import type { Drive } from "./drive.js";
import { hardestNumbers } from "./hardestNumbers.js";
import { solveTravel } from "./travel.js";

/** The winding's limit is watched, too. */
const NO_LIMIT_C = Number.MAX_VALUE;

export interface Effects {
  /** One motor's at the hardest position, A. */
  readonly currentA: number;
  /** Required over available stall torque; null where there is none. */
  readonly share: number | null;
  /** Of the travel, s, to about 1e-7; null where it does not arrive, or has none. */
  readonly timeS: number | null;
}

export function effectsOf(drive: Drive): Effects {
  const { motorCurrentA, stallShare } = hardestNumbers(drive);
  return { currentA: motorCurrentA, share: stallShare, timeS: travelTime(drive, { coarse: true }) };
}

/** Time of the travel, s; null where it does not arrive, or has none. `coarse`: to about 1e-7 instead of 1e-8. */
export function travelTime(drive: Drive, { coarse = false }: { readonly coarse?: boolean } = {}): number | null {
  return solveTravel(withoutWatches(drive), { coarse, timeOnly: true })?.timeS ?? null;
}

/**
 * The drive without all that neither its steady running nor its motion depends on. Protection and the voltage floor are only watched:
 * the time is the same without them, and found in closed form more often.
 */
export function withoutWatches(drive: Drive): Drive {
  const { protection: _protection, withinS: _within, holdForS: _hold, everyS: _every, supply, motor, ...moved } = drive;
  const { rated: _rated, tolerance: _tolerance, thermal, ...constants } = motor;
  const warmed = thermal === undefined ? constants : { ...constants, thermal: { ...thermal, limitC: NO_LIMIT_C } };
  const plain = { ...moved, motor: warmed, stages: moved.stages.map(({ maxTorqueNm: _most, ...stage }) => stage) };
  if (supply === undefined) return plain;
  const { openCircuitV, resistanceOhm } = supply;
  return { ...plain, supply: { openCircuitV, resistanceOhm, peukert: 1 } };
}
