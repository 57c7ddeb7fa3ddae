/**
 * Server to client: what is declared and how it stands, after each analysis that changed it.
 *
 * The whole state each time, so that a client that comes late or starts anew needs no history.
 */
import * as v from "valibot";
import { placeSchema } from "./place.js";

export const STATE = "loadmark/state";

/** The worst that was found: `unknown` where a value is missing that the physics needs. */
const standingSchema = v.picklist(["error", "warning", "fine", "unknown"]);

const mechanismSchema = v.object({
  /** As declared: what commands about it take. */
  name: v.string(),
  /** What is shown; names in it are harmless text. */
  label: v.string(),
  description: v.string(),
  tooltip: v.string(),
  standing: standingSchema,
  place: placeSchema,
});

const robotSchema = v.object({
  /** As declared: what commands about it take. */
  name: v.string(),
  label: v.string(),
  description: v.string(),
  tooltip: v.string(),
  standing: standingSchema,
  place: placeSchema,
  mechanisms: v.array(mechanismSchema),
});

export const stateSchema = v.object({
  robots: v.array(robotSchema),
  /** Mechanisms that no robot lists. */
  apart: v.array(mechanismSchema),
  /** `null` where nothing is declared. */
  status: v.nullable(v.object({ text: v.string(), tooltip: v.string(), standing: standingSchema })),
});

export type Standing = v.InferOutput<typeof standingSchema>;
export type MechanismState = v.InferOutput<typeof mechanismSchema>;
export type RobotState = v.InferOutput<typeof robotSchema>;
export type State = v.InferOutput<typeof stateSchema>;

export const NO_STATE: State = { robots: [], apart: [], status: null };
