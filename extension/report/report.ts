/**
 * The report: the stable, versioned form of an analysis for other programs.
 *
 * SI throughout; no absolute paths, no timestamps; the same analysis gives the same bytes. Numbers carry ten significant digits, so
 * that the last bit of a platform's arithmetic never shows.
 */
import type { AnalysedMechanism, AnalysedRobot, Analysis, Finding } from "../analysis/analysis.js";
import type { Proposal } from "../analysis/proposal.js";
import type { Sensitivity } from "../analysis/sensitivity.js";
import type { Spread } from "../analysis/spread.js";
import { createLineFinder, type Place } from "./lines.js";

export interface Report {
  readonly format: "loadmark-report";
  readonly version: 1;
  readonly mechanisms: readonly ReportedMechanism[];
  readonly robots: readonly ReportedRobot[];
  readonly findings: readonly ReportedFinding[];
  readonly proposals: readonly ReportedProposal[];
}

/** `edits` is empty where nothing in stock helps; the summary then tells the nearest miss. */
export interface ReportedProposal {
  /** One of the two is null: a finding is about a mechanism or about a robot. */
  readonly mechanism: string | null;
  readonly robot: string | null;
  readonly rule: string;
  readonly summary: string;
  readonly predicted: Proposal["predicted"];
  /** Other mechanisms whose numbers change with it. */
  readonly touches: Proposal["touches"];
  readonly edits: readonly (ReportedRange & { readonly newText: string })[];
}

export interface ReportedRange {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly endLine: number;
  readonly endColumn: number;
}

export interface ReportedFinding extends ReportedRange {
  readonly rule: string;
  readonly level: string;
  readonly mechanism: string | null;
  readonly message: string;
  readonly related: readonly (ReportedRange & { readonly message: string })[];
}

type Numbers = NonNullable<AnalysedMechanism["numbers"]>;
type NumbersOrNull = { readonly [Group in keyof Numbers]: Numbers[Group] | null };

export interface ReportedMechanism extends NumbersOrNull {
  readonly name: string;
  readonly file: string;
  readonly line: number;
  /** Four digits: differences of solved numbers carry no more. */
  readonly sensitivity: readonly Sensitivity[];
  /** Only where a tolerance or a range is declared. */
  readonly spread?: Spread;
  readonly assumed: readonly string[];
  readonly notChecked: readonly string[];
}

type RobotNumbers = NonNullable<AnalysedRobot["numbers"]>;

/** null without a load cycle, or where it could not be run. */
export type ReportedRobot = { readonly name: string } & { readonly [Field in keyof RobotNumbers]: RobotNumbers[Field] | null };

/** What is computed only when it is asked for. */
export interface Extras {
  sensitivityOf(mechanism: AnalysedMechanism): readonly Sensitivity[];
  spreadOf(mechanism: AnalysedMechanism): Spread | undefined;
  readonly proposals: readonly Proposal[];
}

/** `nameOf` turns a file of the snapshot into the name that the report carries. */
export function makeReport(
  analysis: Analysis,
  nameOf: (file: string) => string,
  { sensitivityOf, spreadOf, proposals }: Extras,
): Report {
  const places = createPlaces(analysis);
  return {
    format: "loadmark-report",
    version: 1,
    mechanisms: analysis.mechanisms.map((mechanism) => ({
      name: mechanism.name,
      file: nameOf(mechanism.at.file),
      line: places.placeOf(mechanism.at.file, mechanism.at.start).line,
      ...(mechanism.numbers === undefined ? NO_NUMBERS : roundNumbers(mechanism.numbers)),
      sensitivity: sensitivityOf(mechanism).map((one) => ({
        ...one,
        perCentPerPerCent: Number(one.perCentPerPerCent.toPrecision(4)),
      })),
      ...reportSpread(spreadOf(mechanism)),
      assumed: mechanism.assumed,
      notChecked: mechanism.notChecked,
    })),
    robots: analysis.robots.map(({ name, numbers }) => ({
      name,
      ...(numbers === undefined ? NO_ROBOT_NUMBERS : roundNumbers(numbers)),
    })),
    findings: reportFindings(analysis, nameOf),
    proposals: proposals.map(({ mechanism, robot, rule, summary, predicted, touches, edits }) => ({
      mechanism,
      robot,
      rule,
      summary,
      predicted: roundNumbers(predicted),
      touches: touches.map((one) => ({ mechanism: one.mechanism, predicted: roundNumbers(one.predicted) })),
      edits: edits.map((edit) => ({ ...rangeOf(places, nameOf, edit), newText: edit.newText })),
    })),
  };
}

function reportSpread(spread: Spread | undefined): { readonly spread?: Spread } {
  return spread === undefined ? {} : { spread: roundNumbers(spread) };
}

/** The findings alone, for reports that show no tables of numbers. */
export function reportFindings(analysis: Analysis, nameOf: (file: string) => string): ReportedFinding[] {
  const places = createPlaces(analysis);
  return analysis.findings.map(({ rule, level, mechanism, message, at, related }) => ({
    rule,
    level,
    mechanism,
    message,
    ...rangeOf(places, nameOf, at),
    related: related.map((one) => ({ message: one.message, ...rangeOf(places, nameOf, one.at) })),
  }));
}

interface Places {
  placeOf(file: string, offset: number): Place;
}

/** Finds lines and columns in the files of an analysis; each file's lines are found once. */
function createPlaces({ snapshot }: Analysis): Places {
  const finders = new Map<string, (offset: number) => Place>();
  return {
    placeOf(file, offset) {
      const finder = finders.get(file) ?? createLineFinder(snapshot.read(file) ?? "");
      finders.set(file, finder);
      return finder(offset);
    },
  };
}

function rangeOf(places: Places, nameOf: (file: string) => string, { file, start, end }: Finding["at"]): ReportedRange {
  const from = places.placeOf(file, start);
  const to = places.placeOf(file, end);
  return { file: nameOf(file), line: from.line, column: from.column, endLine: to.line, endColumn: to.column };
}

const NO_NUMBERS: NumbersOrNull = {
  ratio: null,
  stageEfficiency: null,
  available: null,
  hardest: null,
  travel: null,
  hold: null,
  stall: null,
  feedforward: null,
};

const NO_ROBOT_NUMBERS = {
  lowestVoltageV: null,
  lowestVoltageAtS: null,
  peakCurrentA: null,
  sourceEnergyJ: null,
  chargeUsedAh: null,
  cyclesDone: null,
};

function roundNumbers<T>(value: T): T {
  if (typeof value === "number") return (Number.isFinite(value) ? Number(value.toPrecision(10)) : null) as T;
  if (Array.isArray(value)) return value.map(roundNumbers) as T;
  if (typeof value === "object" && value !== null) {
    return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, roundNumbers(inner)])) as T;
  }
  return value;
}
