/**
 * Where one motor runs at a given torque: on its available line or at its current limit, whichever gives less.
 *
 * Deliberately not here: which torque the load asks for (hardest.ts), and what changes with time.
 */
import { type ControlledSupply, controlledSupply } from "./bus.js";
import type { Drive } from "./drive.js";
import { availableLine, leadOhm, supplyOf } from "./line.js";
import { breakawayCurrent, lossCurrentSlope } from "./motor.js";

export type LimitedBy = "line" | "limit" | "grip";

/** One motor, except where the name says source. */
export interface OperatingPoint {
  /** Torque asked of the shaft, N·m. */
  readonly torqueNm: number;
  readonly speedRadPerS: number;
  readonly currentA: number;
  /** At the motor's terminals, V. */
  readonly terminalVoltageV: number;
  readonly shaftPowerW: number;
  /** Into the motor's terminals, W. */
  readonly electricalPowerW: number;
  /** Shaft over electrical power while motoring; null where no power goes in. */
  readonly efficiency: number | null;
  /** All motors of the mechanism, A. */
  readonly sourceCurrentA: number;
  /** At the supply's terminals, V. */
  readonly supplyVoltageV: number;
  readonly limitedBy: LimitedBy;
  /** True where the motor cannot turn against the torque: speed is 0, current that of the stalled state. */
  readonly stalled: boolean;
}

/** The point at full command, motor at its sheet's temperature. A torque below 0 drives the motor past no-load speed. */
export function operatingPointAt(drive: Drive, torqueNm: number): OperatingPoint {
  const { motor } = drive;
  const line = availableLine(drive);
  const limitA = drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY;
  const limitStallNm = motor.torqueConstantNmPerA * (limitA - breakawayCurrent(motor));
  if (torqueNm >= Math.min(line.stallTorqueNm, limitStallNm) && torqueNm >= 0) return stalledPoint(drive, torqueNm);
  const currentA = line.currentAt(torqueNm);
  if (currentA <= limitA) return pointAt(drive, torqueNm, line.speedAt(torqueNm), currentA, "line", false);
  // At the limit a lower speed leaves more of the current to the shaft: I_loss(ω) = I_limit − T/k_t.
  const spare = limitA - torqueNm / motor.torqueConstantNmPerA - breakawayCurrent(motor);
  return pointAt(drive, torqueNm, spare / lossCurrentSlope(motor), limitA, "limit", false);
}

/** The stalled state at full command: standstill, the line's stall current or the limit's. */
export function stalledPoint(drive: Drive, torqueNm: number): OperatingPoint {
  const { stallCurrentA } = availableLine(drive);
  const limitA = drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY;
  return limitA < stallCurrentA
    ? pointAt(drive, torqueNm, 0, limitA, "limit", true)
    : pointAt(drive, torqueNm, 0, stallCurrentA, "line", true);
}

/** The point at a known speed and current; off the line, the controller's duty and the supply's voltage follow from them. */
export function pointAt(
  drive: Drive,
  torqueNm: number,
  speedRadPerS: number,
  currentA: number,
  limitedBy: LimitedBy,
  stalled: boolean,
): OperatingPoint {
  const { motor } = drive;
  const terminalVoltageV = currentA * motor.resistanceOhm + motor.backEmfVPerRadPerS * speedRadPerS;
  const source =
    limitedBy === "line"
      ? fullCommand(drive, currentA)
      : (controlled(drive, currentA, speedRadPerS) ?? fullCommand(drive, currentA));
  const shaftPowerW = stalled ? 0 : torqueNm * speedRadPerS;
  const electricalPowerW = terminalVoltageV * currentA;
  return {
    torqueNm,
    speedRadPerS,
    currentA,
    terminalVoltageV,
    shaftPowerW,
    electricalPowerW,
    efficiency: electricalPowerW > 0 && shaftPowerW >= 0 ? shaftPowerW / electricalPowerW : null,
    sourceCurrentA: source.supplyCurrentA,
    supplyVoltageV: source.busV,
    limitedBy,
    stalled,
  };
}

/** Supply at the duty that brings one motor's current at a speed; null: it collapses. */
export function controlled(drive: Drive, currentA: number, speedRadPerS: number): ControlledSupply | null {
  const supply = supplyOf(drive);
  return controlledSupply({
    openCircuitV: supply.openCircuitV,
    supplyOhm: supply.resistanceOhm,
    dropV: drive.driver?.dropV ?? 0,
    count: drive.motorCount,
    currentA,
    neededV: currentA * (drive.motor.resistanceOhm + leadOhm(drive)) + drive.motor.backEmfVPerRadPerS * speedRadPerS,
  });
}

function fullCommand(drive: Drive, currentA: number): ControlledSupply {
  const supply = supplyOf(drive);
  const supplyCurrentA = drive.motorCount * drive.pwmDuty * currentA;
  return { duty: drive.pwmDuty, busV: supply.openCircuitV - supply.resistanceOhm * supplyCurrentA, supplyCurrentA };
}
