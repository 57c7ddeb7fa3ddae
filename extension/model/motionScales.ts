/**
 * How large and how fast a mechanism's motion is, before it is known: tolerances and the choice of method rest on it.
 *
 * Deliberately not here: the motion itself.
 */
import { availableLine } from "./line.js";
import { type Plant, turningInertia } from "./plant.js";

/** Sizes that count as 1 for the tolerance: output shaft in rad and rad/s, s, A of one motor. */
export interface MotionScales {
  readonly progressRad: number;
  readonly speedRadPerS: number;
  readonly timeS: number;
  readonly currentA: number;
}

/** Error of a step as a share, so that over a whole course 1e-8 is kept; the explicit method stays further below what it is allowed. */
export const STIFF_TOLERANCE = 1e-10;
export const EXPLICIT_TOLERANCE = 2e-9;
/** Share of it where corners of a curve start the method again and again. */
export const CORNERED_SHARE = 0.25;
/** Times as much for what-ifs, whose times are then off by 1e-7 at most in practice. */
export const COARSE_FACTOR = 200;
/** Past this a course is given up. */
export const MOST_STEPS = 20_000;
/** Shorter mechanical time constants than this share of the travel: speed follows torque at once. */
const FOLLOWING_SHARE = 1e-5;

/** From the available line, losses and load left out; a heavy mechanism's time is that of its full torque's acceleration. */
export function scalesOf(plant: Plant): MotionScales {
  const { load, train, motor, count } = plant;
  const line = availableLine(plant.drive);
  const speedRadPerS = Math.max(line.noLoadSpeedRadPerS, 1e-9 * motor.noLoadSpeedRadPerS) / train.ratio;
  const currentA = Math.max(Math.min(line.stallCurrentA, plant.limitA), 1e-9);
  const acceleration = (count * train.ratio * motor.torqueConstantNmPerA * currentA) / turningInertia(plant, load.startRad);
  const timeS = load.endless
    ? Math.max(speedRadPerS / acceleration, 1e-12)
    : Math.max(plant.spanRad / speedRadPerS, Math.sqrt((2 * plant.spanRad) / acceleration));
  return { progressRad: load.endless ? speedRadPerS * timeS : plant.spanRad, speedRadPerS, timeS, currentA };
}

/** True where inertia does not show: there is none, or its time constant is below 1e-5 of the travel at no-load speed. */
export function isFollowing(plant: Plant, scales: MotionScales): boolean {
  const { load } = plant;
  let inertia = Math.max(turningInertia(plant, load.startRad), turningInertia(plant, load.endRad));
  for (const corner of load.corners) inertia = Math.max(inertia, turningInertia(plant, corner));
  if (inertia === 0) return true;
  if (plant.load.endless) return false;
  return mechanicalTimeConstant(plant, inertia) < FOLLOWING_SHARE * scales.timeS;
}

/** τ = J/(n·N²·k_t·(k_e/R + I_loss′)), losses of the train left out, s. Source: the DC machine's speed step, any textbook of drives. */
export function mechanicalTimeConstant(plant: Plant, inertiaKgM2: number): number {
  const line = availableLine(plant.drive);
  const damping = plant.motor.torqueConstantNmPerA * (plant.motor.backEmfVPerRadPerS / line.seriesOhm + plant.lossSlopeAsPerRad);
  return inertiaKgM2 / (plant.count * plant.train.ratio * plant.train.ratio * damping);
}
