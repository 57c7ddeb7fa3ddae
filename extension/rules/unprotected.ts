/** `unprotected`: stalled at full command, the winding reaches its limit before protection opens, or protection never opens. */
import { writeQuantity } from "../units/write.js";
import { tellProtector } from "./protector.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const unprotected: MechanismRule = { id: "unprotected", level: "warning", silences: [], judge };

function judge({ drive, stall }: MechanismFacts): Verdict | undefined {
  const limitAfterS = stall.limitAfterS;
  const opensAfterS = stall.trip.opensAfterS;
  const current = writeQuantity(stall.motorCurrentA, "current");
  const advice = "A motor current limit, or protection that opens sooner, spares the winding.";
  if (drive.protection === undefined) {
    if (limitAfterS === null) return undefined;
    return {
      message: `Unprotected: stalled at ${current}, the winding passes its limit after ${writeQuantity(limitAfterS, "time")}, and no protection is declared. ${advice}`,
      excess: 1 / Math.max(limitAfterS, Number.MIN_VALUE),
      blames: [["motor"]],
    };
  }
  const protector = tellProtector(drive);
  if (opensAfterS === null) {
    // Without thermal data nothing is known of the winding, but a protector that stays closed at stall protects nothing.
    const heat = limitAfterS === null ? "" : `; the winding passes its limit after ${writeQuantity(limitAfterS, "time")}`;
    const hot = drive.motor.thermal === undefined || limitAfterS !== null;
    if (!hot) return undefined;
    const when = stall.trip.borderline ? "is too near to what it holds to open surely" : "never opens";
    return {
      message: `Unprotected: stalled at ${current} per motor, ${protector} ${when}${heat}. ${advice}`,
      excess: Number.MAX_VALUE,
      blames: [["protect"]],
    };
  }
  if (limitAfterS === null || limitAfterS >= opensAfterS) return undefined;
  return {
    message:
      `Unprotected: stalled at ${current}, the winding passes its limit after ${writeQuantity(limitAfterS, "time")}, ` +
      `before ${protector} opens after ${writeQuantity(opensAfterS, "time")}. ${advice}`,
    excess: opensAfterS / Math.max(limitAfterS, Number.MIN_VALUE),
    blames: [["protect"], ["motor"]],
  };
}
