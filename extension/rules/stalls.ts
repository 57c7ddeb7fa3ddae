/** `stalls`: the load needs at least the torque that the available line, the current limit or the grip can give. */
import { writeNumber, writeQuantity } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";
import { scaledRatio } from "./wayOut.js";

export const stalls: MechanismRule = {
  id: "stalls",
  level: "error",
  silences: ["past-peak", "late", "beyond-speed", "trips"],
  judge,
};

function judge({ mechanism, numbers }: MechanismFacts): Verdict | undefined {
  const { hardest, available } = numbers;
  if (hardest.limitedBy === "grip" && hardest.motorSpeedRadPerS === 0) {
    return { message: gripMessage(mechanism), excess: Number.MAX_VALUE, blames: [["load"]] };
  }
  if (hardest.motorSpeedRadPerS > 0) return undefined;
  const excess = hardest.motorTorqueNm / available.stallTorqueNm;
  const needed = writeQuantity(hardest.motorTorqueNm, "torque");
  if (hardest.limitedBy === "limit") {
    const limit = writeQuantity(mechanism.si.motorCurrentLimitA ?? 0, "current");
    return {
      message: `Stalls: each motor must give ${needed}, more than its current limit of ${limit} allows. Raise the limit or the ratio.`,
      excess,
      blames: [["motorCurrentLimit"]],
    };
  }
  // Half of the stall torque is where output power peaks: a ratio to aim at, not a bare escape from stalling.
  const ratio = scaledRatio(mechanism, excess / 0.5);
  return {
    message:
      `Stalls: each motor must give ${needed}, but stalls at ${writeQuantity(available.stallTorqueNm, "torque")}. ` +
      `A ratio of ${writeNumber(ratio)} instead of ${writeNumber(mechanism.ratio)} would bring it to its peak of power.`,
    excess,
    blames: [["stages"], ["motor"]],
  };
}

function gripMessage({ load }: MechanismFacts["mechanism"]): string {
  if (load.kind !== "wheels") return "Stalls: the wheels cannot grip.";
  const { massKg, slopeRad, rolling, grip, drivenShare } = load.si;
  const weight = massKg * 9.80665;
  const needed = writeQuantity(weight * (Math.sin(slopeRad) + rolling * Math.cos(slopeRad)), "force");
  const traction = writeQuantity(grip * weight * Math.cos(slopeRad) * drivenShare, "force");
  return `Stalls: the wheels must push ${needed}, but grip only ${traction} before they slip. Drive more of the weight, or lower the slope.`;
}
