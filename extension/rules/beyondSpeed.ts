/** `beyond-speed`: the speed asked for lies beyond what the motor reaches under that torque. */
import { writeNumber, writeQuantity } from "../units/write.js";
import { askedSpeed } from "./askedSpeed.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const beyondSpeed: MechanismRule = { id: "beyond-speed", level: "error", silences: [], judge };

function judge(facts: MechanismFacts): Verdict | undefined {
  const speed = askedSpeed(facts);
  if (speed === undefined || speed.asked <= speed.reached) return undefined;
  const { ratio } = facts.mechanism;
  return {
    message:
      `Beyond its speed: ${writeQuantity(speed.asked / ratio, "speed")} is asked of the output, but the motor turns it at no more than ` +
      `${writeQuantity(speed.reached / ratio, "speed")} under this load. ${wayOut(facts, speed.asked / speed.reached)}`,
    excess: speed.asked / Math.max(speed.reached, Number.MIN_VALUE),
    blames: [["load"], ["stages"]],
  };
}

function wayOut({ mechanism, numbers }: MechanismFacts, excess: number): string {
  // A lower ratio asks less speed of the motor but more torque; where the torque already takes much of the line, it does not pay.
  const share = numbers.hardest.stallShare ?? 1;
  if (share * excess > 0.5) return "No ratio reaches it: take a stronger or a quicker motor.";
  return `Lower the ratio from ${writeNumber(mechanism.ratio)} to about ${writeNumber((mechanism.ratio / excess) * (1 - share))}.`;
}
