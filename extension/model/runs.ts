/**
 * The three states that a mechanism may stay in: held still, stalled at full command, kept turning.
 *
 * Deliberately not here: how the time passes in them (heldRun.ts).
 */
import type { Drive } from "./drive.js";
import { type HeldRun, solveHeld } from "./heldRun.js";
import { holdPoint } from "./hold.js";
import type { CarriedState } from "./motionState.js";
import { operatingPointAt } from "./operatingPoint.js";
import { plantOf } from "./plant.js";
import { throughTrain } from "./stages.js";

/** Holding the load where it pulls hardest, for `holdFor` and beyond; null for a flywheel. */
export function solveHold(drive: Drive, from?: CarriedState): HeldRun | null {
  const point = holdPoint(drive);
  if (!point) return null;
  return solveHeld(plantOf(drive), { kind: "held", torqueNm: point.motorTorqueNm, motorSpeedRadPerS: 0 }, drive.holdForS, from);
}

/** Full command with the output shaft blocked, from cold. */
export function solveStall(drive: Drive): HeldRun {
  return solveHeld(plantOf(drive), { kind: "blocked" });
}

/**
 * A flywheel or roller that keeps turning: at the declared speed by lowered duty, else (or where the line does not reach it) at
 * full command; null for loads with a travel.
 */
export function solveTurning(drive: Drive, lastsS?: number, from?: CarriedState): HeldRun | null {
  const { load } = drive;
  if (load.kind !== "flywheel" && load.kind !== "roller") return null;
  const plant = plantOf(drive);
  const torqueNm = throughTrain(plant.train, plant.load.opposing(0, 1)) / (plant.train.ratio * plant.count);
  const point = operatingPointAt(drive, torqueNm);
  const askedRadPerS = load.speedRadPerS === undefined ? Number.POSITIVE_INFINITY : load.speedRadPerS * plant.train.ratio;
  if (point.stalled) return solveHeld(plant, { kind: "blocked" }, lastsS, from);
  if (askedRadPerS < point.speedRadPerS) {
    return solveHeld(plant, { kind: "held", torqueNm, motorSpeedRadPerS: askedRadPerS }, lastsS, from);
  }
  return solveHeld(plant, { kind: "following" }, lastsS, from);
}
