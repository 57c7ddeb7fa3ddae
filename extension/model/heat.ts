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

/** Above this no motor is one any more, °C: whatever the heat does then, it has run away. */
export const RUNAWAY_C = 2000;

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

/** Changes of winding and housing, K. */
export interface HeatRise {
  readonly windingK: number;
  readonly housingK: number;
}

/**
 * What winding and housing rise in all cycles to come, K, when one cycle of a length (s) changes them by `step` and its heat stays the
 * same: (1 − e^(At))⁻¹ of the step, by the two modes of the linear network x′ = A·x.
 */
export function riseToCome(network: HeatNetwork, cycleS: number, step: HeatRise): HeatRise {
  const inner = 1 / (network.windingToHousingKPerW * network.windingJPerK);
  const cross = 1 / (network.windingToHousingKPerW * network.housingJPerK);
  const outer = 1 / (network.housingToAmbientKPerW * network.housingJPerK);
  const [fastS, slowS] = heatTimeConstants(network);
  const [fast, slow] = [1 / fastS, 1 / slowS];
  const [byFast, bySlow] = [1 / -Math.expm1(-fast * cycleS), 1 / -Math.expm1(-slow * cycleS)];
  // Projections on the modes: (A + slow)/(slow − fast) and (A + fast)/(fast − slow).
  const gap = fast - slow;
  const share = (bySlow - byFast) / gap;
  const rest = (fast * bySlow - slow * byFast) / gap;
  const { windingK, housingK } = step;
  return {
    windingK: share * inner * (housingK - windingK) + rest * windingK,
    housingK: share * (cross * windingK - (cross + outer) * housingK) + rest * housingK,
  };
}

/** Copper heat of a steady current, W: at ambient, and what it grows by for each kelvin of the winding. */
export interface GrowingHeat {
  readonly atAmbientW: number;
  readonly perKW: number;
}

/**
 * Winding and housing temperature a time after a steady current began, from ambient, °C.
 *
 * The two nodes' equations stay linear with copper's straight line, x″ + s·x′ + p·x = const; both roots are real, since each node
 * heats the other. Overflows to Infinity where the heat runs away for long.
 */
export function heatingCurve(
  network: HeatNetwork,
  heat: GrowingHeat,
  timeS: number,
): { readonly windingC: number; readonly housingC: number } {
  const inner = 1 / network.windingToHousingKPerW;
  const outer = 1 / network.housingToAmbientKPerW;
  // x′ = A·x + b for the rises of winding and housing.
  const a = (heat.perKW - inner) / network.windingJPerK;
  const b = inner / network.windingJPerK;
  const c = inner / network.housingJPerK;
  const d = -(inner + outer) / network.housingJPerK;
  const drive = heat.atAmbientW / network.windingJPerK;
  const root = Math.sqrt((a - d) ** 2 + 4 * b * c);
  const fast = (a + d - root) / 2;
  const slow = fast + root;
  // e^(At) split into its two modes; ∫ of each over the time so far drives both rises.
  const grown = (rate: number): number => (rate === 0 ? timeS : Math.expm1(rate * timeS) / rate);
  const [fastPart, slowPart] = [grown(fast), grown(slow)];
  const winding = (drive * (slowPart * (a - fast) - fastPart * (a - slow))) / root;
  const housing = (drive * c * (slowPart - fastPart)) / root;
  return { windingC: network.ambientC + winding, housingC: network.ambientC + housing };
}

/** Time until a steady current brings the winding to a temperature, s; null: it never does. */
export function timeToTemperature(network: HeatNetwork, heat: GrowingHeat, windingC: number): number | null {
  if (windingC <= network.ambientC) return 0;
  const total = network.windingToHousingKPerW + network.housingToAmbientKPerW;
  const share = heat.perKW * total;
  if (!(heat.atAmbientW > 0) || (share < 1 && network.ambientC + (heat.atAmbientW * total) / (1 - share) <= windingC))
    return null;
  let low = 0;
  let high = heatTimeConstants(network)[0];
  while (heatingCurve(network, heat, high).windingC < windingC) {
    low = high;
    high *= 2;
    if (!Number.isFinite(high)) return null;
  }
  for (let k = 0; k < 200 && high - low > 1e-12 * high; k++) {
    const middle = (low + high) / 2;
    if (heatingCurve(network, heat, middle).windingC < windingC) low = middle;
    else high = middle;
  }
  return high;
}

export interface SteadyHeat {
  readonly windingC: number;
  readonly housingC: number;
  readonly copperW: number;
}

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
    const delta = 1e-5 * (Math.abs(windingC) + 273);
    const slope = (excess(windingC + delta) - excess(windingC - delta)) / (2 * delta);
    if (slope >= 0 || !Number.isFinite(value)) return null;
    const next = windingC - value / slope;
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
