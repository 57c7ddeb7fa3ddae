/** The mechanisms of the workspace by robot, each with how it fares: what the view shows. */
import type { AnalysedMechanism, AnalysedRobot, Analysis, Finding } from "../analysis/analysis.js";
import type { Span } from "../evaluator/value.js";
import { writeQuantity } from "../units/write.js";
import { plainText } from "./inertText.js";
import { robotVerdictOf, type State, verdictOf, worse } from "./verdict.js";

export interface MechanismTree {
  readonly robots: readonly RobotNode[];
  /** Mechanisms that no robot lists. */
  readonly apart: readonly MechanismNode[];
}

export interface RobotNode {
  /** As declared: the key for the chart. */
  readonly name: string;
  /** Plain text. */
  readonly label: string;
  /** Plain text: verdict of its load cycle and lowest voltage; empty without a load cycle. */
  readonly description: string;
  /** Plain text, longer. */
  readonly tooltip: string;
  readonly at: Span;
  /** The worst of its mechanisms' and its own findings. */
  readonly state: State;
  readonly mechanisms: readonly MechanismNode[];
}

export interface MechanismNode {
  /** As declared: the key for the chart. */
  readonly name: string;
  /** Plain text. */
  readonly label: string;
  /** Plain text: verdict and share of stall. */
  readonly description: string;
  /** Plain text, longer. */
  readonly tooltip: string;
  readonly at: Span;
  readonly state: State;
  readonly stallShare: number | null;
}

type NodeOf = (analysis: Analysis, mechanism: AnalysedMechanism) => MechanismNode;

/** Gives the same node for a mechanism as long as nothing else is to be said of it. */
export function createNodeReader(): NodeOf {
  const known = new WeakMap<AnalysedMechanism, { readonly findings: readonly Finding[]; readonly node: MechanismNode }>();
  return (analysis, mechanism) => {
    const findings = analysis.findingsByMechanism.get(mechanism.name) ?? [];
    const before = known.get(mechanism);
    if (before?.findings.length === findings.length && findings.every((finding, index) => finding === before.findings[index]))
      return before.node;
    const node = nodeFor(analysis, mechanism);
    known.set(mechanism, { findings, node });
    return node;
  };
}

export function mechanismTree(analysis: Analysis, nodeOf: NodeOf = nodeFor): MechanismTree {
  const byDeclared = new Map(analysis.mechanisms.map((mechanism) => [mechanism.declared, mechanism]));
  const listed = new Set<AnalysedMechanism>();
  const declared = analysis.robots.filter((robot) => robot.declared !== undefined);
  const general = analysis.findings.filter(({ mechanism }) => mechanism === null);
  const robots = declared.map((robot): RobotNode => {
    const own = (robot.declared?.mechanisms ?? []).flatMap((declared) => byDeclared.get(declared) ?? []);
    for (const mechanism of own) listed.add(mechanism);
    const mechanisms = own.map((mechanism) => nodeOf(analysis, mechanism));
    const states = [
      ...mechanisms.map(({ state }) => state),
      ...statesAt(general, robot.call.span),
      ...statesAt(general, robot.at),
    ];
    return {
      name: robot.name,
      label: plainText(robot.name),
      ...saidOf(analysis, robot),
      at: robot.at,
      state: states.reduce(worse, "fine"),
      mechanisms,
    };
  });
  const apart = analysis.mechanisms.filter((mechanism) => !listed.has(mechanism)).map((mechanism) => nodeOf(analysis, mechanism));
  return { robots, apart };
}

function saidOf(analysis: Analysis, robot: AnalysedRobot): Pick<RobotNode, "description" | "tooltip"> {
  const { numbers } = robot;
  if (numbers === undefined) return { description: "", tooltip: robot.notChecked.join(" ") };
  const { state, words } = robotVerdictOf(analysis, robot);
  const lowest = `lowest ${writeQuantity(numbers.lowestVoltageV, "voltage")}`;
  return {
    description: state === "fine" ? lowest : `${lowest} · ${words}`,
    tooltip: `Load cycle: ${words}, ${lowest}, at most ${writeQuantity(numbers.peakCurrentA, "current")}`,
  };
}

function nodeFor(analysis: Analysis, mechanism: AnalysedMechanism): MechanismNode {
  const { state, words, share } = verdictOf(analysis, mechanism);
  const hardest = mechanism.numbers?.hardest;
  const description = share === undefined ? words : state === "fine" ? share : `${share} · ${words}`;
  const current = hardest === undefined ? "" : `, ${writeQuantity(hardest.motorCurrentA, "current")} per motor`;
  return {
    name: mechanism.name,
    label: plainText(mechanism.name),
    description,
    tooltip: `${words}${share === undefined ? "" : `: ${share}`}${current}`,
    at: mechanism.at,
    state,
    stallShare: hardest?.stallShare ?? null,
  };
}

/** `general`: findings about no mechanism in particular. */
function statesAt(general: Analysis["findings"], { file, start, end }: Span): State[] {
  const here = general.filter(({ at }) => at.file === file && start <= at.start && at.end <= end);
  return here.flatMap(({ level }) => (level === "information" ? [] : [level]));
}
