/**
 * What heat does to a motor's constants: copper resistance rises, magnets weaken.
 *
 * Deliberately not here: how hot it gets (heat.ts).
 */
import type { Drive, Magnet, MotorConstants } from "./drive.js";

/** Temperature that sheets speak of, °C. */
export const SHEET_TEMPERATURE_C = 25;

/** Temperature coefficient of copper's resistance at 20 °C, 1/K. Source: IEC 60028. */
const COPPER_PER_K = 0.00393;

/**
 * Change of remanence, and so of torque and back-emf constant, per kelvin. Source: published bands of sintered and
 * bonded grades: ferrite −0.20 %/K; neodymium −0.09 to −0.13 %/K; samarium-cobalt −0.03 to −0.043 %/K.
 */
const MAGNET_PER_K: Readonly<Record<Magnet, number>> = { ferrite: -0.002, neodymium: -0.0011, "samarium-cobalt": -0.0004 };

/** Far from any temperature that a motor survives the straight lines would cross zero; they stop at these shares instead. */
const LEAST_COPPER = 0.02;
/** Reached at 400 °C by ferrite: no magnet steel is one beyond, and no winding. */
const LEAST_MAGNET = 0.25;

/** Resistance at a winding temperature over resistance at 25 °C: (1 + α(T − 20))/(1 + α·5). Valid about −50 to 250 °C. */
export function copperFactor(temperatureC: number): number {
  const factor = (1 + COPPER_PER_K * (temperatureC - 20)) / (1 + COPPER_PER_K * (SHEET_TEMPERATURE_C - 20));
  return Math.max(factor, LEAST_COPPER);
}

/** d(copperFactor)/dT, 1/K. */
export function copperFactorSlope(temperatureC: number): number {
  return copperFactor(temperatureC) > LEAST_COPPER ? COPPER_PER_K / (1 + COPPER_PER_K * (SHEET_TEMPERATURE_C - 20)) : 0;
}

/** Torque and back-emf constant over their values at 25 °C: 1 + β(T − 25). No magnet named: 1. */
export function magnetFactor(magnet: Magnet | undefined, temperatureC: number): number {
  if (magnet === undefined) return 1;
  return Math.max(1 + MAGNET_PER_K[magnet] * (temperatureC - SHEET_TEMPERATURE_C), LEAST_MAGNET);
}

/** d(magnetFactor)/dT, 1/K. */
export function magnetFactorSlope(magnet: Magnet | undefined, temperatureC: number): number {
  return magnet !== undefined && magnetFactor(magnet, temperatureC) > LEAST_MAGNET ? MAGNET_PER_K[magnet] : 0;
}

/** The motor's constants at a temperature; its loss current stays the same function of speed. */
export function motorAt(motor: MotorConstants, temperatureC: number): MotorConstants {
  const magnet = magnetFactor(motor.magnet, temperatureC);
  return {
    ...motor,
    resistanceOhm: motor.resistanceOhm * copperFactor(temperatureC),
    torqueConstantNmPerA: motor.torqueConstantNmPerA * magnet,
    backEmfVPerRadPerS: motor.backEmfVPerRadPerS * magnet,
  };
}

/** The same mechanism with its motors at a temperature: every static rule can so be asked hot. */
export function driveAt(drive: Drive, temperatureC: number): Drive {
  return { ...drive, motor: motorAt(drive.motor, temperatureC) };
}
