/**
 * A whole robot in fixed modes as one system of differential equations, coupled by the voltage of its bus.
 *
 * Deliberately not here: one mechanism's equations (robotUnit.ts), events that all share (robotWatches.ts), and what is done at events.
 */
import { depletionCurrent } from "./battery.js";
import type { Supply } from "./drive.js";
import type { OdeSystem, Watch } from "./odeSystem.js";
import { fuseRate } from "./protection.js";
import { addSeatDerivatives, createBusGradient } from "./robotJacobian.js";
import type { MutableBus, RobotPart } from "./robotPart.js";
import { isKeptOpen, type RobotProtector } from "./robotProtector.js";
import { createUnit, type RobotUnit } from "./robotUnit.js";
import { busWatches, type RobotEvent } from "./robotWatches.js";
import type { BusDemand, SharedBus } from "./sharedBus.js";
import { rateAlong } from "./supplyCurrent.js";

/** What the mechanisms share. */
export interface Sharing {
  readonly supply: Supply;
  readonly bus: SharedBus;
  /** The bus as plants see it. */
  readonly plantBus: MutableBus;
  readonly own: readonly RobotProtector[];
  readonly shared: readonly RobotProtector[];
  /** Charge taken from the rated one before the present course, A·s. */
  readonly depletedAs: () => number;
}

/** One mechanism's place in the state. */
export interface Seat {
  readonly unit: RobotUnit;
  /** From its own layout to the robot's; −1: not there. */
  readonly place: Int32Array;
  readonly state: Float64Array;
  readonly rates: Float64Array;
  readonly jacobian: Float64Array;
  readonly timeRates: Float64Array;
}

/** Where a shared protector's θ, or damages, and the sums of the supply stand. */
export interface SharedPlaces {
  readonly protectors: readonly { readonly protector: RobotProtector; readonly state: number; readonly fast: number }[];
  readonly charge: number;
  readonly depletion: number;
  readonly energy: number;
}

export interface BusPoint {
  voltageV: number;
  supplyA: number;
  /** d(supplyA)/dt, A/s; only after a preparation or a watch. */
  supplyRate: number;
}

export interface RobotSystem extends OdeSystem {
  readonly seats: readonly Seat[];
  readonly places: SharedPlaces;
  /** What each watch means; null: a change of formula only. */
  readonly events: readonly (RobotEvent | null)[];
  /** The bus at the end of the last step; units keep theirs in `front`. */
  readonly front: BusPoint;
  /** The bus at any point; units then have theirs in `at`. */
  readonly pointAt: (timeS: number, state: Float64Array) => BusPoint;
  /** Supply current that a shared protector carries, A. */
  readonly carriedBy: (protector: RobotProtector, which: "at" | "front") => number;
}

const HEAT_SCALE_K = 100;
/** Sums are usually this share of full current over the whole time. */
const SUM_SHARE = 0.01;
const LEAST_SCALE = 1e-9;
const LEAST_TIME_S = 1e-3;

export function createRobotSystem(parts: readonly RobotPart[], sharing: Sharing): RobotSystem {
  const { supply, bus, plantBus } = sharing;
  const { seats, places, size, coupled } = layOut(parts, sharing);
  const live = seats.filter(({ unit }) => unit.demand !== null);
  const demands = live.map(({ unit }) => unit.demand as BusDemand);
  const at: BusPoint = { voltageV: bus.openCircuitV, supplyA: 0, supplyRate: 0 };
  const front: BusPoint = { ...at };
  const gradient = createBusGradient(size);
  const kept = new Set(
    seats.filter(({ unit: { part } }) => sharing.own.some((one) => one.mechanism === part.index && isKeptOpen(one))),
  );

  function see(timeS: number, state: Float64Array, which: "at" | "front", derive: boolean): BusPoint {
    const point = which === "at" ? at : front;
    for (const seat of seats) {
      takeSeat(seat, state);
      seat.unit.ask(timeS, seat.state, seat.unit[which]);
    }
    point.voltageV = bus.solve(demands);
    plantBus.openCircuitV = point.voltageV;
    point.supplyA = 0;
    for (const { unit, state: own } of live) {
      unit.fill(timeS, own, unit[which], derive);
      point.supplyA += unit[which].supplyA;
      if (which === "front") unit.part.highestRadPerS = Math.max(unit.part.highestRadPerS, unit.front.progressRate);
    }
    return point;
  }

  function fillRates(which: "at" | "front", point: BusPoint, state: Float64Array, out: Float64Array): void {
    out.fill(0);
    for (const seat of seats) {
      const { unit, rates, place } = seat;
      unit.rates.fill(seat.state, unit[which], rates);
      if (kept.has(seat)) rates[unit.part.layout.protection] = 0;
      for (let k = 0; k < place.length; k++) if ((place[k] as number) >= 0) out[place[k] as number] = rates[k] as number;
    }
    for (const { protector, state: theta, fast } of places.protectors) {
      const carriedA = carriedBy(protector, which);
      const { protection, replica } = protector;
      if (isKeptOpen(protector)) continue;
      if (replica) out[theta] = ((carriedA / replica.holdCurrentA) ** 2 - (state[theta] as number)) / replica.timeConstantS;
      else if (protection.kind === "fuse") {
        out[theta] = fuseRate(protection.ratingA, carriedA, "slow").rate;
        out[fast] = fuseRate(protection.ratingA, carriedA, "fast").rate;
      }
    }
    out[places.charge] = Math.max(point.supplyA, 0);
    out[places.depletion] = depletionCurrent(supply, point.supplyA);
    out[places.energy] = point.voltageV * Math.max(point.supplyA, 0);
  }

  function carriedBy(protector: RobotProtector, which: "at" | "front"): number {
    let sum = 0;
    for (const { unit } of live) if (protector.feeds.includes(unit.part)) sum += unit[which].supplyA;
    return sum;
  }

  /** With V_b falling by R for each ampere more: dI/dt = Σ ∂I/∂t at a steady bus, over 1 + R·Σ ∂I/∂V. */
  function setSupplyRate(which: "at" | "front", point: BusPoint): void {
    let rate = 0;
    let slope = 0;
    for (const { unit, state } of live) {
      rate += rateAlong(unit[which], unit[which].supplyBy, unit.rates.windingRate(state, unit[which]));
      slope += (unit.demand as BusDemand).slope;
    }
    point.supplyRate = rate / (1 + bus.resistanceOhm * slope);
  }

  const fullA = parts.reduce((sum, { plant, scales }) => sum + plant.count * scales.currentA, 0);
  const watched = busWatches(sharing, places, fullA, carriedBy);
  const unitWatches = seats.flatMap((seat) => seat.unit.watches.map((one) => ({ seat, ...one })));

  function watchAll(which: "at" | "front", point: BusPoint, state: Float64Array, values: number[]): void {
    setSupplyRate(which, point);
    for (let i = 0; i < unitWatches.length; i++) {
      const { seat, value } = unitWatches[i] as (typeof unitWatches)[number];
      values[i] = value(seat.state, seat.unit[which]);
    }
    for (let i = 0; i < watched.length; i++) {
      values[unitWatches.length + i] = (watched[i] as (typeof watched)[number]).value(point, state, which);
    }
  }

  function differentiate(jacobian: Float64Array, timeRates: Float64Array): void {
    jacobian.fill(0);
    timeRates.fill(0);
    for (const seat of seats) addSeatDerivatives(seat, size, jacobian, timeRates, kept.has(seat));
    gradient.add({ supply, bus, live, places, point: front }, jacobian, timeRates);
  }

  return {
    size,
    coupled,
    scale: scaleOf(seats, places, size, bus.openCircuitV, fullA),
    watches: [...unitWatches.map(({ seat, watch }) => seated(watch, seat)), ...watched.map(({ watch }) => watch)],
    events: [
      ...unitWatches.map(({ seat, event }): RobotEvent | null => event && { kind: "unit", unit: seat.unit, event }),
      ...watched.map(({ event }) => event),
    ],
    seats,
    places,
    front,
    carriedBy,
    pointAt: (timeS, state) => see(timeS, state, "at", false),
    evaluate: (timeS, state, out) => fillRates("at", see(timeS, state, "at", false), state, out),
    prepare: (timeS, state, start, values, stiff) => {
      see(timeS, state, "front", true);
      fillRates("front", front, state, start.rates);
      watchAll("front", front, state, values);
      if (stiff) differentiate(start.jacobian, start.timeRates);
    },
    watch: (timeS, state, values) => watchAll("at", see(timeS, state, "at", true), state, values),
  };
}

function takeSeat({ place, state: own }: Seat, state: Float64Array): void {
  for (let k = 0; k < place.length; k++) if ((place[k] as number) >= 0) own[k] = state[place[k] as number] as number;
}

function seated(watch: Watch, { place }: Seat): Watch {
  return watch.component === undefined ? watch : { ...watch, component: place[watch.component] as number };
}

/** Mechanisms first, then shared protectors, and last the sums that nothing depends on. */
function layOut(
  parts: readonly RobotPart[],
  { shared }: Sharing,
): { readonly seats: Seat[]; readonly places: SharedPlaces; readonly size: number; readonly coupled: number } {
  let next = 0;
  const seats = parts.flatMap((part): Seat[] => {
    const { layout } = part;
    const idle = part.mode.kind === "idle";
    const place = new Int32Array(layout.size).fill(-1);
    const carried = [layout.winding, layout.housing, layout.protection, layout.fast].filter((k) => k >= 0);
    if (idle && carried.length === 0) return [];
    for (const k of [...motionOf(part), ...carried]) place[k] = next++;
    const own = (): Float64Array => new Float64Array(layout.size);
    const jacobian = new Float64Array(layout.size * layout.size);
    return [{ unit: createUnit(part), place, state: own(), rates: own(), jacobian, timeRates: own() }];
  });
  const protectors = shared.map((protector) => ({
    protector,
    state: next++,
    fast: protector.protection.kind === "fuse" ? next++ : -1,
  }));
  const coupled = next;
  for (const { unit, place } of seats) if (unit.demand) place[unit.part.layout.energy] = next++;
  const places = { protectors, charge: next++, depletion: next++, energy: next++ };
  return { seats, places, size: next, coupled };
}

/** What of its motion changes by itself. */
function motionOf({ mode, layout }: RobotPart): number[] {
  if (mode.kind === "moving") return [layout.progress, layout.speed];
  return mode.kind === "following" ? [layout.progress] : [];
}

function scaleOf(seats: readonly Seat[], places: SharedPlaces, size: number, openCircuitV: number, fullA: number): Float64Array {
  const scale = new Float64Array(size).fill(1);
  /** Without current the sums stay at 0, whatever counts as 1. */
  let longestS = LEAST_TIME_S;
  for (const { unit, place } of seats) {
    const { layout, scales, plant } = unit.part;
    const put = (k: number, value: number): void => {
      if (k >= 0 && (place[k] as number) >= 0) scale[place[k] as number] = Math.max(value, LEAST_SCALE);
    };
    put(layout.progress, scales.progressRad || 1);
    put(layout.speed, scales.speedRadPerS);
    put(layout.winding, HEAT_SCALE_K);
    put(layout.housing, HEAT_SCALE_K);
    put(layout.energy, SUM_SHARE * openCircuitV * plant.count * scales.currentA * Math.max(scales.timeS, LEAST_TIME_S));
    if (unit.demand) longestS = Math.max(longestS, scales.timeS);
  }
  const charge = SUM_SHARE * Math.max(fullA, LEAST_SCALE) * longestS;
  scale[places.charge] = charge;
  scale[places.depletion] = charge;
  scale[places.energy] = charge * openCircuitV;
  return scale;
}
