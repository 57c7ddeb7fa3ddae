/**
 * Methods of lists that call a function for each element: `map`, `filter`, `reduce` and their like.
 *
 * Each call opens a frame of its own, kept at the place of the call, so that what is built inside it is built once.
 */
import type ts from "typescript";
import { MOST_ITEMS } from "./aggregates.js";
import { type Callable, callableOf } from "./callable.js";
import type { Context, Frame } from "./context.js";
import { callWith } from "./functions.js";
import { finish, isTruthy, originOf } from "./operations.js";
import { dependent, known, primitive, quote, tooDeep, unknown, unsupported } from "./unknown.js";
import type { Known, Origin, Value } from "./value.js";

/** A method called on a list, with its arguments. */
export interface ListCall {
  readonly ctx: Context;
  readonly receiver: Known;
  readonly items: readonly Value[];
  readonly args: readonly Value[];
  readonly node: ts.CallExpression;
  readonly frame: Frame;
  /** Of a result that is made from all of it. */
  readonly origin: Origin;
}

const VISITING = new Set([
  "map",
  "filter",
  "find",
  "findLast",
  "findIndex",
  "findLastIndex",
  "some",
  "every",
  "flatMap",
  "forEach",
]);

/** Whether a method calls its function with the elements, one by one. */
export function isVisiting(name: string): boolean {
  return VISITING.has(name);
}

export function visitList(call: ListCall, name: string): Value {
  const { ctx, items, node, frame, origin, receiver } = call;
  const callable = callbackOf(call);
  if ("known" in callable) return callable;
  const made: Value[] = [];
  const order = name.startsWith("findLast") ? [...items.keys()].reverse() : [...items.keys()];
  for (const index of order) {
    if (made.length > MOST_ITEMS) return tooDeep(node, frame.module);
    const item = items[index] as Value;
    const value = callCallback(ctx, callable, [item, primitive(index, origin), receiver], node, frame, index);
    if (name === "map") made.push(value);
    else if (name === "forEach") continue;
    else if (!value.known) return dependent(node, frame.module, origin, value);
    else if (name === "flatMap") made.push(...(value.data.kind === "array" ? value.data.items : [value]));
    else if (isTruthy(value) === (name === "every")) continue;
    else if (name === "filter") made.push(item);
    else if (name === "some" || name === "every") return primitive(name === "some", origin);
    else return name.endsWith("Index") ? primitive(index, origin) : picked(item, node, frame);
  }
  if (name === "map") return known({ kind: "array", items: made }, originOf("call", node, frame, made));
  if (name === "filter" || name === "flatMap") return known({ kind: "array", items: made }, origin);
  if (name === "some" || name === "every") return primitive(name === "every", origin);
  return primitive(name.endsWith("Index") ? -1 : undefined, origin);
}

export function reduceList(call: ListCall, name: "reduce" | "reduceRight"): Value {
  const { ctx, args, node, frame, receiver } = call;
  const callable = callbackOf(call);
  if ("known" in callable) return callable;
  // A function of the language would see the index as well: `reduce(Math.max)`.
  if (callable.kind !== "closure") return unsupported(node, frame.module, "calls a function that is not followed");
  const items = name === "reduce" ? call.items : [...call.items].reverse();
  const [, start] = args;
  const begins = start === undefined ? 1 : 0;
  let total = start ?? items[0];
  if (total === undefined) return unsupported(node, frame.module, "reduces an empty list without a value to start from");
  for (const [turn, item] of items.slice(begins).entries()) {
    const position = begins + turn;
    const index = name === "reduce" ? position : items.length - 1 - position;
    total = callCallback(ctx, callable, [total, item, primitive(index, item.origin), receiver], node, frame, turn);
  }
  return picked(total, node, frame);
}

/** Calls a function with values; `turn` tells the calls from one place apart. */
export function callCallback(
  ctx: Context,
  callable: Callable,
  values: readonly Value[],
  node: ts.CallExpression,
  frame: Frame,
  turn: number,
): Value {
  if (callable.kind === "closure") return callWith(ctx, callable, values, node, frame, turn);
  // A function that looks at more than its first argument would see the index too: `map(parseInt)`.
  const isUnary = callable.kind === "native" ? callable.unary : callable.kind === "global";
  const apply = callable.kind === "native" || callable.kind === "global" ? callable.apply : undefined;
  const [first] = values;
  if (apply === undefined || first === undefined || !isUnary) {
    return unsupported(node, frame.module, "calls a function that is not followed");
  }
  const origin = originOf("call", node, frame, [first]);
  if (!first.known) return dependent(node, frame.module, origin, first);
  if (first.data.kind !== "primitive") return unsupported(node, frame.module, "calculates with a whole object");
  return finish(node, frame, origin, apply([first.data.value]));
}

function callbackOf({ args, node, frame, origin }: ListCall): Callable | Value {
  const [callback] = args;
  if (callback === undefined) return unknown("missing", `${quote(node, frame.module)} has no function yet.`, "", origin);
  if (!callback.known) return dependent(node, frame.module, origin, callback);
  return callableOf(callback.data) ?? unsupported(node, frame.module, "calls something that is not a function");
}

function picked(value: Value, node: ts.CallExpression, frame: Frame): Value {
  const origin = originOf("access", node, frame, [value]);
  return value.known ? known(value.data, origin) : dependent(node, frame.module, origin, value);
}
