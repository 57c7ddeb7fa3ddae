/**
 * One travel at full command: from rest at the start to the end, with heat and protection along the way.
 *
 * Protection is watched but does not stop the travel: its time then says when it would. Deliberately not here: the two ways to
 * solve it (closedTravel.ts, travelRun.ts).
 */
import { closedTravel, hasClosedForm } from "./closedTravel.js";
import type { Drive } from "./drive.js";
import { isFollowing, scalesOf } from "./motionScales.js";
import { coldState, startState } from "./motionState.js";
import { createObserver } from "./observer.js";
import { type Plant, plantOf } from "./plant.js";
import { goalOf, type TravelGoal } from "./travelGoal.js";
import { finishTravel, type TravelOptions, type TravelResult } from "./travelResult.js";
import { integrateTravel } from "./travelRun.js";

/** Shorter than this (rad, or rad/s of a flywheel) there is nothing to travel. */
const NO_TRAVEL = 1e-100;

/** The travel; null for a roller, which has none. */
export function solveTravel(drive: Drive, options: TravelOptions = {}): TravelResult | null {
  const plant = plantOf(drive);
  if (plant.load.kind === "roller") return null;
  const goal = goalOf(plant);
  const start = plant.load.endless ? (options.fromSpeedRadPerS ?? 0) : 0;
  if (goal.reachable && goal.target <= Math.max(start, NO_TRAVEL)) return nothingToDo(plant, options);
  const closed = goal.reachable && !options.sampling && hasClosedForm(plant) && !isFollowing(plant, scalesOf(plant));
  return (closed ? inClosedForm(plant, goal, start, !options.timeOnly) : null) ?? integrateTravel(plant, goal, options);
}

function nothingToDo(plant: Plant, options: TravelOptions): TravelResult {
  return finishTravel(plant, createObserver(plant, false), startState(plant, options.from), 0, "arrives");
}

function inClosedForm(plant: Plant, goal: TravelGoal, fromRadPerS: number, sums: boolean): TravelResult | null {
  const found = closedTravel(
    plant,
    fromRadPerS,
    plant.load.endless ? { speedRadPerS: goal.target } : { progressRad: goal.target },
    sums,
  );
  if (!found) return null;
  return {
    outcome: "arrives",
    timeS: found.timeS,
    coveredS: found.timeS,
    endSpeed: found.endSpeed * plant.load.ownPerRad,
    rmsMotorCurrentA: Math.sqrt(found.squares / found.timeS),
    sourceEnergyJ: found.energyJ,
    carried: coldState(plant),
    windingPeakC: null,
    peakMotorCurrentA: found.peakMotorCurrentA,
    peakSourceCurrentA: found.peakSourceCurrentA,
    lowestSupplyV: found.lowestSupplyV,
    lowestSupplyAtS: found.lowestSupplyAtS,
    windingLimitAfterS: null,
    opensAfterS: null,
    mayOpenAfterS: null,
    borderline: false,
    belowFloorS: 0,
    supplied: true,
    samples: [],
  };
}
