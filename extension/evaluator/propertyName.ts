/** Names of properties: as they are written, and in the order in which an object lists them. */
import type ts from "typescript";
import type { Context, Frame } from "./context.js";
import { unsupported } from "./unknown.js";
import type { Unknown, Value } from "./value.js";

/** The name of a property as it is written; an unknown where only the running program knows it. */
export function evaluateName(ctx: Context, name: ts.PropertyName, frame: Frame): string | Unknown {
  const { ts } = ctx;
  if (ts.isNumericLiteral(name)) return String(Number(name.text));
  if (ts.isIdentifier(name) || ts.isStringLiteralLike(name) || ts.isPrivateIdentifier(name)) return name.text;
  if (!ts.isComputedPropertyName(name)) return unsupported(name, frame.module, "is not followed as a name");
  const value = ctx.evaluate(name.expression, frame);
  if (!value.known) return value;
  if (value.data.kind !== "primitive") return unsupported(name, frame.module, "is not followed as a name");
  return String(value.data.value);
}

/** Whole numbers come first in an object, in ascending order, however they were written. */
export function inOrder(entries: Map<string, Value>): Map<string, Value> {
  const isIndex = (name: string) => /^(0|[1-9]\d{0,9})$/.test(name) && Number(name) < 2 ** 32 - 1;
  const indices = [...entries].filter(([name]) => isIndex(name));
  if (indices.length === 0) return entries;
  indices.sort(([a], [b]) => Number(a) - Number(b));
  return new Map([...indices, ...[...entries].filter(([name]) => !isIndex(name))]);
}
