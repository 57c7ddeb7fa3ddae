/** `late`: the travel takes longer than it may. */
import { quickestRatio } from "../model/ratioSearch.js";
import { writeNumber, writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const late: MechanismRule = { id: "late", level: "warning", silences: [], judge };

/** Without the way out, which is dear to work out. */
export function isLate({ drive: { withinS }, travel }: Pick<MechanismFacts, "drive" | "travel">): boolean {
  if (withinS === undefined || travel === null || (travel.timeS !== null && travel.timeS <= withinS)) return false;
  // Too many steps to follow: nothing is known of its time.
  return travel.outcome !== "unresolved";
}

function judge(facts: MechanismFacts): Verdict | undefined {
  const { mechanism, drive, travel } = facts;
  const within = drive.withinS;
  if (!isLate(facts) || within === undefined || travel === null) return undefined;
  const took = travel.timeS === null ? "the travel never ends" : `the travel takes ${writeQuantity(travel.timeS, "time")}`;
  return {
    message: `Late: ${took}, but may take ${writeQuantity(within, "time")}. ${wayOut(mechanism.ratio, drive, within)}`,
    excess: (travel.timeS ?? Number.MAX_VALUE) / within,
    blames: [["within"], ["stages"]],
  };
}

function wayOut(ratio: number, drive: MechanismFacts["drive"], within: number): string {
  const quickest = quickestRatio(drive);
  if (quickest === null) return "No ratio makes it arrive: take a stronger motor.";
  const told = `${writeQuantity(quickest.timeS, "time")}, at ${writeNumber(quickest.ratio)} instead of ${writeNumber(ratio)}`;
  return quickest.timeS <= within
    ? `The quickest ratio takes ${told}.`
    : `No ratio is quick enough: the best takes ${told}. Take more power, or allow more time.`;
}
