/**
 * Array and object literals, with spread, shorthand and computed names.
 *
 * An unknown element stays an unknown element; an unknown name or an unknown spread makes the whole literal unknown, because
 * nobody can tell what it overwrites.
 */
import type ts from "typescript";
import { listItems, listProperties } from "./access.js";
import { callableData } from "./callable.js";
import type { Context, Frame } from "./context.js";
import { originOf } from "./operations.js";
import { evaluateName, inOrder } from "./propertyName.js";
import { dependent, known, spanOf, tooDeep, unsupported } from "./unknown.js";
import type { Origin, Span, Unknown, Value } from "./value.js";

/** Lists longer than this are not followed: spreading a list into itself forty times must not fill the memory. */
export const MOST_ITEMS = 10_000;

export function evaluateArray(ctx: Context, node: ts.ArrayLiteralExpression, frame: Frame): Value {
  const items = evaluateElements(ctx, node.elements, frame);
  if (!Array.isArray(items)) return dependent(node, frame.module, originOf("array", node, frame, [items]), items);
  if (items.length > MOST_ITEMS) return tooDeep(node, frame.module);
  return known({ kind: "array", items }, originOf("array", node, frame, items));
}

/** The elements of a list or the arguments of a call, spread out; the unknown that keeps their number open, if any does. */
export function evaluateElements(ctx: Context, nodes: readonly ts.Expression[], frame: Frame): Value[] | Unknown {
  const { ts } = ctx;
  const items: Value[] = [];
  for (const node of nodes) {
    if (ts.isOmittedExpression(node)) return unsupported(node.parent, frame.module, "leaves an element out");
    if (!ts.isSpreadElement(node)) {
      items.push(ctx.evaluate(node, frame));
      continue;
    }
    const whole = ctx.evaluate(node.expression, frame);
    if (!whole.known) return dependent(node, frame.module, originOf("access", node, frame, [whole]), whole);
    const inner = listItems(ctx, whole);
    if (inner === undefined) return unsupported(node, frame.module, "spreads something that is not a list");
    if (items.length + inner.length > MOST_ITEMS) return tooDeep(node, frame.module);
    items.push(...inner.map((item) => passOn(item, node, frame)));
  }
  return items;
}

export function evaluateObject(ctx: Context, node: ts.ObjectLiteralExpression, frame: Frame): Value {
  const entries = new Map<string, Value>();
  const keys = new Map<string, Span>();
  for (const property of node.properties) {
    const failure = addProperty(ctx, property, frame, entries, keys);
    if (failure !== undefined) return dependent(node, frame.module, originOf("object", node, frame, [failure]), failure);
  }
  return known({ kind: "object", entries: inOrder(entries), keys }, originOf("object", node, frame, [...entries.values()]));
}

/** The same value, as it comes in at another place. */
export function passOn(value: Value, node: ts.Node, frame: Frame): Value {
  const origin: Origin = { kind: "access", span: spanOf(node, frame.module), from: [value.origin] };
  return value.known ? known(value.data, origin) : dependent(node, frame.module, origin, value);
}

function addProperty(
  ctx: Context,
  property: ts.ObjectLiteralElementLike,
  frame: Frame,
  entries: Map<string, Value>,
  keys: Map<string, Span>,
): Unknown | undefined {
  const { ts } = ctx;
  if (ts.isSpreadAssignment(property)) return addSpread(ctx, property, frame, entries, keys);
  const name = evaluateName(ctx, property.name, frame);
  if (typeof name !== "string") return name;
  if (name === "__proto__" && ts.isPropertyAssignment(property)) return unsupported(property, frame.module, "sets a prototype");
  keys.set(name, spanOf(property.name, frame.module));
  if (ts.isPropertyAssignment(property)) entries.set(name, ctx.evaluate(property.initializer, frame));
  else if (ts.isShorthandPropertyAssignment(property)) entries.set(name, ctx.evaluate(property.name, frame));
  else if (ts.isMethodDeclaration(property)) {
    const origin = originOf("literal", property, frame, []);
    entries.set(name, known(callableData(name, { kind: "closure", node: property, frame }), origin));
  } else entries.set(name, unsupported(property.name, frame.module, "is worked out each time it is read"));
  return undefined;
}

function addSpread(
  ctx: Context,
  node: ts.SpreadAssignment,
  frame: Frame,
  entries: Map<string, Value>,
  keys: Map<string, Span>,
): Unknown | undefined {
  const whole = ctx.evaluate(node.expression, frame);
  if (!whole.known) return dependent(node, frame.module, originOf("access", node, frame, [whole]), whole);
  const properties = listProperties(ctx, whole);
  if (properties === undefined) return unsupported(node, frame.module, "spreads something that is not an object");
  for (const { name, value, key } of properties) {
    entries.set(name, passOn(value, node, frame));
    if (key === undefined) keys.delete(name);
    else keys.set(name, key);
  }
  return undefined;
}
