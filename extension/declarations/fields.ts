/**
 * The kinds of field that declarations have: quantities, plain numbers, objects with known fields, built things.
 *
 * Each schema gives one sentence per refusal, with the number that is wrong. Limits are those of what can exist, not of what is wise.
 */
import * as v from "valibot";
import { parseQuantity } from "../units/parse.js";
import { DIMENSIONS, type Dimension } from "../units/table.js";
import type { Range } from "./quantities.js";

/** Bounds in the units of the text `say`; `above` is exclusive. */
export interface Limits {
  readonly above?: number;
  readonly min?: number;
  readonly max?: number;
  /** How the bounds are told, such as "more than 0". */
  readonly say: string;
}

export const POSITIVE: Limits = { above: 0, say: "more than 0" };
export const NOT_NEGATIVE: Limits = { min: 0, say: "0 or more" };
export const SHARE: Limits = { min: 0, max: 1, say: "from 0 to 1" };
export const POSITIVE_SHARE: Limits = { above: 0, max: 1, say: "more than 0 and at most 1" };
export const ANY: Limits = { say: "" };

/** A quantity string of `dimension`, or a range of two. `Q` is its template-literal type. */
export function quantity<Q extends string>(dimension: Dimension, limits: Limits): v.GenericSchema<unknown, Q | Range<Q>> {
  const refusal = (input: unknown): string | undefined => {
    const { noun, example } = DIMENSIONS[dimension];
    if (typeof input !== "string") return `here goes ${noun} such as "${example}", not ${tell(input)}`;
    const parsed = parseQuantity(input, dimension);
    if (!parsed.ok) return parsed.message;
    return isWithin(parsed.si, limits) ? undefined : `"${input}" is impossible here: ${noun} must be ${limits.say}`;
  };
  return rangeOr<Q>(refusal);
}

/** A plain number, or a range of two. */
export function number(limits: Limits): v.GenericSchema<unknown, number | Range<number>> {
  return rangeOr<number>((input) => numberRefusal(input, limits));
}

/** A whole number from 1: teeth, motors, starts. */
export function count(noun: string): v.GenericSchema<unknown, number> {
  return v.custom<number>(
    (input) => Number.isSafeInteger(input) && (input as number) >= 1,
    (issue) => `${noun} must be a whole number from 1, not ${tell(issue.input)}`,
  );
}

/** An object with these fields and no others. */
export function fields<const Entries extends v.ObjectEntries>(entries: Entries) {
  const names = Object.keys(entries);
  return v.pipe(
    v.looseObject(entries, (issue) => `here goes an object with ${names.join(", ")}, not ${tell(issue.input)}`),
    v.rawCheck(({ dataset, addIssue }) => {
      const input: unknown = dataset.value;
      if (typeof input !== "object" || input === null || Array.isArray(input)) return;
      for (const [key, value] of Object.entries(input)) {
        if (names.includes(key)) continue;
        const here = input as Record<string, unknown>;
        addIssue({
          message: `"${key}" is not a known field`,
          input: value,
          expected: names.join(", "),
          path: [{ type: "object", origin: "key", input: here, key, value }],
        });
      }
    }),
  );
}

/** Something that another word built, told apart by its `kind`. */
export function builtBy<Built extends { readonly kind: string }>(
  kinds: readonly Built["kind"][],
  noun: string,
): v.GenericSchema<unknown, Built> {
  return v.custom<Built>(
    (input) => isBuilt(input) && kinds.includes(input.kind as Built["kind"]),
    (issue) => `here goes ${noun}, not ${tell(issue.input)}`,
  );
}

/** One of a few words. */
export function word<const Words extends readonly string[]>(...words: Words): v.GenericSchema<unknown, Words[number]> {
  return v.custom<Words[number]>(
    (input) => typeof input === "string" && words.includes(input),
    (issue) => `here goes ${words.map((one) => `"${one}"`).join(" or ")}, not ${tell(issue.input)}`,
  );
}

/** A name for people: not empty. */
export const name: v.GenericSchema<unknown, string> = v.custom<string>(
  (input) => typeof input === "string" && input.trim() !== "",
  (issue) => `here goes a name in quotes, not ${tell(issue.input)}`,
);

/** Adds a check over several fields; `refuse` gets a well-formed object and names the field to blame. */
export function together<Output extends object>(
  schema: v.GenericSchema<unknown, Output>,
  refuse: (output: Output) => { readonly field: string; readonly message: string } | undefined,
): v.GenericSchema<unknown, Output> {
  return v.pipe(
    schema,
    v.rawCheck(({ dataset, addIssue }) => {
      if (!dataset.typed) return;
      const refusal = refuse(dataset.value);
      if (refusal === undefined) return;
      const input = dataset.value as Record<string, unknown>;
      const value = input[refusal.field];
      addIssue({ message: refusal.message, path: [{ type: "object", origin: "value", input, key: refusal.field, value }] });
    }),
  );
}

/** A value as it is told in a message. */
export function tell(input: unknown): string {
  if (typeof input === "string") return JSON.stringify(input.length <= 40 ? input : `${input.slice(0, 39)}…`);
  if (isBuilt(input)) return `a ${input.kind}`;
  if (Array.isArray(input)) return "a list";
  if (typeof input === "object" && input !== null) return "an object";
  return input === undefined ? "nothing" : `${typeof input === "function" ? "a function" : String(input)}`;
}

function rangeOr<Q extends string | number>(
  refusal: (input: unknown) => string | undefined,
): v.GenericSchema<unknown, Q | Range<Q>> {
  const refusalOfAny = (input: unknown) => (isRange(input) ? (refusal(input.low) ?? refusal(input.high)) : refusal(input));
  return v.custom<Q | Range<Q>>(
    (input) => refusalOfAny(input) === undefined,
    (issue) => refusalOfAny(issue.input) ?? "",
  );
}

function numberRefusal(input: unknown, limits: Limits): string | undefined {
  if (typeof input !== "number" || !Number.isFinite(input)) return `here goes a plain number, not ${tell(input)}`;
  return isWithin(input, limits) ? undefined : `${input} is impossible here: it must be ${limits.say}`;
}

function isWithin(value: number, limits: Limits): boolean {
  return (
    (limits.above === undefined || value > limits.above) &&
    value >= (limits.min ?? -Infinity) &&
    value <= (limits.max ?? Infinity)
  );
}

function isRange(input: unknown): input is Range<string | number> {
  return isBuilt(input) && input.kind === "between";
}

function isBuilt(input: unknown): input is { readonly kind: string } {
  return typeof input === "object" && input !== null && "kind" in input && typeof input.kind === "string";
}
