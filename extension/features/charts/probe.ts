/**
 * What would be at another torque, and which number in the code would bring the mechanism there: the ratio of one of its stages.
 *
 * The point is the model's; the change is tried on a copy of the texts, analysed the way that everything is. Writes nothing.
 */
import type { Analyser } from "../../analysis/analyser.js";
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { type Edit, editsFor, withEdits } from "../../analysis/writeChange.js";
import type { Stage } from "../../declarations/stages.js";
import { operatingPointAt } from "../../model/operatingPoint.js";
import { findingsAbout, type State, verdictOf } from "../verdict.js";
import { type ChartValues, chartValues } from "./point.js";

export interface Probe {
  readonly torqueNm: number;
  readonly point: ChartValues & { readonly stalls: boolean };
  /** Null where no number that is written carries it; `cannot` then says why. */
  readonly change: ProbeChange | null;
  readonly cannot: string | null;
}

/** The nearest that a written number can come to it, and what that leads to. */
export interface ProbeChange {
  /** Such as "stage 1 with 16 and 61 teeth". */
  readonly words: string;
  readonly ratio: number;
  /** At its hardest position. */
  readonly needed: ChartValues & { readonly torqueNm: number; readonly stallShare: number | null };
  readonly timeS: number | null;
  readonly state: State;
  readonly verdict: string;
  readonly findings: readonly string[];
  /** Other mechanisms whose numbers the same text changes. */
  readonly others: readonly string[];
}

export type Analyse = Analyser["analyse"];

/** `undefined` for an unknown name, or a mechanism without numbers. */
export function probeAt(analysis: Analysis, name: string, torqueNm: number, analyse: Analyse): Probe | undefined {
  const mechanism = analysis.mechanisms.find((one) => one.name === name && one.numbers !== undefined);
  const { drive } = mechanism ?? {};
  if (mechanism === undefined || drive === undefined) return undefined;
  const point = operatingPointAt(drive, torqueNm);
  const found = changeTo(analysis, mechanism, torqueNm);
  const told = typeof found === "string" ? found : tell(analysis, mechanism, found, analyse);
  return {
    torqueNm,
    point: { ...chartValues(point), stalls: point.stalled },
    change: typeof told === "string" ? null : told,
    cannot: typeof told === "string" ? told : null,
  };
}

/** The edits that write it; `undefined` where there is nothing to write. */
export function probeEdits(analysis: Analysis, name: string, torqueNm: number): readonly Edit[] | undefined {
  const mechanism = analysis.mechanisms.find((one) => one.name === name && one.numbers !== undefined);
  const found = mechanism === undefined ? undefined : changeTo(analysis, mechanism, torqueNm);
  return typeof found === "object" ? found.edits : undefined;
}

interface Found {
  readonly words: string;
  readonly edits: readonly Edit[];
}

interface Candidate {
  readonly stage: number;
  readonly argument: number;
  readonly value: number;
  readonly words: string;
  /** Ratio of the stage as it would be over the one that is wanted. */
  readonly miss: number;
}

const TOOTHED: ReadonlySet<Stage["kind"]> = new Set(["spur", "chain", "belt"]);
const FEWEST_TEETH = 8;
const MOST_TEETH = 200;
/** Digits of a plain ratio: more than a gearbox is made to. */
const RATIO_DIGITS = 3;

/** The ratio that needs this torque goes as one over it. In words why not, where none can be written. */
function changeTo(analysis: Analysis, mechanism: AnalysedMechanism, torqueNm: number): Found | string {
  const { declared, numbers, call } = mechanism;
  const now = numbers?.hardest.motorTorqueNm ?? 0;
  if (declared === undefined) return "A value of the declaration is missing.";
  if (!(now > 0)) return "The load asks for no torque, whatever the ratio.";
  if (!(torqueNm > 0)) return "No ratio takes all torque away.";
  if (declared.stages.length === 0) return "There is no stage whose ratio could change.";
  const factor = now / torqueNm;
  const stock = analysis.toothCounts.get(mechanism.at.file);
  const candidates = declared.stages.flatMap((stage, index) => candidatesOf(stage, index, factor, stock));
  const nearest = candidates.sort((one, other) => one.miss - other.miss);
  for (const { stage, argument, value, words } of nearest) {
    const edits = editsFor(call, { sets: [{ stage, argument, value }], words }, analysis.snapshot);
    if (edits !== undefined && edits.length > 0) return { words, edits };
  }
  return "No stage has a ratio that is written where it could be changed.";
}

function candidatesOf(
  { kind, ratio, given }: Stage,
  stage: number,
  factor: number,
  stock: readonly number[] | undefined,
): Candidate[] {
  const wanted = ratio * factor;
  if (kind === "reduction") {
    // A range is not written over: which end was meant is not known.
    const value = typeof given[0] === "number" ? Number(wanted.toPrecision(RATIO_DIGITS)) : 0;
    if (!(value > 0 && Number.isFinite(value)) || value === ratio) return [];
    return [{ stage, argument: 0, value, words: `stage ${stage + 1} with a ratio of ${value}`, miss: missOf(value, wanted) }];
  }
  const [driver, driven] = given;
  if (!TOOTHED.has(kind) || typeof driver !== "number" || typeof driven !== "number") return [];
  const words = (one: number, other: number): string => `stage ${stage + 1} with ${one} and ${other} teeth`;
  const behind = nearestTeeth(driver * wanted, stock);
  const before = nearestTeeth(driven / wanted, stock);
  return [
    ...(behind === driven
      ? []
      : [{ stage, argument: 1, value: behind, words: words(driver, behind), miss: missOf(behind / driver, wanted) }]),
    // A pinion is often shared: it is changed only where that comes clearly nearer.
    ...(before === driver
      ? []
      : [{ stage, argument: 0, value: before, words: words(before, driven), miss: missOf(driven / before, wanted) + SHARED }]),
  ];
}

const SHARED = 0.02;

function missOf(ratio: number, wanted: number): number {
  return Math.abs(Math.log(ratio / wanted));
}

function nearestTeeth(wanted: number, stock: readonly number[] | undefined): number {
  if (stock === undefined || stock.length === 0) return Math.min(Math.max(Math.round(wanted), FEWEST_TEETH), MOST_TEETH);
  return stock.reduce((best, teeth) => (Math.abs(Math.log(teeth / wanted)) < Math.abs(Math.log(best / wanted)) ? teeth : best));
}

function tell(analysis: Analysis, mechanism: AnalysedMechanism, { words, edits }: Found, analyse: Analyse): ProbeChange | string {
  const roots = rootsOf(analysis, mechanism, edits);
  const after = analyse(roots, withEdits(analysis.snapshot, edits), true);
  const changed = after.mechanisms.find(
    ({ name, call }) => name === mechanism.name && call.span.file === mechanism.call.span.file,
  );
  if (changed?.numbers === undefined) return "With the ratio that this asks for the mechanism cannot be computed.";
  const { hardest, travel, ratio } = changed.numbers;
  const { state, words: verdict } = verdictOf(after, changed);
  return {
    words,
    ratio,
    needed: {
      torqueNm: hardest.motorTorqueNm,
      speedRadPerS: hardest.motorSpeedRadPerS,
      currentA: hardest.motorCurrentA,
      shaftPowerW: hardest.shaftPowerW,
      efficiency: hardest.motorEfficiency,
      stallShare: hardest.stallShare,
    },
    timeS: travel?.timeS ?? null,
    state,
    verdict,
    findings: findingsAbout(after, changed)
      .filter(({ level }) => level !== "information")
      .map(({ message }) => message),
    others: othersChanged(analysis, after, mechanism),
  };
}

/** Everything, where a file is changed that others may read; else the mechanism's own file and those of the robots that supply it. */
function rootsOf(analysis: Analysis, mechanism: AnalysedMechanism, edits: readonly Edit[]): string[] {
  const { file } = mechanism.call.span;
  if (edits.some((edit) => edit.file !== file)) return [...analysis.files.keys()];
  const listing = analysis.robots.filter(
    ({ declared }) => mechanism.declared && declared?.mechanisms.includes(mechanism.declared),
  );
  return [...new Set([file, ...listing.map(({ call }) => call.span.file)])];
}

function othersChanged(before: Analysis, after: Analysis, { name: own }: AnalysedMechanism): string[] {
  return after.mechanisms.flatMap(({ name, numbers }) => {
    const was = before.mechanisms.find((one) => one.name === name);
    const isOther = name !== own && was?.numbers !== undefined && numbers !== undefined;
    return isOther && JSON.stringify(was.numbers) !== JSON.stringify(numbers) ? [name] : [];
  });
}
