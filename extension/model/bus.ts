/**
 * The supply's voltage when a controller lowers its duty to hold a motor current.
 *
 * Deliberately not here: full command, where the line (line.ts) already contains the supply.
 */

/** What the controller asks: `count` motors at a current each, with the voltage that this needs behind the switches. */
export interface ControlledDemand {
  readonly openCircuitV: number;
  readonly supplyOhm: number;
  /** Lost in the controller, V. */
  readonly dropV: number;
  readonly count: number;
  /** One motor's current, A. */
  readonly currentA: number;
  /** Winding, leads and back-emf at that current, V. */
  readonly neededV: number;
}

export interface ControlledSupply {
  /** Share of full command; may exceed 1: then the demand is beyond the supply. */
  readonly duty: number;
  readonly busV: number;
  /** A, all motors; below 0 it charges. */
  readonly supplyCurrentA: number;
}

/**
 * Highest voltage V_b with d·(V_b − V_drop) = U, I_s = n·d·I, V_b = V_oc − R_s·I_s; null where there is none: the supply collapses.
 *
 * Eliminating V_b gives R_s·n·I·d² − (V_oc − V_drop)·d + U = 0, whose root nearer to 0 belongs to the higher V_b; it is written
 * without cancellation.
 */
export function controlledSupply(demand: ControlledDemand): ControlledSupply | null {
  const { openCircuitV, supplyOhm, count, currentA, neededV } = demand;
  const head = openCircuitV - demand.dropV;
  const quadratic = supplyOhm * count * currentA;
  const discriminant = head * head - 4 * quadratic * neededV;
  if (!(head > 0) || discriminant < 0)
    return neededV === 0 && head >= 0 ? { duty: 0, busV: openCircuitV, supplyCurrentA: 0 } : null;
  const duty = (2 * neededV) / (head + Math.sqrt(discriminant));
  const supplyCurrentA = count * duty * currentA;
  return { duty, busV: openCircuitV - supplyOhm * supplyCurrentA, supplyCurrentA };
}
