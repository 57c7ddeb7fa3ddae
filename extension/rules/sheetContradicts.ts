/** `sheet-contradicts`: motor data that break the conservation of energy, or each other. */
import type { Motor } from "../declarations/motor.js";
import { writeNumber, writeQuantity } from "../units/write.js";
import type { MotorRule, Verdict } from "./rule.js";

// Room for the rounding of printed sheets; model.md sets it.
const TORQUE_OVER_BACK_EMF = 1.05;

export const sheetContradicts: MotorRule = { id: "sheet-contradicts", level: "warning", judge };

/** True where no motor can have these data, so that nothing can be computed from them. */
export function isImpossible(motor: Motor): boolean {
  return motor.si.noLoadCurrentA >= motor.si.voltageV / motor.si.resistanceOhm;
}

function judge(motor: Motor): Verdict | undefined {
  const { resistanceOhm, voltageV, noLoadCurrentA, torqueConstantNmPerA, backEmfVPerRadPerS, rated } = motor.si;
  const stallCurrentA = voltageV / resistanceOhm;
  if (isImpossible(motor)) {
    return {
      message:
        `The sheet contradicts itself: a no-load current of ${writeQuantity(noLoadCurrentA, "current")} leaves nothing of the ` +
        `${writeQuantity(stallCurrentA, "current")} at stall to turn the motor. Check both currents.`,
      excess: 1,
      blames: [["noLoad", "current"], ["noLoadCurrent"], ["stall", "current"]],
    };
  }
  if (torqueConstantNmPerA > TORQUE_OVER_BACK_EMF * backEmfVPerRadPerS) {
    return {
      message:
        `The sheet contradicts itself: ${writeNumber(torqueConstantNmPerA)} N·m per ampere at stall, but only ` +
        `${writeNumber(backEmfVPerRadPerS)} V·s/rad from the no-load speed, so more power would come out than goes in. ` +
        "Check the stall torque, the stall current and the no-load speed.",
      excess: 1,
      blames: [
        ["stall", "torque"],
        ["noLoad", "speed"],
      ],
    };
  }
  const stallTorqueNm = torqueConstantNmPerA * (stallCurrentA - noLoadCurrentA * (1 - motor.si.speedLossShare));
  if (rated && rated.torqueNm > stallTorqueNm) {
    return {
      message:
        `The sheet contradicts itself: a rated torque of ${writeQuantity(rated.torqueNm, "torque")} is above the stall torque of ` +
        `${writeQuantity(stallTorqueNm, "torque")}. Check both.`,
      excess: 1,
      blames: [["rated", "torque"]],
    };
  }
  return undefined;
}
