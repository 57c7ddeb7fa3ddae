/**
 * What a mechanism takes from its supply at an instant, and the supply's voltage then.
 *
 * Deliberately not here: several mechanisms on one supply.
 */
import { BY_HEAT, BY_SPEED, BY_TIME, type Gradient, type Instant } from "./instant.js";
import type { Plant } from "./plant.js";

/**
 * At full command I_s = n·d·I. Below it the controller finds its own duty: d·(V_b − V_drop) = U with U = I·(R + R_leads) + k_e·ω and
 * V_b = V_oc − R_s·n·d·I, the root with the highest V_b: d = 2U/(H + √(H² − 4·R_s·n·I·U)), H = V_oc − V_drop.
 */
export function setSupply(plant: Plant, at: Instant, fullCommand: boolean, derive: boolean): void {
  at.supplied = true;
  if (fullCommand) {
    const share = plant.count * at.command;
    at.supplyA = share * at.currentA;
    if (derive) {
      for (let q = 0; q < 4; q++) at.supplyBy[q] = share * (at.currentBy[q] as number);
      (at.supplyBy[BY_TIME] as number) += plant.count * at.commandByTime * at.currentA;
    }
  } else {
    setControlled(plant, at, derive);
  }
  at.supplyV = plant.bus.openCircuitV - plant.bus.resistanceOhm * at.supplyA;
}

function setControlled(plant: Plant, at: Instant, derive: boolean): void {
  const winding = at.resistanceOhm + plant.leadOhm;
  const needed = at.currentA * winding + at.backEmf * at.motorSpeed;
  const slope = plant.bus.resistanceOhm * plant.count;
  const discriminant = at.headV * at.headV - 4 * slope * at.currentA * needed;
  at.supplied = discriminant >= 0 && at.headV > 0;
  if (!at.supplied) {
    at.supplyA = plant.count * at.command * at.currentA;
    at.supplyBy.fill(0);
    return;
  }
  const root = Math.sqrt(discriminant);
  const duty = (2 * needed) / (at.headV + root);
  at.supplyA = plant.count * duty * at.currentA;
  if (!derive) return;
  for (let q = 0; q < 4; q++) {
    const currentBy = at.currentBy[q] as number;
    let neededBy = currentBy * winding + at.backEmf * (at.motorSpeedBy[q] as number);
    if (q === BY_HEAT) neededBy += at.currentA * at.resistanceByHeat + at.backEmfByHeat * at.motorSpeed;
    const dutyBy = root > 0 ? (duty * duty * slope * currentBy + neededBy) / root : 0;
    at.supplyBy[q] = plant.count * (dutyBy * at.currentA + duty * currentBy);
  }
}

/** d/dt of a quantity along the motion, from its derivatives. */
export function rateAlong(at: Instant, by: Gradient, windingRate: number): number {
  return (
    (by[0] as number) * at.progressRate +
    (by[BY_SPEED] as number) * at.speedRate +
    (by[BY_HEAT] as number) * windingRate +
    (by[BY_TIME] as number)
  );
}
