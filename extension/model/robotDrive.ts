/**
 * What the model is told of a whole robot: mechanisms on one supply and the load cycle that moves them, in SI units as plain data.
 *
 * Deliberately not here: names. A mechanism is known by its index in `mechanisms`.
 */
import type { Drive, Protection, Supply } from "./drive.js";

export interface RobotDrive {
  /** Feeds every mechanism; a mechanism's own `supply` is not looked at. */
  readonly supply: Supply;
  readonly mechanisms: readonly Drive[];
  /** One load cycle. */
  readonly steps: readonly RobotStep[];
  readonly shared: readonly SharedProtection[];
  /** How often the load cycle runs, at least 1. */
  readonly cycles: number;
  /** Ambient of motors that name none, °C. */
  readonly ambientC: number;
}

/** Mechanisms named in neither list are without current for the step; one named in both moves. */
export interface RobotStep {
  readonly lastsS: number;
  /** Each restarts its travel with the step and holds when done; flywheel and roller keep turning. */
  readonly moving: readonly number[];
  /** Each holds its load where it pulls hardest; flywheel and roller keep turning. */
  readonly holding: readonly number[];
}

/** A protector that carries the supply current of all that it feeds. */
export interface SharedProtection {
  readonly protection: Protection;
  readonly feeds: readonly number[];
}
