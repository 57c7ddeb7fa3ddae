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
import { type ByFile, createKeeper } from "./byFile.js";
import { comesFrom } from "./comesFrom.js";
import type { Declared, DeclaredRobot, RobotCall } from "./declared.js";
import { type Judged, tellWhyUnknown } from "./judge.js";
import { sameContent, sameItems, union } from "./lists.js";
import { createMemory } from "./memory.js";
import { leavesBelow } from "./rebuild.js";
import { type RobotModel, robotDriveOf } from "./robotDriveOf.js";
import type { RobotLists } from "./robotLists.js";

/** What is said of the robots of one file. */
export interface JudgedRobots {
  readonly robots: readonly AnalysedRobot[];
  readonly findings: readonly Finding[];
}

/** Load cycles that are remembered beside those of the robots that are there. */
const SPARE = 20;

export interface RobotJudge {
  judge(round: RobotRound): ByFile<JudgedRobots>;
  /** The robots as declared, their load cycles not run; they are at the next round. */
  leaveOut(round: RobotRound): ByFile<JudgedRobots>;
}

export interface RobotRound {
  readonly declared: ByFile<Declared>;
  readonly judged: ByFile<Judged>;
  readonly lists: RobotLists;
}

/** Files without robots are absent from its results. */
export function createRobotJudge(): RobotJudge {
  const kept = createKeeper<JudgedRobots>();
  let count = 0;
  const solutions = createMemory<RobotSolution>(() => 2 * count + SPARE);
  const tell = createTeller();
  const judgeFile = ({ robots, unknownRobots }: Declared, aboutOf: (model: RobotModel) => About): JudgedRobots => {
    const findings: Finding[] = [];
    const known = robots.map((robot): AnalysedRobot => {
      const { model, notChecked } = robotDriveOf(robot.declared);
      if (model === null) return tell(robot, undefined, notChecked);
      const solution = solutions.get(JSON.stringify(model.drive), () => solveRobot(model.drive));
      findings.push(...findingsOf(robot, model, solution, aboutOf(model)));
      return tell(robot, { drive: model.drive, solution }, notChecked);
    });
    const unknown = unknownRobots.map((robot) => tell(robot, undefined, [tellWhyUnknown(robot.call)]));
    return { robots: [...known, ...unknown].sort(byPlace), findings };
  };
  /** Files whose robots were not judged since something changed that they rest on. */
  const open = new Set<string>();
  const note = ({ declared, judged, lists }: RobotRound) => {
    for (const file of declared.changed) open.add(file);
    for (const file of judged.changed) {
      for (const { declared: mechanism } of judged.of.get(file)?.mechanisms ?? []) {
        for (const lister of mechanism === undefined ? [] : lists.listersOf(mechanism)) open.add(lister.file);
      }
    }
  };
  let isLeftOut = false;
  return {
    judge(round) {
      const { declared, judged, lists } = round;
      note(round);
      const result = kept.update(
        declared.of,
        open,
        (file) => {
          const here = declared.of.get(file);
          const robots = here === undefined ? 0 : here.robots.length + here.unknownRobots.length;
          count += robots - (kept.of.get(file)?.robots.length ?? 0);
          return here === undefined || robots === 0 ? undefined : judgeFile(here, (model) => readJudged(model, judged.of, lists));
        },
        (one, other) => sameItems(one.robots, other.robots) && sameContent(one.findings, other.findings),
      );
      open.clear();
      isLeftOut = false;
      return result;
    },
    leaveOut(round) {
      note(round);
      const { of, changed } = round.declared;
      const touched = isLeftOut ? changed : union(changed, kept.of.keys());
      for (const file of touched) open.add(file);
      isLeftOut = true;
      return kept.update(of, touched, (file) => {
        const robots = of.get(file)?.robots ?? [];
        return robots.length === 0
          ? undefined
          : { robots: robots.map((robot) => ({ ...robot, assumed: [], notChecked: [] })), findings: [] };
      });
    },
  };
}

type Run = Pick<Required<AnalysedRobot>, "drive" | "solution">;

/** What is said of a robot: the same object as long as its run is the same. */
function createTeller(): (robot: RobotCall, run: Run | undefined, notChecked: readonly string[]) => AnalysedRobot {
  const told = new WeakMap<DefinitionCall, AnalysedRobot>();
  return (robot, run, notChecked) => {
    const before = told.get(robot.call);
    if (before !== undefined && before.solution === run?.solution) return before;
    const result =
      run === undefined
        ? { ...robot, assumed: [], notChecked }
        : {
            ...robot,
            ...run,
            numbers: run.solution.numbers,
            assumed: tellAssumed(run.solution, hasRanges(robot.call)),
            notChecked: [...notChecked, ...tellUnresolved(run.solution)],
          };
    told.set(robot.call, result);
    return result;
  };
}

/** What is known of a robot's mechanisms by themselves. */
interface About {
  readonly places: ReadonlyMap<Mechanism | undefined, Span>;
  /** Rule and mechanism. */
  readonly told: ReadonlySet<string>;
}

function readJudged({ mechanisms }: RobotModel, judged: ReadonlyMap<string, Judged>, lists: RobotLists): About {
  const files = [...new Set(mechanisms.flatMap((mechanism) => lists.fileOf(mechanism) ?? []))];
  const all = files.flatMap((file) => judged.get(file) ?? []);
  return {
    places: new Map(all.flatMap((one) => one.mechanisms.map(({ declared, at }) => [declared, at] as const))),
    told: new Set(all.flatMap(({ findings }) => findings.map(({ mechanism, rule }) => `${rule} ${mechanism}`))),
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

function tellAssumed({ periodic, cyclesFollowed, numbers }: RobotSolution, isRanged: boolean): string[] {
  const told = [
    "Each mechanism holds where its load pulls hardest; one without current stays where it is.",
    "Windings and protection start at rest, the battery full.",
  ];
  if (isRanged) told.push("Numbers and findings are for the middle of each range.");
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

function hasRanges(call: DefinitionCall): boolean {
  return leavesBelow(call).some(({ range }) => range !== undefined);
}

function byPlace({ at: one }: AnalysedRobot, { at: other }: AnalysedRobot): number {
  return one.file === other.file ? one.start - other.start : one.file < other.file ? -1 : 1;
}
