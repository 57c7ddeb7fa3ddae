/**
 * The travel in closed form, where load and inertia are constant and neither heat, protection nor a ramp comes in.
 *
 * Torque falls with speed in straight pieces (limit, line, grip, load driving or driven), so that speed follows one exponential
 * after another: ω(t) = ω_a + α_a·(e^(st) − 1)/s, progress ω_a·t + α_a·(e^(st) − 1 − st)/s². Source: step response of a first-order
 * lag, any textbook of drives. Deliberately not here: everything else (travel.ts), with which it must agree to 1e-8.
 */
import { createInstant, type Instant } from "./instant.js";
import { availableLine } from "./line.js";
import { moveAt } from "./motion.js";
import type { Plant } from "./plant.js";
import { throughTrain } from "./stages.js";
import { setSupply } from "./supplyCurrent.js";
import { SHEET_TEMPERATURE_C } from "./temperature.js";

export interface ClosedTravel {
  readonly timeS: number;
  /** Of the output shaft, rad/s. */
  readonly endSpeed: number;
  /** ∫I² dt of one motor, A²·s, and ∫V·I dt of the supply, J. */
  readonly squares: number;
  readonly energyJ: number;
  readonly peakMotorCurrentA: number;
  readonly peakSourceCurrentA: number;
  readonly lowestSupplyV: number;
  readonly lowestSupplyAtS: number;
}

/** Where the travel ends: a progress in rad or a speed in rad/s. */
export interface ClosedGoal {
  readonly progressRad?: number;
  readonly speedRadPerS?: number;
}

/** True where the closed form holds. */
export function hasClosedForm(plant: Plant): boolean {
  const { drive, load } = plant;
  const { protection, supply } = drive;
  return load.steady && !plant.motor.thermal && !protection && plant.rampS === 0 && supply?.mustStayAbove === undefined;
}

/**
 * From a speed at which it accelerates to the goal; null where it does not start or never gets there. `sums`: whether the integrals are
 * wanted; without them they stay 0.
 */
export function closedTravel(plant: Plant, fromRadPerS: number, goal: ClosedGoal, sums = true): ClosedTravel | null {
  const at = createInstant();
  const seen = {
    timeS: 0,
    squares: 0,
    energyJ: 0,
    peakMotorCurrentA: 0,
    peakSourceCurrentA: 0,
    lowestSupplyV: Number.POSITIVE_INFINITY,
    lowestSupplyAtS: 0,
  };
  const borders = speedBorders(plant).filter((speed) => speed > fromRadPerS);
  let speed = fromRadPerS;
  let progress = 0;
  look(plant, speed, at, seen);
  if (!(at.speedRate > 0)) return null;
  for (const border of [...borders, Number.POSITIVE_INFINITY]) {
    const piece = pieceFrom(plant, speed, border, at);
    const target = goal.speedRadPerS ?? Number.POSITIVE_INFINITY;
    const borderS = timeToSpeed(piece, Math.min(border, target));
    const left = (goal.progressRad ?? Number.POSITIVE_INFINITY) - progress;
    const arrives = Number.isFinite(left) && (borderS === null || progressAfter(piece, borderS) >= left);
    const lastsS = arrives ? timeToProgress(piece, left, borderS) : borderS;
    if (lastsS === null) return null;
    const end = !arrives && Number.isFinite(Math.min(border, target)) ? Math.min(border, target) : speedAfter(piece, lastsS);
    if (sums) addIntegrals(plant, piece, lastsS, at, seen);
    progress += progressAfter(piece, lastsS);
    seen.timeS += lastsS;
    speed = end;
    look(plant, speed, at, seen);
    if (arrives || speed >= target) return { ...seen, endSpeed: speed };
    if (!(at.speedRate > 0)) return null;
  }
  return null;
}

/** Output speeds at which torque, current or acceleration may bend, rising. */
function speedBorders(plant: Plant): number[] {
  const { motor, count, train, load, limitA } = plant;
  const line = availableLine(plant.drive);
  const opposing = load.opposing(load.startRad, plant.direction);
  const inertia = load.inertia(load.startRad) + train.inertiaKgM2;
  const perMotor = count * train.ratio;
  const ofCurrent = (amperes: number): number => (line.voltageV - line.seriesOhm * amperes) / motor.backEmfVPerRadPerS;
  const ofTorque = (torqueNm: number): number[] => {
    const constant = torqueNm < 0 ? Math.max(motor.torqueConstantNmPerA, motor.backEmfVPerRadPerS) : motor.torqueConstantNmPerA;
    return [line.speedAt(torqueNm), (limitA - torqueNm / constant - plant.breakawayA) / plant.lossSlopeAsPerRad];
  };
  const motorSpeeds = [
    ofCurrent(0),
    ofCurrent(limitA),
    ofCurrent(-limitA),
    ...ofTorque(0),
    ...ofTorque((-plant.rotorKgM2 * opposing) / (inertia * perMotor)),
  ];
  if (load.traction) {
    const most = (load.traction.limitNm - (opposing - load.traction.besideGroundNm)) / load.traction.groundInertiaKgM2;
    motorSpeeds.push(...ofTorque((plant.rotorKgM2 * most + throughTrain(train, opposing + inertia * most)) / perMotor));
  }
  return motorSpeeds
    .map((speed) => speed / train.ratio)
    .filter((speed) => Number.isFinite(speed) && speed > 0)
    .sort((one, other) => one - other);
}

/** A stretch of speeds over which acceleration and current are straight lines: α = rate + slope·(ω − speed). */
interface Piece {
  readonly speed: number;
  readonly rate: number;
  readonly slope: number;
  /** One motor's current at `speed`, A, and its slope, A·s/rad. */
  readonly currentA: number;
  readonly currentSlope: number;
  /** True where the controller gives full command: neither limit nor grip holds it back. */
  readonly full: boolean;
  /** True where the supply gives current. */
  readonly draws: boolean;
}

function pieceFrom(plant: Plant, speed: number, border: number, at: Instant): Piece {
  const inside = Number.isFinite(border) ? (speed + border) / 2 : speed * 2 + 1;
  instantAt(plant, inside, at);
  const slope = at.speedRateBy[1] as number;
  const currentSlope = at.currentBy[1] as number;
  return {
    speed,
    rate: at.speedRate + slope * (speed - inside),
    slope,
    currentA: at.currentA + currentSlope * (speed - inside),
    currentSlope,
    full: at.limitGap >= 0 && at.gripGap >= 0,
    draws: at.supplyA > 0,
  };
}

function instantAt(plant: Plant, speed: number, at: Instant): void {
  moveAt(plant, 0, 0, speed, SHEET_TEMPERATURE_C, at, true);
}

/** Pieces longer than this many of their time constants are integrated over their exponential. */
const LONG = 0.5;

/** (e^z − 1)/z, (e^z − 1 − z)/z². */
function firstOrder(z: number): number {
  return z === 0 ? 1 : Math.expm1(z) / z;
}
function secondOrder(z: number): number {
  if (Math.abs(z) > 0.1) return (Math.expm1(z) - z) / (z * z);
  let sum = 0;
  for (let k = 12; k >= 1; k--) sum = (sum * z + 1) / (k + 1);
  return sum;
}

function speedAfter(piece: Piece, timeS: number): number {
  return piece.speed + piece.rate * timeS * firstOrder(piece.slope * timeS);
}

function progressAfter(piece: Piece, timeS: number): number {
  return piece.speed * timeS + piece.rate * timeS * timeS * secondOrder(piece.slope * timeS);
}

/** null: it only ever comes near. */
function timeToSpeed(piece: Piece, speed: number): number | null {
  if (!Number.isFinite(speed)) return null;
  const gain = speed - piece.speed;
  const share = (piece.slope * gain) / piece.rate;
  if (!(piece.rate > 0) || share <= -1) return null;
  return (gain / piece.rate) * (Math.abs(share) < 1e-8 ? 1 - share / 2 : Math.log1p(share) / share);
}

/** Newton's iteration on the rising progress, kept inside a bracket. */
function timeToProgress(piece: Piece, progress: number, mostS: number | null): number {
  let low = 0;
  let high = mostS ?? Number.POSITIVE_INFINITY;
  let timeS = Math.min(high, piece.speed > 0 ? progress / piece.speed : Math.sqrt((2 * progress) / piece.rate));
  for (let k = 0; k < 200; k++) {
    const missing = progress - progressAfter(piece, timeS);
    if (missing > 0) low = timeS;
    else high = timeS;
    const next = timeS + missing / speedAfter(piece, timeS);
    const kept = next > low && next < high ? next : Number.isFinite(high) ? (low + high) / 2 : 2 * timeS;
    if (Math.abs(kept - timeS) <= 1e-15 * timeS || kept === timeS) return kept;
    timeS = kept;
  }
  return timeS;
}

interface Seen {
  timeS: number;
  squares: number;
  energyJ: number;
  peakMotorCurrentA: number;
  peakSourceCurrentA: number;
  lowestSupplyV: number;
  lowestSupplyAtS: number;
}

function look(plant: Plant, speed: number, at: Instant, seen: Seen): void {
  instantAt(plant, speed, at);
  seen.peakMotorCurrentA = Math.max(seen.peakMotorCurrentA, Math.abs(at.currentA));
  seen.peakSourceCurrentA = Math.max(seen.peakSourceCurrentA, at.supplyA);
  if (at.supplyV >= seen.lowestSupplyV) return;
  seen.lowestSupplyV = at.supplyV;
  seen.lowestSupplyAtS = seen.timeS;
}

/** Nodes and weights of Gauss and Legendre's rule with 10 points on −1…1, the positive half. Source: Abramowitz and Stegun, table 25.4. */
const GAUSS: readonly (readonly [node: number, weight: number])[] = [
  [0.14887433898163122, 0.29552422471475287],
  [0.4333953941292472, 0.26926671930999635],
  [0.6794095682990244, 0.21908636251598204],
  [0.8650633666889845, 0.1494513491505806],
  [0.9739065285171717, 0.06667134430868814],
];

/**
 * Adds ∫I² dt and ∫V·I dt over a piece. Short pieces by quadrature over time; long ones over u = e^(st), after taking out the value F∞
 * that the piece's formulae have at the speed they tend to: ∫F dt = F∞·t + ∫(F(u) − F∞)/(−s·u) du, a smooth integrand.
 */
function addIntegrals(plant: Plant, piece: Piece, lastsS: number, at: Instant, seen: Seen): void {
  const exponent = piece.slope * lastsS;
  const long = exponent < -LONG;
  const steady = piece.speed - piece.rate / piece.slope;
  const rest = long ? integrandAt(plant, piece, steady, at) : { square: 0, power: 0 };
  const from = long ? Math.exp(exponent) : 0;
  const half = ((long ? 1 : lastsS) - from) / 2;
  for (const [node, weight] of GAUSS) {
    for (const side of [-1, 1]) {
      const point = from + half * (1 + side * node);
      const speed = long ? steady + (piece.speed - steady) * point : speedAfter(piece, point);
      const { square, power } = integrandAt(plant, piece, speed, at);
      const factor = (half * weight) / (long ? -piece.slope * point : 1);
      seen.squares += factor * (square - rest.square);
      seen.energyJ += factor * (power - rest.power);
    }
  }
  seen.squares += rest.square * (long ? lastsS : 0);
  seen.energyJ += rest.power * (long ? lastsS : 0);
}

/** I² and the supply's power by the piece's own formulae, also beyond its borders. */
function integrandAt(
  plant: Plant,
  piece: Piece,
  speed: number,
  at: Instant,
): { readonly square: number; readonly power: number } {
  at.currentA = piece.currentA + piece.currentSlope * (speed - piece.speed);
  at.motorSpeed = plant.train.ratio * speed;
  setSupply(plant, at, piece.full, false);
  return { square: at.currentA * at.currentA, power: piece.draws ? at.supplyV * at.supplyA : 0 };
}
