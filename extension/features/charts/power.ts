/**
 * Everything that the chart of a robot's load cycle plots: what each mechanism takes from the supply or sends back, the supply's voltage, and
 * how protection and windings stand.
 *
 * SI throughout (temperatures °C), at the supply's terminals. Plots one cycle; the robot's numbers are those of all.
 */
import type { AnalysedRobot, Analysis, Finding } from "../../analysis/analysis.js";
import type { RobotDrive } from "../../model/robotDrive.js";
import type { RobotNumbers, RobotSample } from "../../model/robotSolution.js";
import { findingsAboutRobot, robotVerdictOf, type State } from "../verdict.js";
import { type CycleRunOf, createCycleRuns } from "./cycleRun.js";
import type { ChartFeature } from "./feature.js";
import { keptMoments } from "./keptMoments.js";
import { type ProtectorState, protectorStates, type WindingState, windingStates } from "./powerStates.js";
import { noRobot, robotSubjects, whyRobotIsOld } from "./robotSubjects.js";

export interface PowerWant {
  /** Of the load cycle, s; null: all of it. */
  readonly span: Span | null;
  /** The first cycle, or the last one that the model follows: later ones repeat it. */
  readonly cycle: "first" | "last";
}

export interface Span {
  readonly fromS: number;
  readonly toS: number;
}

export interface PowerChart {
  readonly robot: string;
  readonly state: State;
  readonly verdict: string;
  readonly findings: readonly Pick<Finding, "rule" | "level" | "message">[];
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
  readonly cycles: number;
  readonly cycleS: number;
  /** Which one is plotted, from 1, and which one is the last that is followed. */
  readonly cycle: number;
  readonly lastCycle: number;
  /** What was sampled, s of the cycle; so are all times but those of `numbers`. */
  readonly span: Span;
  readonly steps: readonly CycleStep[];
  readonly openCircuitV: number;
  readonly floor: { readonly voltageV: number; readonly forS: number } | null;
  /** Of all cycles. */
  readonly numbers: RobotNumbers;
  /** Rising; two moments at one time stand before and after a change. All lists below go with it. */
  readonly timesS: readonly number[];
  readonly voltageV: readonly number[];
  readonly currentA: readonly number[];
  readonly mechanisms: readonly MechanismPower[];
  readonly protectors: readonly ProtectorState[];
  readonly windings: readonly WindingState[];
}

export interface CycleStep {
  readonly startS: number;
  readonly endS: number;
  readonly moving: readonly string[];
  readonly holding: readonly string[];
}

export interface MechanismPower {
  readonly name: string;
  /** Below 0 where it is sent back. */
  readonly powerW: readonly number[];
  /** °C; null without thermal data. */
  readonly windingC: readonly number[] | null;
}

/** Spans of time that keep their extremes: more than a panel has pixels would not be seen. */
const SPANS = 300;

export function createPowerFeature(): ChartFeature<PowerChart, PowerWant> {
  const runOf = createCycleRuns();
  return {
    subjects: robotSubjects,
    chartOf: (analysis, name, want) => powerChart(analysis, name, want, runOf),
    whyOld: whyRobotIsOld,
    nothing: noRobot,
  };
}

function powerChart(analysis: Analysis, name: string, want: PowerWant, runOf: CycleRunOf): PowerChart | undefined {
  const robot = analysis.robots.find((one) => one.name === name && one.solution !== undefined);
  const { drive, numbers, solution } = robot ?? {};
  if (robot === undefined || drive === undefined || numbers === undefined || solution === undefined) return undefined;
  const steps = stepsOf(robot, drive);
  const cycleS = steps.at(-1)?.endS ?? 0;
  const cycle = want.cycle === "last" ? solution.lastFollowed : 0;
  const span = spanWithin(want.span, cycleS);
  const whole = runOf(drive, cycle, cycleS, { fromS: 0, toS: cycleS });
  // Where the whole cycle had too much to keep, a part of it is sampled anew.
  const isPart = span.fromS > 0 || span.toS < cycleS;
  const { samples: all } = isPart && whole.thinned ? runOf(drive, cycle, cycleS, span) : whole;
  const samples = isPart ? samplesAround(all, span) : all;
  const names = namesOf(robot, drive);
  const powers = names.map((_, index) => samples.map(({ powerW }) => powerW[index] ?? 0));
  const totals = samples.map(({ powerW }) => powerW.reduce((sum, one) => sum + one, 0));
  const times = samples.map(({ timeS }) => timeS);
  const voltages = samples.map(({ supplyVoltageV }) => supplyVoltageV);
  const kept = keptMoments(times, [voltages, totals], powers, SPANS);
  const pick = (series: readonly number[]): number[] => kept.map((index) => series[index] ?? 0);
  const { state, words } = robotVerdictOf(analysis, robot);
  const { supply } = drive;
  return {
    robot: robot.name,
    state,
    verdict: words,
    findings: findingsAboutRobot(analysis, robot).map(({ rule, level, message }) => ({ rule, level, message })),
    assumed: robot.assumed,
    notChecked: robot.notChecked,
    cycles: drive.cycles,
    cycleS,
    cycle: cycle + 1,
    lastCycle: solution.lastFollowed + 1,
    span,
    steps,
    openCircuitV: supply.openCircuitV,
    floor: supply.mustStayAbove ?? null,
    numbers,
    timesS: pick(times),
    voltageV: pick(voltages),
    currentA: pick(samples.map(({ supplyCurrentA }) => supplyCurrentA)),
    mechanisms: names.map((mechanism, index) => ({
      name: mechanism,
      powerW: pick(powers[index] ?? []),
      windingC: drive.mechanisms[index]?.motor.thermal ? pick(samples.map(({ windingC }) => windingC[index] ?? 0)) : null,
    })),
    protectors: protectorStates(drive, names, whole, cycleS),
    windings: windingStates(drive, names, whole, solution),
  };
}

/** Names by the model's index: what has a supply of its own is not among them. */
function namesOf({ declared }: AnalysedRobot, { mechanisms }: RobotDrive): readonly string[] {
  const listed = [...new Set(declared?.mechanisms ?? [])];
  return mechanisms.map((drive) => listed.find(({ si }) => si === drive)?.name ?? "");
}

function stepsOf(robot: AnalysedRobot, drive: RobotDrive): readonly CycleStep[] {
  const names = namesOf(robot, drive);
  const named = (indices: readonly number[]): string[] => indices.map((index) => names[index] ?? "");
  let startS = 0;
  return drive.steps.map(({ lastsS, moving, holding }) => {
    const step = { startS, endS: startS + lastsS, moving: named(moving), holding: named(holding) };
    startS = step.endS;
    return step;
  });
}

/** Those of a span, with the next one at either side, so that lines go on to the edges. */
function samplesAround(samples: readonly RobotSample[], { fromS, toS }: Span): readonly RobotSample[] {
  const first = samples.findIndex(({ timeS }) => timeS >= fromS);
  const last = samples.findLastIndex(({ timeS }) => timeS <= toS);
  return samples.slice(Math.max((first < 0 ? samples.length : first) - 1, 0), last + 2);
}

function spanWithin(wanted: Span | null, cycleS: number): Span {
  const fromS = Math.min(Math.max(wanted?.fromS ?? 0, 0), cycleS);
  const toS = Math.min(Math.max(wanted?.toS ?? cycleS, 0), cycleS);
  return toS > fromS ? { fromS, toS } : { fromS: 0, toS: cycleS };
}
