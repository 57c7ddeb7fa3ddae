/**
 * What the chart's page remembers of its own: kept by the editor while the page is hidden, and given back after a reload.
 *
 * Results are not in it; the page asks for those.
 */
import * as v from "valibot";

export const chartViewSchema = v.object({
  /** The mechanism that was shown. */
  mechanism: v.nullable(v.string()),
  /** Torque where the cursor stands, N·m. */
  cursorNm: v.nullable(v.pipe(v.number(), v.finite())),
  /** Null until someone opens or closes the table. */
  tableOpen: v.nullable(v.boolean()),
});

export type ChartView = v.InferOutput<typeof chartViewSchema>;

export const NO_VIEW: ChartView = { mechanism: null, cursorNm: null, tableOpen: null };
