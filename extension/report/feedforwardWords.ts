/** Voltages that the robot's own code can send ahead of its feedback, in words. Deliberately no letter symbols: each says what it is for. */
import type { AnalysedMechanism } from "../analysis/analysis.js";
import { writeNumber, writeQuantity, writeShare } from "../units/write.js";

type Feedforward = NonNullable<AnalysedMechanism["numbers"]>["feedforward"];

/** What is 0 is left out. */
export function tellFeedforward(feedforward: Feedforward): string {
  const { holdLoadV, holdLoadSupplyShare, frictionV, voltsPerRadPerS, voltsPerRadPerS2 } = feedforward;
  const ofSupply = holdLoadSupplyShare === null ? "" : ` (${writeShare(holdLoadSupplyShare)} of the supply)`;
  const parts = [
    holdLoadV ? `${writeQuantity(holdLoadV, "voltage")}${ofSupply} holds the load` : "",
    frictionV ? `${writeQuantity(frictionV, "voltage")} against friction` : "",
    `${writeNumber(voltsPerRadPerS)} V per rad/s`,
    voltsPerRadPerS2 ? `${writeNumber(voltsPerRadPerS2)} V per rad/s²` : "",
  ];
  return `at the output shaft: ${parts.filter((part) => part !== "").join(", ")}`;
}
