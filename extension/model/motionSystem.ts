/**
 * One mechanism as a system of differential equations: motion, two temperatures, protection and the sums that reports need.
 *
 * Deliberately not here: choosing steps (integrate.ts) and what the course of a travel means (travelRun.ts).
 */
import { type HeatNetwork, heatNetworkOf } from "./heat.js";
import { createInstant, type Instant } from "./instant.js";
import { moveAt } from "./motion.js";
import { type Layout, layoutOf, type Mode } from "./motionLayout.js";
import { motionRates } from "./motionRates.js";
import type { MotionScales } from "./motionScales.js";
import { motionWatches, type WatchIndex } from "./motionWatches.js";
import type { OdeSystem } from "./odeSystem.js";
import type { Plant } from "./plant.js";
import { blockedAt, followAt, heldAt } from "./stillMotion.js";
import { SHEET_TEMPERATURE_C } from "./temperature.js";

export interface MotionSystem extends OdeSystem {
  readonly layout: Layout;
  readonly index: WatchIndex;
  readonly network: HeatNetwork | null;
  /** The instant at a point of the course; valid until the next call. */
  readonly instantAt: (timeS: number, state: Float64Array) => Instant;
  /** The instant last prepared: the end of the last step. */
  readonly front: Instant;
  /** Current that the protection carries at an instant, A. */
  readonly carried: (now: Instant) => number;
  /** Progress (rad), or speed (rad/s) of a flywheel, at which the next stop stands, and the plant with the load on the way there. */
  readonly setTarget: (target: number, piece?: Plant) => void;
  /** Nobody asks for the sums: they need no accuracy. */
  readonly ignoreSums: () => void;
}

/** Below this share of the highest speed so far it stands still. */
const STANDSTILL_SHARE = 1e-9;
const HEAT_SCALE_K = 100;
/** Of a protector's state, which opens at 1. */
const PROTECTION_SCALE = 0.1;
const UNCHECKED = 1e300;
/** Sums are usually this share of full current over the whole time. */
const SUM_SHARE = 0.01;

export function motionSystem(plant: Plant, mode: Mode, scales: MotionScales): MotionSystem {
  const layout = layoutOf(plant);
  const network = heatNetworkOf(plant.motor);
  const rates = motionRates(plant, layout, network);
  const scale = scaleOf(plant, layout, scales);
  const ignoreSums = (): void => {
    scale[layout.squares] = UNCHECKED;
    scale[layout.energy] = UNCHECKED;
  };
  // At a collapsing supply they have no smooth rate.
  if (mode.kind === "held") ignoreSums();
  const at = createInstant();
  const front = createInstant();
  const released = createInstant();
  let target = plant.spanRad;
  let here = plant;
  let highestSpeed = 0;
  const { watches, values, index } = motionWatches({
    plant,
    mode,
    layout,
    network,
    rates,
    stillBelow: () => STANDSTILL_SHARE * highestSpeed,
    currentScaleA: scales.currentA,
    timeScaleS: scales.timeS,
    target: () => target,
  });

  function fillInstant(timeS: number, state: Float64Array, now: Instant, derive: boolean): void {
    const windingC = layout.winding < 0 ? SHEET_TEMPERATURE_C : (state[layout.winding] as number);
    const progress = state[layout.progress] as number;
    switch (mode.kind) {
      case "moving":
        moveAt(here, timeS, progress, state[layout.speed] as number, windingC, now, derive);
        break;
      case "following":
        followAt(here, timeS, progress, windingC, now);
        break;
      case "held":
        heldAt(plant, mode.torqueNm, mode.motorSpeedRadPerS, windingC, now);
        break;
      case "blocked":
        blockedAt(plant, timeS, windingC, now);
        if (mode.startsAs === "moving") moveAt(plant, timeS, progress, 0, windingC, released, false);
        if (mode.startsAs === "following") followAt(plant, timeS, progress, windingC, released);
        now.startGap = released.startGap;
    }
  }

  function watchInstant(state: Float64Array, now: Instant, watched: number[]): void {
    for (let i = 0; i < values.length; i++) watched[i] = (values[i] as (typeof values)[number])(state, now);
  }

  return {
    size: layout.size,
    coupled: layout.squares,
    scale,
    watches,
    layout,
    index,
    network,
    instantAt: (timeS, state) => {
      fillInstant(timeS, state, at, true);
      return at;
    },
    front,
    carried: rates.carried,
    setTarget: (value, piece = plant) => {
      target = value;
      here = piece;
    },
    ignoreSums,
    evaluate: (timeS, state, out) => {
      fillInstant(timeS, state, at, false);
      rates.fill(state, at, out);
    },
    prepare: (timeS, state, start, watched, stiff) => {
      fillInstant(timeS, state, front, true);
      rates.fill(state, front, start.rates);
      if (stiff) rates.differentiate(front, start.jacobian, start.timeRates);
      watchInstant(state, front, watched);
    },
    accept: () => {
      highestSpeed = Math.max(highestSpeed, front.progressRate);
    },
    watch: (timeS, state, watched) => {
      fillInstant(timeS, state, at, true);
      watchInstant(state, at, watched);
    },
  };
}

function scaleOf(plant: Plant, layout: Layout, scales: MotionScales): Float64Array {
  const scale = new Float64Array(layout.size).fill(1);
  scale[layout.progress] = scales.progressRad;
  scale[layout.speed] = scales.speedRadPerS;
  if (layout.winding >= 0) scale[layout.winding] = HEAT_SCALE_K;
  if (layout.housing >= 0) scale[layout.housing] = HEAT_SCALE_K;
  if (layout.protection >= 0) scale[layout.protection] = PROTECTION_SCALE;
  if (layout.fast >= 0) scale[layout.fast] = PROTECTION_SCALE;
  scale[layout.squares] = SUM_SHARE * scales.currentA ** 2 * scales.timeS;
  scale[layout.energy] = SUM_SHARE * plant.bus.openCircuitV * plant.count * scales.currentA * scales.timeS;
  return scale;
}
