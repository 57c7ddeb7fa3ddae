/**
 * The data of the chart of what matters as it travels, checked where it arrives: effects of declared numbers, and the spread of results.
 *
 * What the numbers mean stands with the feature that computes them.
 */
import * as v from "valibot";
import { listOf, number, said, shownEntries, text } from "./parts.js";

const VIEW = "matters";

const effect = v.nullable(number);
const inputSchema = v.object({ words: text, current: effect, time: effect, share: effect });
const percentiles = { p5: number, p50: number, p95: number };
const percentilesOrNever = { p5: v.nullable(number), p50: v.nullable(number), p95: v.nullable(number) };

const spreadSchema = v.object({
  draws: number,
  seed: number,
  tolerance: number,
  ranges: number,
  motorCurrentA: v.object(percentiles),
  timeS: v.nullable(v.object(percentilesOrNever)),
  trippingShare: v.nullable(number),
});

export const mattersChartSchema = v.object({
  mechanism: text,
  motorCount: number,
  ...said,
  /** In the order of their greatest effect. */
  inputs: listOf(inputSchema),
  /** Null where nothing is declared as uncertain. */
  spread: v.nullable(spreadSchema),
});

export const mattersShown = v.object(shownEntries(VIEW, mattersChartSchema));

/** What the page asks for. */
export const mattersWant = v.object({ view: v.literal(VIEW) });

export const MATTERS_OUTPUTS = ["current", "time", "share"] as const;

/** What the page remembers of this view. */
export const mattersMemory = v.object({
  /** Rank of the input where the cursor stands, from 1. */
  cursor: v.nullable(number),
  /** On what the effect is shown. */
  output: v.picklist(MATTERS_OUTPUTS),
});

export const NO_MATTERS_MEMORY: v.InferOutput<typeof mattersMemory> = { cursor: null, output: "current" };

export type MattersChart = v.InferOutput<typeof mattersChartSchema>;
export type MattersOutput = (typeof MATTERS_OUTPUTS)[number];
