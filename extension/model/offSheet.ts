/** A motor that differs from its sheet as motors of one type do. Deliberately not here: by how much (its declared tolerance) and how likely. */
import type { MotorConstants } from "./drive.js";

/**
 * Winding resistance and back-emf constant away from the sheet's by shares (0.1 is 10 % more). Torque per ampere goes with the back-emf,
 * since both come from the same field and turns (k_t = k_e of the ideal DC machine); the no-load loss stays the sheet's.
 */
export function offSheet(motor: MotorConstants, resistanceShare: number, backEmfShare: number): MotorConstants {
  return {
    ...motor,
    resistanceOhm: motor.resistanceOhm * (1 + resistanceShare),
    backEmfVPerRadPerS: motor.backEmfVPerRadPerS * (1 + backEmfShare),
    torqueConstantNmPerA: motor.torqueConstantNmPerA * (1 + backEmfShare),
  };
}
