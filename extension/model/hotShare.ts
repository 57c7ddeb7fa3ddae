/**
 * The share of stall torque that the load needs when the winding is as hot as its declared use makes it.
 *
 * Copper conducts worse and magnets weaken with heat, so that the same load takes a larger share than on the sheet's 25 °C. Deliberately
 * not here: how hot it gets (travel.ts, runs.ts, repeats.ts).
 */
import type { Drive } from "./drive.js";
import { hardestPosition } from "./hardest.js";
import { ambientOf } from "./heat.js";
import type { HeldRun } from "./heldRun.js";
import { availableLine } from "./line.js";
import type { RepeatedRun } from "./repeats.js";
import { driveAt } from "./temperature.js";
import type { TravelResult } from "./travelResult.js";

/** What a mechanism does for long enough to warm it; a hold counts for as long as it is declared. */
export interface WarmingRuns {
  readonly travel: TravelResult | null;
  readonly hold: HeldRun | null;
  readonly turning: HeldRun | null;
  readonly repeats: RepeatedRun | null;
}

export interface HotShare {
  /** Highest winding temperature of the declared use, °C; the motor's limit where it would pass that. */
  readonly hotWindingC: number | null;
  /** Required over available stall torque then; null where there is none. */
  readonly hotStallShare: number | null;
}

/** Both null without thermal data. */
export function hotShare(drive: Drive, { travel, hold, turning, repeats }: WarmingRuns): HotShare {
  const { thermal } = drive.motor;
  if (thermal === undefined) return { hotWindingC: null, hotStallShare: null };
  const held = drive.holdForS === undefined ? null : hold;
  const runsAway = [held, turning, repeats].some((run) => run?.runsAway);
  const peaks = [travel?.windingPeakC, held?.windingFinalC, turning?.windingFinalC, repeats?.windingPeakC];
  const hottestC = Math.max(ambientOf(drive), ...peaks.map((peak) => peak ?? Number.NEGATIVE_INFINITY));
  const hotWindingC = runsAway ? thermal.limitC : Math.min(hottestC, Math.max(thermal.limitC, ambientOf(drive)));
  const { stallTorqueNm } = availableLine(driveAt(drive, hotWindingC));
  return { hotWindingC, hotStallShare: stallTorqueNm > 0 ? hardestPosition(drive).motorTorqueNm / stallTorqueNm : null };
}
