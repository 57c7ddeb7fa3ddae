/** `no-headroom`: the speed asked for takes more than nine tenths of what the motor reaches, so little is left to regulate with. */
import { writeQuantity, writeShare } from "../units/write.js";
import { askedSpeed } from "./askedSpeed.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

// Common practice, no source: a speed control needs about a tenth of the voltage in hand.
const SHARE = 0.9;

export const noHeadroom: MechanismRule = { id: "no-headroom", level: "information", silences: [], judge };

function judge(facts: MechanismFacts): Verdict | undefined {
  const speed = askedSpeed(facts);
  // Beyond what is reached, beyond-speed speaks.
  if (speed === undefined || speed.asked <= SHARE * speed.reached || speed.asked > speed.reached) return undefined;
  const { ratio } = facts.mechanism;
  return {
    message:
      `Little headroom: ${writeQuantity(speed.asked / ratio, "speed")} is ${writeShare(speed.asked / speed.reached)} of the ` +
      `${writeQuantity(speed.reached / ratio, "speed")} that the motor reaches, so a sagging supply will not hold it. Lower the speed or the ratio a little.`,
    excess: speed.asked / speed.reached,
    blames: [["load"]],
  };
}
