/**
 * The straight speed-torque line of one motor at a steady voltage behind a series resistance.
 *
 * Deliberately not here: current limits and lowered duty (operatingPoint.ts).
 */
import type { Drive, MotorConstants, Supply } from "./drive.js";
import { breakawayCurrent, lossCurrent, lossCurrentSlope, torquePerAmpere } from "./motor.js";

/** One motor's line. Speeds in rad/s, torques in N·m, currents in A, all at one motor. */
export interface MotorLine {
  readonly motor: MotorConstants;
  /** Voltage behind the series resistance, V. */
  readonly voltageV: number;
  /** Winding and all that is in series with it, referred to one motor, ohm. */
  readonly seriesOhm: number;
  readonly noLoadSpeedRadPerS: number;
  readonly noLoadCurrentA: number;
  readonly stallTorqueNm: number;
  readonly stallCurrentA: number;
  /** Speed at a torque; below 0 beyond stall, above no-load where the load drives. */
  readonly speedAt: (torqueNm: number) => number;
  /** Current at a torque. */
  readonly currentAt: (torqueNm: number) => number;
  /** Torque at a forward speed. */
  readonly torqueAt: (speedRadPerS: number) => number;
}

/**
 * The line that the mechanism's supply, wiring, driver and duty leave to one motor, N motors pulling alike.
 *
 * From d·(V_b − V_drop) = k_e·ω + I·(R + R_wiring + R_driver) and V_b = V_oc − R_s·n·d·I follows V = d·(V_oc − V_drop) behind
 * R + R_wiring + R_driver + d²·n·R_s. No supply declared: an ideal one at the motor's own voltage.
 */
export function availableLine(drive: Drive): MotorLine {
  return lineAtDuty(drive, drive.pwmDuty);
}

/** The same line at any duty from 0 to 1. */
export function lineAtDuty(drive: Drive, duty: number): MotorLine {
  const supply = supplyOf(drive);
  const voltageV = duty * Math.max(supply.openCircuitV - (drive.driver?.dropV ?? 0), 0);
  return lineOf(
    drive.motor,
    voltageV,
    drive.motor.resistanceOhm + leadOhm(drive) + duty * duty * drive.motorCount * supply.resistanceOhm,
  );
}

/** The motor alone at its sheet's voltage. */
export function sheetLine(motor: MotorConstants): MotorLine {
  return lineOf(motor, motor.voltageV, motor.resistanceOhm);
}

/** Resistance between controller and winding of one motor, ohm. */
export function leadOhm(drive: Drive): number {
  return drive.wiringOhm + (drive.driver?.resistanceOhm ?? 0);
}

/** The declared supply, or an ideal one at the motor's voltage. */
export function supplyOf(drive: Drive): Supply {
  return drive.supply ?? { openCircuitV: drive.motor.voltageV, resistanceOhm: 0, peukert: 1 };
}

/** Line of a motor at a voltage behind a series resistance that includes its winding. */
export function lineOf(motor: MotorConstants, voltageV: number, seriesOhm: number): MotorLine {
  const breakaway = breakawayCurrent(motor);
  const slope = motor.backEmfVPerRadPerS + seriesOhm * lossCurrentSlope(motor);
  const speedAt = (torqueNm: number): number => {
    const torqueCurrent = torqueNm / torquePerAmpere(motor, torqueNm < 0);
    return (voltageV - seriesOhm * (torqueCurrent + breakaway)) / slope;
  };
  const stallCurrentA = voltageV / seriesOhm;
  const noLoadSpeedRadPerS = Math.max(speedAt(0), 0);
  return {
    motor,
    voltageV,
    seriesOhm,
    noLoadSpeedRadPerS,
    noLoadCurrentA: Math.min(lossCurrent(motor, noLoadSpeedRadPerS), stallCurrentA),
    stallTorqueNm: Math.max(motor.torqueConstantNmPerA * (stallCurrentA - breakaway), 0),
    stallCurrentA,
    speedAt,
    currentAt: (torqueNm) => (voltageV - motor.backEmfVPerRadPerS * speedAt(torqueNm)) / seriesOhm,
    torqueAt: (speedRadPerS) => {
      const surplus = (voltageV - motor.backEmfVPerRadPerS * speedRadPerS) / seriesOhm - lossCurrent(motor, speedRadPerS);
      return torquePerAmpere(motor, surplus < 0) * surplus;
    },
  };
}
