/**
 * Proposals for a finding: the smallest changes that clear it, each proved by analysing the changed texts.
 *
 * Candidates are tried on rebuilt declarations first, which costs no parsing; only what helps there is written as edits and analysed
 * again. Computed when asked for, never on the typing path.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import { DEFINITIONS } from "../declarations/table.js";
import type { DefinitionCall } from "../evaluator/value.js";
import { solveMechanismRuns } from "../model/solve.js";
import { candidateGroups, type Group } from "../proposals/candidates.js";
import type { Change, Setting, Situation } from "../proposals/change.js";
import { COMMON_TOOTH_COUNTS } from "../proposals/stock.js";
import type { MechanismFacts } from "../rules/rule.js";
import { MECHANISM_RULES } from "../rules/table.js";
import { writeNumber, writeQuantity, writeShare } from "../units/write.js";
import type { Analyser } from "./analyser.js";
import type { AnalysedMechanism, Analysis, Finding } from "./analysis.js";
import { type Place, rebuild } from "./rebuild.js";
import { type Edit, editsFor, withEdits } from "./writeChange.js";

/** Results at the hardest position and over the travel; `null` where they do not apply. */
export interface Predicted {
  readonly ratio: number;
  readonly stallShare: number | null;
  readonly motorCurrentA: number;
  readonly timeS: number | null;
  readonly tripsAfterS: number | null;
  readonly windingPeakC: number | null;
}

export interface Proposal {
  readonly mechanism: string;
  readonly rule: Finding["rule"];
  /** One sentence: what is changed, what it gives instead of what is, what else it touches. */
  readonly summary: string;
  /** The same for a menu's line: without what is, which stands beside it. */
  readonly title: string;
  readonly predicted: Predicted;
  /** Other mechanisms whose numbers change with it. */
  readonly touches: readonly { readonly mechanism: string; readonly predicted: Predicted }[];
  /** Empty where nothing in stock clears the finding: the summary then tells the nearest miss. */
  readonly edits: readonly Edit[];
}

/** Candidates of one group that are solved, and of those that help, how many are tried as edits. */
const MOST_SOLVED = 24;
const MOST_WRITTEN = 3;

/** `analyse`: of an analyser of its own, so that the changed texts do not push the real ones out of its caches. */
export function proposalsFor(analysis: Analysis, finding: Finding, analyse: Analyser["analyse"]): Proposal[] {
  const mechanism = analysis.mechanisms.find((one) => one.name === finding.mechanism && one.at.file === finding.at.file);
  if (mechanism?.declared === undefined || mechanism.drive === undefined) return [];
  const rule = MECHANISM_RULES.find(({ id }) => id === finding.rule);
  const facts = { mechanism: mechanism.declared, drive: mechanism.drive, ...solveMechanismRuns(mechanism.drive) };
  const verdict = rule?.judge(facts);
  if (rule === undefined) return [];
  const toothCounts = analysis.toothCounts.get(mechanism.at.file) ?? COMMON_TOOTH_COUNTS;
  const situation: Situation = { ...facts, excess: verdict?.excess ?? 1, toothCounts };
  const search = { analysis, finding, mechanism, facts, analyse };
  const found: Proposal[] = [];
  let missed: Miss | undefined;
  for (const group of candidateGroups(finding.rule, situation)) {
    if (group.instead === true && found.length > 0) continue;
    const result = searchGroup(search, group);
    if ("edits" in result) found.push(result);
    else missed = nearer(missed, result.miss);
  }
  return found.length > 0 || missed === undefined ? found : [tellMiss(search, missed)];
}

interface Search {
  readonly analysis: Analysis;
  readonly finding: Finding;
  readonly mechanism: AnalysedMechanism;
  readonly facts: MechanismFacts;
  readonly analyse: Analyser["analyse"];
}

interface Miss {
  readonly change: Change;
  readonly facts: MechanismFacts;
  readonly excess: number;
}

function searchGroup(search: Search, { changes }: Group): Proposal | { readonly miss: Miss | undefined } {
  let miss: Miss | undefined;
  let written = 0;
  for (const change of changes.slice(0, MOST_SOLVED)) {
    const facts = factsWith(search, change);
    if (facts === undefined) continue;
    const excess = remainingExcess(search, facts);
    if (excess !== undefined) {
      miss = nearer(miss, { change, facts, excess });
      continue;
    }
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
  return { mechanism: changed, drive: changedDrive, ...solveMechanismRuns(changedDrive) };
}

/** `undefined` where the finding is gone and no other rule newly speaks at its level or above. */
function remainingExcess({ finding, facts: before }: Search, after: MechanismFacts): number | undefined {
  for (const rule of MECHANISM_RULES) {
    const verdict = rule.judge(after);
    if (verdict === undefined) continue;
    if (rule.id === finding.rule) return verdict.excess;
    // A stall hides how far past its peak the motor is: a way out of the one must not lead into the other.
    const comesOut = finding.rule === "stalls" && rule.id === "past-peak";
    const isNew = rule.judge(before) === undefined && rank(verdict.level ?? rule.level) >= rank(finding.level);
    if (comesOut || isNew) return Number.MAX_VALUE;
  }
  return undefined;
}

function rank(level: Finding["level"]): number {
  return ["information", "warning", "error"].indexOf(level);
}

/** Writes the change, analyses the texts, and takes it only if the finding is gone and nothing new came. */
function prove({ analysis, finding, mechanism, analyse }: Search, change: Change): Proposal | undefined {
  const edits = editsFor(mechanism.call, change, analysis.snapshot);
  if (edits === undefined) return undefined;
  const after = analyse([...analysis.files.keys()], withEdits(analysis.snapshot, edits));
  const known = new Set(analysis.findings.map(keyOf));
  const isWorse = after.findings.some(
    (one) => rank(one.level) >= rank(finding.level) && (!known.has(keyOf(one)) || keyOf(one) === keyOf(finding)),
  );
  const changed = after.mechanisms.find(({ name }) => name === mechanism.name);
  if (isWorse || changed?.numbers === undefined || mechanism.numbers === undefined) return undefined;
  const touches = after.mechanisms.flatMap((one) => {
    const before = analysis.mechanisms.find(({ name }) => name === one.name);
    if (one.name === mechanism.name || one.numbers === undefined || before?.numbers === undefined) return [];
    return JSON.stringify(one.numbers) === JSON.stringify(before.numbers) ? [] : [{ before, after: one, numbers: one.numbers }];
  });
  const [was, will] = [predict(mechanism.numbers), predict(changed.numbers)];
  const words = capital(change.words);
  const others = touches.map(({ before, numbers }) => tellTouched(before, predict(numbers)));
  const names = touches.map(({ before }) => before.name);
  return {
    mechanism: mechanism.name,
    rule: finding.rule,
    summary: `${words}: ${compare(was, will)}.${others.length === 0 ? "" : ` Also changes ${others.join(", ")}.`}`,
    title: `${words}: ${tellNew(was, will)}${names.length === 0 ? "" : `; also changes ${names.join(", ")}`}`,
    predicted: will,
    touches: touches.map(({ after: one, numbers }) => ({ mechanism: one.name, predicted: predict(numbers) })),
    edits,
  };
}

function keyOf({ rule, mechanism, at }: Finding): string {
  return JSON.stringify([rule, mechanism ?? at.file]);
}

function tellMiss({ mechanism, finding, facts }: Search, { change, facts: after }: Miss): Proposal {
  const [was, will] = [predict(facts.numbers), predict(after.numbers)];
  return {
    mechanism: mechanism.name,
    rule: finding.rule,
    summary: `Nothing in stock clears it. Nearest: ${change.words}: ${compare(was, will)}.`,
    title: `Nearest in stock: ${change.words}: ${tellNew(was, will)}`,
    predicted: will,
    touches: [],
    edits: [],
  };
}

function predict({ ratio, hardest, travel }: MechanismFacts["numbers"]): Predicted {
  return {
    ratio,
    stallShare: hardest.stallShare,
    motorCurrentA: hardest.motorCurrentA,
    timeS: travel?.timeS ?? null,
    tripsAfterS: travel?.tripsAfterS ?? null,
    windingPeakC: travel?.windingPeakC ?? null,
  };
}

const NO_CHANGE = "the numbers stay as they are";

/** The numbers that differ, new instead of old. */
function compare(was: Predicted, will: Predicted): string {
  const parts = differences(was, will).map(({ now, before }) => (before === undefined ? now : `${now} instead of ${before}`));
  return parts.length === 0 ? NO_CHANGE : parts.join(", ");
}

/** The numbers that differ, new. */
function tellNew(was: Predicted, will: Predicted): string {
  const parts = differences(was, will).map(({ now }) => now);
  return parts.length === 0 ? NO_CHANGE : parts.join(", ");
}

interface Difference {
  readonly now: string;
  readonly before: string | undefined;
}

function differences(was: Predicted, will: Predicted): Difference[] {
  const inAmpere = (value: number) => writeQuantity(value, "current");
  const inSeconds = (value: number) => writeQuantity(value, "time");
  return [
    ...differenceOf(was.ratio, will.ratio, writeNumber, (text) => `ratio ${text}`),
    ...differenceOf(was.stallShare, will.stallShare, writeShare, (text) => `${text} of stall`),
    ...differenceOf(was.motorCurrentA, will.motorCurrentA, inAmpere, (text) => `${text} per motor`),
    ...differenceOf(was.timeS, will.timeS, inSeconds, (text) => `travel ${text}`),
  ];
}

/** None where both read the same. */
function differenceOf(
  was: number | null,
  will: number | null,
  write: (value: number) => string,
  say: (text: string) => string,
): Difference[] {
  if (will === null) return [];
  const [before, now] = [was === null ? undefined : write(was), write(will)];
  return before === now ? [] : [{ now: say(now), before }];
}

function tellTouched({ name, numbers }: AnalysedMechanism, will: Predicted): string {
  const was = numbers?.hardest.stallShare ?? null;
  if (was === null || will.stallShare === null) return name;
  return `${name} (${writeShare(will.stallShare)} of stall instead of ${writeShare(was)})`;
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

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
