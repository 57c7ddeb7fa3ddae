/** The report for a terminal: findings first, then a table per mechanism, then the cautions. */
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";
import { writeNumber, writeQuantity, writeShare } from "../units/write.js";
import { CAUTIONS } from "./cautions.js";
import { toInertText } from "./inert.js";
import { makeReport, type ReportedFinding } from "./report.js";

/** `nameOf` as in `makeReport`. Lines end in a line feed; the text holds no control characters from the source. */
export function writeText(analysis: Analysis, nameOf: (file: string) => string): string {
  const { findings } = makeReport(analysis, nameOf);
  const blocks = [
    ...findings.map(writeFinding),
    ...analysis.mechanisms.map((mechanism) => writeMechanism(mechanism, nameOf)),
    writeSummary(findings, analysis.mechanisms.length),
    CAUTIONS.terminal,
  ];
  return `${blocks.join("\n\n")}\n`;
}

function writeFinding({ file, line, column, level, rule, message, related }: ReportedFinding): string {
  const where = related.map((one) => `\n    ${one.file}:${one.line}:${one.column}  ${toInertText(one.message)}`).join("");
  return `${file}:${line}:${column}  ${level}  ${rule}\n    ${toInertText(message)}${where}`;
}

function writeMechanism(mechanism: AnalysedMechanism, nameOf: (file: string) => string): string {
  const rows = mechanism.numbers === undefined ? [] : rowsOf(mechanism.numbers);
  const notes = [
    ...mechanism.assumed.map((sentence) => ["assumed", sentence] as const),
    ...mechanism.notChecked.map((sentence) => ["not checked", sentence] as const),
  ];
  const lines = [...rows, ...notes].map(([label, text]) => `  ${label.padEnd(12)} ${toInertText(text)}`);
  return [`${toInertText(mechanism.name)} (${nameOf(mechanism.at.file)})`, ...lines].join("\n");
}

function rowsOf(numbers: NonNullable<AnalysedMechanism["numbers"]>): (readonly [label: string, text: string])[] {
  const { hardest, available, ratio, stageEfficiency } = numbers;
  const share =
    hardest.stallShare === null
      ? ""
      : `, ${writeShare(hardest.stallShare)} of the ${writeQuantity(available.stallTorqueNm, "torque")} at stall`;
  return [
    ["needs", `${writeQuantity(hardest.motorTorqueNm, "torque")} per motor${share}`],
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
  ];
}

function writeSummary(findings: readonly ReportedFinding[], mechanisms: number): string {
  const count = (level: string) => findings.filter((finding) => finding.level === level).length;
  const told = [plural(count("error"), "error"), plural(count("warning"), "warning"), `${count("information")} for information`];
  return `${plural(mechanisms, "mechanism")}: ${told.join(", ")}.`;
}

function plural(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}
