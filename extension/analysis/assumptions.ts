/** What a result rests on beyond the declaration, and what could not be checked, in plain sentences. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Robot } from "../declarations/robot.js";
import { writeNumber, writeQuantity } from "../units/write.js";

export function tellAssumptions(
  mechanism: Mechanism,
  robot: Robot | undefined,
  corners: number,
): { readonly assumed: readonly string[]; readonly notChecked: readonly string[] } {
  const { motor, stages, si } = mechanism;
  const assumed = ["Motor at the 25 °C of its sheet."];
  stages.forEach((stage, index) => {
    if (!stage.efficiencyAssumed) return;
    assumed.push(`Stage ${index + 1} (${stage.kind}): customary efficiency ${writeNumber(stage.si.efficiency)}.`);
  });
  if (motor.speedLossShare === undefined) assumed.push("The motor's no-load loss grows with its speed.");
  if (mechanism.supply === undefined && robot !== undefined) assumed.push(`Supply of the robot "${robot.name}".`);
  if (mechanism.supply === undefined && robot === undefined) {
    assumed.push(`An ideal supply of ${writeQuantity(si.motor.voltageV, "voltage")}: no battery is declared.`);
  }
  if (corners > 0)
    assumed.push(`Numbers are for the middle of each range; findings are for the worst of ${corners} combinations of ends.`);
  return { assumed, notChecked: tellNotChecked(mechanism) };
}

function tellNotChecked({ motor, protect, si }: Mechanism): string[] {
  const told: string[] = [];
  if (motor.thermal === undefined) told.push("Heat: the motor has no thermal data.");
  if (protect === undefined) told.push("Protection: none is declared.");
  if (si.withinS === undefined && si.load.kind !== "roller") told.push('Time: no "within" is declared.');
  return told;
}
