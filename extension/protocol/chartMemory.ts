/**
 * What the chart's page remembers of its own: kept by the editor while the page is hidden, and given back after a reload.
 *
 * Results are not in it; the page asks for those.
 */
import * as v from "valibot";
import type { UnitSystem } from "../units/systems.js";
import { memoriesSchema, NO_MEMORIES, viewNameSchema } from "./charts/views.js";

/** What `units` calls its systems; it may be asked for its types alone. */
export const UNIT_SYSTEMS = ["metric", "si", "inch"] as const satisfies readonly UnitSystem[];

export const chartMemorySchema = v.object({
  view: viewNameSchema,
  /** The mechanism and the robot that were shown. */
  mechanism: v.nullable(v.string()),
  robot: v.nullable(v.string()),
  /** Null until someone chooses. */
  units: v.nullable(v.picklist(UNIT_SYSTEMS)),
  /** Null until someone opens or closes the table. */
  tableOpen: v.nullable(v.boolean()),
  views: memoriesSchema,
});

export type ChartMemory = v.InferOutput<typeof chartMemorySchema>;

export const NO_MEMORY: ChartMemory = {
  view: "operating-point",
  mechanism: null,
  robot: null,
  units: null,
  tableOpen: null,
  views: NO_MEMORIES,
};
