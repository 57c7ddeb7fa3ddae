/**
 * Power screws: torque to raise and to lower, with collar.
 *
 * Deliberately not here: the screw as a load over its travel (shaftLoad.ts).
 */
import type { Load } from "./drive.js";

type Screw = Extract<Load, { kind: "screw" }>;

/** A thread so rough that the equations give no finite torque counts as a lever of this many mean diameters: nothing moves it. */
const JAMMED = 1e6;

export interface ScrewTorques {
  /** Torque to move against the force, N·m. */
  readonly raisingNm: number;
  /** Torque to move with the force, N·m; below 0 the force drives the screw. */
  readonly loweringNm: number;
  /** Torque of the force with all friction left out, N·m. */
  readonly frictionlessNm: number;
}

/**
 * T_R = F·d/2·(l + π·f·d·sec α)/(π·d − f·l·sec α) + F·f_c·d_c/2, T_L = F·d/2·(π·f·d·sec α − l)/(π·d + f·l·sec α) + F·f_c·d_c/2.
 * d mean diameter, l lead, α half thread angle. Source: Budynas and Nisbett, Shigley's Mechanical Engineering Design, eqs 8-1, 8-2,
 * 8-5, 8-6. A given efficiency (ball screw) replaces them: T_R = F·l/(2π·η), T_L = −F·l/(2π)·(2 − 1/η).
 */
export function screwTorques(screw: Screw): ScrewTorques {
  const force = Math.abs(screw.forceN);
  const frictionlessNm = (force * screw.leadM) / (2 * Math.PI);
  if (screw.efficiency !== undefined) {
    return {
      raisingNm: frictionlessNm / screw.efficiency,
      loweringNm: -frictionlessNm * (2 - 1 / screw.efficiency),
      frictionlessNm,
    };
  }
  const { meanDiameterM: diameter, leadM: lead, collar } = screw;
  const secant = 1 / Math.cos(screw.threadAngleRad);
  const rubbing = screw.friction * secant;
  const collarNm = collar ? (force * collar.friction * collar.meanDiameterM) / 2 : 0;
  const opening = Math.PI * diameter - rubbing * lead;
  const lever = opening > 0 ? (lead + Math.PI * rubbing * diameter) / opening : JAMMED;
  const lowering = (Math.PI * rubbing * diameter - lead) / (Math.PI * diameter + rubbing * lead);
  return {
    raisingNm: ((force * diameter) / 2) * Math.min(lever, JAMMED) + collarNm,
    loweringNm: ((force * diameter) / 2) * lowering + collarNm,
    frictionlessNm,
  };
}

/** True where the force alone does not turn the screw: the lowering torque, collar included, is above 0. */
export function screwSelfLocks(screw: Screw): boolean {
  return screwTorques(screw).loweringNm > 0;
}

/** Useful over spent work when raising: F·l/(2π·T_R). */
export function screwEfficiency(screw: Screw): number {
  const { raisingNm, frictionlessNm } = screwTorques(screw);
  return frictionlessNm / raisingNm;
}
