/** The numbers that a proposal predicts, and how they are told beside those that are: what stays good or gets better, then what gets worse. */
import type { Drive } from "../model/drive.js";
import type { MechanismNumbers } from "../model/numbers.js";
import { solveTravel } from "../model/travel.js";
import type { RuleId } from "../rules/rule.js";
import { writeNumber, writeQuantity, writeShare } from "../units/write.js";
import type { Predicted } from "./proposal.js";

const CELSIUS_ZERO_K = 273.15;

export function predict({ ratio, hardest, travel, stall }: MechanismNumbers, drive: Drive): Predicted {
  const windingPeakC = travel?.windingPeakC ?? null;
  const limitC = drive.motor.thermal?.limitC;
  return {
    ratio,
    stallShare: hardest.stallShare,
    motorCurrentA: hardest.motorCurrentA,
    timeS: travel?.timeS ?? null,
    tripsAfterS: travel?.tripsAfterS ?? null,
    tripMargin: travel === null ? null : tripMarginOf(drive, travel.tripsAfterS),
    windingPeakC,
    windingMarginK: windingPeakC === null || limitC === undefined ? null : limitC - windingPeakC,
    stalledTripsAfterS: stall.tripsAfterS,
    stalledLimitAfterS: stall.windingLimitAfterS,
  };
}

function tripMarginOf(drive: Drive, tripsAfterS: number | null): number | null {
  if (drive.protection === undefined) return null;
  const borne = tripsAfterS === null ? solveTravel(drive)?.carried.protection : 1;
  return borne === undefined ? null : Math.min(Math.max(1 - borne, 0), 1);
}

/** One number that reads differently. */
export interface Difference {
  readonly now: string;
  /** Absent where there was none. */
  readonly before?: string;
  readonly worse: boolean;
}

/** The mechanism's numbers that differ; those of a stall only for a finding about one. */
export function differencesOf(was: Predicted, will: Predicted, rule: RuleId): Difference[] {
  const seconds = (value: number) => writeQuantity(value, "time");
  const celsius = (value: number) => writeQuantity(value + CELSIUS_ZERO_K, "temperature");
  return [
    ...differenceOf(was.ratio, will.ratio, { write: writeNumber, say: (text) => `ratio ${text}`, isWorse: () => false }),
    ...differenceOf(was.stallShare, will.stallShare, { write: writeShare, say: (text) => `${text} of stall`, isWorse: more }),
    ...differenceOf(was.motorCurrentA, will.motorCurrentA, {
      write: (value) => writeQuantity(value, "current"),
      say: (text) => `${text} per motor`,
      isWorse: more,
    }),
    ...differenceOf(was.timeS, will.timeS, { write: seconds, say: (text) => `travel ${text}`, isWorse: more }),
    ...differenceOf(was.tripsAfterS, will.tripsAfterS, {
      write: seconds,
      say: (text) => `protection opens after ${text}`,
      isWorse: less,
      gone: "protection stays closed",
    }),
    ...(rule === "trips"
      ? differenceOf(was.tripMargin, will.tripMargin, {
          write: writeShare,
          say: (text) => `${text} left until it opens`,
          isWorse: less,
        })
      : []),
    ...differenceOf(was.windingPeakC, will.windingPeakC, { write: celsius, say: (text) => `winding ${text}`, isWorse: more }),
    ...(rule === "unprotected" ? stallDifferences(was, will) : []),
  ];
}

function stallDifferences(was: Predicted, will: Predicted): Difference[] {
  const seconds = (value: number) => writeQuantity(value, "time");
  return [
    ...differenceOf(was.stalledLimitAfterS, will.stalledLimitAfterS, {
      write: seconds,
      say: (text) => `stalled, the winding's limit after ${text}`,
      isWorse: less,
      gone: "stalled, the winding stays below its limit",
    }),
    ...differenceOf(was.stalledTripsAfterS, will.stalledTripsAfterS, {
      write: seconds,
      say: (text) => `stalled, protection opens after ${text}`,
      isWorse: more,
    }),
  ];
}

export interface Telling {
  write(value: number): string;
  say(text: string): string;
  /** A number that was not there before is not judged. */
  isWorse(was: number, will: number): boolean;
  /** What is said where there is no number any more; absent: nothing is. */
  readonly gone?: string;
}

/** None where both read the same. */
export function differenceOf(was: number | null, will: number | null, { write, say, isWorse, gone }: Telling): Difference[] {
  if (will === null) return was === null || gone === undefined ? [] : [{ now: gone, worse: false }];
  if (was === null) return [{ now: say(write(will)), worse: gone !== undefined }];
  const [before, now] = [write(was), write(will)];
  return before === now ? [] : [{ now: say(now), before, worse: isWorse(was, will) }];
}

export function more(was: number, will: number): boolean {
  return will > was;
}

export function less(was: number, will: number): boolean {
  return will < was;
}

/** After what is changed: new numbers instead of old ones, a sentence more for what gets worse. */
export function tellDifferences(words: string, differences: readonly Difference[]): string {
  const tell = ({ now, before }: Difference) => (before === undefined ? now : `${now} instead of ${before}`);
  const list = (worse: boolean) => differences.filter((one) => one.worse === worse).map(tell);
  const [good, bad] = [list(false), list(true)];
  if (good.length + bad.length === 0) return `${words}: the numbers stay as they are.`;
  const first = good.length === 0 ? `${words}.` : `${words}: ${good.join(", ")}.`;
  return bad.length === 0 ? first : `${first} Worse: ${bad.join(", ")}.`;
}

/** For a menu's line: new numbers alone. */
export function tellBriefly(words: string, differences: readonly Difference[]): string {
  const list = (worse: boolean) => differences.filter((one) => one.worse === worse).map(({ now }) => now);
  const [good, bad] = [list(false), list(true)];
  if (good.length + bad.length === 0) return `${words}: the numbers stay as they are`;
  const parts = [...good, ...(bad.length === 0 ? [] : [`worse: ${bad.join(", ")}`])];
  return `${words}: ${parts.join(", ")}`;
}
