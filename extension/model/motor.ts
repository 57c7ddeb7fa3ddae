/**
 * A DC motor's constants, from its sheet or from measured constants, and its current-torque relation.
 *
 * Deliberately not here: what feeds the motor (line.ts) and heat (temperature.ts).
 */
import type { MotorConstants } from "./drive.js";

type Extras = Partial<Pick<MotorConstants, "rated" | "thermal" | "magnet" | "tolerance">>;

/** Sheet values at `voltageV`: V, rad/s, A, N·m. */
export interface MotorSheetValues extends Extras {
  readonly voltageV: number;
  readonly noLoadSpeedRadPerS: number;
  readonly noLoadCurrentA: number;
  readonly stallTorqueNm: number;
  readonly stallCurrentA: number;
  readonly speedLossShare?: number;
  readonly rotorInertiaKgM2?: number;
}

/** Measured constants: V, ohm, N·m/A, A. */
export interface MotorConstantValues extends Extras {
  readonly voltageV: number;
  readonly resistanceOhm: number;
  readonly torqueConstantNmPerA: number;
  readonly noLoadCurrentA: number;
  readonly speedLossShare?: number;
  readonly rotorInertiaKgM2?: number;
}

/** Sheets that contradict themselves stay finite: no constant falls below this share of the loss-free motor's. */
const LEAST_SHARE = 1e-9;

/**
 * Constants of the motor that a sheet describes.
 *
 * R = V/I_s, k_e = (V − R·I_0)/ω_0, k_t = T_s/(I_s − I_0·(1 − v)): the straight line through the
 * sheet's two points. Source: the steady equations of the separately excited DC machine (Fitzgerald,
 * Kingsley, Umans, Electric Machinery, ch. 7), solved for the constants.
 */
export function motorFromSheet(sheet: MotorSheetValues): MotorConstants {
  const { noLoadSpeedRadPerS, stallTorqueNm, stallCurrentA, speedLossShare = 1, rotorInertiaKgM2 = 0, ...rest } = sheet;
  const resistanceOhm = sheet.voltageV / stallCurrentA;
  const lossFree = sheet.voltageV / noLoadSpeedRadPerS;
  const backEmf = (sheet.voltageV - resistanceOhm * sheet.noLoadCurrentA) / noLoadSpeedRadPerS;
  const torqueCurrent = Math.max(stallCurrentA - sheet.noLoadCurrentA * (1 - speedLossShare), LEAST_SHARE * stallCurrentA);
  return {
    ...rest,
    resistanceOhm,
    torqueConstantNmPerA: stallTorqueNm / torqueCurrent,
    backEmfVPerRadPerS: Math.max(backEmf, LEAST_SHARE * lossFree),
    noLoadSpeedRadPerS,
    speedLossShare,
    rotorInertiaKgM2,
  };
}

/** Constants of a motor known by resistance and torque constant; back-emf constant and torque constant are then one number. */
export function motorFromConstants(values: MotorConstantValues): MotorConstants {
  const { speedLossShare = 1, rotorInertiaKgM2 = 0, ...rest } = values;
  const backEmf = values.torqueConstantNmPerA;
  const inner = Math.max(values.voltageV - values.resistanceOhm * values.noLoadCurrentA, LEAST_SHARE * values.voltageV);
  return { ...rest, backEmfVPerRadPerS: backEmf, noLoadSpeedRadPerS: inner / backEmf, speedLossShare, rotorInertiaKgM2 };
}

/** Part of the loss current that does not depend on speed, A: what must flow before the shaft breaks away. */
export function breakawayCurrent(motor: MotorConstants): number {
  return motor.noLoadCurrentA * (1 - motor.speedLossShare);
}

/** Loss current per speed, A·s/rad. */
export function lossCurrentSlope(motor: MotorConstants): number {
  return (motor.noLoadCurrentA * motor.speedLossShare) / motor.noLoadSpeedRadPerS;
}

/** Loss current at a forward speed, A: I_loss = I_0·[(1 − v) + v·ω/ω_0]. */
export function lossCurrent(motor: MotorConstants, speedRadPerS: number): number {
  return breakawayCurrent(motor) + lossCurrentSlope(motor) * speedRadPerS;
}

/** Torque per ampere, N·m/A; the larger constant counts when the shaft drives the motor, so that no energy comes from nothing. */
export function torquePerAmpere(motor: MotorConstants, driven: boolean): number {
  return driven ? Math.max(motor.torqueConstantNmPerA, motor.backEmfVPerRadPerS) : motor.torqueConstantNmPerA;
}
