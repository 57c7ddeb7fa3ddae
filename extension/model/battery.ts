/**
 * What discharging takes from a battery.
 *
 * Deliberately not here: its voltage under load (line.ts, bus.ts).
 */
import type { Supply } from "./drive.js";

const SECONDS_PER_HOUR = 3600;

/**
 * Charge that a current takes from the rated one, A: I·max(1, I·H/C)^(k − 1). Below the rated current nothing is gained; a current
 * sent back is not credited. Source: Peukert's law referred to the rated discharge of C over H hours.
 */
export function depletionCurrent(supply: Supply, currentA: number): number {
  if (currentA <= 0) return 0;
  const { capacityAh, ratedOverH, peukert } = supply;
  if (capacityAh === undefined || ratedOverH === undefined) return currentA;
  return currentA * Math.max(1, (currentA * ratedOverH) / capacityAh) ** (peukert - 1);
}

/** How long a full battery gives a steady current, s; null without a capacity or a current. */
export function dischargeTime(supply: Supply, currentA: number): number | null {
  const taken = depletionCurrent(supply, currentA);
  return supply.capacityAh === undefined || taken === 0 ? null : (supply.capacityAh / taken) * SECONDS_PER_HOUR;
}
