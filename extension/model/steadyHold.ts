/**
 * Holding, stall and turning at a current that stays as it is: everything in closed form.
 *
 * Deliberately not here: currents that heat changes (heldRun.ts).
 */
import { type HeatNetwork, heatingCurve, steadyHeat, timeToTemperature } from "./heat.js";
import type { HeldRun } from "./heldRun.js";
import { type CarriedState, coldState } from "./motionState.js";
import type { Plant } from "./plant.js";
import { fuseRate, NEVER, type TripVerdict, thermalReplica, tripVerdict } from "./protection.js";
import { copperFactor, copperFactorSlope } from "./temperature.js";

/** One motor's steady current and what it draws from the supply, A. */
export interface SteadyCurrent {
  readonly currentA: number;
  readonly supplyA: number;
  /** What protection carries. */
  readonly carriedA: number;
  readonly supplied: boolean;
}

/** From cold, for a time or for ever; without a network nothing is said of heat. At standstill: all heat is copper's. */
export function steadyHold(
  plant: Plant,
  steady: SteadyCurrent,
  network: HeatNetwork | null,
  lastsS: number | undefined,
): HeldRun {
  const { currentA, supplyA, carriedA, supplied } = steady;
  const carried = replicaAfter(plant, carriedA, lastsS);
  const trip = steadyTrip(plant, carriedA);
  const common = { motorCurrentA: currentA, sourceCurrentA: supplyA, trip, supplied };
  if (!network) return { ...common, windingFinalC: null, limitAfterS: null, runsAway: false, carried };
  const copperW = (windingC: number): number => currentA * currentA * plant.motor.resistanceOhm * copperFactor(windingC);
  const heat = {
    atAmbientW: copperW(network.ambientC),
    perKW: currentA * currentA * plant.motor.resistanceOhm * copperFactorSlope(network.ambientC),
  };
  const forEver = steadyHeat(network, copperW);
  const end = lastsS === undefined ? forEver : heatingCurve(network, heat, lastsS);
  const known = end !== null && Number.isFinite(end.windingC) ? end : null;
  return {
    ...common,
    windingFinalC: known?.windingC ?? null,
    limitAfterS: timeToTemperature(network, heat, network.limitC),
    runsAway: forEver === null,
    carried: known ? { ...carried, windingC: known.windingC, housingC: known.housingC } : carried,
  };
}

/** Protection after a time at a steady current, from rest: θ = m²·(1 − e^(−t/τ)). */
function replicaAfter(plant: Plant, carriedA: number, lastsS = Number.POSITIVE_INFINITY): CarriedState {
  const cold = coldState(plant);
  const { protection } = plant.drive;
  if (!protection) return cold;
  if (protection.kind === "fuse") {
    const damage = (gate: "fast" | "slow"): number =>
      carriedA > 0 ? Math.min(fuseRate(protection.ratingA, carriedA, gate).rate * lastsS, 1) || 0 : 0;
    return { ...cold, protection: damage("slow"), fast: damage("fast") };
  }
  const replica = thermalReplica(protection);
  return { ...cold, protection: (carriedA / replica.holdCurrentA) ** 2 * -Math.expm1(-lastsS / replica.timeConstantS) };
}

function steadyTrip(plant: Plant, carriedA: number): TripVerdict {
  return plant.drive.protection ? tripVerdict(plant.drive.protection, carriedA) : NEVER;
}
