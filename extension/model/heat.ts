/**
 * The two-node heat network of a motor: winding, housing, ambient.
 *
 * Deliberately not here: what the current is (motion.ts) and how time passes (integrate.ts).
 */
import type { Drive, MotorConstants } from "./drive.js";
import { copperFactor, magnetFactor, SHEET_TEMPERATURE_C } from "./temperature.js";

/** Resistances in K/W, capacities in J/K, temperatures in °C. */
export interface HeatNetwork {
  readonly windingToHousingKPerW: number;
  readonly housingToAmbientKPerW: number;
  readonly windingJPerK: number;
  readonly housingJPerK: number;
  readonly ambientC: number;
  readonly limitC: number;
}

/** C_w = windingTime/R_wh, C_h = housingTime/R_ha; null without thermal data. Source: Lumped two-mass motor model of thermal catalogues. */
export function heatNetworkOf(motor: MotorConstants): HeatNetwork | null {
  const { thermal } = motor;
  if (!thermal) return null;
  return {
    windingToHousingKPerW: thermal.windingToHousingKPerW,
    housingToAmbientKPerW: thermal.housingToAmbientKPerW,
    windingJPerK: thermal.windingTimeS / thermal.windingToHousingKPerW,
    housingJPerK: thermal.housingTimeS / thermal.housingToAmbientKPerW,
    ambientC: ambientOf({ motor }),
    limitC: thermal.limitC,
  };
}

/** Where everything starts, °C. */
export function ambientOf({ motor }: Pick<Drive, "motor">): number {
  return motor.thermal?.ambientC ?? SHEET_TEMPERATURE_C;
}

/** The network's own two time constants, s, the shorter first: eigenvalues of the linear two-node equations. */
export function heatTimeConstants(network: HeatNetwork): readonly [number, number] {
  const inner = 1 / (network.windingToHousingKPerW * network.windingJPerK);
  const cross = 1 / (network.windingToHousingKPerW * network.housingJPerK);
  const outer = 1 / (network.housingToAmbientKPerW * network.housingJPerK);
  const sum = inner + cross + outer;
  // Both roots of s² − sum·s + inner·outer, the smaller without cancellation.
  const fast = (sum + Math.sqrt(Math.max(sum * sum - 4 * inner * outer, 0))) / 2;
  return [1 / fast, fast / (inner * outer)];
}

export interface SteadyHeat {
  readonly windingC: number;
  readonly housingC: number;
  readonly copperW: number;
}

/** Above this no motor is one any more: the heat has run away. */
export const RUNAWAY_C = 2000;

/**
 * Steady temperatures under copper heat that grows with the winding's temperature; null: none exists, the heat runs away.
 *
 * T = T_a + P(T)·(R_wh + R_ha). P is convex, so that Newton's iteration from ambient climbs to the lowest root or meets a
 * slope that no root can lie behind.
 */
export function steadyHeat(network: HeatNetwork, copperW: (windingC: number) => number): SteadyHeat | null {
  const total = network.windingToHousingKPerW + network.housingToAmbientKPerW;
  const excess = (windingC: number): number => network.ambientC + copperW(windingC) * total - windingC;
  let windingC = network.ambientC;
  for (let k = 0; k < 100; k++) {
    const value = excess(windingC);
    const delta = 1e-4;
    const slope = (excess(windingC + delta) - excess(windingC - delta)) / (2 * delta);
    if (slope >= 0 || !Number.isFinite(value)) return null;
    const next = windingC - value / slope;
    if (next > RUNAWAY_C) return null;
    if (Math.abs(next - windingC) <= 1e-10 * Math.max(1, Math.abs(next))) {
      const heat = copperW(next);
      return { windingC: next, housingC: network.ambientC + heat * network.housingToAmbientKPerW, copperW: heat };
    }
    windingC = next;
  }
  return null;
}

/** Copper heat of one motor that holds a torque at standstill, W: (T/k_t(T_w))²·R(T_w). */
export function holdingHeat(motor: MotorConstants, torqueNm: number): (windingC: number) => number {
  return (windingC) => {
    const currentA = torqueNm / (motor.torqueConstantNmPerA * magnetFactor(motor.magnet, windingC));
    return currentA * currentA * motor.resistanceOhm * copperFactor(windingC);
  };
}
