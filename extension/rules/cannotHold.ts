/** `cannot-hold`: holding the load takes more than the supply and the limits give, with the winding as hot as the hold makes it. */
import { holdPoint } from "../model/hold.js";
import { availableLine } from "../model/line.js";
import { driveAt, SHEET_TEMPERATURE_C } from "../model/temperature.js";
import { writeNumber, writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";
import { scaledRatio } from "./wayOut.js";

export const cannotHold: MechanismRule = { id: "cannot-hold", level: "error", silences: [], judge };

function judge({ mechanism, drive, hold }: MechanismFacts): Verdict | undefined {
  if (hold === null || drive.holdForS === undefined) return undefined;
  const windingC = windingWhileHolding(drive, hold.windingFinalC);
  const hot = driveAt(drive, windingC);
  const point = holdPoint(hot);
  if (point === null || point.withinLine) return undefined;
  const available = Math.min(
    availableLine(hot).stallTorqueNm,
    (drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY) * hot.motor.torqueConstantNmPerA,
  );
  const excess = point.motorTorqueNm / available;
  return {
    message:
      `Cannot hold: each motor must keep up ${writeQuantity(point.motorTorqueNm, "torque")}, but gives no more than ` +
      `${writeQuantity(available, "torque")} with its winding at ${writeQuantity(windingC + 273.15, "temperature")}. ` +
      `A ratio of ${writeNumber(scaledRatio(mechanism, Math.max(excess, 1) * 2))} instead of ${writeNumber(mechanism.ratio)} halves the effort, or let a brake hold it.`,
    excess,
    blames: [["holdFor"], ["stages"]],
  };
}

/** Past its limit the winding's heat is overheats' business; without thermal data the sheet's temperature has to do. */
function windingWhileHolding({ motor }: MechanismFacts["drive"], finalC: number | null): number {
  if (motor.thermal === undefined) return SHEET_TEMPERATURE_C;
  return Math.min(finalC ?? motor.thermal.limitC, motor.thermal.limitC);
}
