/** `backdrives`: with the power off the load may drive the mechanism back; how fast, if the driver shorts the motor. */
import { descentOf } from "../model/descent.js";
import { trainOf } from "../model/stages.js";
import { writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const backdrives: MechanismRule = { id: "backdrives", level: "information", silences: [], judge };

function judge({ mechanism, drive }: MechanismFacts): Verdict | undefined {
  const descent = descentOf(drive);
  if (descent === null) return nearSelfLocking(drive);
  const isTurning = mechanism.load.kind === "arm" || mechanism.load.kind === "loadCurve";
  const speed = isTurning ? writeQuantity(descent.speed, "speed") : writeQuantity(descent.speed, "linearSpeed");
  return {
    message:
      `Runs back when the power is off: the load turns each motor with ${writeQuantity(descent.motorTorqueNm, "torque")}, at ${speed} ` +
      "if the driver shorts the motor, faster if it does not. Block it before working on it; a brake or a self-locking stage would hold it.",
    excess: descent.speed,
    blames: [["load"]],
  };
}

/** Vibration releases what is only just self-locking. */
function nearSelfLocking(drive: MechanismFacts["drive"]): Verdict | undefined {
  const { runsBack, selfLocking } = trainOf(drive.stages);
  if (runsBack || selfLocking) return undefined;
  const at = drive.stages.findIndex((stage) => stage.nearSelfLocking);
  return {
    message:
      "May run back when the power is off: a stage locks itself, but its lead angle is within 20 % of the angle of friction, and vibration " +
      "releases it. Block it before working on it; do not count on it to hold.",
    excess: 0,
    blames: [["stages", at]],
  };
}
