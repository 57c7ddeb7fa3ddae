/**
 * A drive with another ratio, and the ratio that makes its travel quickest.
 *
 * Searches the ratio alone, as a number; teeth that exist are chosen elsewhere.
 */
import type { Drive, Stage } from "./drive.js";
import { withoutWatches } from "./effects.js";
import { hardestPosition } from "./hardest.js";
import { searchLeast } from "./leastValue.js";
import { availableLine } from "./line.js";
import { trainOf } from "./stages.js";
import { solveTravel } from "./travel.js";

/** The same drive with its whole ratio times `factor`; losses and inertias stay those of its stages. */
export function withRatioTimes(drive: Drive, factor: number): Drive {
  const [first, ...rest] = drive.stages;
  const direct: Stage = {
    kind: "reduction",
    ratio: 1,
    efficiency: 1,
    backwardEfficiency: 1,
    nearSelfLocking: false,
    inertiaKgM2: 0,
  };
  const stage = first ?? direct;
  return { ...drive, stages: [{ ...stage, ratio: stage.ratio * factor }, ...rest] };
}

export interface QuickestRatio {
  readonly ratio: number;
  readonly timeS: number;
}

/** Of the ratio's logarithm: finer than any choice of teeth. */
const TOLERANCE = 1e-3;
const MOST_TRAVELS = 20;

/**
 * The ratio with the shortest travel, by a search of log(ratio), on the side where the motor moves
 * the load at all; null for a load without travel, or where no ratio makes it arrive.
 */
export function quickestRatio(drive: Drive): QuickestRatio | null {
  const { ratio } = trainOf(drive.stages);
  const share = hardestPosition(drive).motorTorqueNm / availableLine(drive).stallTorqueNm;
  if (!Number.isFinite(share)) return null;
  // Below the first bound it stalls. Inertia can ask for more ratio than the static load does, never for a hundred times more.
  const least = Math.max(share * 1.02, 1e-3);
  const low = Math.log(least);
  const high = Math.log(Math.max(least * 20, 20));
  let best: QuickestRatio | null = null;
  let unresolved = 0;
  const unwatched = withoutWatches(drive);
  const timeAt = (log: number): number => {
    const factor = Math.exp(log);
    // Travels that take too many steps to follow are absurd and slow: one of them ends the search.
    if (unresolved > 0) return Number.POSITIVE_INFINITY;
    const travel = solveTravel(withRatioTimes(unwatched, factor), { coarse: true, timeOnly: true });
    if (travel?.outcome === "unresolved") unresolved++;
    const timeS = travel?.timeS ?? null;
    if (timeS !== null && (best === null || timeS < best.timeS)) best = { ratio: ratio * factor, timeS };
    return timeS ?? Number.POSITIVE_INFINITY;
  };
  searchLeast(timeAt, low, high, { tolerance: TOLERANCE, most: MOST_TRAVELS });
  return best;
}
