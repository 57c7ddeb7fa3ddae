/** `slips`: the wheels let go of the ground before the motors stall. */
import { slipPoint } from "../model/hardest.js";
import { writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const slips: MechanismRule = { id: "slips", level: "information", silences: [], judge };

function judge({ drive, numbers }: MechanismFacts): Verdict | undefined {
  const slip = slipPoint(drive);
  // Wheels that cannot move at all stall; that is said already.
  if (slip === null || !slip.canMove || slip.motorTorqueNm >= numbers.available.stallTorqueNm) return undefined;
  return {
    message:
      `The wheels slip at ${writeQuantity(slip.motorCurrentA, "current")} per motor, before the motors stall at ` +
      `${writeQuantity(numbers.stall.motorCurrentA, "current")}. A motor current limit just below it saves current and tyres.`,
    excess: numbers.available.stallTorqueNm / slip.motorTorqueNm,
    blames: [["load"]],
  };
}
