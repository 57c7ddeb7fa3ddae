/** `sags` for good: the battery's charge does not last for all cycles. */
import { writeQuantity } from "../units/write.js";
import type { RobotFacts, RobotRule, RobotVerdict } from "./robotRule.js";

export const robotEmpties: RobotRule = { id: "sags", level: "warning", judge };

const SECONDS_PER_HOUR = 3600;

function judge({ drive, solution, names }: RobotFacts): RobotVerdict[] {
  const { capacityAh } = drive.supply;
  const { emptyAtS, depletedAh, numbers, mechanisms } = solution;
  if (emptyAtS === null || capacityAh === undefined) return [];
  const cycleS = drive.steps.reduce((sum, { lastsS }) => sum + lastsS, 0);
  const neededAh = depletedAh * ((drive.cycles * cycleS) / emptyAtS);
  const most = mechanisms
    .map(({ sourceEnergyJ }) => sourceEnergyJ)
    .reduce((best, one, i, all) => (one > (all[best] ?? 0) ? i : best), 0);
  const lasts = drive.cycles > 1 ? `after ${numbers.cyclesDone} of ${drive.cycles} cycles, ` : "before the load cycle is done, ";
  return [
    {
      message:
        `Sags: the battery is empty ${lasts}${writeQuantity(emptyAtS, "time")} from the start; all of them take about ` +
        `${writeCharge(neededAh)}, and its capacity is ${writeCharge(capacityAh)}. Move less in each cycle, or change the battery in time; ` +
        `"${names[most]}" takes most.`,
      subject: "charge",
      about: [{ mechanism: most, says: `"${names[most]}" takes most of the battery's energy.` }],
      blames: [["supply"], ["cycles"]],
    },
  ];
}

function writeCharge(ampereHours: number): string {
  return writeQuantity(ampereHours * SECONDS_PER_HOUR, "charge");
}
