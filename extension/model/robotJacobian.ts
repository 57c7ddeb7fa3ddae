/**
 * Derivatives of a robot's rates: each mechanism's own at a steady bus, and what reaches it through the bus's voltage.
 *
 * ∂f/∂y = ∂f/∂y|V + ∂f/∂V·∂V/∂y with ∂V/∂y = −R·ΣI_y/(1 + R·ΣI_V), from V = V_oc − R·ΣI(y, V). Deliberately not here: the rates.
 */
import { depletionCurrent } from "./battery.js";
import type { Supply } from "./drive.js";
import { BY_HEAT, BY_PROGRESS, BY_SPEED, BY_TIME } from "./instant.js";
import { fuseRate } from "./protection.js";
import { isKeptOpen, type RobotProtector } from "./robotProtector.js";
import type { BusPoint, Seat, SharedPlaces } from "./robotSystem.js";
import type { BusDemand, SharedBus } from "./sharedBus.js";

/** Adds what a mechanism's rates depend on by themselves; `kept`: its protection does not change. */
export function addSeatDerivatives(
  { unit, place, jacobian: own, timeRates: ownTime }: Seat,
  size: number,
  jacobian: Float64Array,
  timeRates: Float64Array,
  kept: boolean,
): void {
  unit.rates.differentiate(unit.front, own, ownTime);
  const count = place.length;
  for (let row = 0; row < count; row++) {
    const to = place[row] as number;
    if (to < 0 || (kept && row === unit.part.layout.protection)) continue;
    timeRates[to] = ownTime[row] as number;
    for (let column = 0; column < count; column++) {
      const from = place[column] as number;
      if (from >= 0) jacobian[to * size + from] = own[row * count + column] as number;
    }
  }
}

export interface BusAt {
  readonly supply: Supply;
  readonly bus: SharedBus;
  /** Seats of the mechanisms that draw current. */
  readonly live: readonly Seat[];
  readonly places: SharedPlaces;
  /** At the front, prepared with derivatives. */
  readonly point: BusPoint;
}

export interface BusGradient {
  readonly add: (at: BusAt, jacobian: Float64Array, timeRates: Float64Array) => void;
}

/** Share of the current by which it is moved to see the depletion's slope. */
const NUDGE = 1e-6;

export function createBusGradient(size: number): BusGradient {
  /** By the state, and last by time. */
  const voltsBy = new Float64Array(size + 1);
  const totalBy = new Float64Array(size + 1);
  const fedBy = new Float64Array(size + 1);
  const byVolts = new Float64Array(size);

  function add(at: BusAt, jacobian: Float64Array, timeRates: Float64Array): void {
    const { bus, live, places, point, supply } = at;
    const every = (): boolean => true;
    totalBy.fill(0);
    const slope = addCurrents(live, every, totalBy);
    const feedback = -bus.resistanceOhm / (1 + bus.resistanceOhm * slope);
    for (let i = 0; i <= size; i++) voltsBy[i] = feedback * (totalBy[i] as number);
    for (let i = 0; i <= size; i++) (totalBy[i] as number) += slope * (voltsBy[i] as number);
    setByVolts(at);
    for (let row = 0; row < size; row++) addRow(row, byVolts[row] as number, voltsBy);
    if (point.supplyA > 0) {
      const step = NUDGE * point.supplyA;
      const ahead = depletionCurrent(supply, point.supplyA + step) - depletionCurrent(supply, point.supplyA - step);
      addRow(places.charge, 1, totalBy);
      addRow(places.depletion, ahead / (2 * step), totalBy);
      addRow(places.energy, point.voltageV, totalBy);
      addRow(places.energy, point.supplyA, voltsBy);
    }
    for (const { protector, state, fast } of places.protectors) {
      const { protection, replica, feeds } = protector;
      if (isKeptOpen(protector)) continue;
      const fed = (seat: Seat): boolean => feeds.includes(seat.unit.part);
      fedBy.fill(0);
      const fedSlope = addCurrents(live, fed, fedBy);
      for (let i = 0; i <= size; i++) (fedBy[i] as number) += fedSlope * (voltsBy[i] as number);
      const carriedA = carried(live, protector);
      if (replica) {
        addRow(state, (2 * carriedA) / (replica.holdCurrentA ** 2 * replica.timeConstantS), fedBy);
        (jacobian[state * size + state] as number) -= 1 / replica.timeConstantS;
      } else if (protection.kind === "fuse") {
        addRow(state, fuseRate(protection.ratingA, carriedA, "slow").slope, fedBy);
        addRow(fast, fuseRate(protection.ratingA, carriedA, "fast").slope, fedBy);
      }
    }

    function addRow(row: number, weight: number, by: Float64Array): void {
      if (weight === 0) return;
      for (let i = 0; i < size; i++) (jacobian[row * size + i] as number) += weight * (by[i] as number);
      (timeRates[row] as number) += weight * (by[size] as number);
    }
  }

  /** Adds ∂I/∂y at a steady bus of some mechanisms; returns their Σ ∂I/∂V. */
  function addCurrents(live: readonly Seat[], counts: (seat: Seat) => boolean, by: Float64Array): number {
    let slope = 0;
    for (const seat of live) {
      if (!counts(seat)) continue;
      const { unit, place } = seat;
      const { layout } = unit.part;
      const { supplyBy } = unit.front;
      const put = (k: number, value: number): void => {
        if (k >= 0 && (place[k] as number) >= 0) by[place[k] as number] = value;
      };
      put(layout.progress, supplyBy[BY_PROGRESS] as number);
      put(layout.speed, supplyBy[BY_SPEED] as number);
      put(layout.winding, supplyBy[BY_HEAT] as number);
      (by[size] as number) += supplyBy[BY_TIME] as number;
      slope += (unit.demand as BusDemand).slope;
    }
    return slope;
  }

  function carried(live: readonly Seat[], { feeds }: RobotProtector): number {
    let sum = 0;
    for (const { unit } of live) if (feeds.includes(unit.part)) sum += unit.front.supplyA;
    return sum;
  }

  /** Mechanisms' rates by the bus's voltage. */
  function setByVolts({ live, point }: BusAt): void {
    byVolts.fill(0);
    for (const { unit, state, jacobian, timeRates, place } of live) {
      unit.fillByVolts(state);
      unit.rates.differentiate(unit.at, jacobian, timeRates);
      const { supplyA } = unit.front;
      timeRates[unit.part.layout.energy] = supplyA > 0 ? supplyA + point.voltageV * (unit.demand as BusDemand).slope : 0;
      for (let k = 0; k < place.length; k++) if ((place[k] as number) >= 0) byVolts[place[k] as number] = timeRates[k] as number;
    }
  }

  return { add };
}
