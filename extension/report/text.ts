/** The report for a terminal: findings first, then a table per mechanism, then the cautions. */
import type { AnalysedMechanism, AnalysedRobot, Analysis, Finding } from "../analysis/analysis.js";
import type { Proposal } from "../analysis/proposal.js";
import type { Spread } from "../analysis/spread.js";
import { writeIn, writeNumber, writeQuantity, writeShare } from "../units/write.js";
import { CAUTIONS } from "./cautions.js";
import { tellFeedforward } from "./feedforwardWords.js";
import { toInertText } from "./inert.js";
import { type ReportedFinding, reportFindings } from "./report.js";
import { tellSpread } from "./spreadWords.js";

/** What is computed only when it is asked for. */
export interface TextExtras {
  readonly proposals?: readonly Proposal[];
  spreadOf?(mechanism: AnalysedMechanism): Spread | undefined;
}

/** `nameOf` as in `reportFindings`. Lines end in a line feed; the text holds no control characters from the source. */
export function writeText(
  analysis: Analysis,
  nameOf: (file: string) => string,
  { proposals = [], spreadOf = () => undefined }: TextExtras = {},
): string {
  const findings = reportFindings(analysis, nameOf);
  const blocks = [
    ...findings.map((finding, index) => writeFinding(finding, waysOut(proposals, analysis.findings[index]))),
    ...analysis.mechanisms.map((mechanism) => writeMechanism(mechanism, nameOf, spreadOf(mechanism))),
    ...analysis.robots.map((robot) => writeRobot(robot, nameOf)),
    writeSummary(findings, analysis.mechanisms.length),
    CAUTIONS.terminal,
  ];
  return `${blocks.join("\n\n")}\n`;
}

type Numbers = NonNullable<AnalysedMechanism["numbers"]>;

function writeFinding({ file, line, column, level, rule, message, related }: ReportedFinding, ways: string): string {
  const where = related.map((one) => `\n    ${one.file}:${one.line}:${one.column}  ${toInertText(one.message)}`).join("");
  return `${file}:${line}:${column}  ${level}  ${rule}\n    ${toInertText(message)}${where}${ways}`;
}

/** A nearest miss is no way out. */
function waysOut(proposals: readonly Proposal[], finding: Finding | undefined): string {
  return proposals
    .filter((one) => one.finding === finding)
    .map(({ summary, edits }) => `\n    ${edits.length === 0 ? "no way out" : "way out"}: ${toInertText(summary)}`)
    .join("");
}

function writeMechanism(mechanism: AnalysedMechanism, nameOf: (file: string) => string, spread: Spread | undefined): string {
  const rows = mechanism.numbers === undefined ? [] : rowsOf(mechanism.numbers);
  const spreads: Row[] = spread === undefined ? [] : [["spread", tellSpread(spread)]];
  return writeTable(`${mechanism.name} (${nameOf(mechanism.at.file)})`, [...rows, ...spreads], mechanism);
}

function writeTable(
  title: string,
  rows: readonly Row[],
  { assumed, notChecked }: Pick<AnalysedRobot, "assumed" | "notChecked">,
): string {
  const lines = [...rows, ...notesOf("assumed", assumed), ...notesOf("not checked", notChecked)].map(
    ([label, text]) => `  ${label.padEnd(12)} ${toInertText(text)}`,
  );
  return [toInertText(title), ...lines].join("\n");
}

function writeRobot(robot: AnalysedRobot, nameOf: (file: string) => string): string {
  const { numbers } = robot;
  const rows: Row[] = numbers === undefined ? [] : robotRows(numbers);
  return writeTable(`robot ${robot.name} (${nameOf(robot.at.file)})`, rows, robot);
}

function robotRows(numbers: NonNullable<AnalysedRobot["numbers"]>): Row[] {
  const { lowestVoltageV, lowestVoltageAtS, peakCurrentA, sourceEnergyJ, chargeUsedAh, cyclesDone } = numbers;
  return [
    ["supply", `falls to ${writeQuantity(lowestVoltageV, "voltage")} after ${writeQuantity(lowestVoltageAtS, "time")}`],
    ["draws", `${writeQuantity(peakCurrentA, "current")} at most`],
    ["takes", `${writeQuantity(sourceEnergyJ, "energy")}, ${writeQuantity(chargeUsedAh * 3600, "charge")} of the battery`],
    ["cycles", `${cyclesDone} done`],
  ];
}

/** The label stands once. */
function notesOf(label: string, sentences: readonly string[]): Row[] {
  return sentences.map((sentence, index) => [index === 0 ? label : "", sentence]);
}

type Row = readonly [label: string, text: string];

function rowsOf(numbers: Numbers): Row[] {
  const { hardest, available, ratio, stageEfficiency } = numbers;
  const share =
    hardest.stallShare === null
      ? ""
      : `, ${writeShare(hardest.stallShare)} of the ${writeQuantity(available.stallTorqueNm, "torque")} at stall`;
  return [
    ["needs", `${writeQuantity(hardest.motorTorqueNm, "torque")} per motor${share}`],
    ...hotRows(hardest),
    [
      "runs at",
      `${writeQuantity(hardest.motorSpeedRadPerS, "speed")} of the motor, ${writeQuantity(hardest.motorSpeedRadPerS / ratio, "speed")} at the output`,
    ],
    [
      "draws",
      `${writeQuantity(hardest.motorCurrentA, "current")} per motor, ${writeQuantity(hardest.sourceCurrentA, "current")} from the supply`,
    ],
    [
      "power",
      `${writeQuantity(hardest.electricalPowerW, "power")} in, ${writeQuantity(hardest.shaftPowerW, "power")} at the shaft, ${writeQuantity(hardest.loadPowerW, "power")} at the load`,
    ],
    ["ratio", `${writeNumber(ratio)}, stages pass ${writeShare(stageEfficiency)}`],
    ...travelRows(numbers),
    ...holdRows(numbers),
    ...stallRows(numbers),
    ["feedforward", tellFeedforward(numbers.feedforward)],
  ];
}

/** Only where there are thermal data. */
function hotRows({ hotStallShare, hotWindingC }: Numbers["hardest"]): Row[] {
  if (hotStallShare === null || hotWindingC === null) return [];
  return [
    ["hot", `${writeShare(hotStallShare)} of what is then left at stall, winding ${writeIn(hotWindingC + 273.15, "degC")}`],
  ];
}

function travelRows({ travel }: Numbers): Row[] {
  if (travel === null) return [];
  const took = travel.timeS === null ? "does not arrive" : `takes ${writeQuantity(travel.timeS, "time")}`;
  const energy = `${writeQuantity(travel.sourceEnergyJ, "energy")} from the supply`;
  return [
    [
      "travel",
      [
        took,
        `${writeQuantity(travel.rmsMotorCurrentA, "current")} rms per motor`,
        energy,
        ...heat(travel.windingPeakC),
        ...opens(travel.tripsAfterS),
      ].join(", "),
    ],
  ];
}

/** What turns on and on is not held. */
function holdRows({ hold, hardest }: Numbers): Row[] {
  if (hold === null || hold.motorCurrentA === 0 || hardest.position === null) return [];
  return [
    [
      "held",
      [`${writeQuantity(hold.motorCurrentA, "current")} per motor`, ...heat(hold.windingFinalC), ...opens(hold.tripsAfterS)].join(
        ", ",
      ),
    ],
  ];
}

function stallRows({ stall }: Numbers): Row[] {
  const limit =
    stall.windingLimitAfterS === null ? [] : [`winding at its limit after ${writeQuantity(stall.windingLimitAfterS, "time")}`];
  const currents = `${writeQuantity(stall.motorCurrentA, "current")} per motor, ${writeQuantity(stall.sourceCurrentA, "current")} from the supply`;
  return [["stalled", [currents, ...limit, ...opens(stall.tripsAfterS)].join(", ")]];
}

function heat(windingC: number | null): string[] {
  return windingC === null ? [] : [`winding ${writeQuantity(windingC + 273.15, "temperature")}`];
}

function opens(afterS: number | null): string[] {
  return afterS === null ? [] : [`protection opens after ${writeQuantity(afterS, "time")}`];
}

function writeSummary(findings: readonly ReportedFinding[], mechanisms: number): string {
  const count = (level: string) => findings.filter((finding) => finding.level === level).length;
  const told = [plural(count("error"), "error"), plural(count("warning"), "warning"), `${count("information")} for information`];
  return `${plural(mechanisms, "mechanism")}: ${told.join(", ")}.`;
}

function plural(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}
