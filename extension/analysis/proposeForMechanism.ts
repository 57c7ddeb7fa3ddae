/**
 * The search for what clears a mechanism's finding: candidates of `proposals/` on rebuilt declarations, which cost no parsing; only what
 * helps there is written as edits and analysed again.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import { DEFINITIONS } from "../declarations/table.js";
import type { DefinitionCall } from "../evaluator/value.js";
import { lazySolution } from "../model/lazySolution.js";
import { solveMechanismRuns } from "../model/solve.js";
import { candidateGroups, type Group } from "../proposals/candidates.js";
import type { Change, Setting, Situation } from "../proposals/change.js";
import { COMMON_TOOTH_COUNTS } from "../proposals/stock.js";
import type { MechanismFacts } from "../rules/rule.js";
import { MECHANISM_RULES } from "../rules/table.js";
import type { Analyser } from "./analyser.js";
import type { AnalysedMechanism, Analysis, Finding } from "./analysis.js";
import { differencesOf, predict, tellBriefly, tellDifferences } from "./predict.js";
import type { Proposal } from "./proposal.js";
import type { Tally } from "./propose.js";
import { changedBy, hasNumbers, provenBy } from "./proveChange.js";
import { rankOf } from "./rank.js";
import { type Place, rebuild } from "./rebuild.js";
import { createRobotCheck, type RobotCheck } from "./robotsStayGood.js";
import { editsFor } from "./writeChange.js";

export interface MechanismQuestion {
  readonly analysis: Analysis;
  readonly finding: Finding;
  readonly analyse: Analyser["analyse"];
  readonly tally: Tally;
}

interface Search extends MechanismQuestion {
  readonly mechanism: AnalysedMechanism;
  readonly facts: MechanismFacts;
  readonly robotCheck: RobotCheck;
}

/** Candidates of one group that are solved, and of those that help, how many are tried as edits. */
const MOST_SOLVED = 24;
const MOST_WRITTEN = 3;

export function* proposeForMechanism(question: MechanismQuestion): Generator<undefined, Proposal[]> {
  const { analysis, finding } = question;
  const mechanism = analysis.mechanisms.find((one) => one.name === finding.mechanism && one.at.file === finding.at.file);
  const rule = MECHANISM_RULES.find(({ id }) => id === finding.rule);
  if (mechanism?.declared === undefined || mechanism.drive === undefined || rule === undefined) return [];
  const facts = { mechanism: mechanism.declared, drive: mechanism.drive, ...solveMechanismRuns(mechanism.drive) };
  const toothCounts = analysis.toothCounts.get(mechanism.at.file) ?? COMMON_TOOTH_COUNTS;
  const situation: Situation = { ...facts, excess: rule.judge(facts)?.excess ?? 1, toothCounts };
  const search = { ...question, mechanism, facts, robotCheck: createRobotCheck() };
  const found: Proposal[] = [];
  let missed: Miss | undefined;
  for (const group of candidateGroups(finding.rule, situation)) {
    if (group.instead === true && found.length > 0) continue;
    const result = yield* searchGroup(search, group);
    if ("edits" in result) found.push(result);
    else missed = nearer(missed, result.miss);
  }
  return found.length > 0 || missed === undefined ? found : [tellMiss(search, missed)];
}

interface Miss {
  readonly change: Change;
  readonly facts: MechanismFacts;
  readonly excess: number;
}

function* searchGroup(search: Search, { changes }: Group): Generator<undefined, Proposal | { readonly miss: Miss | undefined }> {
  let miss: Miss | undefined;
  let written = 0;
  for (const change of changes.slice(0, MOST_SOLVED)) {
    yield;
    const facts = factsWith(search, change);
    if (facts === undefined) continue;
    search.tally.solved += 1;
    const excess = remainingExcess(search, facts);
    if (excess !== undefined) {
      miss = nearer(miss, { change, facts, excess });
      continue;
    }
    yield;
    const proposal = prove(search, change);
    if (proposal !== undefined) return proposal;
    written += 1;
    if (written >= MOST_WRITTEN) break;
  }
  return { miss };
}

function nearer(one: Miss | undefined, other: Miss | undefined): Miss | undefined {
  if (one === undefined || other === undefined) return one ?? other;
  return other.excess < one.excess ? other : one;
}

/** The mechanism as it would be, on the supply that it has. */
function factsWith({ mechanism: { call, drive, declared } }: Search, change: Change): MechanismFacts | undefined {
  const changed = rebuild(call, new Map(change.sets.flatMap((setting) => placeOf(call, setting)))) as Mechanism | undefined;
  if (changed === undefined || drive === undefined) return undefined;
  const lent = declared?.si.supply === undefined && drive.supply !== undefined ? { supply: drive.supply } : {};
  const changedDrive = { ...changed.si, ...lent };
  return lazyFacts(changed, changedDrive);
}

/** Most candidates are dropped by one number: the others are then never worked out. */
function lazyFacts(mechanism: Mechanism, drive: MechanismFacts["drive"]): MechanismFacts {
  const solution = lazySolution(drive);
  return {
    mechanism,
    drive,
    numbers: solution.numbers,
    get travel() {
      return solution.travel;
    },
    get hold() {
      return solution.hold;
    },
    get stall() {
      return solution.stall;
    },
    get turning() {
      return solution.turning;
    },
    get repeats() {
      return solution.repeats;
    },
  };
}

/** `undefined` where the finding is gone and no other rule newly speaks at its level or above. */
function remainingExcess({ finding, facts: before }: Search, after: MechanismFacts): number | undefined {
  const own = MECHANISM_RULES.find(({ id }) => id === finding.rule)?.judge(after);
  if (own !== undefined) return own.excess;
  for (const rule of MECHANISM_RULES) {
    const verdict = rule.judge(after);
    if (verdict === undefined) continue;
    // A stall hides how far past its peak the motor is: a way out of the one must not lead into the other.
    const comesOut = finding.rule === "stalls" && rule.id === "past-peak";
    const isNew = rule.judge(before) === undefined && rankOf(verdict.level ?? rule.level) >= rankOf(finding.level);
    if (comesOut || isNew) return Number.MAX_VALUE;
  }
  return undefined;
}

/** Writes the change, analyses the texts, and takes it only if that proves it. */
function prove({ analysis, finding, mechanism, analyse, robotCheck }: Search, change: Change): Proposal | undefined {
  const edits = editsFor(mechanism.call, change, analysis.snapshot);
  const after = edits && provenBy(analysis, finding, edits, { analyse, robotCheck });
  const changed = after?.mechanisms.find(({ name }) => name === mechanism.name);
  if (edits === undefined || after === undefined || changed === undefined || !hasNumbers(changed) || !hasNumbers(mechanism))
    return undefined;
  const touches = changedBy(analysis, after, finding);
  const will = predict(changed.numbers, changed.drive);
  const differences = differencesOf(predict(mechanism.numbers, mechanism.drive), will, finding.rule);
  const words = capital(change.words);
  const names = touches.map(({ brief }) => brief);
  return {
    finding,
    mechanism: mechanism.name,
    robot: null,
    rule: finding.rule,
    summary: `${tellDifferences(words, differences)}${touches.length === 0 ? "" : ` Also changes ${touches.map(({ told }) => told).join(", ")}.`}`,
    title: `${tellBriefly(words, differences)}${names.length === 0 ? "" : `; also changes ${names.join(", ")}`}`,
    predicted: will,
    touches: touches.map(({ mechanism: touched, predicted }) => ({ mechanism: touched, predicted })),
    edits,
  };
}

function tellMiss({ mechanism, finding, facts }: Search, { change, facts: after }: Miss): Proposal {
  const will = predict(after.numbers, after.drive);
  const differences = differencesOf(predict(facts.numbers, facts.drive), will, finding.rule);
  return {
    finding,
    mechanism: mechanism.name,
    robot: null,
    rule: finding.rule,
    summary: `Nothing in stock clears it. Nearest: ${tellDifferences(change.words, differences)}`,
    title: `Nothing in stock clears it; nearest: ${tellBriefly(change.words, differences)}`,
    predicted: will,
    touches: [],
    edits: [],
  };
}

function placeOf(call: DefinitionCall, setting: Setting): (readonly [Place, unknown])[] {
  if ("addSpur" in setting) {
    const stage = DEFINITIONS.get("spur")?.check(setting.addSpur).built;
    return [[{ call, path: [1, "stages", "+"] }, stage]];
  }
  if ("field" in setting) return [[{ call, path: [1, setting.field] }, setting.value]];
  const stages = call.args[1];
  const list = stages?.known && stages.data.kind === "object" ? stages.data.entries.get("stages") : undefined;
  const stage = list?.known && list.data.kind === "array" ? list.data.items[setting.stage] : undefined;
  return stage?.known && stage.data.kind === "built"
    ? [[{ call: stage.data.call, path: [setting.argument] }, setting.value]]
    : [];
}

export function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
