/**
 * Whether a change of mechanisms brings nothing new in the load cycles of the robots that list them.
 *
 * A load cycle may run hundreds of times, so that its first cycles are run with and without the change: where every winding, protector and
 * the battery fare no worse in them, or by so little that ten times as much would not matter in the end, the others bring nothing new
 * either. Else all cycles are run.
 */
import type { RobotDrive } from "../model/robotDrive.js";
import type { RobotSolution } from "../model/robotSolution.js";
import { solveRobot } from "../model/solveRobot.js";
import type { RobotFacts } from "../rules/robotRule.js";
import { ROBOT_RULES } from "../rules/table.js";
import type { AnalysedRobot, Analysis, Finding } from "./analysis.js";
import { rankOf } from "./rank.js";
import { robotDriveOf } from "./robotDriveOf.js";

/** Cycles that are run beside each other. */
const FEW = 2;
/** What is worse in the few cycles counts so many times over in all of them. */
const AT_WORST = 10;

/** `changed`: the analysis of the changed texts, robots not run. `level`: what is below does not count. */
export type RobotCheck = (before: Analysis, changed: Analysis, level: Finding["level"]) => boolean;

/** For one search: its candidates are compared with the same short runs. */
export function createRobotCheck(): RobotCheck {
  const shortRuns = new Map<RobotSolution, RobotSolution>();
  const shortRunOf = (drive: RobotDrive, solution: RobotSolution): RobotSolution => {
    const known = shortRuns.get(solution) ?? solveRobot({ ...drive, cycles: FEW });
    shortRuns.set(solution, known);
    return known;
  };
  return (before, changed, level) => changed.robots.every((robot) => staysGood(robot, before, changed, { level, shortRunOf }));
}

interface Comparison {
  readonly level: Finding["level"];
  readonly shortRunOf: (drive: RobotDrive, solution: RobotSolution) => RobotSolution;
}

function staysGood(robot: AnalysedRobot, before: Analysis, changed: Analysis, { level, shortRunOf }: Comparison): boolean {
  const was = before.robots.find(({ name, at }) => name === robot.name && at.file === robot.at.file);
  const model = robot.declared && robotDriveOf(robot.declared).model;
  if (model === null || model === undefined) return was?.solution === undefined;
  if (was?.drive === undefined || was.solution === undefined) return false;
  const names = model.mechanisms.map(({ name }) => name);
  const levels = before.levels.get(robot.at.file) ?? {};
  const isOff = (rule: Finding["rule"]): boolean => levels[rule] === "off";
  const known = ranksIn({ drive: was.drive, solution: was.solution, names, isTold: toldIn(before, names) });
  const isWorse = (drive: RobotDrive, solution: RobotSolution): boolean =>
    [...ranksIn({ drive, solution, names, isTold: toldIn(changed, names) })].some(
      ([key, { rule, rank }]) => !isOff(rule) && rank >= rankOf(level) && rank > (known.get(key)?.rank ?? -1),
    );
  if (runsAlike(was.drive, model.drive)) return !isWorse(model.drive, was.solution);
  if (model.drive.cycles > FEW) {
    const few = { ...model.drive, cycles: FEW };
    const solution = solveRobot(few);
    if (isWorse(few, solution)) return false;
    if (faresNoWorse(solution, shortRunOf(was.drive, was.solution), was.solution, model.drive)) return true;
  }
  return !isWorse(model.drive, solveRobot(model.drive));
}

interface Told {
  readonly rule: Finding["rule"];
  readonly rank: number;
}

function ranksIn(facts: RobotFacts): Map<string, Told> {
  const ranks = new Map<string, Told>();
  for (const { id, level, judge } of ROBOT_RULES) {
    for (const verdict of judge(facts)) {
      const key = `${id} ${verdict.subject}`;
      ranks.set(key, { rule: id, rank: Math.max(ranks.get(key)?.rank ?? -1, rankOf(verdict.level ?? level)) });
    }
  }
  return ranks;
}

function toldIn({ findings }: Analysis, names: readonly string[]): RobotFacts["isTold"] {
  const told = new Set(findings.map(({ rule, mechanism }) => `${rule} ${mechanism}`));
  return (mechanism, rule) => told.has(`${rule} ${names[mechanism]}`);
}

/** What a mechanism is asked for by itself. */
const OWN: ReadonlySet<string> = new Set(["withinS", "everyS", "holdForS"]);

/** That does not change how the robot runs. */
function runsAlike(one: RobotDrive, other: RobotDrive): boolean {
  const run = (drive: RobotDrive): string => JSON.stringify(drive, (key, value: unknown) => (OWN.has(key) ? undefined : value));
  return run(one) === run(other);
}

function faresNoWorse(now: RobotSolution, was: RobotSolution, wasInEnd: RobotSolution, drive: RobotDrive): boolean {
  const stays = (few: number | null, before: number | null, inEnd: number | null, limit: number | undefined): boolean => {
    if (few === null || limit === undefined) return true;
    if (before === null || inEnd === null) return false;
    // Beyond its limit it is known already.
    return inEnd >= limit || few <= before || inEnd + AT_WORST * (few - before) < limit;
  };
  const windings = now.mechanisms.every((one, index) =>
    stays(
      one.windingPeakC,
      was.mechanisms[index]?.windingPeakC ?? null,
      wasInEnd.mechanisms[index]?.windingPeakC ?? null,
      drive.mechanisms[index]?.motor.thermal?.limitC,
    ),
  );
  const protectors = now.protectors.every((one, index) =>
    stays(one.peakShare, was.protectors[index]?.peakShare ?? null, wasInEnd.protectors[index]?.peakShare ?? null, 1),
  );
  return windings && protectors && stays(now.depletedAh, was.depletedAh, wasInEnd.depletedAh, drive.supply.capacityAh);
}
