/** How messages about a robot's run name moments and mechanisms. */
import type { RobotDrive } from "../model/robotDrive.js";
import { writeQuantity } from "../units/write.js";

/** Such as "12.4 s into cycle 3 (step 2)"; a robot of one cycle has no number of it. */
export function tellMoment({ steps, cycles }: RobotDrive, runS: number): string {
  const cycleS = steps.reduce((sum, { lastsS }) => sum + lastsS, 0);
  const cycle = Math.min(Math.floor(runS / cycleS + 1e-12), cycles - 1);
  const inCycleS = runS - cycle * cycleS;
  let step = 0;
  for (let startS = 0; step < steps.length - 1; step++) {
    startS += steps[step]?.lastsS ?? 0;
    if (inCycleS < startS - 1e-12 * cycleS) break;
  }
  const into = cycles > 1 ? `into cycle ${cycle + 1}` : "into the load cycle";
  return `${writeQuantity(Math.max(inCycleS, 0), "time")} ${into} (step ${step + 1})`;
}

/** Such as `"hoist", "arm" and "base"`. */
export function tellNames(names: readonly string[]): string {
  const quoted = names.map((name) => `"${name}"`);
  const last = quoted.pop() ?? "nothing";
  return quoted.length === 0 ? last : `${quoted.join(", ")} and ${last}`;
}
