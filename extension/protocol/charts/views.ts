/**
 * The views of the chart panel: for each what the page asks for, what it is shown and what it remembers.
 *
 * A new view adds its file beside this one and a line to each table here; the compiler then asks for the rest.
 */
import * as v from "valibot";
import { mattersMemory, mattersShown, mattersWant, NO_MATTERS_MEMORY } from "./matters.js";
import { NO_OPERATING_POINT_MEMORY, operatingPointMemory, operatingPointShown, operatingPointWant } from "./operatingPoint.js";
import { NO_POWER_MEMORY, powerMemory, powerShown, powerWant } from "./power.js";
import { NO_RATIO_MAP_MEMORY, ratioMapMemory, ratioMapShown, ratioMapWant } from "./ratioMap.js";
import { NO_TRAVEL_MEMORY, travelMemory, travelShown, travelWant } from "./travel.js";

/** In the order of their tabs. */
export const VIEW_NAMES = ["operating-point", "travel", "ratio-map", "matters", "power"] as const;

export const viewNameSchema = v.picklist(VIEW_NAMES);

export const wantSchema = v.variant("view", [operatingPointWant, travelWant, ratioMapWant, mattersWant, powerWant]);

export const shownSchema = v.variant("view", [operatingPointShown, travelShown, ratioMapShown, mattersShown, powerShown]);

export const memoriesSchema = v.object({
  "operating-point": operatingPointMemory,
  travel: travelMemory,
  "ratio-map": ratioMapMemory,
  matters: mattersMemory,
  power: powerMemory,
});

export const NO_MEMORIES: v.InferOutput<typeof memoriesSchema> = {
  "operating-point": NO_OPERATING_POINT_MEMORY,
  travel: NO_TRAVEL_MEMORY,
  "ratio-map": NO_RATIO_MAP_MEMORY,
  matters: NO_MATTERS_MEMORY,
  power: NO_POWER_MEMORY,
};

export type ViewName = v.InferOutput<typeof viewNameSchema>;
/** What the page asks for: a view, and what it wants to see of it. */
export type Want = v.InferOutput<typeof wantSchema>;
export type ShownChart<V extends ViewName = ViewName> = Extract<v.InferOutput<typeof shownSchema>, { view: V }>;
export type ViewMemory<V extends ViewName = ViewName> = v.InferOutput<typeof memoriesSchema>[V];
