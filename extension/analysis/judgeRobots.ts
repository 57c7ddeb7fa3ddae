/**
 * Runs the model over every declared robot's load cycle and the rules over what comes of it.
 *
 * Solutions are kept by content: an edit that leaves a robot's numbers alone costs nothing. Ranges count with their middle.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { DefinitionCall, Span } from "../evaluator/value.js";
import type { RobotSolution } from "../model/robotSolution.js";
import { solveRobot } from "../model/solveRobot.js";
import type { RobotFacts, RobotRule, RobotVerdict } from "../rules/robotRule.js";
import { ROBOT_RULES } from "../rules/table.js";
import { writeQuantity } from "../units/write.js";
import type { AnalysedRobot, Finding } from "./analysis.js";
import { comesFrom } from "./comesFrom.js";
import type { Declared, DeclaredRobot } from "./declared.js";
import { type Judged, tellWhyUnknown } from "./judge.js";
import { createMemory } from "./memory.js";
import { leavesBelow } from "./rebuild.js";
import { type RobotModel, robotDriveOf } from "./robotDriveOf.js";

export interface JudgedRobots {
  readonly robots: readonly AnalysedRobot[];
  readonly findings: readonly Finding[];
}

export function createRobotJudge(): (declared: Declared, judged: Judged) => JudgedRobots {
  const solutions = createMemory<RobotSolution>();
  const ranged = new WeakMap<DefinitionCall, boolean>();
  const hasRanges = (call: DefinitionCall): boolean => {
    const known = ranged.get(call) ?? leavesBelow(call).some(({ range }) => range !== undefined);
    ranged.set(call, known);
    return known;
  };
  return ({ robots, unknownRobots }, judged) => {
    const findings: Finding[] = [];
    let about: About | undefined;
    const known = robots.map((robot): AnalysedRobot => {
      const { model, notChecked } = robotDriveOf(robot.declared);
      if (model === null) return { ...robot, assumed: [], notChecked };
      const solution = solutions.get(JSON.stringify(model.drive), () => solveRobot(model.drive));
      // Most robots of a workspace may have no load cycle.
      about ??= indexJudged(judged);
      findings.push(...findingsOf(robot, model, solution, about));
      return {
        ...robot,
        drive: model.drive,
        numbers: solution.numbers,
        solution,
        assumed: tellAssumed(solution, hasRanges(robot.call)),
        notChecked: [...notChecked, ...tellUnresolved(solution)],
      };
    });
    solutions.forgetUnused();
    const unknown = unknownRobots.map((robot) => ({ ...robot, assumed: [], notChecked: [tellWhyUnknown(robot.call)] }));
    return { robots: [...known, ...unknown].sort(byPlace), findings };
  };
}

/** The robots as declared, their load cycles not run. */
export function unjudged({ robots }: Declared): JudgedRobots {
  return { robots: robots.map((robot) => ({ ...robot, assumed: [], notChecked: [] })), findings: [] };
}

/** What is known of mechanisms by themselves. */
interface About {
  readonly places: ReadonlyMap<Mechanism | undefined, Span>;
  /** Rule and mechanism. */
  readonly told: ReadonlySet<string>;
}

function indexJudged({ mechanisms, findings }: Judged): About {
  return {
    places: new Map(mechanisms.map(({ declared, at }) => [declared, at])),
    told: new Set(findings.map(({ mechanism, rule }) => `${rule} ${mechanism}`)),
  };
}

function findingsOf(robot: DeclaredRobot, model: RobotModel, solution: RobotSolution, { places, told }: About): Finding[] {
  const names = model.mechanisms.map(({ name }) => name);
  const isTold: RobotFacts["isTold"] = (mechanism, rule) => told.has(`${rule} ${names[mechanism]}`);
  const facts: RobotFacts = { drive: model.drive, solution, names, isTold };
  const spans = model.mechanisms.map((one) => places.get(one));
  return ROBOT_RULES.flatMap((rule) => rule.judge(facts).map((verdict) => toFinding(robot, rule, verdict, spans)));
}

function toFinding(
  { name, at, call }: DeclaredRobot,
  rule: RobotRule,
  verdict: RobotVerdict,
  places: readonly (Span | undefined)[],
): Finding {
  const mechanisms = verdict.about.flatMap(({ mechanism, says }) => {
    const place = places[mechanism];
    return place === undefined ? [] : [{ at: place, message: says }];
  });
  return {
    rule: rule.id,
    level: verdict.level ?? rule.level,
    mechanism: null,
    robot: { name, subject: verdict.subject },
    message: verdict.message,
    at,
    related: [...mechanisms, ...comesFrom(call, verdict.blames)],
  };
}

function tellAssumed({ periodic, cyclesFollowed, numbers }: RobotSolution, hasRanges: boolean): string[] {
  const told = [
    "Each mechanism holds where its load pulls hardest; one without current stays where it is.",
    "Windings and protection start at rest, the battery full.",
  ];
  if (hasRanges) told.push("Numbers and findings are for the middle of each range.");
  if (periodic && cyclesFollowed < numbers.cyclesDone)
    told.push(
      `After ${cyclesFollowed} of ${numbers.cyclesDone} cycles nothing changes any more: the others count like the last one.`,
    );
  return told;
}

function tellUnresolved({ outcome, coveredS }: RobotSolution): string[] {
  if (outcome !== "unresolved") return [];
  return [`The load cycle after ${writeQuantity(coveredS, "time")}: too much happens in it to be followed.`];
}

function byPlace({ at: one }: AnalysedRobot, { at: other }: AnalysedRobot): number {
  return one.file === other.file ? one.start - other.start : one.file < other.file ? -1 : 1;
}
