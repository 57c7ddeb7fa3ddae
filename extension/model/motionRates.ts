/**
 * Rates of a mechanism's state and their derivatives, from the instant that its equations of motion give.
 *
 * Heat: C_w·T_w′ = I²R − (T_w − T_h)/R_wh, C_h·T_h′ = (T_w − T_h)/R_wh + (k_e·I − T)·ω − (T_h − T_a)/R_ha. Breaker and PTC:
 * θ′ = ((I/hold)² − θ)/τ. Fuse: damage′ = 1/t(I). Deliberately not here: the instant itself (motion.ts, stillMotion.ts).
 */
import { type HeatNetwork, heatTimeConstants } from "./heat.js";
import { BY_HEAT, BY_PROGRESS, BY_SPEED, BY_TIME, type Gradient, type Instant } from "./instant.js";
import type { Layout } from "./motionLayout.js";
import type { Plant } from "./plant.js";
import { fuseRate, type ThermalReplica, thermalReplica } from "./protection.js";

export interface MotionRates {
  /** Current that the protection carries, A. */
  readonly carried: (now: Instant) => number;
  /** T_w′, K/s; 0 without thermal data. */
  readonly windingRate: (state: Float64Array, now: Instant) => number;
  /** What heat (K) and protection (hundredths of its state) would still change by at their present rates, each over its own time constant. */
  readonly unrest: (state: Float64Array, now: Instant) => number;
  readonly fill: (state: Float64Array, now: Instant, rates: Float64Array) => void;
  /** Jacobian (row-major) and time derivatives of what `fill` gives. */
  readonly differentiate: (now: Instant, jacobian: Float64Array, timeRates: Float64Array) => void;
}

export function motionRates(plant: Plant, layout: Layout, network: HeatNetwork | null): MotionRates {
  const { protection } = plant.drive;
  const fuse = protection?.kind === "fuse" ? protection : null;
  const replica: ThermalReplica | null = protection && protection.kind !== "fuse" ? thermalReplica(protection) : null;
  const bySupply = protection?.carries === "supply";
  const { size, winding, housing } = layout;
  const carried = (now: Instant): number => (bySupply ? now.supplyA : now.currentA);

  function windingRate(state: Float64Array, now: Instant): number {
    if (!network) return 0;
    const flow = ((state[winding] as number) - (state[housing] as number)) / network.windingToHousingKPerW;
    return (now.currentA * now.currentA * now.resistanceOhm - flow) / network.windingJPerK;
  }

  const slowS = network ? heatTimeConstants(network)[1] : 0;
  function unrest(state: Float64Array, now: Instant): number {
    let left = 0;
    if (network) {
      const inner = ((state[winding] as number) - (state[housing] as number)) / network.windingToHousingKPerW;
      const outer = ((state[housing] as number) - network.ambientC) / network.housingToAmbientKPerW;
      left = (Math.abs(windingRate(state, now)) + Math.abs(inner - outer) / network.housingJPerK) * slowS;
    }
    if (replica) left += Math.abs((carried(now) / replica.holdCurrentA) ** 2 - (state[layout.protection] as number)) * 100;
    if (fuse) left += fuseRate(fuse.ratingA, carried(now), "slow").rate > 0 && (state[layout.protection] as number) < 1 ? 1 : 0;
    return left;
  }

  function fill(state: Float64Array, now: Instant, rates: Float64Array): void {
    rates[layout.progress] = now.progressRate;
    rates[layout.speed] = now.speedRate;
    if (network) {
      const inner = ((state[winding] as number) - (state[housing] as number)) / network.windingToHousingKPerW;
      const outer = ((state[housing] as number) - network.ambientC) / network.housingToAmbientKPerW;
      const friction = (now.backEmf * now.currentA - now.torqueNm) * now.motorSpeed;
      rates[winding] = (now.currentA * now.currentA * now.resistanceOhm - inner) / network.windingJPerK;
      rates[housing] = (inner + friction - outer) / network.housingJPerK;
    }
    if (replica) {
      const multiple = carried(now) / replica.holdCurrentA;
      rates[layout.protection] = (multiple * multiple - (state[layout.protection] as number)) / replica.timeConstantS;
    } else if (fuse) {
      rates[layout.protection] = fuseRate(fuse.ratingA, carried(now), "slow").rate;
      rates[layout.fast] = fuseRate(fuse.ratingA, carried(now), "fast").rate;
    }
    rates[layout.squares] = now.currentA * now.currentA;
    rates[layout.energy] = now.supplyV * Math.max(now.supplyA, 0);
  }

  function differentiate(now: Instant, jacobian: Float64Array, timeRates: Float64Array): void {
    jacobian.fill(0);
    timeRates.fill(0);
    const put = (row: number, column: number, value: number): void => {
      (jacobian[row * size + column] as number) += value;
    };
    /** Adds what a row depends on through the instant. */
    const add = (row: number, weight: number, by: Gradient): void => {
      put(row, layout.progress, weight * (by[BY_PROGRESS] as number));
      put(row, layout.speed, weight * (by[BY_SPEED] as number));
      if (winding >= 0) put(row, winding, weight * (by[BY_HEAT] as number));
      (timeRates[row] as number) += weight * (by[BY_TIME] as number);
    };
    add(layout.progress, 1, now.progressRateBy);
    add(layout.speed, 1, now.speedRateBy);
    if (network) {
      const inner = 1 / network.windingToHousingKPerW;
      const perWinding = 1 / network.windingJPerK;
      add(winding, 2 * now.currentA * now.resistanceOhm * perWinding, now.currentBy);
      put(winding, winding, (now.currentA * now.currentA * now.resistanceByHeat - inner) * perWinding);
      put(winding, housing, inner * perWinding);
      const perHousing = 1 / network.housingJPerK;
      add(housing, now.backEmf * now.motorSpeed * perHousing, now.currentBy);
      add(housing, -now.motorSpeed * perHousing, now.torqueBy);
      add(housing, (now.backEmf * now.currentA - now.torqueNm) * perHousing, now.motorSpeedBy);
      put(housing, winding, (inner + now.backEmfByHeat * now.currentA * now.motorSpeed) * perHousing);
      put(housing, housing, -(inner + 1 / network.housingToAmbientKPerW) * perHousing);
    }
    const carriedBy = bySupply ? now.supplyBy : now.currentBy;
    if (replica) {
      add(layout.protection, (2 * carried(now)) / (replica.holdCurrentA ** 2 * replica.timeConstantS), carriedBy);
      put(layout.protection, layout.protection, -1 / replica.timeConstantS);
    } else if (fuse) {
      add(layout.protection, fuseRate(fuse.ratingA, carried(now), "slow").slope, carriedBy);
      add(layout.fast, fuseRate(fuse.ratingA, carried(now), "fast").slope, carriedBy);
    }
    add(layout.squares, 2 * now.currentA, now.currentBy);
    if (now.supplyA > 0) add(layout.energy, now.supplyV - plant.bus.resistanceOhm * now.supplyA, now.supplyBy);
  }

  return { carried, windingRate, unrest, fill, differentiate };
}
