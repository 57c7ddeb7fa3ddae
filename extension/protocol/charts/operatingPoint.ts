/**
 * The data of one operating-point chart as it travels, checked where it arrives: every plotted number, computed before it is sent.
 *
 * SI values of one motor; what does not apply is null. What the numbers mean stands with the feature that computes them.
 */
import * as v from "valibot";
import { listOf, number, said, shownEntries, text } from "./parts.js";

const VIEW = "operating-point";

const values = {
  speedRadPerS: number,
  currentA: number,
  shaftPowerW: number,
  /** Shaft power over power into the motor's terminals, a share of one. */
  efficiency: v.nullable(number),
};
const valuesSchema = v.object(values);
const pointSchema = v.object({ torqueNm: number, ...values });

const endsSchema = v.object({ stallTorqueNm: number, noLoadSpeedRadPerS: number, stallCurrentA: number });

/** One abscissa; a line is null where it does not reach. */
const sampleSchema = v.object({ torqueNm: number, available: v.nullable(valuesSchema), sheet: v.nullable(valuesSchema) });

const hardestSchema = v.object({
  torqueNm: number,
  ...values,
  stallShare: v.nullable(number),
  limitedBy: v.picklist(["line", "limit", "grip"]),
  stalls: v.boolean(),
  /** In words; null where the load has no position. */
  where: v.nullable(text),
});

const limitSchema = v.object({
  kind: v.picklist(["protection", "rated-torque", "stage-torque", "grip"]),
  label: text,
  fromTorqueNm: number,
  currentA: v.exactOptional(number),
});

const limitsSchema = v.object({
  /** Half of the stall torque. */
  pastPeakFromNm: number,
  /** No speed is left from here on. */
  stopsAtNm: number,
  /** Between the two torques the current limit decides. */
  current: v.nullable(v.object({ currentA: number, fromNm: number, toNm: number })),
  /** What else gives way, in rising torque. */
  others: listOf(limitSchema),
});

export const operatingPointChartSchema = v.object({
  mechanism: text,
  motorCount: number,
  ...said,
  available: endsSchema,
  sheet: endsSchema,
  /** Rising torque from 0 to the end of the longer line; marked points are among them. */
  samples: listOf(sampleSchema),
  hardest: hardestSchema,
  /** Null for a motor that gives nothing. */
  peakPower: v.nullable(pointSchema),
  bestEfficiency: v.nullable(pointSchema),
  limits: limitsSchema,
});

const probeChangeSchema = v.object({
  words: text,
  ratio: number,
  needed: v.object({ torqueNm: number, ...values, stallShare: v.nullable(number) }),
  timeS: v.nullable(number),
  state: said.state,
  verdict: text,
  findings: listOf(text),
  others: listOf(text),
});

/** What would be at another torque, and which written number would bring the mechanism there. */
const probeSchema = v.object({
  torqueNm: number,
  point: v.object({ ...values, stalls: v.boolean() }),
  change: v.nullable(probeChangeSchema),
  cannot: v.nullable(text),
});

export const operatingPointShown = v.object({
  ...shownEntries(VIEW, operatingPointChartSchema),
  probe: v.nullable(probeSchema),
});

const wantedProbe = v.nullable(v.object({ torqueNm: number }));

/** What the page asks for. */
export const operatingPointWant = v.object({ view: v.literal(VIEW), probe: wantedProbe });

/** What the page remembers of this view. */
export const operatingPointMemory = v.object({
  /** Torque where the cursor stands, N·m. */
  cursor: v.nullable(number),
  probe: wantedProbe,
});

export const NO_OPERATING_POINT_MEMORY: v.InferOutput<typeof operatingPointMemory> = { cursor: null, probe: null };

export type Probe = v.InferOutput<typeof probeSchema>;
export type OperatingPointChart = v.InferOutput<typeof operatingPointChartSchema>;
export type ChartSample = v.InferOutput<typeof sampleSchema>;
export type CurveValues = v.InferOutput<typeof valuesSchema>;
