/**
 * Two points of a line that people ask for: greatest output power and best efficiency.
 *
 * Deliberately not here: where the mechanism itself runs.
 */
import type { MotorLine } from "./line.js";

/** A point on a line, one motor: N·m, rad/s, A, W; efficiency from the line's voltage to the shaft. */
export interface LinePoint {
  readonly torqueNm: number;
  readonly speedRadPerS: number;
  readonly currentA: number;
  readonly shaftPowerW: number;
  readonly efficiency: number;
}

/** The line is straight, so that T·ω peaks at half the stall torque and half the no-load speed. */
export function peakPowerPoint(line: MotorLine): LinePoint {
  return linePoint(line, line.stallTorqueNm / 2);
}

/**
 * Torque of the best share of T·ω in V·I.
 *
 * With ω = ω_n·(1 − t), I = I_n + (I_s − I_n)·t, t = T/T_s, the share t(1 − t)/(a + (1 − a)t) with a = I_n/I_s has its one maximum
 * at t = √a/(1 + √a): setting the derivative to 0 gives (1 − a)t² + 2at − a = 0. For a constant loss torque this is the
 * textbook's (1 − √(I_0/I_s))².
 */
export function peakEfficiencyPoint(line: MotorLine): LinePoint {
  const root = Math.sqrt(line.stallCurrentA > 0 ? Math.min(line.noLoadCurrentA / line.stallCurrentA, 1) : 0);
  return linePoint(line, (line.stallTorqueNm * root) / (1 + root));
}

/** The point of a line at a torque. */
export function linePoint(line: MotorLine, torqueNm: number): LinePoint {
  const speedRadPerS = line.speedAt(torqueNm);
  const currentA = line.currentAt(torqueNm);
  const shaftPowerW = torqueNm * speedRadPerS;
  const spent = line.voltageV * currentA;
  return { torqueNm, speedRadPerS, currentA, shaftPowerW, efficiency: spent > 0 ? shaftPowerW / spent : 0 };
}
