/**
 * Gear stages: ratios, losses in both directions, inertias, and the whole train from motor to output shaft.
 *
 * Deliberately not here: drums, wheels and screws, which come after the output shaft (shaftLoad.ts).
 */
import type { Stage } from "./drive.js";

/**
 * Customary efficiency of a stage whose own is not given.
 *
 * Sources: spur 0.94 to 0.98 and more, worm aside (Shigley's and Mott's handbook ranges per mesh); roller chain 0.97 to 0.98
 * lubricated, up to 0.986 measured (Spicer et al., J. Mech. Des. 123, 2001); synchronous belt about 0.98 new; planetary
 * 0.97 to 0.98 per stage; a `reduction` of unknown make is taken lower.
 */
export const ASSUMED_EFFICIENCY: Readonly<Record<Exclude<Stage["kind"], "worm">, number>> = {
  spur: 0.98,
  chain: 0.97,
  belt: 0.97,
  planetary: 0.97,
  reduction: 0.95,
};

/**
 * Efficiency with the load driving, from the efficiency with the motor driving: 2 − 1/η.
 * The same loss torque in both directions; not above 0 means that the stage does not run back. Source: power-balance of a
 * constant loss torque, as for screws in Dubbel, Handbook of Mechanical Engineering.
 */
export function backwardEfficiency(efficiency: number): number {
  return 2 - 1 / efficiency;
}

export interface WormValues {
  readonly ratio: number;
  readonly leadAngleRad: number;
  readonly friction: number;
  /** Normal pressure angle, rad. */
  readonly pressureAngleRad: number;
  /** Replaces the friction equations. */
  readonly efficiency?: number;
  readonly inertiaKgM2: number;
  readonly maxTorqueNm?: number;
}

/** Self-locking closer to its border than this share is never claimed: vibration releases it. */
const SELF_LOCKING_MARGIN = 0.2;
const LEAST_EFFICIENCY = 1e-9;

/** A worm and its wheel as a stage. Angles in rad. */
export function wormStage(values: WormValues): Stage {
  const { ratio, leadAngleRad, friction, pressureAngleRad, inertiaKgM2 } = values;
  const maxTorque = values.maxTorqueNm === undefined ? {} : { maxTorqueNm: values.maxTorqueNm };
  const given = values.efficiency;
  const both =
    given === undefined
      ? wormEfficiencies(leadAngleRad, friction, pressureAngleRad)
      : { forward: given, backward: backwardEfficiency(given) };
  const frictionAngle = Math.atan(friction / Math.cos(pressureAngleRad));
  return {
    kind: "worm",
    ratio,
    efficiency: Math.max(both.forward, LEAST_EFFICIENCY),
    backwardEfficiency: both.backward,
    nearSelfLocking: given === undefined && Math.abs(leadAngleRad - frictionAngle) <= SELF_LOCKING_MARGIN * frictionAngle,
    inertiaKgM2,
    ...maxTorque,
  };
}

/**
 * Efficiency of a worm gearset, worm driving and wheel driving.
 *
 * η = (cos φ − f·tan λ)/(cos φ + f·cot λ), η_b = (cos φ − f·cot λ)/(cos φ + f·tan λ); λ lead angle, φ normal pressure angle,
 * rad. Source: Budynas and Nisbett, Shigley's Mechanical Engineering Design, worm gearing. Valid for 0 < λ < 90°.
 */
export function wormEfficiencies(
  leadAngleRad: number,
  friction: number,
  pressureAngleRad: number,
): { readonly forward: number; readonly backward: number } {
  const normal = Math.cos(pressureAngleRad);
  const tangent = Math.tan(leadAngleRad);
  return {
    forward: (normal - friction * tangent) / (normal + friction / tangent),
    backward: (normal - friction / tangent) / (normal + friction * tangent),
  };
}

/** All stages of a mechanism as one. */
export interface Train {
  /** Motor turns per output turn. */
  readonly ratio: number;
  readonly efficiency: number;
  /** Negative where the train does not run back. */
  readonly backwardEfficiency: number;
  /** False: power off, the train blocks the load. */
  readonly runsBack: boolean;
  /** True where the train holds the load without any current, with margin. */
  readonly selfLocking: boolean;
  /** Stages' inertias referred to the output shaft, kg·m². */
  readonly inertiaKgM2: number;
}

/** Multiplies the stages up; inertia J at a driven shaft that turns n times per output turn counts J·n² at the output. */
export function trainOf(stages: readonly Stage[]): Train {
  let ratio = 1;
  let efficiency = 1;
  let backward = 1;
  let inertiaKgM2 = 0;
  for (const stage of stages.toReversed()) {
    inertiaKgM2 += stage.inertiaKgM2 * ratio * ratio;
    ratio *= stage.ratio;
    efficiency *= stage.efficiency;
    backward *= stage.backwardEfficiency;
  }
  const runsBack = stages.every((stage) => stage.backwardEfficiency > 0);
  const selfLocking = stages.some((stage) => stage.backwardEfficiency <= 0 && !stage.nearSelfLocking);
  return { ratio, efficiency, backwardEfficiency: runsBack ? backward : -Math.abs(backward), runsBack, selfLocking, inertiaKgM2 };
}

/**
 * Torque that the motors' side must bring at the output shaft for a load torque there, N·m: Φ(x) = x/η when the motor drives,
 * else η_b·x; with a train that does not run back, lowering costs torque too.
 */
export function throughTrain(train: Train, loadTorqueNm: number): number {
  return loadTorqueNm >= 0 ? loadTorqueNm / train.efficiency : train.backwardEfficiency * loadTorqueNm;
}
