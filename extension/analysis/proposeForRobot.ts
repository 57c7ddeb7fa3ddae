/**
 * The search for what clears a finding about a whole robot: steps of its load cycle staggered, one mechanism's current limited, a rest.
 *
 * Candidates are run on what the model was told; only what helps there is written as edits and proved by analysing the changed texts.
 */
import { limitLadder, restLadder, type Way, waysFor } from "../proposals/robotCandidates.js";
import type { RobotSetting } from "../proposals/robotChange.js";
import { shifts, staggers } from "../proposals/staggers.js";
import type { Analyser } from "./analyser.js";
import type { AnalysedRobot, Analysis, Finding } from "./analysis.js";
import { tellBriefly, tellDifferences } from "./predict.js";
import { predictRobot, robotDifferences, tellSettings } from "./predictRobot.js";
import type { Proposal } from "./proposal.js";
import type { Tally } from "./propose.js";
import { changedBy, provenBy } from "./proveChange.js";
import { robotDriveOf } from "./robotDriveOf.js";
import { missesOf, protectorOf, type RobotCase, robotCaseOf, type Tried, troubleIn, tryChange } from "./robotFacts.js";
import { createRobotCheck } from "./robotsStayGood.js";
import { type Edit, editsFor } from "./writeChange.js";
import { editsForSteps } from "./writeSteps.js";

export interface RobotQuestion {
  readonly analysis: Analysis;
  readonly finding: Finding;
  readonly robot: { readonly name: string };
  readonly analyse: Analyser["analyse"];
  readonly tally: Tally;
}

interface Search extends RobotQuestion {
  readonly analysed: AnalysedRobot;
  readonly one: RobotCase;
  readonly before: Tried;
  readonly misses: number;
  /** The nearest of what does not help. */
  miss: Tried | undefined;
}

type Trying<Result> = Generator<undefined, Result>;

/** Steps that may be taken apart at once. */
const MOST_STAGGERED = 4;
/** Mechanisms whose current is limited, each alone. */
const MOST_LIMITED = 3;
/** For a sag, which the cold windings of the first cycles make deepest. */
const CYCLES_FOR_SAGS = 2;

export function* proposeForRobot(question: RobotQuestion): Trying<Proposal[]> {
  const { analysis, finding, robot } = question;
  const analysed = analysis.robots.find((one) => one.name === robot.name && one.at.file === finding.at.file);
  const model = analysed?.declared && robotDriveOf(analysed.declared).model;
  const solution = analysed?.solution;
  if (analysed === undefined || solution === undefined || model === null || model === undefined) return [];
  const one = robotCaseOf(analysis, model, finding);
  const before = { sets: [], drive: model.drive, solution, clears: false, distance: Number.POSITIVE_INFINITY };
  const search: Search = { ...question, analysed, one, before, misses: missesOf(solution), miss: undefined };
  const shared = protectorOf(model, one.subject, solution)?.mechanism === null || finding.rule === "sags";
  const found: Proposal[] = [];
  for (const way of waysFor(finding.rule, one.subject, shared)) {
    for (const tried of yield* alongWay(search, way)) {
      yield;
      const proposal = prove(search, tried);
      if (proposal !== undefined) found.push(proposal);
    }
  }
  return found.length === 0 && search.miss !== undefined ? [tellMiss(search, search.miss)] : found;
}

function* alongWay(search: Search, way: Way): Trying<readonly Tried[]> {
  const { drive } = search.before;
  switch (way) {
    case "stagger":
      return yield* staggered(search);
    case "shift":
      return yield* firstThatClears(search, shiftsOf(search));
    case "limit":
      return yield* limited(search);
    case "rest":
      return yield* smallestOf(search, restLadder(drive));
    case "cycles": {
      const { cyclesDone } = search.before.solution.numbers;
      return cyclesDone > 0 ? yield* firstThatClears(search, [{ kind: "cycles", cycles: cyclesDone }]) : [];
    }
  }
}

function* attempt(search: Search, sets: readonly RobotSetting[]): Trying<Tried> {
  yield;
  search.tally.solved += 1;
  const tried = tryChange(search.one, sets, search.misses, cyclesFor(search));
  if (!tried.clears && (search.miss === undefined || tried.distance < search.miss.distance)) search.miss = tried;
  return tried;
}

/** What opens in a late cycle needs that cycle; the proof runs all of them anyhow. */
function cyclesFor({ finding, one, before }: Search): number {
  if (finding.rule === "sags" && one.subject !== "charge") return CYCLES_FOR_SAGS;
  const first = protectorOf(one.model, one.subject, before.solution)?.openings[0];
  return finding.rule === "trips" && first !== undefined ? 2 * first.cycle + 3 : Number.POSITIVE_INFINITY;
}

/** Takes mechanisms out of the step in trouble, one after the other, until the finding is gone. */
function* staggered(search: Search): Trying<readonly Tried[]> {
  const { one, before } = search;
  let last: Tried = before;
  for (let round = 0; round < MOST_STAGGERED; round++) {
    const trouble = troubleIn(one, last);
    if (trouble === undefined) return [];
    const taken = last.sets.flatMap((set) => (set.kind === "stagger" && set.step === trouble.step ? [set.mechanism] : []));
    let best: Tried | undefined;
    for (const option of staggers(before, trouble.step, trouble.movers, taken)) {
      const tried = yield* attempt(search, [...last.sets, option]);
      if (tried.clears) return [tried];
      if (best === undefined || tried.distance < best.distance) best = tried;
    }
    if (best === undefined) return [];
    last = best;
  }
  return [];
}

function shiftsOf({ one, before }: Search): RobotSetting[] {
  const trouble = troubleIn(one, before);
  return trouble === undefined ? [] : shifts(before, trouble.step, trouble.movers);
}

function* firstThatClears(search: Search, settings: readonly RobotSetting[]): Trying<readonly Tried[]> {
  for (const setting of settings) {
    const tried = yield* attempt(search, [setting]);
    if (tried.clears) return [tried];
  }
  return [];
}

function* limited(search: Search): Trying<readonly Tried[]> {
  const { one, before } = search;
  const found: Tried[] = [];
  for (const mechanism of whoDraws(search).slice(0, MOST_LIMITED)) {
    const analysed = one.mechanisms[mechanism];
    if (analysed?.numbers === undefined || before.drive.mechanisms[mechanism] === undefined) continue;
    found.push(...(yield* smallestOf(search, limitLadder(mechanism, analysed.numbers.stall.motorCurrentA))));
  }
  return found;
}

/** Mechanisms that have to do with it, the greatest draw first. */
function whoDraws({ one, before }: Search): readonly number[] {
  const { model, subject } = one;
  const trouble = troubleIn(one, before)?.movers ?? [];
  const own = protectorOf(model, subject, before.solution)?.mechanism;
  const hot = model.mechanisms.findIndex(({ name }) => subject === `winding of ${name}`);
  const others = own === null || own === undefined ? (hot < 0 ? [] : [hot]) : [own];
  return [...new Set([...trouble, ...others])];
}

/** Of ever greater changes the first that helps, by halving: a greater one helps no less. */
function* smallestOf(search: Search, ladder: readonly RobotSetting[]): Trying<readonly Tried[]> {
  let [low, high] = [0, ladder.length];
  let best: Tried | undefined;
  while (low < high) {
    const middle = Math.floor((low + high) / 2);
    const setting = ladder[middle];
    if (setting === undefined) break;
    const tried = yield* attempt(search, [setting]);
    // A limit so low that something no longer arrives is too great a change, not too small a one.
    if (tried.clears) best = tried;
    if (tried.clears || missesOf(tried.solution) > search.misses) high = middle;
    else low = middle + 1;
  }
  return best === undefined ? [] : [best];
}

function prove(search: Search, tried: Tried): Proposal | undefined {
  const { analysis, analyse, finding, analysed, one } = search;
  const edits = editsOf(search, tried.sets);
  const after = edits && provenBy(analysis, finding, edits, { analyse, robotCheck: createRobotCheck() });
  const changed = after?.robots.find((robot) => robot.name === analysed.name);
  const { solution, drive } = changed ?? {};
  if (after === undefined || edits === undefined || solution === undefined || drive === undefined) return undefined;
  if (missesOf(solution) > search.misses) return undefined;
  const touches = changedBy(analysis, after, finding);
  const [was, will] = [predictRobot(one, search.before), predictRobot(one, { solution, drive })];
  const differences = robotDifferences(was, will, finding.rule);
  const words = tellSettings(one, tried.sets);
  // Whose current is limited is named already.
  const limitedNames = tried.sets.flatMap((set) => (set.kind === "limit" ? [one.model.mechanisms[set.mechanism]?.name] : []));
  const others = touches.filter(({ mechanism, told }) => !limitedNames.includes(mechanism) || told !== mechanism);
  const names = touches.flatMap(({ mechanism, brief }) => (limitedNames.includes(mechanism) ? [] : [brief]));
  return {
    finding,
    mechanism: null,
    robot: analysed.name,
    rule: finding.rule,
    summary: `${tellDifferences(words, differences)}${others.length === 0 ? "" : ` Also changes ${others.map(({ told }) => told).join(", ")}.`}`,
    title: `${tellBriefly(words, differences)}${names.length === 0 ? "" : `; also changes ${names.join(", ")}`}`,
    predicted: will,
    touches: touches.map(({ mechanism, predicted }) => ({ mechanism, predicted })),
    edits,
  };
}

function editsOf({ analysis, analysed, one }: Search, sets: readonly RobotSetting[]): Edit[] | undefined {
  const { drive, mechanisms } = one.model;
  const inSteps = editsForSteps(analysed.call, drive, mechanisms, sets, analysis.snapshot);
  if (inSteps === undefined) return undefined;
  const inMechanisms: Edit[] = [];
  for (const set of sets) {
    if (set.kind !== "limit") continue;
    const call = one.mechanisms[set.mechanism]?.call;
    const change = { sets: [{ field: "motorCurrentLimit" as const, value: `${set.currentA} A` }], words: "" };
    const edits = call && editsFor(call, change, analysis.snapshot);
    if (edits === undefined) return undefined;
    inMechanisms.push(...edits);
  }
  return [...inSteps, ...inMechanisms];
}

function tellMiss({ finding, analysed, one, before }: Search, { sets }: Tried): Proposal {
  // The search may have run a few cycles only.
  const nearest = tryChange(one, sets, Number.POSITIVE_INFINITY);
  const will = predictRobot(one, nearest);
  const differences = robotDifferences(predictRobot(one, before), will, finding.rule);
  const words = tellSettings(one, sets);
  return {
    finding,
    mechanism: null,
    robot: analysed.name,
    rule: finding.rule,
    summary: `No change of the load cycle or of one current clears it. Nearest: ${tellDifferences(words, differences)}`,
    title: `Nothing clears it; nearest: ${tellBriefly(words, differences)}`,
    predicted: will,
    touches: [],
    edits: [],
  };
}
