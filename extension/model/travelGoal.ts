/** Where a travel ends. Deliberately not here: how it gets there. */
import { operatingPointAt } from "./operatingPoint.js";
import type { Plant } from "./plant.js";
import { throughTrain } from "./stages.js";

export interface TravelGoal {
  /** Progress in rad, or a flywheel's speed in rad/s. */
  readonly target: number;
  /** False where a flywheel's target lies at or beyond the steady speed: the travel then ends just below that. */
  readonly reachable: boolean;
}

/** A target beyond the steady speed is approached to this share of it. */
const STEADY_SHARE = 1e-6;

/** Nearer to the steady speed than this share is at it. */
const AT_STEADY = 1e-9;

export function goalOf(plant: Plant): TravelGoal {
  const { load } = plant.drive;
  if (load.kind !== "flywheel") return { target: plant.spanRad, reachable: true };
  const torque = throughTrain(plant.train, plant.load.opposing(0, 1)) / (plant.train.ratio * plant.count);
  const steady = operatingPointAt(plant.drive, torque).speedRadPerS / plant.train.ratio;
  const reachable = load.speedRadPerS < steady * (1 - AT_STEADY);
  return { target: reachable ? load.speedRadPerS : steady * (1 - STEADY_SHARE), reachable };
}
