/** From a path inside a declaration's argument to the value that is written there. */
import type { Value } from "../evaluator/value.js";

/** The value at `path`, or `undefined` where nothing is written there. */
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
