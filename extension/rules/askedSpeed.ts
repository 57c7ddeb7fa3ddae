/** The motor speed that a declaration asks for, and what the motor reaches there: the ground of `beyond-speed` and `no-headroom`. */
import type { MechanismFacts } from "./rule.js";

/** Speeds at the motor's shaft, rad/s; `undefined` where no speed is asked for. */
export function askedSpeed({
  mechanism,
  numbers,
}: MechanismFacts): { readonly asked: number; readonly reached: number } | undefined {
  const { load } = mechanism;
  if (load.kind !== "flywheel" && load.kind !== "roller") return undefined;
  const { speedRadPerS } = load.si;
  if (speedRadPerS === undefined) return undefined;
  return { asked: speedRadPerS * mechanism.ratio, reached: numbers.hardest.motorSpeedRadPerS };
}
