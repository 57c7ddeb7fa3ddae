/**
 * Ways to let mechanisms of one step of a load cycle move one after the other: in a step of their own, or in a step that is there.
 *
 * Whether a way helps is found by running the robot.
 */
import type { RobotDrive } from "../model/robotDrive.js";
import type { RobotSolution } from "../model/robotSolution.js";
import { isUsed, type RobotSetting } from "./robotChange.js";
import { roundUp } from "./roundTo.js";

export interface RobotSituation {
  readonly drive: RobotDrive;
  readonly solution: RobotSolution;
}

/** Each of the movers in a step of its own behind the step; none where nothing else draws current in it. */
export function staggers(
  { drive, solution }: RobotSituation,
  step: number,
  movers: readonly number[],
  taken: readonly number[],
): RobotSetting[] {
  const here = drive.steps[step];
  if (here === undefined) return [];
  const left = here.moving.filter((one) => !taken.includes(one));
  if (left.length + here.holding.length < 2) return [];
  return movers
    .filter((mechanism) => left.includes(mechanism))
    .map((mechanism) => ({ kind: "stagger", step, mechanism, lastsS: timeFor(solution, step, mechanism) ?? here.lastsS }));
}

/**
 * Each of the movers in another step of the cycle that is long enough, the nearest step first. Not for what is held anywhere: it would
 * be held where it has not yet moved.
 */
export function shifts({ drive, solution }: RobotSituation, step: number, movers: readonly number[]): RobotSetting[] {
  const here = drive.steps[step];
  if (here === undefined || here.moving.length + here.holding.length < 2) return [];
  const isHeld = (mechanism: number): boolean => drive.steps.some(({ holding }) => holding.includes(mechanism));
  const others = drive.steps
    .map((_, to) => to)
    .filter((to) => to !== step)
    .sort((one, other) => Math.abs(one - step) - Math.abs(other - step) || other - one);
  const free = movers.filter((mechanism) => here.moving.includes(mechanism) && !isHeld(mechanism));
  return others.flatMap((to) =>
    free
      .filter((mechanism) => {
        const needsS = timeFor(solution, step, mechanism) ?? here.lastsS;
        return !isUsed(drive, to, mechanism) && needsS <= (drive.steps[to]?.lastsS ?? 0);
      })
      .map((mechanism) => ({ kind: "shift" as const, step, mechanism, to })),
  );
}

/** What it took at its slowest and a tenth more; `undefined` for what turns on or did not arrive. */
function timeFor({ mechanisms }: RobotSolution, step: number, mechanism: number): number | undefined {
  const travel = mechanisms[mechanism]?.travels.find((one) => one.step === step);
  if (travel === undefined || travel.slowestS === null || travel.misses > 0) return undefined;
  return roundUp(travel.slowestS * 1.1);
}
