/**
 * The data of the chart of one mechanism over its ratio as it travels, checked where it arrives.
 *
 * SI values of one motor at the hardest position, times of the travel. What the numbers mean stands with the feature that computes them.
 */
import * as v from "valibot";
import { listOf, number, said, shownEntries, text } from "./parts.js";

const VIEW = "ratio-map";

const point = {
  ratio: number,
  /** Null for a load without a travel, or where it does not arrive. */
  timeS: v.nullable(number),
  outputRadPerS: number,
  currentA: number,
  stallShare: v.nullable(number),
  efficiency: v.nullable(number),
  /** Rules that it breaks, in words. */
  breaks: listOf(text),
};
const pointSchema = v.object(point);
const writableSchema = v.object({ ...point, words: text });
const spansSchema = listOf(v.object({ from: number, to: number }));

export const ratioMapChartSchema = v.object({
  mechanism: text,
  motorCount: number,
  ...said,
  /** False for a load that only turns: its output speed then stands for the time. */
  hasTravel: v.boolean(),
  withinS: v.nullable(number),
  /** Rising ratio; the marked ones are among them. */
  samples: listOf(pointSchema),
  /** Where every rule is kept that counts. */
  kept: spansSchema,
  broken: listOf(v.object({ words: text, spans: spansSchema })),
  /** Rules that no ratio keeps, in words. */
  neverKept: listOf(text),
  now: pointSchema,
  fastest: v.nullable(pointSchema),
  bestEfficiency: v.nullable(pointSchema),
  /** The best that can be written into the code. */
  toWrite: v.object({ fastest: v.nullable(writableSchema), bestEfficiency: v.nullable(writableSchema) }),
  /** Rising ratio; `gears`: how many are to be changed. */
  stock: listOf(v.object({ ratio: number, words: text, gears: v.picklist([1, 2]), keeps: v.boolean() })),
  /** A plain reduction: any ratio can be had. */
  anyRatio: v.boolean(),
});

export const ratioMapShown = v.object(shownEntries(VIEW, ratioMapChartSchema));

/** What the page asks for; `write`: the ratio that is to be written into the code, where it asks for that. */
export const ratioMapWant = v.object({
  view: v.literal(VIEW),
  write: v.nullable(v.object({ mechanism: text, ratio: v.pipe(number, v.gtValue(0)) })),
});

/** What the page remembers of this view. */
export const ratioMapMemory = v.object({
  /** Ratio where the cursor stands. */
  cursor: v.nullable(number),
});

export const NO_RATIO_MAP_MEMORY: v.InferOutput<typeof ratioMapMemory> = { cursor: null };

export type RatioMapChart = v.InferOutput<typeof ratioMapChartSchema>;
export type RatioMapPoint = v.InferOutput<typeof pointSchema>;
