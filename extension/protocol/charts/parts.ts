/** What the messages of all views are made of: checked numbers, lists and texts. Knows no view. */
import * as v from "valibot";

export const number = v.pipe(v.number(), v.finite());
export const text = v.string();

/** What arrived is nobody's to change. */
export const listOf = <S extends v.GenericSchema>(item: S) => v.pipe(v.array(item), v.readonly());

/** A series: long, so checked in one go. */
export const numbers = v.custom<readonly number[]>((value) => Array.isArray(value) && value.every(Number.isFinite));

export const findingSchema = v.object({ rule: text, level: v.picklist(["error", "warning", "information"]), message: text });

/** What every chart says in words, whatever it plots. */
export const said = {
  state: v.picklist(["error", "warning", "fine", "unknown"]),
  /** A few words. */
  verdict: text,
  findings: listOf(findingSchema),
  assumed: listOf(text),
  notChecked: listOf(text),
};

/** An answer with a chart: the result of now, the saved one where that is another, and why it is old where it is. */
export function shownEntries<const V extends string, S extends v.GenericSchema>(view: V, chart: S) {
  return {
    kind: v.literal("chart"),
    view: v.literal(view),
    chart,
    saved: v.nullable(chart),
    /** Why this is not the result for the text of now, in a plain sentence; null where it is. */
    old: v.nullable(text),
  };
}

export type ChartFinding = v.InferOutput<typeof findingSchema>;
