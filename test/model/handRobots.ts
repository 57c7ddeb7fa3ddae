/** Robots for hand-worked tests: round numbers, one battery, a lift that no motor lifts. */
import type { Drive, Protection, Supply } from "../../extension/model/drive.js";
import type { RobotDrive, RobotStep } from "../../extension/model/robotDrive.js";
import { driveOf, liftOf } from "./drives.js";

export const G = 9.80665;
export const EXACT = 1e-9;
export const INTEGRATED = 1e-6;

/** Of the plain motor: V/I_s, (V − R·I_0)/ω_0, T_s/I_s (its loss grows with speed). */
export const R = 12 / 50;
export const KE = (12 - R * 0.8) / 500;
export const KT = 1.1 / 50;

export const pack: Supply = { openCircuitV: 12, resistanceOhm: 0.1, peukert: 1 };
/** Far beyond what the motor lifts. */
export const stuck = driveOf({ load: liftOf(1000, 0.05, 1) });

export function robotOf(mechanisms: readonly Drive[], steps: readonly RobotStep[], fields: Partial<RobotDrive> = {}): RobotDrive {
  return { supply: pack, mechanisms, steps, shared: [], cycles: 1, ambientC: 25, ...fields };
}

export const all = (drives: readonly Drive[]): number[] => drives.map((_, i) => i);
export const move = (lastsS: number, ...moving: number[]): RobotStep => ({ lastsS, moving, holding: [] });
export const hold = (lastsS: number, ...holding: number[]): RobotStep => ({ lastsS, moving: [], holding });
export const rest = (lastsS: number): RobotStep => ({ lastsS, moving: [], holding: [] });

/** Holds 20 A, opens after `tripsAfterS` at 40 A. */
export function breaker(fields: { tripsAfterS?: number; resetsS?: number; carries?: "motor" | "supply" } = {}): Protection {
  return { kind: "breaker", holdCurrentA: 20, tripsAtA: 40, tripsAfterS: 2, carries: "motor", ...fields };
}
