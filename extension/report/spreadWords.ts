/** The spread of a mechanism in one sentence, for terminals and hovers. Deliberately no numbers of its own: see the analysis. */
import type { Spread } from "../analysis/spread.js";
import { writeQuantity, writeShare } from "../units/write.js";

/** Such as "nine of ten take 1.2 s to 1.5 s and draw 3.1 A to 3.4 A, 12 % trip (200 draws over ±10 % of the motor and 2 ranges)". */
export function tellSpread(spread: Spread): string {
  const { motorCurrentA, trippingShare, draws } = spread;
  const does = [
    ...takes(spread),
    `draw ${writeQuantity(motorCurrentA.p5, "current")} to ${writeQuantity(motorCurrentA.p95, "current")}`,
  ];
  const trips = trippingShare === null ? "" : `, ${trippingShare === 0 ? "none" : writeShare(trippingShare)} trip`;
  return `nine of ten ${does.join(" and ")}${trips} (${draws} draws over ${tellOver(spread)})`;
}

function takes({ timeS }: Spread): string[] {
  if (timeS === null) return [];
  const { p5, p95 } = timeS;
  if (p5 === null) return ["never arrive"];
  const from = writeQuantity(p5, "time");
  return [p95 === null ? `take ${from} or more, if they arrive at all,` : `take ${from} to ${writeQuantity(p95, "time")}`];
}

function tellOver({ tolerance, ranges }: Spread): string {
  const motor = tolerance === 0 ? [] : [`±${writeShare(tolerance)} of the motor`];
  const others = ranges === 0 ? [] : [ranges === 1 ? "1 range" : `${ranges} ranges`];
  return [...motor, ...others].join(" and ");
}
