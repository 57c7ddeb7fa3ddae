/**
 * `as T`, `<T>x` and `as const`: types say nothing about values, but `as const` promises that nobody writes to a literal.
 */
import type ts from "typescript";
import type { Context, Frame } from "./context.js";
import { known } from "./unknown.js";
import type { Data, Value } from "./value.js";

export function evaluateAssertion(ctx: Context, node: ts.AsExpression | ts.TypeAssertion, frame: Frame): Value {
  const value = ctx.evaluate(node.expression, frame);
  if (!value.known || !isConst(ctx, node.type)) return value;
  return known(freezeDeep(value.data), value.origin);
}

/** A copy that counts as frozen, with everything inside it. */
function freezeDeep(data: Data): Data {
  if (data.kind === "array") return { ...data, items: data.items.map(freezeValue), frozen: true };
  if (data.kind !== "object") return data;
  const entries = new Map([...data.entries].map(([name, value]) => [name, freezeValue(value)]));
  return { ...data, entries, frozen: true };
}

function freezeValue(value: Value): Value {
  // Only what is written inside the literal is made constant; what a name stands for has its own declaration.
  const written = value.origin.kind === "array" || value.origin.kind === "object";
  return value.known && written ? known(freezeDeep(value.data), value.origin) : value;
}

function isConst(ctx: Context, type: ts.TypeNode): boolean {
  return ctx.ts.isTypeReferenceNode(type) && ctx.ts.isConstTypeReference(type);
}
