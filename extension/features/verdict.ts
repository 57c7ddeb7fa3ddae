/**
 * One mechanism's verdict in a few words, from its findings and its numbers: what hovers, lenses, the tree and the status say alike.
 *
 * Judges nothing itself.
 */
import type { AnalysedMechanism, AnalysedRobot, Analysis, Finding } from "../analysis/analysis.js";
import type { Level, RuleId } from "../rules/rule.js";
import { writeShare } from "../units/write.js";

/** `fine`: computed, nothing at warning or error. `unknown`: the physics could not be run. */
export type State = Exclude<Level, "information"> | "fine" | "unknown";

export interface Verdict {
  readonly state: State;
  /** A few words, such as "Past its peak of power". */
  readonly words: string;
  /** "58 % of stall"; absent where there are no numbers. */
  readonly share?: string;
  /** Notes of level information, a few words each. */
  readonly notes: readonly string[];
}

const WORDS: Readonly<Record<RuleId, string>> = {
  stalls: "Stalls",
  "cannot-hold": "Cannot hold its load",
  "beyond-speed": "Cannot reach its speed",
  "past-peak": "Past its peak of power",
  trips: "Trips its protection",
  unprotected: "Unprotected when stalled",
  overheats: "Overheats",
  overloads: "Overloaded",
  sags: "Pulls the supply too low",
  late: "Late",
  slips: "Wheels slip before it stalls",
  backdrives: "May run back when power is off",
  "no-headroom": "Little speed in hand",
  "sheet-contradicts": "The motor's sheet contradicts itself",
  "not-constant": "A value is not constant",
  "bad-declaration": "Declaration not accepted",
};

const RANK: Readonly<Record<Level, number>> = { error: 0, warning: 1, information: 2 };

/** A rule in a few words: what is said where it is broken. */
export function ruleWords(rule: RuleId): string {
  return WORDS[rule];
}

/** Findings about one mechanism, worst first. */
export function findingsAbout(analysis: Analysis, mechanism: AnalysedMechanism): readonly Finding[] {
  const found = analysis.inFile.get(mechanism.call.span.file)?.findings ?? analysis.findings;
  return found
    .filter((finding) => finding.mechanism === mechanism.name && belongs(finding, mechanism))
    .toSorted((one, other) => RANK[one.level] - RANK[other.level]);
}

export function verdictOf(analysis: Analysis, mechanism: AnalysedMechanism): Verdict {
  const findings = findingsAbout(analysis, mechanism);
  const notes = [...new Set(findings.filter(({ level }) => level === "information").map(({ rule }) => WORDS[rule]))];
  const worst = findings.find(({ level }) => level !== "information");
  const share = writeStallShare(mechanism);
  const rest = { notes, ...(share === undefined ? {} : { share }) };
  if (worst !== undefined && worst.level !== "information") return { state: worst.level, words: WORDS[worst.rule], ...rest };
  if (mechanism.numbers === undefined) return { state: "unknown", words: "Not checked", ...rest };
  return { state: "fine", words: "Fine", ...rest };
}

/** Findings about a robot as a whole, worst first. */
export function findingsAboutRobot({ findingsIn }: Analysis, { at, call: { span } }: AnalysedRobot): readonly Finding[] {
  const places = [span, at];
  const isHere = ({ at: here }: Finding): boolean =>
    places.some(({ file, start, end }) => file === here.file && start <= here.start && here.end <= end);
  // In the analysis's order, which is that of the files' names.
  const files = [...new Set(places.map(({ file }) => file))].sort();
  return files
    .flatMap((file) => findingsIn.get(file) ?? [])
    .filter((finding) => finding.mechanism === null && isHere(finding))
    .toSorted((one, other) => RANK[one.level] - RANK[other.level]);
}

/** A robot's verdict as a whole; its mechanisms have their own. */
export function robotVerdictOf(analysis: Analysis, robot: AnalysedRobot): Pick<Verdict, "state" | "words"> {
  const worst = findingsAboutRobot(analysis, robot).find(({ level }) => level !== "information");
  if (worst !== undefined && worst.level !== "information") return { state: worst.level, words: WORDS[worst.rule] };
  return robot.numbers === undefined ? { state: "unknown", words: "Not checked" } : { state: "fine", words: "Fine" };
}

/** The worse of two states. */
export function worse(one: State, other: State): State {
  return ORDER.indexOf(one) <= ORDER.indexOf(other) ? one : other;
}

const ORDER: readonly State[] = ["error", "warning", "unknown", "fine"];

function writeStallShare({ numbers }: AnalysedMechanism): string | undefined {
  const share = numbers?.hardest.stallShare;
  return share === undefined || share === null ? undefined : `${writeShare(share)} of stall`;
}

/** Two mechanisms may share a name by mistake; a finding then belongs to the one in whose declaration it sits. */
function belongs({ at }: Finding, { at: binding, call }: AnalysedMechanism): boolean {
  if (at.file !== call.span.file) return true;
  const places = [call.span, binding, ...call.leadingComments.map(({ span }) => span)];
  return places.some(({ start, end }) => start <= at.start && at.end <= end);
}
