/** `overheats`: the winding passes its limit in the travel, in the hold, when repeating, or when turning on and on. */
import { writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const overheats: MechanismRule = { id: "overheats", level: "warning", silences: [], judge };

function judge(facts: MechanismFacts): Verdict | undefined {
  const limitC = facts.drive.motor.thermal?.limitC;
  if (limitC === undefined) return undefined;
  const found = inTravel(facts, limitC) ?? inHold(facts) ?? inRepeats(facts, limitC) ?? inTurning(facts);
  if (found === undefined) return undefined;
  return {
    message: `Overheats: ${found.told}; its limit is ${writeCelsius(limitC)}. Lower the current with a higher ratio or less load, or rest longer. Hot windings burn.`,
    excess: found.excess,
    blames: [["motor"], ...found.blames],
  };
}

interface Heat {
  readonly told: string;
  readonly excess: number;
  readonly blames: readonly (readonly string[])[];
}

function inTravel({ travel }: MechanismFacts, limitC: number): Heat | undefined {
  const peak = travel?.windingPeakC ?? null;
  if (peak === null || peak <= limitC) return undefined;
  return { told: `the winding reaches ${writeCelsius(peak)} in the travel`, excess: peak / limitC, blames: [] };
}

function inHold({ drive, hold }: MechanismFacts): Heat | undefined {
  const after = hold?.limitAfterS ?? null;
  if (after === null || drive.holdForS === undefined || after >= drive.holdForS) return undefined;
  const told = `held for ${writeQuantity(drive.holdForS, "time")}, the winding passes its limit after ${writeQuantity(after, "time")}`;
  return { told, excess: drive.holdForS / Math.max(after, Number.MIN_VALUE), blames: [["holdFor"]] };
}

function inRepeats({ drive, repeats }: MechanismFacts, limitC: number): Heat | undefined {
  if (repeats === null || drive.everyS === undefined) return undefined;
  const every = `repeated every ${writeQuantity(drive.everyS, "time")}`;
  if (repeats.runsAway) return { told: `${every}, the winding gets ever hotter`, excess: Number.MAX_VALUE, blames: [["every"]] };
  const peak = repeats.windingPeakC;
  if (peak === null || peak <= limitC) return undefined;
  return { told: `${every}, the winding comes to ${writeCelsius(peak)}`, excess: peak / limitC, blames: [["every"]] };
}

function inTurning({ turning }: MechanismFacts): Heat | undefined {
  if (turning === null || turning.limitAfterS === null) return undefined;
  const told = `turning on and on, the winding passes its limit after ${writeQuantity(turning.limitAfterS, "time")}`;
  return { told, excess: 1 / Math.max(turning.limitAfterS, Number.MIN_VALUE), blames: [["load"]] };
}

function writeCelsius(celsius: number): string {
  return writeQuantity(celsius + 273.15, "temperature");
}
