/**
 * The equations of one mechanism in one mode as a part of a robot: what it asks of the bus, its instant at the bus's voltage, its
 * rates and what is watched.
 *
 * Deliberately not here: the formulae themselves (motion.ts, stillMotion.ts, motionRates.ts) and the bus (sharedBus.ts).
 */
import { BY_TIME, createInstant, type Instant, setConditions } from "./instant.js";
import { moveAt } from "./motion.js";
import type { Mode } from "./motionLayout.js";
import { type MotionRates, motionRates } from "./motionRates.js";
import { motionWatches } from "./motionWatches.js";
import type { Watch } from "./odeSystem.js";
import type { Plant } from "./plant.js";
import { type RobotPart, targetOf } from "./robotPart.js";
import { type BusDemand, createDemand } from "./sharedBus.js";
import { throughTrain } from "./stages.js";
import { blockedAt, followAt, heldAt } from "./stillMotion.js";
import { SHEET_TEMPERATURE_C } from "./temperature.js";

/** What a crossing of a watched value means for the part. */
export type UnitEvent =
  | "arrives"
  | "stands-still"
  | "starts"
  | "reaches-speed"
  | "loses-speed"
  | "burns"
  | "opens"
  | "may-open"
  | "passes-limit"
  | "winding-peaks";

export interface UnitWatch {
  readonly watch: Watch;
  /** null: only a change of formula. */
  readonly event: UnitEvent | null;
  readonly value: (state: Float64Array, now: Instant) => number;
}

export interface RobotUnit {
  readonly part: RobotPart;
  /** null without current. */
  readonly demand: BusDemand | null;
  readonly rates: MotionRates;
  readonly watches: readonly UnitWatch[];
  /** The end of the last step, and a point anywhere. */
  readonly front: Instant;
  readonly at: Instant;
  /** Sets the demand at a step time (s) and state. */
  readonly ask: (timeS: number, state: Float64Array, now: Instant) => void;
  /** Fills an instant at the bus's voltage. */
  readonly fill: (timeS: number, state: Float64Array, now: Instant, derive: boolean) => void;
  /** Derivatives of motion and current by the bus's voltage, per volt, where the front stands: as `at`'s derivatives by time. */
  readonly fillByVolts: (state: Float64Array) => void;
}

/** Share of the highest speed since it started below which it stands still. */
const STANDSTILL_SHARE = 1e-9;
/** Shorter times do not count, s. */
const LEAST_TIME_S = 1e-3;
/** A ramp is never looked at nearer to its start than this share: with no command at all nothing would start. */
const RAMP_BEGUN = 1e-9;

export function createUnit(part: RobotPart): RobotUnit {
  const { plant, layout, network, mode } = part;
  const rates = motionRates(plant, layout, network);
  const base = { part, rates, front: createInstant(), at: createInstant() };
  if (mode.kind === "idle") {
    const nothing = (): void => {};
    return { ...base, demand: null, watches: [], ask: nothing, fill: nothing, fillByVolts: nothing };
  }
  const demand = createDemand();
  demand.count = plant.count;
  demand.dropV = plant.dropV;
  demand.limitA = plant.limitA;
  const released = createInstant();

  function ask(timeS: number, state: Float64Array, now: Instant): void {
    setConditions(plant, mode.kind === "held" ? plant.rampS : sinceStart(part, timeS), windingOf(part, state), now);
    demand.command = now.command;
    demand.seriesOhm = now.resistanceOhm + plant.leadOhm;
    if (mode.kind === "moving") askMoving(part, state[1] as number, now, demand);
    else if (mode.kind === "following") askFollowing(plant, state[0] as number, now, demand);
    else if (mode.kind === "held") cap(demand, heldCurrent(plant, mode, now), plant.limitA, now.backEmf * mode.motorSpeedRadPerS);
    else cap(demand, plant.limitA, plant.limitA, 0);
  }

  function fill(timeS: number, state: Float64Array, now: Instant, derive: boolean): void {
    const since = mode.kind === "held" ? plant.rampS : sinceStart(part, timeS);
    fillAs(plant, since, state, now, derive);
    if (mode.kind !== "blocked") return;
    if (part.moves === "moving") moveAt(plant, since, state[0] as number, 0, windingOf(part, state), released, false);
    else followAt(plant, since, state[0] as number, windingOf(part, state), released);
    now.startGap = released.startGap;
  }

  function fillAs(as: Plant, since: number, state: Float64Array, now: Instant, derive: boolean): void {
    const windingC = windingOf(part, state);
    const progress = state[0] as number;
    if (mode.kind === "moving") moveAt(as, since, progress, state[1] as number, windingC, now, derive);
    else if (mode.kind === "following") followAt(as, since, progress, windingC, now);
    else if (mode.kind === "held" && (derive || !holdBriefly(as, mode, windingC, now))) holdAt(as, mode, since, windingC, now);
    else if (mode.kind === "held") return;
    else blockedAt(as, since, windingC, now);
  }

  /** A ramp whose command at 1 s is the present one, and grows as a share of itself each second: as the voltage does by 1/head for each volt. */
  const ramped = { ...plant, rampS: 2 };

  function fillByVolts(state: Float64Array): void {
    const { command } = base.front;
    ramped.duty = 2 * command;
    fillAs(ramped, 1, state, base.at, true);
    const { at } = base;
    const perVolt = at.headV > 0 ? 1 / at.headV : 0;
    for (const by of [at.progressRateBy, at.speedRateBy, at.currentBy, at.torqueBy, at.motorSpeedBy]) {
      by[BY_TIME] = perVolt * (by[BY_TIME] as number);
    }
    at.supplyBy[BY_TIME] = demand.slope;
  }

  return { ...base, demand, ask, fill, fillByVolts, watches: watchesOf(part, mode, rates) };
}

/** By how much line and limit give more than the mechanism needs to be held or kept at its speed, A of one motor. */
export function spareToHold(part: RobotPart, now: Instant): number {
  const { plant, held } = part;
  const line = (plant.duty * now.headV - now.backEmf * held.motorSpeedRadPerS) / (now.resistanceOhm + plant.leadOhm);
  return Math.min(line, plant.limitA) - heldCurrent(plant, held, now);
}

/** Output speed, rad/s. */
export function stillBelow({ highestRadPerS }: RobotPart): number {
  return STANDSTILL_SHARE * highestRadPerS;
}

/** Time since the ramp began, s. */
function sinceStart({ plant, startedAtS }: RobotPart, timeS: number): number {
  return Math.max(timeS - startedAtS, RAMP_BEGUN * plant.rampS);
}

function windingOf({ layout }: RobotPart, state: Float64Array): number {
  return layout.winding < 0 ? SHEET_TEMPERATURE_C : (state[layout.winding] as number);
}

function heldCurrent(plant: Plant, held: RobotPart["held"], now: Instant): number {
  const speed = held.motorSpeedRadPerS;
  return held.torqueNm / now.torqueConstant + (speed > 0 ? plant.breakawayA + plant.lossSlopeAsPerRad * speed : 0);
}

/** The same without derivatives, where the supply brings the hold's current; else false. */
function holdBriefly(plant: Plant, held: RobotPart["held"], windingC: number, now: Instant): boolean {
  setConditions(plant, plant.rampS, windingC, now);
  const seriesOhm = now.resistanceOhm + plant.leadOhm;
  const backV = now.backEmf * held.motorSpeedRadPerS;
  const current = heldCurrent(plant, held, now);
  const spare = Math.min((plant.duty * now.headV - backV) / seriesOhm, plant.limitA) - current;
  if (!(spare >= 0 && now.headV > 0)) return false;
  now.progressRate = 0;
  now.speedRate = 0;
  now.motorSpeed = held.motorSpeedRadPerS;
  now.torqueNm = held.torqueNm;
  now.currentA = current;
  now.supplyA = (plant.count * current * (current * seriesOhm + backV)) / now.headV;
  now.supplyV = plant.bus.openCircuitV;
  now.supplied = true;
  now.limitGap = spare;
  return true;
}

/** Where the supply does not bring the hold's current, all that full command gives; `limitGap` tells, A. */
function holdAt(plant: Plant, held: RobotPart["held"], since: number, windingC: number, now: Instant): void {
  heldAt(plant, held.torqueNm, held.motorSpeedRadPerS, windingC, now);
  const command = since < plant.rampS ? (plant.duty * since) / plant.rampS : plant.duty;
  const line = (command * now.headV - now.backEmf * now.motorSpeed) / (now.resistanceOhm + plant.leadOhm);
  const spare = Math.min(line, plant.limitA) - now.currentA;
  if (spare < 0 && held.motorSpeedRadPerS === 0) blockedAt(plant, since, windingC, now);
  now.limitGap = spare;
}

function cap(demand: BusDemand, wantedA: number, limitA: number, backV: number): void {
  demand.backV = backV;
  demand.capA = Math.min(wantedA, limitA);
  demand.capV = demand.capA * demand.seriesOhm + backV;
}

function askMoving({ plant, slipNm }: RobotPart, speed: number, now: Instant, demand: BusDemand): void {
  const motorSpeed = plant.train.ratio * speed;
  const constant = slipNm < 0 ? now.drivenConstant : now.torqueConstant;
  cap(
    demand,
    slipNm / constant + plant.breakawayA + plant.lossSlopeAsPerRad * motorSpeed,
    plant.limitA,
    now.backEmf * motorSpeed,
  );
}

/** I = I_asked + I_loss′·ω with ω where the line meets it; standing still below I_asked. */
function askFollowing(plant: Plant, progress: number, now: Instant, demand: BusDemand): void {
  const { load, direction, train } = plant;
  const opposing = load.opposing(load.startRad + direction * progress, direction);
  const torque = throughTrain(train, opposing) / (plant.count * train.ratio);
  const asked = torque / (torque < 0 ? now.drivenConstant : now.torqueConstant) + plant.breakawayA;
  const slips = load.traction !== undefined && load.traction.limitNm < opposing - load.traction.besideGroundNm;
  const lossOhm = demand.seriesOhm * plant.lossSlopeAsPerRad;
  demand.followsPastA = slips ? Number.POSITIVE_INFINITY : asked;
  demand.followShare = slips ? 1 : lossOhm / (now.backEmf + lossOhm);
  const limitSpeed = !slips && plant.lossSlopeAsPerRad > 0 ? Math.max(plant.limitA - asked, 0) / plant.lossSlopeAsPerRad : 0;
  cap(demand, plant.limitA, plant.limitA, 0);
  if (Number.isFinite(limitSpeed)) demand.capV += now.backEmf * limitSpeed;
}

/** What a mechanism alone watches, its events made stops where the robot goes on differently after them. */
function watchesOf(part: RobotPart, mode: Mode, rates: MotionRates): UnitWatch[] {
  const { plant, layout, network, scales, askedRadPerS } = part;
  const { watches, values, index } = motionWatches({
    plant,
    mode,
    layout,
    network,
    rates,
    stillBelow: () => stillBelow(part),
    currentScaleA: scales.currentA,
    timeScaleS: Math.max(scales.timeS, LEAST_TIME_S),
    target: () => targetOf(part),
  });
  const events = new Map<number, UnitEvent>([
    [index.arrival, "arrives"],
    [index.standstill, "stands-still"],
    [index.targetSpeed, "reaches-speed"],
    [index.breakaway, "starts"],
    [index.burnt, "burns"],
    [index.windingPeak, "winding-peaks"],
    [index.windingLimit, "passes-limit"],
    [index.opens, "opens"],
    [index.mayOpen, "may-open"],
  ]);
  // Peaks and sags of the supply are the robot's, not one mechanism's.
  const others = new Set([index.currentPeak, index.supplyPeak, index.floor]);
  const kept = watches.flatMap((watch, i): UnitWatch[] => {
    const event = events.get(i) ?? null;
    const value = values[i];
    if (others.has(i) || value === undefined) return [];
    return [{ watch: event === "opens" ? { ...watch, kind: "stop" } : watch, event, value }];
  });
  const ratio = plant.train.ratio;
  if (mode.kind === "held") {
    const turns = mode.motorSpeedRadPerS > 0;
    const watch: Watch = turns ? { kind: "stop", crosses: "down" } : { kind: "kink", crosses: "both" };
    kept.push({ watch, event: turns ? "loses-speed" : null, value: (_, now) => now.limitGap });
  } else if (mode.kind !== "blocked" && askedRadPerS !== null && index.targetSpeed < 0) {
    kept.push({
      watch: { kind: "stop", crosses: "up" },
      event: "reaches-speed",
      value: (_, now) => now.motorSpeed / ratio - askedRadPerS,
    });
  }
  return kept;
}
