/**
 * What the chart's page, the client and the server say to each other, checked wherever it arrives.
 *
 * The page asks first, and each answer is the full state. An unknown message is not an error here: readers give `undefined`, and
 * whoever read it ignores and logs it. Deliberately not here: what the chart's numbers mean (chart.ts).
 */
import * as v from "valibot";
import { operatingPointChartSchema } from "./chart.js";

/** The client's question to the server. */
export const CHART_REQUEST = "loadmark/chart";

const place = v.object({ uri: v.string(), line: v.number(), character: v.number() });

const chartQuestion = v.object({
  /** The caret; positions count from 0, columns in UTF-16 units. Its mechanism comes first. */
  caret: v.nullable(place),
  /** The mechanism that is shown, kept where the caret is in none. */
  mechanism: v.nullable(v.string()),
});

const chartAnswer = v.variant("kind", [
  v.object({
    kind: v.literal("nothing"),
    /** What to do, in plain sentences. */
    reason: v.string(),
  }),
  v.object({
    kind: v.literal("chart"),
    chart: operatingPointChartSchema,
    /** The result for what is saved, where that differs from what is typed. */
    saved: v.nullable(operatingPointChartSchema),
    /** Why this is an old result, in plain sentences; null while it is current. */
    old: v.nullable(v.string()),
  }),
]);

const FILE_NAME_LIMIT = 120;
const SAVED_LIMIT = 32 * 1024 * 1024;
const fileName = v.pipe(v.string(), v.nonEmpty(), v.maxLength(FILE_NAME_LIMIT));

const pageMessage = v.variant("type", [
  /** The page is there, or there again; it may remember which mechanism it showed. */
  v.object({ type: v.literal("ready"), mechanism: v.nullable(v.string()) }),
  v.object({
    type: v.literal("savePicture"),
    fileName,
    /** A PNG file. */
    base64: v.pipe(v.string(), v.maxLength(SAVED_LIMIT), v.base64()),
  }),
  v.object({ type: v.literal("saveTable"), fileName, csv: v.pipe(v.string(), v.maxLength(SAVED_LIMIT)) }),
  /** Something that the page could not do, for the log. */
  v.object({ type: v.literal("trouble"), what: v.pipe(v.string(), v.maxLength(2000)) }),
]);

const hostMessage = v.variant("type", [v.object({ type: v.literal("show"), answer: chartAnswer })]);

export type ChartQuestion = v.InferOutput<typeof chartQuestion>;
export type ChartAnswer = v.InferOutput<typeof chartAnswer>;
/** From the chart's page to its host. */
export type PageMessage = v.InferOutput<typeof pageMessage>;
/** From the host to the chart's page. */
export type HostMessage = v.InferOutput<typeof hostMessage>;

export const readChartQuestion = readerOf(chartQuestion);
export const readChartAnswer = readerOf(chartAnswer);
export const readPageMessage = readerOf(pageMessage);
export const readHostMessage = readerOf(hostMessage);

/** `undefined` for anything else than the schema's; unknown fields are dropped. */
function readerOf<T>(schema: v.GenericSchema<unknown, T>): (message: unknown) => T | undefined {
  return (message) => {
    const result = v.safeParse(schema, message);
    return result.success ? result.output : undefined;
  };
}
