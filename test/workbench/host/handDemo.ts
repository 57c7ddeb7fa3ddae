// Two mechanisms of the demo worked out by hand from what is declared there, so that what the editor shows is not held to
// the product's own numbers alone. Units are SI; equations are those of a line between the sheet's two points.

/** Standard gravity, m/s²: CGPM 1901. */
const GRAVITY = 9.80665;

const RPM = (2 * Math.PI) / 60;

interface Sheet {
  readonly voltageV: number;
  readonly noLoadRadPerS: number;
  readonly noLoadA: number;
  readonly stallNm: number;
  readonly stallA: number;
}

/** test/demo/motors.ts. */
const steadyMotor: Sheet = { voltageV: 12, noLoadRadPerS: 152 * RPM, noLoadA: 0.28, stallNm: 2.4, stallA: 4.1 };
const quickMotor: Sheet = { voltageV: 12, noLoadRadPerS: 310 * RPM, noLoadA: 0.35, stallNm: 1.3, stallA: 4.4 };

/** test/demo/power.ts. */
const pack = { openCircuitV: 12.6, resistanceOhm: 0.11 };

/** Customary for a pair of spur gears. */
export const SPUR_EFFICIENCY = 0.98;

export interface HandPoint {
  /** Needed at one motor's shaft. */
  readonly motorNm: number;
  /** Where one motor on this pack stalls. */
  readonly stallNm: number;
  readonly share: number;
  readonly currentA: number;
  readonly outputNm: number;
  readonly outputRpm: number;
  /** Below this ratio one motor needs more than half of its stall torque. */
  readonly ratioAtPeak: number;
}

/** mechanisms/shelfLift.ts: two motors on one drum. */
export function shelfLift({ driver = 20, driven = 22 } = {}): HandPoint {
  return point(steadyMotor, 2, driven / driver, (13 * GRAVITY + 6) * 0.025);
}

/** mechanisms/trayHoist.ts. */
export function trayHoist({ driver = 16, driven = 54 } = {}): HandPoint {
  return point(quickMotor, 1, driven / driver, (4.5 + 1.4) * GRAVITY * 0.03);
}

/** mechanisms/wateringArm.ts: hardest where the arm is level. */
export function wateringArm({ driver = 16, driven = 48 } = {}): HandPoint {
  return point(steadyMotor, 1, driven / driver, (1.5 + 0.9) * GRAVITY * 0.42);
}

function point(sheet: Sheet, count: number, ratio: number, outputNm: number): HandPoint {
  const windingOhm = sheet.voltageV / sheet.stallA;
  const backEmf = (sheet.voltageV - windingOhm * sheet.noLoadA) / sheet.noLoadRadPerS;
  // The loss current grows with speed, so that all of the stall current gives torque.
  const torquePerA = sheet.stallNm / sheet.stallA;
  // All motors pull on the one pack: each sees its resistance as often as there are motors.
  const ohm = windingOhm + count * pack.resistanceOhm;
  const stallA = pack.openCircuitV / ohm;
  const stallNm = torquePerA * stallA;
  const motorNm = outputNm / (count * ratio * SPUR_EFFICIENCY);
  const torqueA = motorNm / torquePerA;
  // V = I·R + k_e·ω with I = T/k_t + I_0·ω/ω_0.
  const lossPerRadPerS = sheet.noLoadA / sheet.noLoadRadPerS;
  const radPerS = Math.max((pack.openCircuitV - torqueA * ohm) / (backEmf + lossPerRadPerS * ohm), 0);
  return {
    motorNm,
    stallNm,
    share: motorNm / stallNm,
    currentA: radPerS === 0 ? stallA : torqueA + lossPerRadPerS * radPerS,
    outputNm,
    outputRpm: radPerS / ratio / RPM,
    ratioAtPeak: (2 * outputNm) / (count * SPUR_EFFICIENCY * stallNm),
  };
}
