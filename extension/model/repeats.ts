/**
 * A mechanism that repeats its work every so often: its heat in the periodic state, and when its protection opens on the way.
 *
 * One cycle: the travel (a flywheel: release and recovery), the hold for `holdFor`, rest without current until the next one.
 * Deliberately not here: several mechanisms in one load cycle.
 */
import type { Drive } from "./drive.js";
import { type HeatRise, heatNetworkOf, RUNAWAY_C, riseToCome } from "./heat.js";
import { solveHeld } from "./heldRun.js";
import { holdPoint } from "./hold.js";
import { type CarriedState, coldState } from "./motionState.js";
import { type Plant, plantOf } from "./plant.js";
import { solveRelease } from "./release.js";
import { solveTravel } from "./travel.js";
import type { TravelResult } from "./travelResult.js";

export interface RepeatedRun {
  /** Highest winding temperature of a cycle in the periodic state, °C; null without thermal data or where there is none. */
  readonly windingPeakC: number | null;
  /** It gets ever hotter, or so hot that it does not arrive any more. */
  readonly runsAway: boolean;
  /** From the first start, s; null: protection stays closed. */
  readonly tripsAfterS: number | null;
  /** False where a cycle's travel and hold last longer than `every`: it then repeats without rest. */
  readonly fits: boolean;
}

/** The periodic state counts as reached when what is left to rise is below this, K. */
const PERIODIC_K = 0.1;
/** Less change of a protector's state in a cycle is none. */
const SETTLED = 1e-3;
/** Cycles that are followed one by one at first, as long as the protector's state still changes. */
const FOLLOWED = 100;
/** The same where it is known to open in the end. */
const FOLLOWED_TO_OPENING = 1000;
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
  let periodic: Periodic | undefined;
  for (let cycle = 0; cycle < FOLLOWED_TO_OPENING; cycle++) {
    const run = oneCycle(drive, plant, state, drive.everyS);
    if (!run) return cycle === 0 ? null : { windingPeakC: null, runsAway: true, tripsAfterS, fits: false };
    if (tripsAfterS === null && run.opensAfterS !== null) tripsAfterS = elapsedS + run.opensAfterS;
    fits &&= run.fits;
    const rests = Math.abs(run.end.protection - state.protection) < SETTLED;
    const settled = rests && leftToRise(plant, state, run) < PERIODIC_K;
    elapsedS += run.lastsS;
    state = run.end;
    if (state.windingC > RUNAWAY_C) return { windingPeakC: null, runsAway: true, tripsAfterS, fits };
    if (settled) return { windingPeakC: run.windingPeakC, runsAway: false, tripsAfterS, fits };
    if (!rests && cycle < FOLLOWED) continue;
    // What is left is slow heat. It drifts one way, so that a protector closed now and in the end stays closed in between.
    periodic ??= jumpToPeriodic(drive, plant, state, drive.everyS);
    if (tripsAfterS !== null || !periodic.opens) break;
  }
  periodic ??= jumpToPeriodic(drive, plant, state, drive.everyS);
  return { windingPeakC: periodic.windingPeakC, runsAway: periodic.runsAway, tripsAfterS, fits: fits && periodic.fits };
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
    const held = solveHeld(
      plant,
      { kind: "held", torqueNm: hold.motorTorqueNm, motorSpeedRadPerS: 0 },
      drive.holdForS,
      state,
      true,
    );
    if (opensAfterS === null && held.trip.opensAfterS !== null && held.trip.opensAfterS <= drive.holdForS) {
      opensAfterS = lastsS + held.trip.opensAfterS;
    }
    if (held.windingFinalC !== null) windingPeakC = Math.max(windingPeakC ?? held.windingFinalC, held.windingFinalC);
    state = held.carried;
    lastsS += drive.holdForS;
  }
  const restS = everyS - lastsS;
  if (restS > 0) {
    state = solveHeld(plant, { kind: "held", torqueNm: 0, motorSpeedRadPerS: 0 }, restS, state, true).carried;
    lastsS = everyS;
  }
  return { end: { ...state, fast: 0 }, lastsS, windingPeakC, opensAfterS, fits: restS >= 0 };
}

function workOf(drive: Drive, from: CarriedState): TravelResult | null {
  return solveRelease(drive, from)?.recovery ?? solveTravel(drive, { from });
}

/** What the cycles to come still add, were the network linear, K. */
function riseAhead(plant: Plant, before: CarriedState, { end, lastsS }: Cycle): HeatRise {
  const network = heatNetworkOf(plant.motor);
  if (!network) return { windingK: 0, housingK: 0 };
  return riseToCome(network, lastsS, { windingK: end.windingC - before.windingC, housingK: end.housingC - before.housingC });
}

function leftToRise(plant: Plant, before: CarriedState, run: Cycle): number {
  const { windingK, housingK } = riseAhead(plant, before, run);
  return Math.max(Math.abs(windingK), Math.abs(housingK));
}

interface Periodic extends Omit<RepeatedRun, "tripsAfterS"> {
  /** Whether protection opens in the last cycle looked at. */
  readonly opens: boolean;
}

/** Skips the many cycles of a slow housing: each jump adds what a linear network would still rise. */
function jumpToPeriodic(drive: Drive, plant: Plant, from: CarriedState, everyS: number): Periodic {
  const network = heatNetworkOf(plant.motor);
  if (!network) return { windingPeakC: null, runsAway: false, fits: true, opens: false };
  let state = from;
  let opens = false;
  let fits = true;
  for (let jump = 0; jump < MOST_JUMPS; jump++) {
    const run = oneCycle(drive, plant, state, everyS);
    if (!run || state.windingC > RUNAWAY_C || run.end.windingC > RUNAWAY_C) break;
    opens = run.opensAfterS !== null;
    fits = run.fits;
    if (leftToRise(plant, state, run) < PERIODIC_K) return { windingPeakC: run.windingPeakC, runsAway: false, fits, opens };
    const { windingK, housingK } = riseAhead(plant, state, run);
    state = { ...run.end, windingC: state.windingC + windingK, housingC: state.housingC + housingK };
  }
  return { windingPeakC: null, runsAway: true, fits, opens };
}
