/**
 * Units inside the quantity strings of declarations, after a number and a space. Everything else is completed by TypeScript.
 *
 * The analysis must be of the very text that the caret is in.
 */
import type { Analysis } from "../analysis/analysis.js";
import { dimensionAt } from "../declarations/dimensions.js";
import type { DefinitionCall, Span, Value } from "../evaluator/value.js";
import { parseAnyQuantity } from "../units/parse.js";
import { DIMENSIONS, type Dimension, unitsOf } from "../units/table.js";
import { typeset } from "../units/write.js";
import { originsOf } from "./feeds.js";

export interface Completion {
  readonly label: string;
  /** What the label stands for. */
  readonly detail: string;
  /** What the unit that is there already, or begun, is replaced by. */
  readonly newText: string;
  readonly replaces: Span;
}

/** The most usual unit first; hosts must keep the order. */
export function completionsAt(analysis: Analysis, file: string, offset: number): Completion[] {
  const text = analysis.snapshot.read(file);
  if (typeof text !== "string") return [];
  for (const { call, value, path } of valuesIn(analysis)) {
    const written = [...originsOf(value)].find(
      ({ kind, span }) =>
        (kind === "literal" || kind === "template") && span.file === file && span.start < offset && offset <= span.end,
    );
    const replaces = written && unitPlace(text, written.span, offset);
    const dimension = replaces && dimensionOf(analysis, call, path);
    if (replaces !== undefined && dimension !== undefined) return unitsAt(replaces, dimension);
  }
  return [];
}

function unitsAt(replaces: Span, dimension: Dimension): Completion[] {
  const { noun } = DIMENSIONS[dimension];
  return unitsOf(dimension).map(({ symbol }) => ({
    label: symbol,
    detail: `${typeset(symbol)}, ${noun}`,
    newText: symbol,
    replaces,
  }));
}

/** The characters of the unit around the caret, when a number and one space stand before them. */
function unitPlace(text: string, { file, start, end }: Span, offset: number): Span | undefined {
  const quote = text[start];
  if (quote === undefined || !`"'\``.includes(quote)) return undefined;
  const before = /(?:^.[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?|\}) ([^\s"'`{}]*)$/s.exec(text.slice(start, offset));
  if (before === null) return undefined;
  const closed = end > start + 1 && text[end - 1] === quote ? end - 1 : end;
  if (offset > closed) return undefined;
  const after = /^[^\s"'`,;${}()]*/.exec(text.slice(offset, closed))?.[0].length ?? 0;
  return { file, start: offset - (before[1]?.length ?? 0), end: offset + after };
}

interface Place {
  readonly call: DefinitionCall;
  readonly value: Value;
  readonly path: readonly (string | number)[];
}

/** Every plain or unknown value among the arguments of all calls. */
function valuesIn({ files }: Analysis): Place[] {
  const calls = [...files.values()].flatMap((evaluation) => evaluation.calls);
  return calls.flatMap((call) => call.args.flatMap((arg, index) => placesIn(call, arg, [index])));
}

function placesIn(call: DefinitionCall, value: Value, path: readonly (string | number)[]): Place[] {
  if (!value.known) return [{ call, value, path }];
  const { data } = value;
  if (data.kind === "array") return data.items.flatMap((item, index) => placesIn(call, item, [...path, index]));
  if (data.kind === "object") return [...data.entries].flatMap(([key, item]) => placesIn(call, item, [...path, key]));
  return data.kind === "primitive" || data.kind === "built" ? [{ call, value, path }] : [];
}

function dimensionOf(analysis: Analysis, call: DefinitionCall, path: readonly (string | number)[]): Dimension | undefined {
  if (call.definition !== "between") return dimensionAt(call.definition, path);
  // A range has the dimension of the field that it stands in; while that is being written, of its other end.
  const around = valuesIn(analysis).find(({ value }) => isMadeBy(value, call));
  const inField = around && dimensionAt(around.call.definition, around.path);
  return inField ?? call.args.map(dimensionIn).find((dimension) => dimension !== undefined);
}

function isMadeBy(value: Value, { span }: DefinitionCall): boolean {
  return [...originsOf(value)].some(
    (one) => one.span.file === span.file && one.span.start === span.start && one.span.end === span.end,
  );
}

function dimensionIn(value: Value): Dimension | undefined {
  if (!value.known || value.data.kind !== "primitive" || typeof value.data.value !== "string") return undefined;
  return parseAnyQuantity(value.data.value)?.unit.dimension;
}
