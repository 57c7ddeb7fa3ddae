/** From a path inside a declaration's argument to the characters that hold the value. */
import type { Span, Value } from "../evaluator/value.js";

/** The expression of the value at `path`, or `undefined` where nothing is written there. */
export function spanAt(value: Value, path: readonly (string | number)[]): Span | undefined {
  return valueAt(value, path)?.origin.span;
}

/** The value at `path`. */
export function valueAt(value: Value, path: readonly (string | number)[]): Value | undefined {
  const [key, ...rest] = path;
  if (key === undefined) return value;
  if (!value.known) return undefined;
  const { data } = value;
  const inner =
    data.kind === "object"
      ? data.entries.get(String(key))
      : data.kind === "array" && typeof key === "number"
        ? data.items[key]
        : undefined;
  return inner === undefined ? undefined : valueAt(inner, rest);
}
