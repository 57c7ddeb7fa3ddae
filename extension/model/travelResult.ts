/** What a travel comes to. Deliberately no equations. */
import { ambientOf } from "./heat.js";
import { layoutOf } from "./motionLayout.js";
import { type CarriedState, carriedState } from "./motionState.js";
import type { Observation, Observer } from "./observer.js";
import type { Plant } from "./plant.js";

/**
 * `arrives`; `never-starts`: too heavy from rest; `stands-still`: somewhere on the way; `never-reaches-speed`: a target at or beyond
 * the steady speed; `unresolved`: too many steps or events to follow.
 */
export type TravelOutcome = "arrives" | "never-starts" | "stands-still" | "never-reaches-speed" | "unresolved";

/** One motor's values unless the name says source. */
export interface TravelResult extends Readonly<Observation> {
  readonly outcome: TravelOutcome;
  /** null where it does not arrive. */
  readonly timeS: number | null;
  /** Time that the numbers cover, s: to the arrival, or to where it ends without. */
  readonly coveredS: number;
  /** In the load's own coordinate per second. */
  readonly endSpeed: number;
  readonly rmsMotorCurrentA: number;
  readonly sourceEnergyJ: number;
  /** What a following phase starts from. */
  readonly carried: CarriedState;
}

export interface TravelOptions {
  readonly sampling?: boolean;
  /** To 1e-7 instead of 1e-8, for what-ifs. */
  readonly coarse?: boolean;
  /** Current and energy over the time are not wanted; they are then 0 where a closed form holds. */
  readonly timeOnly?: boolean;
  /** Absent: cold, protection at rest. */
  readonly from?: CarriedState;
  /** Speed that a flywheel starts from, rad/s. */
  readonly fromSpeedRadPerS?: number;
}

/** The result at the end of a course; `speed` is the output shaft's, rad/s. */
export function finishTravel(
  plant: Plant,
  observer: Observer,
  state: Float64Array,
  timeS: number,
  outcome: TravelOutcome,
  speed = 0,
): TravelResult {
  observer.close(timeS);
  const { seen } = observer;
  const layout = layoutOf(plant);
  const windingPeakC = layout.winding < 0 ? null : (seen.windingPeakC ?? ambientOf(plant.drive));
  // Field by field: a spread costs a tenth of a travel.
  return {
    outcome,
    timeS: outcome === "arrives" ? timeS : null,
    coveredS: timeS,
    endSpeed: speed * plant.load.ownPerRad,
    rmsMotorCurrentA: timeS > 0 ? Math.sqrt((state[layout.squares] as number) / timeS) : seen.peakMotorCurrentA,
    sourceEnergyJ: state[layout.energy] as number,
    carried: carriedState(plant, state),
    windingPeakC,
    peakMotorCurrentA: seen.peakMotorCurrentA,
    peakSourceCurrentA: seen.peakSourceCurrentA,
    lowestSupplyV: seen.lowestSupplyV,
    lowestSupplyAtS: seen.lowestSupplyAtS,
    windingLimitAfterS: seen.windingLimitAfterS,
    opensAfterS: seen.opensAfterS,
    mayOpenAfterS: seen.mayOpenAfterS,
    borderline: seen.borderline,
    belowFloorS: seen.belowFloorS,
    supplied: seen.supplied,
    samples: seen.samples,
  };
}
