/**
 * What is watched of a robot as a whole: its supply, its battery, its shared protectors.
 *
 * Deliberately not here: what follows from a crossing (robotTurns.ts, robotObserver.ts).
 */
import type { Watch } from "./odeSystem.js";
import { fuseGates } from "./protection.js";
import type { RobotProtector } from "./robotProtector.js";
import type { BusPoint, SharedPlaces, Sharing } from "./robotSystem.js";
import type { RobotUnit, UnitEvent } from "./robotUnit.js";

export type RobotEvent =
  | { readonly kind: "unit"; readonly unit: RobotUnit; readonly event: UnitEvent }
  | { readonly kind: "protector"; readonly protector: RobotProtector; readonly event: "opens" | "may-open" }
  | { readonly kind: "supply"; readonly event: "empties" | "crosses-floor" | "peaks" };

export interface BusWatch {
  readonly watch: Watch;
  /** null: only a change of formula. */
  readonly event: RobotEvent | null;
  readonly value: (point: BusPoint, state: Float64Array, which: "at" | "front") => number;
}

const KINK: Watch = { kind: "kink", crosses: "both" };
/** Shares of full current, and of it each second, that count as nothing: rounding alone must not cross. */
const FADED = 1e-9;
const SECONDS_PER_HOUR = 3600;

export function busWatches(
  { supply, depletedAs }: Sharing,
  places: SharedPlaces,
  fullA: number,
  carriedBy: (protector: RobotProtector, which: "at" | "front") => number,
): BusWatch[] {
  const found: BusWatch[] = [];
  const { capacityAh, ratedOverH, peukert, mustStayAbove } = supply;
  const faded = (value: number): number => (Math.abs(value) < FADED * fullA ? 0 : value);
  found.push({ watch: KINK, event: null, value: (point) => faded(point.supplyA) });
  found.push({
    watch: { kind: "note", crosses: "down" },
    event: { kind: "supply", event: "peaks" },
    value: (point) => faded(point.supplyRate),
  });
  if (mustStayAbove) {
    found.push({
      watch: { kind: "note", crosses: "both" },
      event: { kind: "supply", event: "crosses-floor" },
      value: (point) => point.voltageV - mustStayAbove.voltageV,
    });
  }
  if (capacityAh !== undefined) {
    const watch: Watch = { kind: "stop", crosses: "up", component: places.depletion };
    const missing = (state: Float64Array): number =>
      depletedAs() + (state[places.depletion] as number) - capacityAh * SECONDS_PER_HOUR;
    found.push({ watch, event: { kind: "supply", event: "empties" }, value: (_, state) => missing(state) });
    if (ratedOverH !== undefined && peukert !== 1) {
      found.push({ watch: KINK, event: null, value: (point) => point.supplyA - capacityAh / ratedOverH });
    }
  }
  for (const { protector, state: theta, fast } of places.protectors) {
    const { protection } = protector;
    if (protector.open) continue;
    found.push({
      watch: { kind: "stop", crosses: "up", component: theta },
      event: { kind: "protector", protector, event: "opens" },
      value: (_, state) => (state[theta] as number) - 1,
    });
    if (protection.kind !== "fuse") continue;
    found.push({
      watch: { kind: "note", crosses: "up", component: fast },
      event: { kind: "protector", protector, event: "may-open" },
      value: (_, state) => (state[fast] as number) - 1,
    });
    for (const [multiple] of fuseGates(protection.ratingA)) {
      const gateA = multiple * protection.ratingA;
      found.push({ watch: KINK, event: null, value: (_, __, which) => carriedBy(protector, which) - gateA });
    }
  }
  return found;
}
