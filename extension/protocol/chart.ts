/**
 * The data of one operating-point chart: every plotted number, computed before it is sent.
 *
 * SI values of one motor unless the name says otherwise; what does not apply is null. The chart draws and words these numbers and
 * computes none of its own.
 */
import * as v from "valibot";

const number = v.pipe(v.number(), v.finite());
const text = v.string();

const values = {
  speedRadPerS: number,
  /** One motor's. */
  currentA: number,
  /** At the shaft. */
  shaftPowerW: number,
  /** Shaft power over power into the motor's terminals, as a share of one. */
  efficiency: v.nullable(number),
};

const curveValues = v.object(values);
const curvePoint = v.object({ torqueNm: number, ...values });

const lineEnds = v.object({ stallTorqueNm: number, noLoadSpeedRadPerS: number, stallCurrentA: number });

/** One abscissa. A line is null where it does not reach. */
const sample = v.object({ torqueNm: number, available: v.nullable(curveValues), sheet: v.nullable(curveValues) });

const hardest = v.object({
  /** Required; the motor may not be able to give it: then it stalls. */
  torqueNm: number,
  ...values,
  stallShare: v.nullable(number),
  limitedBy: v.picklist(["line", "limit", "grip"]),
  stalls: v.boolean(),
  /** In words, such as "at 0.35 m"; null where the load has no position. */
  where: v.nullable(text),
});

const limits = v.object({
  /** Half of the stall torque: output power peaks there. */
  pastPeakFromNm: number,
  /** No speed is left from here on: stall, or what the current limit leaves. */
  stopsAtNm: number,
  /** Between the two torques the current limit, not the line, decides. */
  current: v.nullable(v.object({ currentA: number, fromNm: number, toNm: number })),
});

const finding = v.object({ rule: text, level: v.picklist(["error", "warning", "information"]), message: text });

export const operatingPointChartSchema = v.object({
  mechanism: text,
  motorCount: number,
  state: v.picklist(["error", "warning", "fine", "unknown"]),
  /** The verdict in a few words. */
  verdict: text,
  available: lineEnds,
  sheet: lineEnds,
  /** Rising torque from 0 to the end of the longer line; marked points are among them. */
  samples: v.array(sample),
  hardest,
  peakPower: v.nullable(curvePoint),
  bestEfficiency: v.nullable(curvePoint),
  limits,
  findings: v.array(finding),
  /** Plain sentences, as are those not checked. */
  assumed: v.array(text),
  notChecked: v.array(text),
});

export type OperatingPointChart = v.InferOutput<typeof operatingPointChartSchema>;
export type ChartSample = v.InferOutput<typeof sample>;
export type CurveValues = v.InferOutput<typeof curveValues>;
