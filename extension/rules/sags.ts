/** `sags`: moving alone, the mechanism draws the supply below the voltage that it must stay above. */
import { writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const sags: MechanismRule = { id: "sags", level: "warning", silences: [], judge };

function judge({ drive, travel, numbers }: MechanismFacts): Verdict | undefined {
  const floor = drive.supply?.mustStayAbove;
  if (floor === undefined || travel === null || travel.lowestSupplyV >= floor.voltageV || travel.belowFloorS <= floor.forS)
    return undefined;
  const allowed = floor.forS > 0 ? `, where ${writeQuantity(floor.forS, "time")} is allowed` : "";
  return {
    message:
      `Sags: the supply falls to ${writeQuantity(travel.lowestSupplyV, "voltage")}, below its ${writeQuantity(floor.voltageV, "voltage")}, for ` +
      `${writeQuantity(travel.belowFloorS, "time")}${allowed}. A motor current limit below ${writeQuantity(limitFor(drive, floor.voltageV), "current")} ` +
      `instead of the ${writeQuantity(numbers.stall.motorCurrentA, "current")} at stall, or a ramp, keeps it up.`,
    excess: floor.voltageV / Math.max(travel.lowestSupplyV, Number.MIN_VALUE),
    blames: [["supply"], ["motorCurrentLimit"]],
  };
}

/** Full duty: the supply's current is the motors'. */
function limitFor({ supply, motorCount }: MechanismFacts["drive"], floorV: number): number {
  if (supply === undefined || supply.resistanceOhm === 0) return 0;
  return Math.max(supply.openCircuitV - floorV, 0) / supply.resistanceOhm / motorCount;
}
