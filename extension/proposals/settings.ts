/** Other settings of a mechanism: more motors, a current limit, a lower command, more time; the smallest change first. */
import type { Change, Situation } from "./change.js";
import { roundDown, roundUp } from "./roundTo.js";

/** Up to this many motors more: beyond, another motor is the better answer. */
const MOST_MORE = 4;

export function moreMotors({ mechanism }: Situation): Change[] {
  const count = mechanism.motorCount ?? 1;
  return Array.from({ length: MOST_MORE }, (_, more) => count + more + 1).map((value) => ({
    sets: [{ field: "motorCount", value }],
    words: `${value} motors`,
  }));
}

/** From just below the current at stall down to a tenth of it. */
export function currentLimits({ stall }: Situation): Change[] {
  return [0.9, 0.8, 0.7, 0.6, 0.5, 0.4, 0.3, 0.2, 0.1].map((share) => {
    const value = `${roundDown(stall.motorCurrentA * share)} A`;
    return { sets: [{ field: "motorCurrentLimit", value }], words: `a motor current limit of ${value}` };
  });
}

export function lowerCommands({ drive }: Situation): Change[] {
  return [0.9, 0.8, 0.7, 0.6, 0.5, 0.4]
    .filter((value) => value < drive.pwmDuty)
    .map((value) => ({
      sets: [{ field: "pwmDuty", value }],
      words: `full command at ${Math.round(value * 100)} % of the supply`,
    }));
}

/** The time that the travel takes, rounded up. */
export function moreTime({ travel }: Situation): Change[] {
  if (travel === null || travel.timeS === null) return [];
  const value = `${roundUp(travel.timeS * 1.02)} s`;
  return [{ sets: [{ field: "within", value }], words: `${value} for the travel` }];
}
