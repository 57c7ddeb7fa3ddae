/** A robot's run with one change, judged again: whether a finding about it still stands, how far off it is, and where in the cycle. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { RobotDrive } from "../model/robotDrive.js";
import type { RobotSolution, SagStretch } from "../model/robotSolution.js";
import { solveRobot } from "../model/solveRobot.js";
import { applyTo, planSteps, type RobotSetting } from "../proposals/robotChange.js";
import type { RobotFacts } from "../rules/robotRule.js";
import { ROBOT_RULES } from "../rules/table.js";
import type { AnalysedMechanism, Analysis, Finding } from "./analysis.js";
import type { RobotModel } from "./robotDriveOf.js";

/** The robot of a finding, and what is told of it already. */
export interface RobotCase {
  readonly model: RobotModel;
  readonly rule: Finding["rule"];
  readonly subject: string;
  readonly isTold: RobotFacts["isTold"];
  /** By index, with its call. */
  readonly mechanisms: readonly (AnalysedMechanism | undefined)[];
}

export function robotCaseOf(analysis: Analysis, model: RobotModel, { rule, robot }: Finding): RobotCase {
  const told = new Set(analysis.findings.map((one) => `${one.rule} ${one.mechanism}`));
  const bySource = new Map<Mechanism | undefined, AnalysedMechanism>(analysis.mechanisms.map((one) => [one.declared, one]));
  return {
    model,
    rule,
    subject: robot?.subject ?? "",
    isTold: (mechanism, about) => told.has(`${about} ${model.mechanisms[mechanism]?.name}`),
    mechanisms: model.mechanisms.map((one) => bySource.get(one)),
  };
}

/** A run of the changed robot. */
export interface Tried {
  readonly sets: readonly RobotSetting[];
  readonly drive: RobotDrive;
  readonly solution: RobotSolution;
  /** The finding is gone, and every travel arrives that did before. */
  readonly clears: boolean;
  /** Less is nearer; compared within one finding. */
  readonly distance: number;
}

/** `cycles`: run no more of them. `arrived`: how many travels did not arrive before. */
export function tryChange(
  one: RobotCase,
  sets: readonly RobotSetting[],
  missesBefore: number,
  cycles = Number.POSITIVE_INFINITY,
): Tried {
  const changed = applyTo(one.model.drive, sets);
  const drive = { ...changed, cycles: Math.min(changed.cycles, cycles) };
  const solution = solveRobot(drive);
  const names = one.model.mechanisms.map(({ name }) => name);
  const verdicts = ROBOT_RULES.filter(({ id }) => id === one.rule).flatMap((rule) =>
    rule.judge({ drive, solution, names, isTold: one.isTold }),
  );
  const stands = verdicts.some(({ subject }) => subject === one.subject);
  return { sets, drive, solution, clears: !stands && missesOf(solution) <= missesBefore, distance: distanceOf(one, solution) };
}

/** Steps, counted once, in which a travel did not arrive. */
export function missesOf({ mechanisms }: RobotSolution): number {
  return mechanisms.reduce((sum, { travels }) => sum + travels.filter(({ misses }) => misses > 0).length, 0);
}

function distanceOf({ rule, subject, model }: RobotCase, solution: RobotSolution): number {
  if (rule === "sags") return subject === "charge" ? solution.depletedAh : -solution.numbers.lowestVoltageV;
  if (rule === "overheats") return Math.max(...solution.mechanisms.map(({ windingPeakC }) => windingPeakC ?? 0));
  const protector = protectorOf(model, subject, solution);
  return protector === undefined ? 0 : (protector.peakShare ?? 0) - (protector.openings[0]?.atS ?? 0);
}

/** The protector that a `trips` finding speaks of. */
export function protectorOf({ mechanisms }: RobotModel, subject: string, { protectors }: RobotSolution) {
  return protectors.find(({ mechanism, shared }) =>
    mechanism === null ? subject === `shared ${shared}` : subject === `protection of ${mechanisms[mechanism]?.name}`,
  );
}

/** Where in the cycle the finding comes about, and who draws current there, the greatest first. */
export interface Trouble {
  /** A step of the cycle before any change. */
  readonly step: number;
  readonly movers: readonly number[];
}

export function troubleIn({ rule, subject, model }: RobotCase, { sets, drive, solution }: Tried): Trouble | undefined {
  const plan = planSteps(model.drive, sets);
  if (rule === "sags") {
    const worst = worstStretch(solution, drive.supply.mustStayAbove?.forS ?? 0);
    const atS = worst?.lowestAtS ?? solution.collapsesAtS;
    if (atS === null || atS === undefined) return undefined;
    const step = plan[stepAt(drive, atS)]?.from ?? undefined;
    if (step === undefined) return undefined;
    const drawing = worst?.supplyA ?? [];
    return { step, movers: byCurrent(drive.steps[stepAt(drive, atS)]?.moving ?? [], drawing) };
  }
  const protector = protectorOf(model, subject, solution);
  const feeds = drive.shared[protector?.shared ?? -1]?.feeds ?? (protector?.mechanism == null ? [] : [protector.mechanism]);
  const at = protector?.openings[0]?.step ?? (protector?.mayOpenAtS == null ? undefined : stepAt(drive, protector.mayOpenAtS));
  const step = at === undefined ? undefined : (plan[at]?.from ?? undefined);
  return step === undefined || at === undefined
    ? undefined
    : { step, movers: (drive.steps[at]?.moving ?? []).filter((one) => feeds.includes(one)) };
}

function worstStretch({ sags }: RobotSolution, allowedS: number): SagStretch | undefined {
  return [...sags.stretches, ...(sags.longest === null ? [] : [sags.longest])]
    .filter(({ lastsS }) => lastsS > allowedS)
    .reduce<SagStretch | undefined>(
      (worst, one) => (worst === undefined || one.lowestV < worst.lowestV ? one : worst),
      undefined,
    );
}

function byCurrent(mechanisms: readonly number[], supplyA: readonly number[]): number[] {
  return mechanisms.toSorted((one, other) => (supplyA[other] ?? 0) - (supplyA[one] ?? 0));
}

function stepAt({ steps }: RobotDrive, runS: number): number {
  const cycleS = steps.reduce((sum, { lastsS }) => sum + lastsS, 0);
  let left = cycleS > 0 ? runS % cycleS : 0;
  for (const [index, { lastsS }] of steps.entries()) {
    if (left < lastsS) return index;
    left -= lastsS;
  }
  return steps.length - 1;
}
