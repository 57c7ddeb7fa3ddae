/** Numbers that several rules offer as a way out. */
import type { Mechanism } from "../declarations/mechanism.js";

/** The mechanism's ratio times `factor`, rounded up to the three digits that people read, so that what is read suffices. */
export function scaledRatio(mechanism: Mechanism, factor: number): number {
  const ratio = mechanism.ratio * factor;
  const step = 10 ** (Math.floor(Math.log10(ratio)) - 2);
  return Math.ceil(ratio / step) * step;
}
