/** `past-peak`: more than half of the available stall torque, where more current buys less output power. */
import { writeNumber, writeQuantity, writeShare } from "../units/write.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";
import { scaledRatio } from "./wayOut.js";

// Output power of a straight speed-torque line peaks at half of its stall torque (any text on DC motors).
const PEAK_SHARE = 0.5;

export const pastPeak: MechanismRule = {
  id: "past-peak",
  level: "warning",
  silences: [],
  judge,
};

function judge({ mechanism, numbers }: MechanismFacts): Verdict | undefined {
  const { hardest, available } = numbers;
  if (hardest.stallShare === null || hardest.stallShare <= PEAK_SHARE) return undefined;
  const ratio = scaledRatio(mechanism, hardest.stallShare / PEAK_SHARE);
  return {
    message:
      `Past its peak of power: each motor gives ${writeQuantity(hardest.motorTorqueNm, "torque")}, ` +
      `${writeShare(hardest.stallShare)} of the ${writeQuantity(available.stallTorqueNm, "torque")} at which it stalls. ` +
      `A ratio of at least ${writeNumber(ratio)} instead of ${writeNumber(mechanism.ratio)} takes it back below half.`,
    excess: hardest.stallShare / PEAK_SHARE,
    blames: [["stages"], ["motor"]],
  };
}
