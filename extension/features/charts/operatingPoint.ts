/**
 * Everything that the operating-point chart of one mechanism plots; its table shows the same samples.
 *
 * SI throughout, one motor unless the name says otherwise; what does not apply is null. How it looks is the chart's business.
 */
import type { Analysis } from "../../analysis/analysis.js";
import { bestEfficiencyPoint, greatestPowerPoint, greatestTorque } from "../../model/bestPoints.js";
import type { Drive } from "../../model/drive.js";
import { availableLine, type MotorLine, sheetLine } from "../../model/line.js";
import type { MechanismNumbers } from "../../model/numbers.js";
import { operatingPointAt } from "../../model/operatingPoint.js";
import { linePoint } from "../../model/peaks.js";
import { positionWords } from "../positionWords.js";
import type { ChartFeature } from "./feature.js";
import { type ChartLimit, limitsOf, torqueAtCurrent } from "./limits.js";
import { headOf, type MechanismHead, mechanismIn } from "./mechanismHead.js";
import { mechanismSubjects, noMechanism, whyMechanismIsOld } from "./mechanismSubjects.js";
import { type ChartPoint, type ChartValues, chartPoint, chartValues } from "./point.js";
import { probeAt, probeEdits } from "./probe.js";

/** One abscissa; a line is null where it does not reach. */
export interface ChartSample {
  readonly torqueNm: number;
  /** Supply, wiring, duty and limits counted. */
  readonly available: ChartValues | null;
  /** The motor alone at its sheet's voltage. */
  readonly sheet: ChartValues | null;
}

export interface LineEnds {
  readonly stallTorqueNm: number;
  readonly noLoadSpeedRadPerS: number;
  readonly stallCurrentA: number;
}

export interface OperatingPointChart extends MechanismHead {
  /** Its stall torque is 100 % on the scale of shares. */
  readonly available: LineEnds;
  readonly sheet: LineEnds;
  /** Rising torque from 0 to the end of the longer line; marked points are among them. */
  readonly samples: readonly ChartSample[];
  readonly hardest: ChartPoint & {
    readonly stallShare: number | null;
    readonly limitedBy: MechanismNumbers["hardest"]["limitedBy"];
    readonly stalls: boolean;
    /** Such as "at 0°"; null where the load has no position. */
    readonly where: string | null;
  };
  /** Null, like `bestEfficiency`, for a motor that gives nothing. */
  readonly peakPower: ChartPoint | null;
  readonly bestEfficiency: ChartPoint | null;
  readonly limits: {
    /** Half of the stall torque: output power peaks there. */
    readonly pastPeakFromNm: number;
    /** No speed is left from here on. */
    readonly stopsAtNm: number;
    /** Between the two torques the current limit decides. */
    readonly current: { readonly currentA: number; readonly fromNm: number; readonly toNm: number } | null;
    /** What else gives way, in rising torque. */
    readonly others: readonly ChartLimit[];
  };
}

/** Steps of the abscissa between its ends. */
const STEPS = 100;

export interface OperatingPointWant {
  /** A torque to try; null for none. */
  readonly probe: { readonly torqueNm: number } | null;
}

export const operatingPointFeature: ChartFeature<OperatingPointChart, OperatingPointWant> = {
  subjects: mechanismSubjects,
  chartOf: operatingPointChart,
  whyOld: whyMechanismIsOld,
  besides: (analysis, name, { probe }, analyse) => ({
    probe: probe === null ? null : (probeAt(analysis, name, probe.torqueNm, analyse) ?? null),
  }),
  editsFor: (analysis, name, { probe }) => (probe === null ? undefined : probeEdits(analysis, name, probe.torqueNm)),
  nothing: noMechanism,
};

/** `undefined` for an unknown name, or a mechanism without numbers. */
export function operatingPointChart(analysis: Analysis, mechanismName: string): OperatingPointChart | undefined {
  const mechanism = mechanismIn(analysis, mechanismName);
  const drive = mechanism?.drive;
  if (mechanism?.numbers === undefined || drive === undefined) return undefined;
  const { hardest } = mechanism.numbers;
  const available = availableLine(drive);
  const sheet = sheetLine(drive.motor);
  const stopsAtNm = greatestTorque(drive);
  const current = currentLimitOf(drive, available, stopsAtNm);
  const [peakPower, bestEfficiency] = [greatestPowerPoint(drive), bestEfficiencyPoint(drive)].map(
    (one) => one && chartPoint(one),
  );
  const point: ChartPoint = {
    torqueNm: hardest.motorTorqueNm,
    speedRadPerS: hardest.motorSpeedRadPerS,
    currentA: hardest.motorCurrentA,
    shaftPowerW: hardest.shaftPowerW,
    efficiency: hardest.motorEfficiency,
  };
  const marked = [point, peakPower, bestEfficiency].flatMap((one) => (one ? [one.torqueNm] : []));
  const bends = [available.stallTorqueNm, sheet.stallTorqueNm, stopsAtNm, ...(current ? [current.fromNm] : [])];
  return {
    ...headOf(analysis, mechanism),
    available: endsOf(available),
    sheet: endsOf(sheet),
    samples: samplesOf(drive, sheet, stopsAtNm, [...marked, ...bends]),
    hardest: {
      ...point,
      stallShare: hardest.stallShare,
      limitedBy: hardest.limitedBy,
      stalls: hardest.motorSpeedRadPerS === 0,
      where: hardest.position === null ? null : positionWords(drive, mechanism),
    },
    peakPower: peakPower ?? null,
    bestEfficiency: bestEfficiency ?? null,
    limits: { pastPeakFromNm: available.stallTorqueNm / 2, stopsAtNm, current, others: limitsOf(drive, available) },
  };
}

function samplesOf(drive: Drive, sheet: MotorLine, stopsAtNm: number, extra: readonly number[]): ChartSample[] {
  const end = Math.max(sheet.stallTorqueNm, availableLine(drive).stallTorqueNm);
  const steps = Array.from({ length: STEPS + 1 }, (_, step) => (step / STEPS) * end);
  const abscissas = new Set([...steps, ...extra.filter((torqueNm) => torqueNm >= 0 && torqueNm <= end)]);
  return [...abscissas]
    .sort((one, other) => one - other)
    .map((torqueNm) => ({
      torqueNm,
      available: torqueNm <= stopsAtNm ? chartValues(operatingPointAt(drive, torqueNm)) : null,
      sheet: torqueNm <= sheet.stallTorqueNm ? sheetValues(sheet, torqueNm) : null,
    }));
}

/** At stall, speed and power are 0 but for rounding. */
function sheetValues(sheet: MotorLine, torqueNm: number): ChartValues {
  const { speedRadPerS, currentA, shaftPowerW, efficiency } = linePoint(sheet, torqueNm);
  return {
    speedRadPerS: Math.max(speedRadPerS, 0),
    currentA,
    shaftPowerW: Math.max(shaftPowerW, 0),
    efficiency: Math.max(efficiency, 0),
  };
}

function endsOf({ stallTorqueNm, noLoadSpeedRadPerS, stallCurrentA }: MotorLine): LineEnds {
  return { stallTorqueNm, noLoadSpeedRadPerS, stallCurrentA };
}

function currentLimitOf(drive: Drive, line: MotorLine, stopsAtNm: number): OperatingPointChart["limits"]["current"] {
  const currentA = drive.motorCurrentLimitA;
  const fromNm = currentA === undefined ? undefined : torqueAtCurrent(line, currentA);
  return currentA === undefined || fromNm === undefined || fromNm > stopsAtNm ? null : { currentA, fromNm, toNm: stopsAtNm };
}
