/**
 * One mechanism at one instant, with derivatives: a record that is filled again and again without allocating.
 *
 * Deliberately not here: the formulae that fill it (motion.ts, stillMotion.ts).
 */
import type { Plant } from "./plant.js";
import { copperFactor, copperFactorSlope, magnetFactor, magnetFactorSlope } from "./temperature.js";

/** Derivatives by progress (rad), output speed (rad/s), winding temperature (K) and time (s), in this order. */
export type Gradient = number[];
export const BY_PROGRESS = 0;
export const BY_SPEED = 1;
export const BY_HEAT = 2;
export const BY_TIME = 3;

/** Reused from call to call: an instant is read before the next one is asked for. */
export interface Instant extends Conditions {
  /** Rates of progress and of output speed, rad/s and rad/s². */
  progressRate: number;
  readonly progressRateBy: Gradient;
  speedRate: number;
  readonly speedRateBy: Gradient;
  /** One motor: A, N·m, rad/s. */
  currentA: number;
  readonly currentBy: Gradient;
  torqueNm: number;
  readonly torqueBy: Gradient;
  motorSpeed: number;
  readonly motorSpeedBy: Gradient;
  /** All motors' current from the supply, A, and the supply's voltage, V. */
  supplyA: number;
  readonly supplyBy: Gradient;
  supplyV: number;
  /** False where no supply voltage satisfies the controller: it collapses. */
  supplied: boolean;
  /** Their signs tell which formula holds: line or limit, motor driving or driven, train driving or driven, grip or slip. */
  limitGap: number;
  drivenGap: number;
  trainGap: number;
  gripGap: number;
  /** Above 0 where the mechanism starts from standstill: its acceleration then, or without inertia its speed. */
  startGap: number;
}

/** The motor's constants at its temperature, and the command at its time. */
interface Conditions {
  /** Temperature that the constants below stand for, °C. */
  windingC: number;
  resistanceOhm: number;
  resistanceByHeat: number;
  /** Winding, leads and supply as one motor sees them at this command, ohm. */
  seriesOhm: number;
  seriesByTime: number;
  backEmf: number;
  backEmfByHeat: number;
  torqueConstant: number;
  torqueConstantByHeat: number;
  /** The same where the shaft drives the motor. */
  drivenConstant: number;
  drivenConstantByHeat: number;
  /** Share of full voltage, and its rate. */
  command: number;
  commandByTime: number;
  /** Voltage that full command puts on the motor's circuit, V. */
  headV: number;
}

export function createInstant(): Instant {
  const gradient = (): Gradient => [0, 0, 0, 0];
  return {
    progressRate: 0,
    progressRateBy: gradient(),
    speedRate: 0,
    speedRateBy: gradient(),
    currentA: 0,
    currentBy: gradient(),
    torqueNm: 0,
    torqueBy: gradient(),
    motorSpeed: 0,
    motorSpeedBy: gradient(),
    supplyA: 0,
    supplyBy: gradient(),
    supplyV: 0,
    supplied: true,
    limitGap: 1,
    drivenGap: 1,
    trainGap: 1,
    gripGap: 1,
    startGap: 1,
    windingC: Number.NaN,
    resistanceOhm: 0,
    resistanceByHeat: 0,
    seriesOhm: 0,
    seriesByTime: 0,
    backEmf: 0,
    backEmfByHeat: 0,
    torqueConstant: 0,
    torqueConstantByHeat: 0,
    drivenConstant: 0,
    drivenConstantByHeat: 0,
    command: 0,
    commandByTime: 0,
    headV: 0,
  };
}

/** Constants at a winding temperature and the ramp's command at a time. */
export function setConditions(plant: Plant, timeS: number, windingC: number, at: Instant): void {
  if (windingC !== at.windingC) setConstants(plant, windingC, at);
  const { bus } = plant;
  const ramping = timeS < plant.rampS;
  at.command = ramping ? (plant.duty * timeS) / plant.rampS : plant.duty;
  at.commandByTime = ramping ? plant.duty / plant.rampS : 0;
  at.headV = Math.max(bus.openCircuitV - plant.dropV, 0);
  const supplyOhm = plant.count * bus.resistanceOhm;
  at.seriesOhm = at.resistanceOhm + plant.leadOhm + at.command * at.command * supplyOhm;
  at.seriesByTime = 2 * at.command * at.commandByTime * supplyOhm;
}

function setConstants({ motor }: Plant, windingC: number, at: Instant): void {
  const magnet = magnetFactor(motor.magnet, windingC);
  const magnetByHeat = magnetFactorSlope(motor.magnet, windingC);
  const driven = Math.max(motor.torqueConstantNmPerA, motor.backEmfVPerRadPerS);
  at.windingC = windingC;
  at.resistanceOhm = motor.resistanceOhm * copperFactor(windingC);
  at.resistanceByHeat = motor.resistanceOhm * copperFactorSlope(windingC);
  at.backEmf = motor.backEmfVPerRadPerS * magnet;
  at.backEmfByHeat = motor.backEmfVPerRadPerS * magnetByHeat;
  at.torqueConstant = motor.torqueConstantNmPerA * magnet;
  at.torqueConstantByHeat = motor.torqueConstantNmPerA * magnetByHeat;
  at.drivenConstant = driven * magnet;
  at.drivenConstantByHeat = driven * magnetByHeat;
}

/** Sets all four derivatives. */
export function setGradient(gradient: Gradient, progress: number, speed: number, heat: number, time: number): void {
  gradient[BY_PROGRESS] = progress;
  gradient[BY_SPEED] = speed;
  gradient[BY_HEAT] = heat;
  gradient[BY_TIME] = time;
}
