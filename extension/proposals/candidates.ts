/**
 * Which changes are worth trying for a rule: groups in the order in which they are offered, each with its smallest change first.
 *
 * Never a bigger fuse or breaker.
 */
import { quickestRatio } from "../model/ratioSearch.js";
import type { Change, Situation } from "./change.js";
import { oneGear, oneMoreStage, twoGears, twoStages, type Wanted } from "./gears.js";
import { currentLimits, lowerCommands, moreMotors, moreTime } from "./settings.js";

/** Each group is asked for one change; a group marked `instead` only where the groups before it gave none. */
export interface Group {
  readonly changes: readonly Change[];
  readonly instead?: true;
}

const HIGHER: Wanted = { atLeast: 1, atMost: 100 };
const LOWER: Wanted = { atLeast: 0.01, atMost: 1 };

/** Empty for rules that no change of these kinds can clear. */
export function candidateGroups(rule: string, situation: Situation): Group[] {
  switch (rule) {
    case "stalls":
      // Out of the stall and to the peak of power at once: what is only just out of it is past its peak.
      return strongerGroups(situation, { atLeast: situation.excess / 0.5, atMost: 100 });
    case "past-peak":
      return strongerGroups(situation, { atLeast: situation.excess, atMost: 100 });
    case "cannot-hold":
      return strongerGroups(situation, { atLeast: Math.max(situation.excess, 1), atMost: 100 });
    case "overloads":
      return [...gearGroups(situation, HIGHER), { changes: moreMotors(situation) }, { changes: currentLimits(situation) }];
    case "trips":
    case "overheats":
      return [...gearGroups(situation, HIGHER), { changes: currentLimits(situation) }, { changes: moreMotors(situation) }];
    case "unprotected":
      return [{ changes: currentLimits(situation) }, { changes: lowerCommands(situation) }];
    case "sags":
      return [{ changes: currentLimits(situation) }, { changes: lowerCommands(situation) }];
    case "late":
      return [
        ...gearGroups(situation, towardsQuickest(situation)),
        { changes: moreMotors(situation) },
        { changes: moreTime(situation) },
      ];
    case "beyond-speed":
    case "no-headroom":
      return gearGroups(situation, LOWER);
    default:
      return [];
  }
}

function strongerGroups(situation: Situation, wanted: Wanted): Group[] {
  return [...gearGroups(situation, wanted), { changes: moreMotors(situation) }];
}

/**
 * From the ratio that is to as far beyond the quickest one: the time has one minimum over the ratio, and teeth in stock may miss it.
 * Either way where no ratio arrives.
 */
function towardsQuickest({ drive, numbers }: Situation): Wanted {
  const quickest = quickestRatio(drive);
  if (quickest === null) return { atLeast: 0.01, atMost: 100 };
  const factor = quickest.ratio / numbers.ratio;
  // No ratio is quick enough: only what comes nearest is worth telling.
  if (drive.withinS !== undefined && quickest.timeS > drive.withinS * (1 + MARGIN))
    return { atLeast: factor / NEAR, atMost: factor * NEAR };
  const beyond = factor ** 2;
  return { atLeast: Math.min(beyond, 1), atMost: Math.max(beyond, 1) };
}

/** The quickest ratio is known to about a thousandth. */
const MARGIN = 1e-2;
const NEAR = 1.05;

function gearGroups(situation: Situation, wanted: Wanted): Group[] {
  return [
    { changes: oneGear(situation, wanted) },
    { changes: twoGears(situation, wanted), instead: true },
    { changes: twoStages(situation, wanted), instead: true },
    { changes: oneMoreStage(situation, wanted), instead: true },
  ];
}
