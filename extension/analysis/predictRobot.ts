/** The numbers that a proposal for a whole robot predicts, and in what words it is told. */

import { cycleTimeOf, type RobotSetting } from "../proposals/robotChange.js";
import type { RuleId } from "../rules/rule.js";
import { writeQuantity, writeShare } from "../units/write.js";
import { type Difference, differenceOf, less, more } from "./predict.js";
import type { RobotPredicted } from "./proposal.js";
import { protectorOf, type RobotCase, type Tried } from "./robotFacts.js";

export function predictRobot(
  { model, subject }: RobotCase,
  { drive, solution }: Pick<Tried, "drive" | "solution">,
): RobotPredicted {
  const { numbers, protectors, mechanisms } = solution;
  const [nearest] = protectors.toSorted((one, other) => other.peakShare - one.peakShare);
  const protector = protectorOf(model, subject, solution) ?? nearest;
  const hottest = mechanisms.flatMap(({ windingPeakC }) => (windingPeakC === null ? [] : [windingPeakC]));
  return {
    lowestVoltageV: numbers.lowestVoltageV,
    peakCurrentA: numbers.peakCurrentA,
    tripMargin: protector === undefined ? null : 1 - protector.peakShare,
    tripsAfterS: protector?.openings[0]?.atS ?? null,
    windingPeakC: hottest.length === 0 ? null : Math.max(...hottest),
    cycleS: cycleTimeOf(drive),
    cyclesDone: numbers.cyclesDone,
  };
}

const CELSIUS_ZERO_K = 273.15;

/** Those of protection only for a finding about it. */
export function robotDifferences(was: RobotPredicted, will: RobotPredicted, rule: RuleId): Difference[] {
  const seconds = (value: number) => writeQuantity(value, "time");
  return [
    ...differenceOf(was.lowestVoltageV, will.lowestVoltageV, {
      write: (value) => writeQuantity(value, "voltage"),
      say: (text) => `supply down to ${text}`,
      isWorse: less,
    }),
    ...differenceOf(was.peakCurrentA, will.peakCurrentA, {
      write: (value) => writeQuantity(value, "current"),
      say: (text) => `at most ${text}`,
      isWorse: more,
    }),
    ...(rule === "trips" ? tripDifferences(was, will) : []),
    ...differenceOf(was.windingPeakC, will.windingPeakC, {
      write: (value) => writeQuantity(value + CELSIUS_ZERO_K, "temperature"),
      say: (text) => `hottest winding ${text}`,
      isWorse: more,
    }),
    ...differenceOf(was.cycleS, will.cycleS, { write: seconds, say: (text) => `cycle ${text}`, isWorse: more }),
    ...differenceOf(was.cyclesDone, will.cyclesDone, {
      write: String,
      say: (text) => `${text} cycles done`,
      isWorse: less,
    }),
  ];
}

function tripDifferences(was: RobotPredicted, will: RobotPredicted): Difference[] {
  return [
    ...differenceOf(was.tripsAfterS, will.tripsAfterS, {
      write: (value) => writeQuantity(value, "time"),
      say: (text) => `protection opens after ${text}`,
      isWorse: less,
      gone: "protection stays closed",
    }),
    ...differenceOf(was.tripMargin, will.tripMargin, {
      write: writeShare,
      say: (text) => `${text} left until it opens`,
      isWorse: less,
    }),
  ];
}

export function tellSettings(one: RobotCase, sets: readonly RobotSetting[]): string {
  return sets.map((set) => tellSetting(one, set)).join(", and ");
}

function tellSetting({ model }: RobotCase, set: RobotSetting): string {
  const name = (mechanism: number) => `"${model.mechanisms[mechanism]?.name}"`;
  switch (set.kind) {
    case "stagger":
      return `${name(set.mechanism)} in a step of its own behind step ${set.step + 1}, ${writeQuantity(set.lastsS, "time")}`;
    case "shift":
      return `${name(set.mechanism)} in step ${set.to + 1} instead of step ${set.step + 1}`;
    case "limit":
      return `A motor current limit of ${writeQuantity(set.currentA, "current")} for ${name(set.mechanism)}`;
    case "rest":
      return `A rest of ${writeQuantity(set.lastsS, "time")} in each cycle`;
    case "cycles":
      return `${set.cycles} cycles on one charge`;
  }
}
