/** A motor: its constants, and the points of its straight line that its sheet rarely prints. */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import type { Motor } from "../../declarations/motor.js";
import type { DefinitionCall } from "../../evaluator/value.js";
import type { MotorConstants } from "../../model/drive.js";
import { sheetLine } from "../../model/line.js";
import { type LinePoint, linePoint, peakEfficiencyPoint, peakPowerPoint } from "../../model/peaks.js";
import { writeQuantity, writeShare } from "../../units/write.js";
import { callsWithin } from "../feeds.js";
import { inertMarkdown } from "../inertText.js";
import { type Table, writeBlock } from "./block.js";
import { sentences } from "./sentences.js";

export function describeMotor(analysis: Analysis, call: DefinitionCall): string {
  const motor = call.built as Motor | undefined;
  const name = call.binding ? inertMarkdown(call.binding.name) : "Motor";
  const contradiction = analysis.findings.filter(
    ({ rule, at }) => rule === "sheet-contradicts" && at.file === call.span.file && isAt(call, at.start),
  );
  if (motor === undefined) return writeBlock({ verdict: `Not checked: ${name}`, notes: ["The declaration is not accepted."] });
  const voltage = writeQuantity(motor.si.voltageV, "voltage");
  if (contradiction.length > 0) {
    return writeBlock({
      verdict: `The sheet contradicts itself: ${name}`,
      lines: [constantsOf(motor.si)],
      notes: sentences(
        "Finding",
        contradiction.map(({ message }) => message),
      ),
    });
  }
  return writeBlock({
    verdict: `${name}: at ${voltage}`,
    lines: [constantsOf(motor.si), usersOf(analysis, call)],
    table: tableOf(motor.si),
  });
}

function constantsOf(si: MotorConstants): string {
  const parts = [
    `winding ${writeQuantity(si.resistanceOhm, "resistance")}`,
    `torque constant ${writeQuantity(si.torqueConstantNmPerA, "torqueConstant")}`,
    `back-emf ${writeQuantity(si.backEmfVPerRadPerS, "torqueConstant").replace("N·m/A", "V·s/rad")}`,
    si.rotorInertiaKgM2 === 0 ? undefined : `rotor ${writeQuantity(si.rotorInertiaKgM2, "inertia")}`,
  ];
  return parts.filter((part) => part !== undefined).join(" · ");
}

function usersOf({ mechanisms }: Analysis, call: DefinitionCall): string {
  const users = mechanisms
    .filter((one: AnalysedMechanism) => callsWithin(one.call).includes(call))
    .map(({ name }) => inertMarkdown(name));
  if (users.length === 0) return "Drives no mechanism yet";
  return `Drives ${users.slice(0, 5).join(", ")}${users.length > 5 ? ` and ${users.length - 5} more` : ""}`;
}

function tableOf(si: MotorConstants): Table {
  const line = sheetLine(si);
  const points: readonly (readonly [string, LinePoint])[] = [
    ["no load", linePoint(line, 0)],
    ["best efficiency", peakEfficiencyPoint(line)],
    ["peak output power", peakPowerPoint(line)],
    ["stall", linePoint(line, line.stallTorqueNm)],
  ];
  return {
    head: ["", "torque", "speed", "current", "output", "efficiency"],
    rows: points.map(([label, point]) => [
      label,
      writeQuantity(point.torqueNm, "torque"),
      writeQuantity(settled(point.speedRadPerS, line.noLoadSpeedRadPerS), "speed"),
      writeQuantity(point.currentA, "current"),
      writeQuantity(settled(point.shaftPowerW, line.stallTorqueNm * line.noLoadSpeedRadPerS), "power"),
      writeShare(Math.max(point.efficiency, 0)),
    ]),
  };
}

/** What is 0 but for rounding: the speed at stall. */
function settled(value: number, scale: number): number {
  return Math.abs(value) <= 1e-9 * scale ? 0 : value;
}

function isAt({ span, binding }: DefinitionCall, offset: number): boolean {
  return (binding !== undefined && binding.span.start === offset) || (span.start <= offset && offset < span.end);
}
