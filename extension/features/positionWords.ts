/** The hardest position of a mechanism's travel in words. */
import type { AnalysedMechanism } from "../analysis/analysis.js";
import type { Drive } from "../model/drive.js";
import { shaftLoadOf } from "../model/shaftLoad.js";
import { writeQuantity } from "../units/write.js";

/** Such as "at 0 ° of its travel"; for a load that is the same everywhere, that it is. */
export function positionWords(drive: Drive, { numbers }: AnalysedMechanism): string {
  const position = numbers?.hardest.position;
  if (position === null || position === undefined) return "while it turns";
  const load = shaftLoadOf(drive);
  if (load.steady) return "all along its travel";
  const isAngle = load.kind === "arm" || load.kind === "loadCurve";
  return `at ${writeQuantity(position, isAngle ? "angle" : "length")}`;
}
