/**
 * The same numbers as solve.ts gives, each worked out when it is first read: for searches that drop most candidates by one number.
 *
 * Deliberately not for what is kept or sent: reading all of it costs as much as solving at once.
 */
import type { Drive } from "./drive.js";
import { feedforwardNumbers } from "./feedforward.js";
import { hardestNumbers } from "./hardestNumbers.js";
import { hotShare } from "./hotShare.js";
import { availableLine } from "./line.js";
import { once } from "./once.js";
import { solveHold, solveStall } from "./runs.js";
import { holdNumbers, type MechanismSolution, repeatsOf, stallNumbers, travelNumbers, turningOf } from "./solve.js";
import { trainOf } from "./stages.js";
import { solveTravel } from "./travel.js";

export function lazySolution(drive: Drive): MechanismSolution {
  const train = trainOf(drive.stages);
  const travel = once(() => solveTravel(drive));
  const hold = once(() => solveHold(drive));
  const stall = once(() => solveStall(drive));
  const turning = once(() => turningOf(drive));
  const repeats = once(() => repeatsOf(drive));
  const hardest = once(() => ({
    ...hardestNumbers(drive),
    get hotWindingC() {
      return hot().hotWindingC;
    },
    get hotStallShare() {
      return hot().hotStallShare;
    },
  }));
  const hot = once(() => hotShare(drive, { travel: travel(), hold: hold(), turning: turning(), repeats: repeats() }));
  const feedforward = once(() => feedforwardNumbers(drive));
  return {
    numbers: {
      ratio: train.ratio,
      stageEfficiency: train.efficiency,
      get available() {
        const { noLoadSpeedRadPerS, stallTorqueNm, stallCurrentA } = availableLine(drive);
        return { noLoadSpeedRadPerS, stallTorqueNm, stallCurrentA };
      },
      get hardest() {
        return hardest();
      },
      get travel() {
        const run = travel();
        return run && travelNumbers(run);
      },
      get hold() {
        const run = hold();
        return run && holdNumbers(run);
      },
      get stall() {
        return stallNumbers(stall());
      },
      get feedforward() {
        return feedforward();
      },
    },
    get travel() {
      return travel();
    },
    get hold() {
      return hold();
    },
    get stall() {
      return stall();
    },
    get turning() {
      return turning();
    },
    get repeats() {
      return repeats();
    },
  };
}
