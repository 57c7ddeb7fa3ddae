/**
 * What is watched while a mechanism moves: where its equations change formula, where its course ends, and what is to be told.
 *
 * Deliberately not here: what follows from it (travelRun.ts).
 */
import { type HeatNetwork, RUNAWAY_C } from "./heat.js";
import type { Instant } from "./instant.js";
import type { Layout, Mode } from "./motionLayout.js";
import type { MotionRates } from "./motionRates.js";
import type { Watch } from "./odeSystem.js";
import type { Plant } from "./plant.js";
import { fuseGates } from "./protection.js";
import { rateAlong } from "./supplyCurrent.js";

/** Indices of the watches that a course acts on; −1: not watched. */
export interface WatchIndex {
  /** Progress reaches the target. */
  readonly arrival: number;
  readonly standstill: number;
  /** A flywheel reaches the target speed. */
  readonly targetSpeed: number;
  /** A flywheel's speed rises no more: its motors get hot faster than it gets quick. */
  readonly topSpeed: number;
  /** A blocked mechanism would start. */
  readonly breakaway: number;
  /** The winding is past anything that is still a motor. */
  readonly burnt: number;
  /** Held or stalled for long, nothing changes any more. */
  readonly settled: number;
  readonly currentPeak: number;
  readonly supplyPeak: number;
  readonly windingPeak: number;
  readonly windingLimit: number;
  readonly opens: number;
  readonly mayOpen: number;
  /** The supply crosses the voltage that it must stay above. */
  readonly floor: number;
}

export type WatchValue = (state: Float64Array, now: Instant) => number;

export interface MotionWatches {
  readonly watches: readonly Watch[];
  readonly values: readonly WatchValue[];
  readonly index: WatchIndex;
}

export interface WatchedThings {
  readonly plant: Plant;
  readonly mode: Mode;
  readonly layout: Layout;
  readonly network: HeatNetwork | null;
  readonly rates: MotionRates;
  /** Output speed below which it stands still, rad/s. */
  readonly stillBelow: () => number;
  /** One motor's full current, A, and the course's time, s: what counts as nothing is judged by them. */
  readonly currentScaleA: number;
  readonly timeScaleS: number;
  /** Progress (rad) or, for a flywheel, speed (rad/s) to reach. */
  readonly target: () => number;
}

const KINK: Watch = { kind: "kink", crosses: "both" };
/** Values that only fade towards a kink stay this share of their size away from it, and no rounding makes them cross. */
const FADED = 1e-9;
/** What is left to change, in K and hundredths of a protector's state, when a held mechanism counts as settled. */
const SETTLED = 1e-6;
/** Share of the way after which it has left its start. */
const LEFT = 1e-12;

export function motionWatches({
  plant,
  mode,
  layout,
  network,
  rates,
  stillBelow,
  currentScaleA,
  timeScaleS,
  target,
}: WatchedThings): MotionWatches {
  const watches: Watch[] = [];
  const values: WatchValue[] = [];
  const listen = (present: boolean, watch: Watch, value: WatchValue): number => {
    if (!present) return -1;
    values.push(value);
    return watches.push(watch) - 1;
  };
  const { protection, supply } = plant.drive;
  const { motor } = plant;
  const moving = mode.kind === "moving";
  const turning = moving || mode.kind === "following";
  const fuse = protection?.kind === "fuse" ? protection : null;
  const floorV = supply?.mustStayAbove?.voltageV;
  const flywheel = plant.load.kind === "flywheel";

  const faded = (scale: number, value: WatchValue): WatchValue => {
    const band = FADED * scale;
    return (state, now) => {
      const found = value(state, now);
      return Math.abs(found) < band ? 0 : found;
    };
  };
  const kink = (present: boolean, scale: number, value: (now: Instant) => number): void => {
    listen(
      present,
      KINK,
      faded(scale, (_, now) => value(now)),
    );
  };
  const torqueScale = plant.count * plant.train.ratio * motor.torqueConstantNmPerA * currentScaleA;
  kink(Number.isFinite(plant.limitA) && mode.kind !== "held", currentScaleA, (now) => now.limitGap);
  kink(
    turning && motor.backEmfVPerRadPerS > motor.torqueConstantNmPerA,
    drivenScale(plant, mode, currentScaleA),
    (now) => now.drivenGap,
  );
  kink(turning && plant.train.efficiency < 1, torqueScale, (now) => now.trainGap);
  const slipScale = plant.load.traction ? torqueScale / plant.load.traction.groundInertiaKgM2 : 1;
  kink(moving && plant.load.traction !== undefined, slipScale, (now) => now.gripGap);
  kink(turning, plant.count * currentScaleA, (now) => now.supplyA);
  for (const [multiple] of fuse ? fuseGates(fuse.ratingA) : []) {
    kink(true, 0, (now) => rates.carried(now) - multiple * (fuse?.ratingA ?? 0));
  }

  const stop = (crosses: Watch["crosses"]): Watch => ({ kind: "stop", crosses });
  const note = (crosses: Watch["crosses"]): Watch => ({ kind: "note", crosses });
  const component = ({ kind, crosses }: Watch, index: number): Watch => ({ kind, crosses, component: index });
  const rateOf =
    (by: "currentBy" | "supplyBy"): WatchValue =>
    (at, now) =>
      rateAlong(now, now[by], rates.windingRate(at, now));
  const lasts =
    mode.kind === "held" ||
    (mode.kind === "blocked" ? mode.startsAs === undefined : mode.kind === "following" && plant.load.endless);
  /** At the very start, where a ramp just overcomes the load, rounding is no standstill. */
  const hasLeft = (at: Float64Array): boolean =>
    plant.load.endless ? stillBelow() > 0 : (at[0] as number) > LEFT * plant.spanRad;
  const index: WatchIndex = {
    arrival: listen(turning && !plant.load.endless, component(stop("up"), 0), (at) => (at[0] as number) - target()),
    standstill: moving
      ? listen(true, component(stop("down"), 1), (at) => (hasLeft(at) ? (at[1] as number) - stillBelow() : -1))
      : listen(turning, stop("down"), (at, now) => (hasLeft(at) ? now.startGap / plant.train.ratio - stillBelow() : -1)),
    targetSpeed: listen(moving && flywheel, component(stop("up"), 1), (at) => (at[1] as number) - target()),
    topSpeed: listen(moving && flywheel, stop("down"), (at, now) => (hasLeft(at) ? now.speedRate : 1)),
    breakaway: listen(mode.kind === "blocked" && mode.startsAs !== undefined, stop("up"), (_, now) => now.startGap),
    burnt: listen(network !== null, component(stop("up"), layout.winding), (at) => (at[layout.winding] as number) - RUNAWAY_C),
    settled: listen(lasts, stop("down"), (at, now) => rates.unrest(at, now) - SETTLED),
    currentPeak: listen(true, note("down"), faded(currentScaleA / timeScaleS, rateOf("currentBy"))),
    supplyPeak: listen(true, note("down"), faded((plant.count * currentScaleA) / timeScaleS, rateOf("supplyBy"))),
    windingPeak: listen(network !== null, note("down"), faded(1 / timeScaleS, rates.windingRate)),
    windingLimit: listen(
      network !== null,
      component(note("up"), layout.winding),
      (at) => (at[layout.winding] as number) - (network?.limitC ?? 0),
    ),
    opens: listen(
      protection !== undefined,
      component(note("up"), layout.protection),
      (at) => (at[layout.protection] as number) - 1,
    ),
    mayOpen: listen(fuse !== null, component(note("up"), layout.fast), (at) => (at[layout.fast] as number) - 1),
    floor: listen(floorV !== undefined, note("both"), (_, now) => now.supplyV - (floorV ?? 0)),
  };
  return { watches, values, index };
}

/** Without inertia the gap is a torque, with it a current. */
function drivenScale(plant: Plant, mode: Mode, currentA: number): number {
  return mode.kind === "following" ? plant.motor.torqueConstantNmPerA * currentA : currentA;
}
