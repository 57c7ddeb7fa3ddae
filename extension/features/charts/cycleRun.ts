/** One cycle of a robot's run with its samples, in times of the cycle; kept, since the next question is often about the same. */
import type { RobotDrive } from "../../model/robotDrive.js";
import type { ProtectorHistory, RobotSample } from "../../model/robotSolution.js";
import { solveRobot } from "../../model/solveRobot.js";
import type { Span } from "./power.js";

export interface CycleRun {
  /** In rising time of the cycle. */
  readonly samples: readonly RobotSample[];
  /** True where there was more to sample than is kept. */
  readonly thinned: boolean;
  /** What they did in this cycle, in its own times; open at its start where they opened before. */
  readonly protectors: readonly ProtectorHistory[];
}

export type CycleRunOf = (drive: RobotDrive, cycle: number, cycleS: number, span: Span) => CycleRun;

const KEPT = 8;

export function createCycleRuns(): CycleRunOf {
  const known = new Map<string, CycleRun>();
  return (drive, cycle, cycleS, span) => {
    const key = JSON.stringify([drive, cycle, span]);
    const run = known.get(key) ?? solveCycle(drive, cycle, cycleS, span);
    known.delete(key);
    known.set(key, run);
    const [oldest] = known.keys();
    if (known.size > KEPT && oldest !== undefined) known.delete(oldest);
    return run;
  };
}

function solveCycle(drive: RobotDrive, cycle: number, cycleS: number, { fromS, toS }: Span): CycleRun {
  const startS = cycle * cycleS;
  // The first cycle is the same, however many follow.
  const followed = cycle === 0 ? { ...drive, cycles: 1 } : drive;
  const { samples, thinned, protectors } = solveRobot(followed, { sampled: { fromS: startS + fromS, toS: startS + toS } });
  return {
    thinned,
    samples: samples.map((sample) => ({ ...sample, timeS: sample.timeS - startS })),
    protectors: protectors.map((history) => ({
      ...history,
      openings: history.openings
        .filter(({ atS, closesAtS }) => atS < startS + cycleS && (closesAtS ?? Number.POSITIVE_INFINITY) > startS)
        .map((one) => ({ ...one, atS: one.atS - startS, closesAtS: one.closesAtS === null ? null : one.closesAtS - startS })),
      mayOpenAtS: history.mayOpenAtS === null ? null : history.mayOpenAtS - startS,
    })),
  };
}
