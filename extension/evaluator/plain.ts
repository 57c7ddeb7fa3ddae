/**
 * Hands a call's arguments to its definition as plain values, and finds what among them is unknown.
 *
 * An unknown becomes a symbol of its own, which no schema accepts and no two places share.
 */
import { listProperties } from "./access.js";
import type { Context } from "./context.js";
import type { Data, Unknown, Value } from "./value.js";

export interface PlainArguments {
  readonly plain: readonly unknown[];
  /** Each unknown once, with the path to it. */
  readonly unknowns: readonly { readonly path: readonly (string | number)[]; readonly unknown: Unknown }[];
}

export function toPlain(ctx: Context, args: readonly Value[]): PlainArguments {
  const unknowns: { path: readonly (string | number)[]; unknown: Unknown }[] = [];
  // What is shared stays shared: values may be a hundred levels of lists that each hold the last one twice.
  const made = new Map<Data, unknown>();
  /** Where the value that is being converted stands. */
  const path: (string | number)[] = [];
  const convertAt = (key: string | number, value: Value): unknown => {
    path.push(key);
    const plain = convert(value);
    path.pop();
    return plain;
  };
  const convert = (value: Value): unknown => {
    if (!value.known) {
      unknowns.push({ path: [...path], unknown: value });
      return Symbol("unknown");
    }
    const { data } = value;
    if (data.kind === "primitive") return data.value;
    if (data.kind === "built") return data.built;
    if (data.kind === "function") return () => undefined;
    if (made.has(data)) return made.get(data);
    made.set(data, undefined);
    const plain =
      data.kind === "array"
        ? data.items.map((item, index) => convertAt(index, item))
        : Object.fromEntries((listProperties(ctx, value) ?? []).map(({ name, value: inner }) => [name, convertAt(name, inner)]));
    made.set(data, plain);
    return plain;
  };
  return { plain: args.map((arg, index) => convertAt(index, arg)), unknowns };
}
