/** `overheats` over the cycles: a winding passes its limit with the heat that earlier steps and cycles have left. */
import { writeQuantity } from "../units/write.js";
import type { RobotFacts, RobotRule, RobotVerdict } from "./robotRule.js";
import { tellMoment } from "./tellRun.js";

export const robotOverheats: RobotRule = { id: "overheats", level: "warning", judge };

function judge(facts: RobotFacts): RobotVerdict[] {
  const { drive, solution, names, isTold } = facts;
  return solution.mechanisms.flatMap(({ windingLimitAtS, windingPeakC }, mechanism): RobotVerdict[] => {
    const limitC = drive.mechanisms[mechanism]?.motor.thermal?.limitC;
    if (limitC === undefined || windingPeakC === null || windingPeakC <= limitC) return [];
    if (isTold(mechanism, "overheats") || isTold(mechanism, "stalls")) return [];
    const when = windingLimitAtS === null ? "" : ` It passes its limit ${tellMoment(drive, windingLimitAtS)}.`;
    return [
      {
        message:
          `Overheats: in the load cycle the winding of "${names[mechanism]}" comes to ${writeCelsius(windingPeakC)}; its limit is ` +
          `${writeCelsius(limitC)}.${when} Rest longer between its moves, or lower its current with a higher ratio or less load. Hot windings burn.`,
        subject: `winding of ${names[mechanism]}`,
        about: [{ mechanism, says: `"${names[mechanism]}" gets too hot.` }],
        blames: [["cycles"]],
      },
    ];
  });
}

function writeCelsius(celsius: number): string {
  return writeQuantity(celsius + 273.15, "temperature");
}
