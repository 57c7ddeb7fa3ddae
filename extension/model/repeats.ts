/**
 * A mechanism that repeats its work every so often: its heat in the periodic state, and when its protection opens on the way.
 *
 * One cycle: the travel (a flywheel: release and recovery), the hold for `holdFor`, rest without current until the next one.
 * Deliberately not here: several mechanisms in one load cycle.
 */
import type { Drive } from "./drive.js";
import { heatNetworkOf, heatTimeConstants, RUNAWAY_C } from "./heat.js";
import { solveHeld } from "./heldRun.js";
import { holdPoint } from "./hold.js";
import { type CarriedState, coldState } from "./motionState.js";
import { type Plant, plantOf } from "./plant.js";
import { solveRelease } from "./release.js";
import { solveTravel } from "./travel.js";
import type { TravelResult } from "./travelResult.js";

export interface RepeatedRun {
  /** Highest winding temperature of a cycle in the periodic state, °C; null without thermal data or where it runs away. */
  readonly windingPeakC: number | null;
  readonly runsAway: boolean;
  /** From the first start, s; null: protection stays closed. */
  readonly tripsAfterS: number | null;
  /** False where a cycle's travel and hold last longer than `every`: it then repeats without rest. */
  readonly fits: boolean;
}

/** The periodic state counts as reached when what is left to rise is below this, K. */
const PERIODIC_K = 0.1;
/** Cycles that are followed one by one for protection's sake. */
const FOLLOWED = 100;
const MOST_JUMPS = 60;

/** null where nothing repeats, or the travel never arrives. */
export function solveRepeats(drive: Drive): RepeatedRun | null {
  if (drive.everyS === undefined || drive.load.kind === "roller") return null;
  const plant = plantOf(drive);
  const opening = solveTravel(drive);
  if (opening?.outcome !== "arrives") return null;
  let state = drive.load.kind === "flywheel" ? opening.carried : coldState(plant);
  let elapsedS = drive.load.kind === "flywheel" ? opening.coveredS : 0;
  let tripsAfterS = drive.load.kind === "flywheel" ? opening.opensAfterS : null;
  let fits = true;
  for (let cycle = 0; cycle < FOLLOWED; cycle++) {
    const run = oneCycle(drive, plant, state, drive.everyS);
    if (!run) return null;
    if (tripsAfterS === null && run.opensAfterS !== null) tripsAfterS = elapsedS + run.opensAfterS;
    fits &&= run.fits;
    const settled = leftToRise(plant, state, run) < PERIODIC_K && Math.abs(run.end.protection - state.protection) < 1e-3;
    elapsedS += run.lastsS;
    state = run.end;
    if (state.windingC > RUNAWAY_C) return { windingPeakC: null, runsAway: true, tripsAfterS, fits };
    if (settled) return { windingPeakC: run.windingPeakC, runsAway: false, tripsAfterS, fits };
  }
  return { ...jumpToPeriodic(drive, plant, state, drive.everyS), tripsAfterS, fits };
}

interface Cycle {
  readonly end: CarriedState;
  readonly lastsS: number;
  readonly windingPeakC: number | null;
  readonly opensAfterS: number | null;
  readonly fits: boolean;
}

function oneCycle(drive: Drive, plant: Plant, from: CarriedState, everyS: number): Cycle | null {
  const work = workOf(drive, from);
  if (!work || work.timeS === null) return null;
  let state = work.carried;
  let lastsS = work.timeS;
  let opensAfterS = work.opensAfterS;
  let windingPeakC = work.windingPeakC;
  const hold = drive.holdForS ? holdPoint(drive) : null;
  if (hold && drive.holdForS) {
    const held = solveHeld(plant, { kind: "held", torqueNm: hold.motorTorqueNm, motorSpeedRadPerS: 0 }, drive.holdForS, state);
    if (opensAfterS === null && held.trip.opensAfterS !== null && held.trip.opensAfterS <= drive.holdForS) {
      opensAfterS = lastsS + held.trip.opensAfterS;
    }
    if (held.windingFinalC !== null) windingPeakC = Math.max(windingPeakC ?? held.windingFinalC, held.windingFinalC);
    state = held.carried;
    lastsS += drive.holdForS;
  }
  const restS = everyS - lastsS;
  if (restS > 0) {
    state = solveHeld(plant, { kind: "held", torqueNm: 0, motorSpeedRadPerS: 0 }, restS, state).carried;
    lastsS = everyS;
  }
  return { end: { ...state, fast: 0 }, lastsS, windingPeakC, opensAfterS, fits: restS >= 0 };
}

function workOf(drive: Drive, from: CarriedState): TravelResult | null {
  return solveRelease(drive, from)?.recovery ?? solveTravel(drive, { from });
}

/** What a slow network still rises beyond one cycle's rise, were it linear, K. */
function leftToRise(plant: Plant, before: CarriedState, run: Cycle): number {
  const network = heatNetworkOf(plant.motor);
  if (!network) return 0;
  const slow = heatTimeConstants(network)[1];
  const rise = Math.max(Math.abs(run.end.windingC - before.windingC), Math.abs(run.end.housingC - before.housingC));
  return rise / -Math.expm1(-run.lastsS / slow);
}

/** Skips the many cycles of a slow housing: each jump adds what a linear network would still rise. */
function jumpToPeriodic(
  drive: Drive,
  plant: Plant,
  from: CarriedState,
  everyS: number,
): Pick<RepeatedRun, "windingPeakC" | "runsAway"> {
  const network = heatNetworkOf(plant.motor);
  if (!network) return { windingPeakC: null, runsAway: false };
  const slow = heatTimeConstants(network)[1];
  let state = from;
  for (let jump = 0; jump < MOST_JUMPS; jump++) {
    const run = oneCycle(drive, plant, state, everyS);
    if (!run || state.windingC > RUNAWAY_C || run.end.windingC > RUNAWAY_C) break;
    const left = leftToRise(plant, state, run);
    if (left < PERIODIC_K) return { windingPeakC: run.windingPeakC, runsAway: false };
    const share = 1 / -Math.expm1(-run.lastsS / slow);
    state = {
      ...run.end,
      windingC: state.windingC + (run.end.windingC - state.windingC) * share,
      housingC: state.housingC + (run.end.housingC - state.housingC) * share,
    };
  }
  return { windingPeakC: null, runsAway: true };
}
