/** A mechanism: whether its motors cope, what is needed against what is available, and what that rests on. */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { sensitivitiesOf } from "../../analysis/sensitivity.js";
import { spreadOf } from "../../analysis/spread.js";
import { exactRatio } from "../../declarations/exactRatio.js";
import type { DefinitionCall, Span } from "../../evaluator/value.js";
import { bestEfficiencyPoint, greatestPowerPoint } from "../../model/bestPoints.js";
import type { Drive } from "../../model/drive.js";
import type { MechanismNumbers } from "../../model/numbers.js";
import { tellFeedforward } from "../../report/feedforwardWords.js";
import { tellSpread } from "../../report/spreadWords.js";
import { writeIn, writeNumber, writeQuantity, writeShare } from "../../units/write.js";
import { callsWithin } from "../feeds.js";
import { inertMarkdown } from "../inertText.js";
import { inputWords } from "../inputWords.js";
import { chartLink, ratioMapLink, revealLink } from "../links.js";
import { positionWords } from "../positionWords.js";
import { outputShaftOf } from "../shaft.js";
import { type Committed, sinceCommitLine } from "../sinceCommit.js";
import { findingsAbout, verdictOf, worse } from "../verdict.js";
import { type Table, writeBlock } from "./block.js";
import { runLines } from "./runLines.js";
import { sentences } from "./sentences.js";

/** One piece of text may declare several mechanisms: the worst is described, the others named. */
export function describeMechanisms(
  analysis: Analysis,
  mechanisms: readonly AnalysedMechanism[],
  committed: Committed,
): string | undefined {
  const states = mechanisms.map((one) => verdictOf(analysis, one).state);
  const mechanism = mechanisms[states.indexOf(states.reduce(worse, "fine"))];
  if (mechanism === undefined) return undefined;
  const others = mechanisms.filter((one) => one !== mechanism).map(({ name }) => inertMarkdown(name));
  const shared =
    others.length === 0
      ? []
      : [`Declared by the same text: ${others.slice(0, 5).join(", ")}${others.length > 5 ? " and more" : ""}.`];
  return describeMechanism(analysis, mechanism, shared, sinceCommitLine(committed, mechanism));
}

function describeMechanism(
  analysis: Analysis,
  mechanism: AnalysedMechanism,
  shared: readonly string[],
  sinceCommit: string | undefined,
): string {
  const verdict = verdictOf(analysis, mechanism);
  const { drive } = mechanism;
  const { numbers } = mechanism;
  const name = inertMarkdown(mechanism.name);
  if (numbers === undefined || drive === undefined) {
    const why = sentences("Nothing is checked", whyUnknown(analysis, mechanism));
    return writeBlock({ verdict: `${verdict.words}: ${name}`, notes: [...why, ...shared], links: linksOf(mechanism) });
  }
  const assumptions = [...sentences("Assumed", mechanism.assumed), ...sentences("Not checked", mechanism.notChecked)];
  return writeBlock({
    verdict: `${verdict.words}: ${[verdict.share, ...verdict.notes].filter((part) => part !== undefined).join(" · ")}`,
    lines: [
      `${name} · ${motorsOf(drive)} · ${ratioOf(mechanism)} · ${whereOf(drive, mechanism)}`,
      ...outputOf(mechanism),
      ...(sinceCommit === undefined ? [] : [sinceCommit]),
    ],
    table: tableOf(drive, numbers),
    notes: [
      ...runLines(drive, numbers),
      ...hotLine(numbers),
      `Feedforward, ${tellFeedforward(numbers.feedforward)}`,
      ...spreadLine(analysis, mechanism),
      ...assumptions,
      ...shared,
      ...mostBy(analysis, mechanism),
    ],
    links: [chartLink(mechanism.name), ratioMapLink(mechanism.name), ...linksOf(mechanism)],
  });
}

/** Its own findings, or those of what it is made of, or what the analysis says. */
function whyUnknown(analysis: Analysis, mechanism: AnalysedMechanism): readonly string[] {
  const own = findingsAbout(analysis, mechanism).map(({ message }) => message);
  if (own.length > 0) return own;
  const parts = callsWithin(mechanism.call).concat(mechanism.call.waitsFor);
  const isInPart = ({ file, start, end }: Span): boolean =>
    parts.some(({ span, binding }) => file === span.file && (binding?.span ?? span).start <= start && end <= span.end);
  const theirs = analysis.findings
    .filter(({ at, level }) => level !== "information" && isInPart(at))
    .map(({ message }) => message);
  return theirs.length > 0 ? theirs : mechanism.notChecked;
}

/** With the fraction that the teeth make, where it is no whole number. */
function ratioOf({ declared, numbers }: AnalysedMechanism): string {
  const exact = exactRatio(declared?.stages ?? []);
  const fraction = exact === undefined || exact.denominator === 1 ? "" : ` (${exact.numerator}/${exact.denominator})`;
  return `ratio ${writeNumber(numbers?.ratio ?? 1)}${fraction.length > LONGEST_FRACTION ? "" : fraction}`;
}

/** With its brackets; a longer one tells nobody anything. */
const LONGEST_FRACTION = 12;

function motorsOf({ motorCount }: Drive): string {
  return motorCount === 1 ? "1 motor" : `${motorCount} motors`;
}

function whereOf(drive: Drive, mechanism: AnalysedMechanism): string {
  return mechanism.numbers?.hardest.position === null ? "turning on" : `hardest ${positionWords(drive, mechanism)}`;
}

function outputOf(mechanism: AnalysedMechanism): string[] {
  const shaft = outputShaftOf(mechanism);
  if (shaft === undefined) return [];
  const speed = shaft.speedRadPerS === 0 ? "stalled" : `at ${writeQuantity(shaft.speedRadPerS, "speed")}`;
  const stall = writeQuantity(shaft.stallTorqueNm, "torque");
  return [`Output shaft: needs ${writeQuantity(shaft.torqueNm, "torque")} of ${stall} at stall, ${speed}`];
}

function tableOf(drive: Drive, { hardest, available }: MechanismNumbers): Table {
  const peak = greatestPowerPoint(drive);
  const best = bestEfficiencyPoint(drive);
  const limit = drive.motorCurrentLimitA;
  const currentLimit = limit !== undefined && limit < available.stallCurrentA;
  return {
    head: ["per motor", "hardest", "available"],
    rows: [
      ["torque", writeQuantity(hardest.motorTorqueNm, "torque"), `${writeQuantity(available.stallTorqueNm, "torque")} at stall`],
      [
        "speed",
        writeQuantity(hardest.motorSpeedRadPerS, "speed"),
        `${writeQuantity(available.noLoadSpeedRadPerS, "speed")} at no load`,
      ],
      [
        "current",
        writeQuantity(hardest.motorCurrentA, "current"),
        currentLimit
          ? `${writeQuantity(limit, "current")} limit`
          : `${writeQuantity(available.stallCurrentA, "current")} at stall`,
      ],
      [
        "output power",
        writeQuantity(hardest.shaftPowerW, "power"),
        peak === undefined ? "–" : `${writeQuantity(peak.shaftPowerW, "power")} at its peak`,
      ],
      [
        "efficiency",
        hardest.motorEfficiency === null ? "–" : writeShare(hardest.motorEfficiency),
        best === undefined ? "–" : `${writeShare(best.efficiency ?? 0)} at best`,
      ],
    ],
  };
}

/** The share of stall once the winding is as hot as its use makes it, where that is another one in whole per cent. */
function hotLine({ hardest }: MechanismNumbers): string[] {
  const { hotStallShare, hotWindingC, stallShare } = hardest;
  if (hotStallShare === null || hotWindingC === null || stallShare === null) return [];
  const [hot, cold] = [writeShare(hotStallShare), writeShare(stallShare)];
  return hot === cold ? [] : [`Hot, winding at ${writeIn(hotWindingC + 273.15, "degC")}: ${hot} of stall`];
}

/** How far motors of the declared tolerance, and declared ranges, spread the results. */
function spreadLine(analysis: Analysis, mechanism: AnalysedMechanism): string[] {
  const spread = spreadOf(analysis, mechanism);
  return spread === undefined ? [] : [`Spread: ${tellSpread(spread)}`];
}

/** How many inputs are named. */
const MOST_NAMED = 3;

/** Which declared numbers move the current, the share of stall or the time most. */
function mostBy(analysis: Analysis, mechanism: AnalysedMechanism): string[] {
  const inputs = [...new Set(sensitivitiesOf(analysis, mechanism).map(({ input }) => input))].slice(0, MOST_NAMED);
  return inputs.length === 0 ? [] : [`Most by: ${inputs.map((input) => inertMarkdown(inputWords(input))).join(", ")}`];
}

function linksOf({ call }: AnalysedMechanism): string[] {
  const motor = callsWithin(call).find(({ definition }) => definition === "motor");
  return motor === undefined ? [] : [revealLink("Motor", placeOf(motor))];
}

function placeOf({ binding, callee }: DefinitionCall) {
  return binding?.span ?? callee;
}
