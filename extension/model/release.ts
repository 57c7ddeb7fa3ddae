/**
 * A flywheel that gives up energy: how far its speed drops and how long the motor needs to bring it back.
 *
 * Deliberately not here: repeated releases (repeats.ts).
 */
import type { Drive } from "./drive.js";
import type { CarriedState } from "./motionState.js";
import { plantOf, turningInertia } from "./plant.js";
import { solveTravel } from "./travel.js";
import type { TravelResult } from "./travelResult.js";

export interface Release {
  /** Just after, rad/s at the output shaft; 0 where the turning inertia holds less than the release takes. */
  readonly speedAfterRadPerS: number;
  /** Back to the declared speed at full command. */
  readonly recovery: TravelResult;
}

/** ½·J·(ω² − ω′²) = E with J the whole turning inertia, rotors included; null for anything that has no release. */
export function solveRelease(drive: Drive, from?: CarriedState): Release | null {
  const { load } = drive;
  if (load.kind !== "flywheel" || load.releaseEnergyJ === undefined) return null;
  const inertia = turningInertia(plantOf(drive), 0);
  const square = load.speedRadPerS ** 2 - (2 * load.releaseEnergyJ) / inertia;
  const speedAfterRadPerS = Math.sqrt(Math.max(square, 0));
  const recovery = solveTravel(drive, { fromSpeedRadPerS: speedAfterRadPerS, ...(from && { from }) });
  return recovery && { speedAfterRadPerS, recovery };
}
