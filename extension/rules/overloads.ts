/** `overloads`: more torque than the motor's rating or a stage bears, in the travel or when the load is blocked. */
import { writeNumber, writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const overloads: MechanismRule = { id: "overloads", level: "warning", silences: [], judge };

function judge(facts: MechanismFacts): Verdict | undefined {
  return judgeRating(facts) ?? judgeStages(facts);
}

function judgeRating({ mechanism, numbers }: MechanismFacts): Verdict | undefined {
  const rated = mechanism.motor.si.rated?.torqueNm;
  const needed = numbers.hardest.motorTorqueNm;
  if (rated === undefined || needed <= rated) return undefined;
  return {
    message:
      `Overloads its motor: ${writeQuantity(needed, "torque")} needed, ${writeQuantity(rated, "torque")} rated. ` +
      `A ratio of at least ${writeNumber(mechanism.ratio * (needed / rated))} instead of ${writeNumber(mechanism.ratio)} stays within the rating.`,
    excess: needed / rated,
    blames: [["stages"], ["motor"]],
  };
}

/** Torque at each driven shaft; all motors of the mechanism drive one train. */
function judgeStages({ mechanism, drive, numbers }: MechanismFacts): Verdict | undefined {
  const stallTorqueNm = stallTorque(drive, numbers);
  let gain = drive.motorCount;
  for (const [index, stage] of drive.stages.entries()) {
    gain *= stage.ratio * stage.efficiency;
    if (stage.maxTorqueNm === undefined) continue;
    const running = numbers.hardest.motorTorqueNm * gain;
    const blocked = stallTorqueNm * gain;
    if (Math.max(running, blocked) <= stage.maxTorqueNm) continue;
    const when =
      running > stage.maxTorqueNm
        ? `${writeQuantity(running, "torque")} in the travel`
        : `${writeQuantity(blocked, "torque")} when blocked`;
    return {
      message:
        `Overloads stage ${index + 1} (${stage.kind}): ${when}, but it bears ${writeQuantity(stage.maxTorqueNm, "torque")}. ` +
        (running > stage.maxTorqueNm
          ? "Take a stronger stage, or move ratio behind it."
          : `A motor current limit of ${writeQuantity(limitFor(mechanism.motor.si, stage.maxTorqueNm / gain), "current")} keeps it safe.`),
      excess: Math.max(running, blocked) / stage.maxTorqueNm,
      blames: [["stages", index]],
    };
  }
  return undefined;
}

function stallTorque(drive: MechanismFacts["drive"], numbers: MechanismFacts["numbers"]): number {
  const { torqueConstantNmPerA, noLoadCurrentA, speedLossShare } = drive.motor;
  const limited = torqueConstantNmPerA * Math.max(numbers.stall.motorCurrentA - noLoadCurrentA * (1 - speedLossShare), 0);
  return Math.min(limited, numbers.available.stallTorqueNm);
}

function limitFor(motor: MechanismFacts["drive"]["motor"], torqueNm: number): number {
  return torqueNm / motor.torqueConstantNmPerA + motor.noLoadCurrentA * (1 - motor.speedLossShare);
}
