/** Accepted fields to SI numbers: the middle of a range stands for it (the worse end is the rules' business). */
import { parseAnyQuantity } from "../units/parse.js";
import type { Range } from "./quantities.js";

/** SI value of an accepted quantity or plain number; a range gives its middle. */
export function read(value: string | number | Range<string | number>): number {
  if (typeof value === "number") return value;
  if (typeof value === "string") return parseAnyQuantity(value)?.si ?? Number.NaN;
  return (read(value.low) + read(value.high)) / 2;
}

/** The same, or `fallback` where the field was left out. */
export function readOr<Fallback extends number | undefined>(
  value: string | number | Range<string | number> | undefined,
  fallback: Fallback,
): number | Fallback {
  return value === undefined ? fallback : read(value);
}

/** The object without its undefined fields: what does not apply is absent from SI data. */
export function present<T extends object>(object: T): Present<T> {
  return Object.fromEntries(Object.entries(object).filter(([, value]) => value !== undefined)) as Present<T>;
}

type Present<T> = { [K in keyof T as undefined extends T[K] ? never : K]: T[K] } & {
  [K in keyof T as undefined extends T[K] ? K : never]?: Exclude<T[K], undefined>;
};
