/** How one mechanism's motion is laid out in a state vector. Deliberately only names: rates are in motionRates.ts. */
import type { Plant } from "./plant.js";

/**
 * `moving` with inertia; `following` without it: speed follows torque at once; `blocked` at full command, watching for the
 * moment it starts (`startsAs`) or not at all; `held` by a controller at one motor's torque (N·m) and speed (rad/s).
 */
export type Mode =
  | { readonly kind: "moving" | "following" }
  | { readonly kind: "blocked"; readonly startsAs?: "moving" | "following" }
  | { readonly kind: "held"; readonly torqueNm: number; readonly motorSpeedRadPerS: number };

/** Where in the state each quantity stands; −1: not there. */
export interface Layout {
  /** Turn of the output shaft since the start, rad. */
  readonly progress: 0;
  /** Of the output shaft, rad/s. */
  readonly speed: 1;
  /** °C. */
  readonly winding: number;
  readonly housing: number;
  /** θ of a breaker or PTC; damage at a fuse's slow gate. */
  readonly protection: number;
  /** Damage at a fuse's fast gate. */
  readonly fast: number;
  /** ∫I² dt of one motor, A²·s. */
  readonly squares: number;
  /** ∫V·I dt of the supply, charging left out, J. */
  readonly energy: number;
  readonly size: number;
}

export function layoutOf(plant: Plant): Layout {
  const heated = plant.motor.thermal !== undefined;
  const { protection } = plant.drive;
  let next = 2;
  const place = (present: boolean): number => (present ? next++ : -1);
  return {
    progress: 0,
    speed: 1,
    winding: place(heated),
    housing: place(heated),
    protection: place(protection !== undefined),
    fast: place(protection?.kind === "fuse"),
    squares: place(true),
    energy: place(true),
    size: next,
  };
}
