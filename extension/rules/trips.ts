/** `trips`: protection opens before the travel is done, before the hold is over, or while it keeps turning or repeating. */
import { writeQuantity } from "../units/write.js";
import { tellProtector } from "./protector.js";
import type { MechanismFacts, MechanismRule, Verdict } from "./rule.js";

export const trips: MechanismRule = { id: "trips", level: "error", silences: ["late"], judge };

/** Protection that is expected to open, or (a fuse between its gates) may open. */
interface Opening {
  readonly afterS: number;
  readonly surely: boolean;
  /** What it comes before, such as "the travel of 9 s is done". */
  readonly before: string;
  readonly currentA: number;
  readonly lastsS: number;
}

type Runs = Pick<MechanismFacts, "drive" | "travel" | "hold" | "turning" | "repeats">;

/** Whether protection opens in use: before the travel is done, before the hold is over, or while it keeps turning or repeating. */
export function opensInUse(runs: Runs): boolean {
  if (runs.drive.protection === undefined) return false;
  return [inTravel, inHold, inTurning, inRepeats].some((openingsIn) => openingsIn(runs).some(({ surely }) => surely));
}

function judge(facts: MechanismFacts): Verdict | undefined {
  if (facts.drive.protection === undefined) return undefined;
  const openings = [...inTravel(facts), ...inHold(facts), ...inTurning(facts), ...inRepeats(facts)];
  const opening = openings.find(({ surely }) => surely) ?? openings[0];
  if (opening === undefined) return undefined;
  const { afterS, surely, before, currentA, lastsS } = opening;
  return {
    message:
      `Trips: ${tellProtector(facts.drive)} ${surely ? "opens" : "may open"} after ${writeQuantity(afterS, "time")}, before ${before}; ` +
      `it carries ${writeQuantity(currentA, "current")}. Lower the current with a higher ratio or less load; never raise the rating to silence this.`,
    excess: lastsS / Math.max(afterS, Number.MIN_VALUE),
    blames: [["protect"], ["stages"]],
    ...(surely ? {} : { level: "warning" }),
  };
}

function inTravel({ drive, travel }: Runs): Opening[] {
  if (travel === null) return [];
  const lastsS = travel.timeS ?? Number.POSITIVE_INFINITY;
  const before = travel.timeS === null ? "the travel is done" : `the travel of ${writeQuantity(travel.timeS, "time")} is done`;
  const currentA = carriesSupply(drive) ? travel.peakSourceCurrentA : travel.rmsMotorCurrentA;
  return openingsOf(travel.opensAfterS, travel.mayOpenAfterS, { before, currentA, lastsS });
}

function inHold({ drive, hold }: Runs): Opening[] {
  const lastsS = drive.holdForS;
  if (hold === null || lastsS === undefined) return [];
  const { opensAfterS, mayOpenAfterS } = hold.trip;
  const currentA = carriesSupply(drive) ? hold.sourceCurrentA : hold.motorCurrentA;
  return openingsOf(opensAfterS, mayOpenAfterS, {
    before: `the hold of ${writeQuantity(lastsS, "time")} is over`,
    currentA,
    lastsS,
  });
}

/** What turns on and on has no end to reach: any opening counts. */
function inTurning({ drive, turning }: Runs): Opening[] {
  if (turning === null) return [];
  const { opensAfterS, mayOpenAfterS } = turning.trip;
  const currentA = carriesSupply(drive) ? turning.sourceCurrentA : turning.motorCurrentA;
  return openingsOf(opensAfterS, mayOpenAfterS, { before: "it has turned for long", currentA, lastsS: Number.MAX_VALUE });
}

function inRepeats({ drive, travel, repeats }: Runs): Opening[] {
  if (drive.everyS === undefined || travel === null || repeats === null) return [];
  const before = `it can repeat every ${writeQuantity(drive.everyS, "time")} for long`;
  return openingsOf(repeats.tripsAfterS, null, { before, currentA: travel.rmsMotorCurrentA, lastsS: Number.MAX_VALUE });
}

function openingsOf(
  opensAfterS: number | null,
  mayOpenAfterS: number | null,
  what: Pick<Opening, "before" | "currentA" | "lastsS">,
): Opening[] {
  if (opensAfterS !== null && opensAfterS <= what.lastsS) return [{ afterS: opensAfterS, surely: true, ...what }];
  return mayOpenAfterS !== null && mayOpenAfterS <= what.lastsS ? [{ afterS: mayOpenAfterS, surely: false, ...what }] : [];
}

function carriesSupply({ protection }: MechanismFacts["drive"]): boolean {
  return protection?.carries === "supply";
}
