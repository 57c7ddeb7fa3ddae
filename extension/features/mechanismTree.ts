/**
 * The mechanisms of the workspace by robot, each with how it fares: what the view shows, by the file that declares it.
 *
 * Looks again at what was touched alone. Does not say where in a text anything is, but for offsets.
 */
import type { AnalysedMechanism, AnalysedRobot, Analysis, FileAnalysis, Finding } from "../analysis/analysis.js";
import { sameItems } from "../analysis/lists.js";
import type { Span } from "../evaluator/value.js";
import { writeQuantity } from "../units/write.js";
import { plainText } from "./inertText.js";
import type { IndexOf, MechanismIndex } from "./mechanismIndex.js";
import { findingsAbout, findingsAboutRobot, robotVerdictOf, type State, verdictOf, worse } from "./verdict.js";

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

/** What the calls of one file declare. */
export interface FileTree {
  readonly robots: readonly RobotNode[];
  /** Mechanisms that no robot lists. */
  readonly apart: readonly MechanismNode[];
  readonly counts: Counts;
}

/** How many there are, listed or not, accepted or not. */
export interface Counts {
  readonly mechanisms: number;
  /** Of these, those that could not be checked. */
  readonly unchecked: number;
  readonly motors: number;
  readonly robots: number;
}

export interface Trees {
  /** Without files that declare nothing; valid until the next analysis is given. */
  readonly byFile: ReadonlyMap<string, FileTree>;
  /** Files whose tree is another than with the analysis before, or gone. */
  readonly changed: ReadonlySet<string>;
  /** Of all files. */
  readonly counts: Counts;
}

/** `touched`: files that may differ from the analysis given before (`changesBetween`); absent: any may. */
export type TreesOf = (analysis: Analysis, touched?: ReadonlySet<string>) => Trees;

/** A file's tree, a robot and a mechanism are the same objects for as long as the same is to be said of them. */
export function createTreeReader(indexOf: IndexOf): TreesOf {
  const nodeOf = createNodeReader();
  const byFile = new Map<string, FileTree>();
  let counts = NOTHING;
  return (analysis, touched = new Set([...byFile.keys(), ...analysis.inFile.keys()])) => {
    const index = indexOf(analysis);
    const changed = new Set<string>();
    for (const file of touched) {
      const before = byFile.get(file);
      const tree = treeOf(analysis, file, index, nodeOf, before);
      if (tree === before) continue;
      changed.add(file);
      counts = recount(counts, before?.counts, tree?.counts);
      if (tree === undefined) byFile.delete(file);
      else byFile.set(file, tree);
    }
    return { byFile, changed, counts };
  };
}

const NOTHING: Counts = { mechanisms: 0, unchecked: 0, motors: 0, robots: 0 };

function recount(all: Counts, before = NOTHING, now = NOTHING): Counts {
  return {
    mechanisms: all.mechanisms + now.mechanisms - before.mechanisms,
    unchecked: all.unchecked + now.unchecked - before.unchecked,
    motors: all.motors + now.motors - before.motors,
    robots: all.robots + now.robots - before.robots,
  };
}

type NodeOf = (analysis: Analysis, mechanism: AnalysedMechanism) => MechanismNode;

/** Gives the same node for a mechanism as long as nothing else is to be said of it. */
function createNodeReader(): NodeOf {
  const known = new WeakMap<AnalysedMechanism, { readonly findings: readonly Finding[]; readonly node: MechanismNode }>();
  return (analysis, mechanism) => {
    const findings = findingsAbout(analysis, mechanism);
    const before = known.get(mechanism);
    if (before !== undefined && sameItems(findings, before.findings)) return before.node;
    const node = nodeFor(analysis, mechanism);
    known.set(mechanism, { findings, node });
    return node;
  };
}

function treeOf(
  analysis: Analysis,
  file: string,
  index: MechanismIndex,
  nodeOf: NodeOf,
  before: FileTree | undefined,
): FileTree | undefined {
  const { mechanisms = [], motors = [], robots: all = [] }: Partial<FileAnalysis> = analysis.inFile.get(file) ?? {};
  if (mechanisms.length + motors.length + all.length === 0) return undefined;
  const declared = all.filter((robot) => robot.declared !== undefined);
  const nodes = mechanisms.map((mechanism) => nodeOf(analysis, mechanism));
  const apart = nodes.filter((_, position) => {
    const mechanism = mechanisms[position]?.declared;
    return mechanism === undefined || !index.isListed(mechanism);
  });
  const robots = declared.map((robot, position) => {
    const own = (robot.declared?.mechanisms ?? []).flatMap((mechanism) => index.declared(mechanism)?.mechanism ?? []);
    const node = robotNode(
      analysis,
      robot,
      own.map((mechanism) => nodeOf(analysis, mechanism)),
    );
    const like = before?.robots[position];
    return like !== undefined && sameRobot(like, node) ? like : node;
  });
  const unchecked = nodes.filter(({ state }) => state === "unknown").length;
  const counts = { mechanisms: mechanisms.length, unchecked, motors: motors.length, robots: all.length };
  const isSame =
    before !== undefined &&
    sameItems(before.robots, robots) &&
    sameItems(before.apart, apart) &&
    JSON.stringify(before.counts) === JSON.stringify(counts);
  return isSame ? before : { robots, apart, counts };
}

function robotNode(analysis: Analysis, robot: AnalysedRobot, mechanisms: readonly MechanismNode[]): RobotNode {
  const levels = findingsAboutRobot(analysis, robot).map(({ level }) => level);
  const states = [...mechanisms.map(({ state }) => state), ...levels.filter((level) => level !== "information")];
  return {
    name: robot.name,
    label: plainText(robot.name),
    ...saidOf(analysis, robot),
    at: robot.at,
    state: states.reduce(worse, "fine"),
    mechanisms,
  };
}

function sameRobot({ mechanisms: some, ...one }: RobotNode, { mechanisms: others, ...other }: RobotNode): boolean {
  return sameItems(some, others) && JSON.stringify(one) === JSON.stringify(other);
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
