/** Where the cursor can stand along a load cycle: every moment that was sampled, once. Of two at one time the one with less voltage. */
import type { PowerChart } from "../../../extension/protocol/charts/power.js";

/** Indices of moments within a span, in rising time. */
export function stopsWithin({ timesS, voltageV }: PowerChart, fromS: number, toS: number): readonly number[] {
  const found: number[] = [];
  for (const [index, timeS] of timesS.entries()) {
    if (timeS < fromS || timeS > toS) continue;
    const last = found.at(-1);
    if (last === undefined || timesS[last] !== timeS) found.push(index);
    else if ((voltageV[index] ?? 0) < (voltageV[last] ?? 0)) found[found.length - 1] = index;
  }
  return found;
}
