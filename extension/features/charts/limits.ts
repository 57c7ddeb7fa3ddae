/**
 * Torques at one motor's shaft beyond which something gives: the chart hatches what lies behind them.
 *
 * Only limits that the declaration names or that follow from the line; whether one is a finding is up to the rules.
 */
import type { Drive, Protection } from "../../model/drive.js";
import { slipPoint } from "../../model/hardest.js";
import type { MotorLine } from "../../model/line.js";

export interface ChartLimit {
  readonly kind: "protection" | "rated-torque" | "stage-torque" | "grip";
  /** A few words, plain text. */
  readonly label: string;
  readonly fromTorqueNm: number;
  /** The current that it is about, where it is about one. */
  readonly currentA?: number;
}

/** In rising torque; limits that the line never reaches are left out. */
export function limitsOf(drive: Drive, line: MotorLine): ChartLimit[] {
  const slip = slipPoint(drive);
  const rated = drive.motor.rated;
  const limits: ChartLimit[] = [
    ...protectionLimits(drive, line),
    ...(rated ? [{ kind: "rated-torque" as const, label: "above the rated torque", fromTorqueNm: rated.torqueNm }] : []),
    ...stageLimits(drive),
    ...(slip ? [{ kind: "grip" as const, label: "wheels slip", fromTorqueNm: slip.motorTorqueNm }] : []),
  ];
  return limits
    .filter(({ fromTorqueNm }) => fromTorqueNm < line.stallTorqueNm)
    .toSorted((one, other) => one.fromTorqueNm - other.fromTorqueNm);
}

/** Torque at which a current flows, on the line from no load to stall, along which current rises as straight as torque; at least 0. */
export function torqueAtCurrent(line: MotorLine, currentA: number): number | undefined {
  const noLoad = line.currentAt(0);
  if (!(line.stallCurrentA > noLoad)) return undefined;
  return Math.max(((currentA - noLoad) / (line.stallCurrentA - noLoad)) * line.stallTorqueNm, 0);
}

function protectionLimits(drive: Drive, line: MotorLine): ChartLimit[] {
  const currentA = heldCurrent(drive);
  const fromTorqueNm = currentA === undefined ? undefined : torqueAtCurrent(line, currentA);
  if (currentA === undefined || fromTorqueNm === undefined) return [];
  return [{ kind: "protection", label: "protection may open", fromTorqueNm, currentA }];
}

/** What the protection carries for ever, as one motor's current. */
function heldCurrent({ protection, motorCount, pwmDuty }: Drive): number | undefined {
  if (protection === undefined) return undefined;
  const held = heldBy(protection);
  return protection.carries === "motor" ? held : held / (motorCount * pwmDuty);
}

function heldBy(protection: Protection): number {
  return protection.kind === "fuse" ? protection.ratingA : protection.holdCurrentA;
}

function stageLimits({ stages, motorCount }: Drive): ChartLimit[] {
  let gain = motorCount;
  return stages.flatMap(({ ratio, efficiency, maxTorqueNm, kind }, index) => {
    gain *= ratio * efficiency;
    if (maxTorqueNm === undefined) return [];
    return [
      { kind: "stage-torque" as const, label: `stage ${index + 1} (${kind}) above its torque`, fromTorqueNm: maxTorqueNm / gain },
    ];
  });
}
