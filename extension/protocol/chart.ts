/**
 * The data of one operating-point chart as it travels, checked where it arrives: every plotted number, computed before it is sent.
 *
 * SI values of one motor; what does not apply is null. What the numbers mean stands with the feature that computes them.
 */
import * as v from "valibot";

const number = v.pipe(v.number(), v.finite());
const text = v.string();

const point = {
  torqueNm: number,
  speedRadPerS: number,
  currentA: number,
  outputPowerW: number,
  /** A share of one. */
  efficiency: v.nullable(number),
};
const pointSchema = v.object(point);

const hardestSchema = v.object({
  ...point,
  stallShare: v.nullable(number),
  where: text,
  limitedBy: v.picklist(["line", "limit", "grip"]),
  stalled: v.boolean(),
});

const limitSchema = v.object({
  kind: v.picklist(["past-peak", "current-limit", "protection", "rated-torque", "stage-torque", "grip"]),
  label: text,
  fromTorqueNm: number,
  currentA: v.exactOptional(number),
});

const tableSchema = v.object({
  columns: v.array(v.object({ title: text, unit: text })),
  rows: v.array(v.object({ label: text, cells: v.array(v.nullable(number)) })),
});

export const operatingPointChartSchema = v.object({
  mechanism: text,
  state: v.picklist(["error", "warning", "fine", "unknown"]),
  words: text,
  stallTorqueNm: number,
  available: v.array(pointSchema),
  sheet: v.array(pointSchema),
  hardest: hardestSchema,
  peakPower: v.nullable(pointSchema),
  bestEfficiency: v.nullable(pointSchema),
  limits: v.array(limitSchema),
  assumed: v.array(text),
  notChecked: v.array(text),
  table: tableSchema,
});

export const chartFindingSchema = v.object({
  rule: text,
  level: v.picklist(["error", "warning", "information"]),
  message: text,
});

export type OperatingPointChart = v.InferOutput<typeof operatingPointChartSchema>;
export type ChartPoint = v.InferOutput<typeof pointSchema>;
export type ChartLimit = v.InferOutput<typeof limitSchema>;
export type ChartFinding = v.InferOutput<typeof chartFindingSchema>;
