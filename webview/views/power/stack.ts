/** Powers on top of each other: what is taken grows upwards from 0, what is sent back downwards. SI; pure. */
import type { PowerChart } from "../../../extension/protocol/charts/power.js";
import type { Band, Stack } from "../../plots/series/drawing.js";

/** Bands in the order of mechanisms, the first one at the bottom; those that take nothing all along are left out, but keep their turn. */
export function stackOf({ timesS, mechanisms }: PowerChart): Stack {
  const above = timesS.map(() => 0);
  const below = timesS.map(() => 0);
  const bands = mechanisms.map(({ name, powerW }, turn): Band => {
    const lower = powerW.map((power, index) => (power < 0 ? (below[index] ?? 0) : (above[index] ?? 0)));
    const upper = powerW.map((power, index) => (lower[index] ?? 0) + power);
    for (const [index, power] of powerW.entries()) {
      if (power < 0) below[index] = upper[index] ?? 0;
      else above[index] = upper[index] ?? 0;
    }
    return { name, lower, upper, turn };
  });
  return { xs: timesS, bands: bands.filter((_, index) => mechanisms[index]?.powerW.some((power) => Math.abs(power) > LEAST_W)) };
}

/** What rounding leaves of nothing. */
const LEAST_W = 1e-9;
