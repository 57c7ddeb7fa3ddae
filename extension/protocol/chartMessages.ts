/**
 * What the chart's page, the client and the server say to each other.
 *
 * The page asks first, and each answer is the full state. Whoever reads a message checks it with `readMessage`, and ignores and logs
 * what it does not know. What the numbers of a chart are stands in charts/, a file for each view.
 */
import * as v from "valibot";
import { UNIT_SYSTEMS } from "./chartMemory.js";
import { shownSchema, viewNameSchema, wantSchema } from "./charts/views.js";
import { placeSchema } from "./place.js";

/** The client's question to the server: takes a question, gives an answer. */
export const CHART = "loadmark/chart";

/** The client's question what would write to the code what the page wants: takes the same question, gives edits or null. */
export const CHART_EDITS = "loadmark/chartEdits";

/** Server to client, after each result: whoever shows a chart asks again. */
export const CHART_MAY_DIFFER = "loadmark/chartMayDiffer";

const count = v.pipe(v.number(), v.integer(), v.minValue(0));

export const chartQuestionSchema = v.object({
  /** Lines and characters from 0. What is declared here comes first. */
  caret: v.nullable(v.object({ uri: v.string(), line: count, character: count })),
  /** What is shown, kept where the caret is in none. */
  mechanism: v.nullable(v.string()),
  robot: v.nullable(v.string()),
  want: wantSchema,
});

export const nothingSchema = v.object({
  kind: v.literal("nothing"),
  view: viewNameSchema,
  reason: v.picklist(["nothing-declared", "nothing-computed", "does-not-apply"]),
  /** Plain sentences: why, and what to do. */
  says: v.array(v.string()),
  /** What could be written; null where that is not the matter. */
  example: v.nullable(v.string()),
});

export const chartAnswerSchema = v.variant("kind", [nothingSchema, shownSchema]);

/** Null where there is nothing to write. */
export const chartEditsSchema = v.nullable(
  v.array(v.object({ ...placeSchema.entries, newText: v.string(), version: v.nullable(v.number()) })),
);

const CONTENT_LIMIT = 32 * 1024 * 1024;
/** A name alone: never a path. */
const fileName = v.pipe(v.string(), v.regex(/^[\p{L}\p{N}-]{1,100}\.(png|csv|html)$/u));
const content = v.pipe(v.string(), v.maxLength(CONTENT_LIMIT));
/** Without groups: a repeated group overflows the stack on a picture of some megabytes. */
const BASE64 = /^[A-Za-z\d+/]*={0,2}$/;

export const pageMessageSchema = v.variant("type", [
  /** The page is there, or there again; it may remember what it showed. */
  v.object({ type: v.literal("ready"), mechanism: v.nullable(v.string()), robot: v.nullable(v.string()), want: wantSchema }),
  /** It wants to see something else. */
  v.object({ type: v.literal("ask"), want: wantSchema }),
  /** To write to the code what it wants to see. */
  v.object({ type: v.literal("writeToCode"), want: wantSchema }),
  /** Kept for charts to come. */
  v.object({ type: v.literal("chooseUnits"), units: v.picklist(UNIT_SYSTEMS) }),
  /** A PNG file in base 64. */
  v.object({
    type: v.literal("savePicture"),
    fileName,
    base64: v.pipe(
      content,
      v.regex(BASE64),
      v.check((text) => text.length % 4 === 0),
    ),
  }),
  v.object({ type: v.literal("saveTable"), fileName, csv: content }),
  /** A page of its own, for the printer. */
  v.object({ type: v.literal("savePage"), fileName, html: content }),
  /** What the page could not do, for the log. */
  v.object({ type: v.literal("trouble"), what: v.pipe(v.string(), v.maxLength(2000)) }),
]);

export const hostMessageSchema = v.variant("type", [
  v.object({ type: v.literal("show"), answer: chartAnswerSchema }),
  /** Someone asked the editor for a view; the page then asks for it. */
  v.object({ type: v.literal("open"), view: viewNameSchema }),
]);

export type ChartQuestion = v.InferOutput<typeof chartQuestionSchema>;
export type ChartAnswer = v.InferOutput<typeof chartAnswerSchema>;
export type ChartEdits = v.InferOutput<typeof chartEditsSchema>;
export type Nothing = v.InferOutput<typeof nothingSchema>;
/** From the chart's page to its host. */
export type PageMessage = v.InferOutput<typeof pageMessageSchema>;
/** From the host to the chart's page. */
export type HostMessage = v.InferOutput<typeof hostMessageSchema>;
