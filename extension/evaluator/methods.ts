/**
 * Methods of lists, texts and numbers that change nothing: `map`, `reduce`, `slice`, `toFixed`, `repeat` and their like.
 *
 * A fixed list; methods that depend on the locale or change the list are not on it.
 */
import type ts from "typescript";
import { getProperty } from "./access.js";
import { evaluateElements, MOST_ITEMS } from "./aggregates.js";
import { type Callable, callableOf } from "./callable.js";
import type { Context, Frame } from "./context.js";
import { callWith } from "./functions.js";
import { finish, isTruthy, originOf } from "./operations.js";
import { asNumber, asText, LONGEST_TEXT, type Outcome, type Primitive, refuse } from "./operators.js";
import { dependent, known, primitive, quote, tooDeep, unknown, unsupported } from "./unknown.js";
import type { Known, Origin, Unknown, Value } from "./value.js";

const CHANGES_LIST = new Set(["push", "pop", "shift", "unshift", "splice", "sort", "reverse", "fill", "copyWithin"]);
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
const TEXT_METHODS = new Set([
  "at",
  "charAt",
  "charCodeAt",
  "concat",
  "endsWith",
  "includes",
  "indexOf",
  "lastIndexOf",
  "padEnd",
  "padStart",
  "repeat",
  "replace",
  "replaceAll",
  "slice",
  "split",
  "startsWith",
  "substring",
  "toLowerCase",
  "toString",
  "toUpperCase",
  "trim",
  "trimEnd",
  "trimStart",
]);
const NUMBER_METHODS = new Set(["toExponential", "toFixed", "toPrecision", "toString"]);

/** Calls a method of a list or a plain value. */
export function applyMethod(ctx: Context, receiver: Known, name: string, node: ts.CallExpression, frame: Frame): Value {
  const { data } = receiver;
  const args = evaluateElements(ctx, node.arguments, frame);
  if (!Array.isArray(args)) return dependent(node, frame.module, originOf("call", node, frame, [receiver, args]), args);
  const origin = originOf("call", node, frame, [receiver, ...args]);
  if (data.kind === "array") return applyToList(ctx, receiver, data.items, name, args, node, frame, origin);
  const plain: Primitive[] = [];
  for (const arg of args) {
    if (!arg.known) return dependent(node, frame.module, origin, arg);
    if (arg.data.kind !== "primitive") return unsupported(node, frame.module, "is not followed", origin.from);
    plain.push(arg.data.value);
  }
  const value = data.kind === "primitive" ? data.value : undefined;
  if (typeof value === "string" && name === "split") return splitText(value, plain, node, frame, origin);
  if (typeof value === "string" && TEXT_METHODS.has(name)) return finish(node, frame, origin, applyToText(value, name, plain));
  if (typeof value === "number" && NUMBER_METHODS.has(name))
    return finish(node, frame, origin, applyToNumber(value, name, plain));
  return missingMethod(ctx, receiver, name, node, frame);
}

function applyToList(
  ctx: Context,
  receiver: Known,
  items: readonly Value[],
  name: string,
  args: readonly Value[],
  node: ts.CallExpression,
  frame: Frame,
  origin: Origin,
): Value {
  if (CHANGES_LIST.has(name)) return unsupported(node, frame.module, "changes the list");
  if (VISITING.has(name) || name === "reduce" || name === "reduceRight") {
    const [callback] = args;
    if (callback === undefined) return unknown("missing", `${quote(node, frame.module)} has no function yet.`, "", origin);
    if (!callback.known) return dependent(node, frame.module, origin, callback);
    const callable = callableOf(callback.data);
    const call = (values: readonly Value[], turn: number): Value => callOne(ctx, callable, values, node, frame, turn);
    if (!VISITING.has(name) && callable?.kind !== "closure")
      return unsupported(node, frame.module, "calls a function that is not followed");
    if (!VISITING.has(name))
      return reduce(name === "reduce" ? items : [...items].reverse(), receiver, name, args, call, node, frame);
    return visit(items, receiver, name, call, node, frame, origin);
  }
  return listPart(items, name, args, node, frame, origin) ?? missingMethod(ctx, receiver, name, node, frame);
}

function callOne(
  ctx: Context,
  callable: Callable | undefined,
  values: readonly Value[],
  node: ts.CallExpression,
  frame: Frame,
  turn: number,
): Value {
  if (callable?.kind === "closure") return callWith(ctx, callable, values, node, frame, turn);
  // A function that looks at more than its first argument would see the index too: `map(parseInt)`.
  const apply = callable?.kind === "native" || callable?.kind === "global" ? callable.apply : undefined;
  const [first] = values;
  if (apply === undefined || first === undefined || !isUnary(callable)) {
    return unsupported(node, frame.module, "calls a function that is not followed");
  }
  const origin = originOf("call", node, frame, [first]);
  if (!first.known) return dependent(node, frame.module, origin, first);
  if (first.data.kind !== "primitive") return unsupported(node, frame.module, "calculates with a whole object");
  return finish(node, frame, origin, apply([first.data.value]));
}

function isUnary(callable: Callable | undefined): boolean {
  return callable?.kind === "native" ? callable.unary : callable?.kind === "global";
}

function visit(
  items: readonly Value[],
  receiver: Known,
  name: string,
  call: (values: readonly Value[], turn: number) => Value,
  node: ts.CallExpression,
  frame: Frame,
  origin: Origin,
): Value {
  const made: Value[] = [];
  const order = name.startsWith("findLast") ? [...items.keys()].reverse() : [...items.keys()];
  for (const index of order) {
    if (made.length > MOST_ITEMS) return tooDeep(node, frame.module);
    const item = items[index] as Value;
    const value = call([item, primitive(index, origin), receiver], index);
    if (name === "map") made.push(value);
    else if (name === "forEach") continue;
    else if (!value.known) return dependent(node, frame.module, origin, value);
    else if (name === "flatMap") made.push(...(value.data.kind === "array" ? value.data.items : [value]));
    else if (name === "every" && !isTruthy(value)) return primitive(false, origin);
    else if (name === "every" || !isTruthy(value)) continue;
    else if (name === "filter") made.push(item);
    else if (name === "some") return primitive(true, origin);
    else if (name === "find" || name === "findLast") return picked(item, node, frame);
    else return primitive(index, origin);
  }
  if (name === "map" || name === "filter" || name === "flatMap") {
    return known({ kind: "array", items: made }, name === "map" ? originOf("call", node, frame, made) : origin);
  }
  if (name === "some" || name === "every") return primitive(name === "every", origin);
  return primitive(name.endsWith("Index") ? -1 : undefined, origin);
}

function reduce(
  items: readonly Value[],
  receiver: Known,
  name: string,
  args: readonly Value[],
  call: (values: readonly Value[], turn: number) => Value,
  node: ts.CallExpression,
  frame: Frame,
): Value {
  const [, start] = args;
  const begins = start === undefined ? 1 : 0;
  let total = start ?? items[0];
  if (total === undefined) return unsupported(node, frame.module, "reduces an empty list without a value to start from");
  for (const [turn, item] of items.slice(begins).entries()) {
    const position = begins + turn;
    const index = name === "reduce" ? position : items.length - 1 - position;
    total = call([total, item, primitive(index, originOf("call", node, frame, [])), receiver], turn);
  }
  return picked(total, node, frame);
}

/** Methods that give a part of the list, or tell something about it; `undefined` for any other. */
function listPart(
  items: readonly Value[],
  name: string,
  args: readonly Value[],
  node: ts.CallExpression,
  frame: Frame,
  origin: Origin,
): Value | undefined {
  if (name === "concat") {
    const open = args.find((arg) => !arg.known);
    if (open !== undefined && !open.known) return dependent(node, frame.module, origin, open);
    const all = [...items, ...args.flatMap((arg) => (arg.known && arg.data.kind === "array" ? arg.data.items : [arg]))];
    return all.length > MOST_ITEMS ? tooDeep(node, frame.module) : known({ kind: "array", items: all }, origin);
  }
  const plain: Primitive[] = [];
  for (const arg of args) {
    if (!arg.known) return dependent(node, frame.module, origin, arg);
    if (arg.data.kind !== "primitive") return undefined;
    plain.push(arg.data.value);
  }
  const [first, second] = plain;
  const numeric = plain.every((arg) => arg === undefined || typeof arg === "number");
  switch (name) {
    case "slice":
      return numeric ? known({ kind: "array", items: items.slice(first as number, second as number) }, origin) : undefined;
    case "toReversed":
      return known({ kind: "array", items: [...items].reverse() }, origin);
    case "at": {
      const item = numeric ? items.at(Number(first ?? 0)) : undefined;
      return item === undefined ? undefined : picked(item, node, frame);
    }
    case "includes":
    case "indexOf":
    case "join":
      return searchOrJoin(items, name, plain, node, frame, origin);
    default:
      return undefined;
  }
}

function searchOrJoin(
  items: readonly Value[],
  name: string,
  args: readonly Primitive[],
  node: ts.CallExpression,
  frame: Frame,
  origin: Origin,
): Value {
  const open = items.find((item): item is Unknown => !item.known);
  if (open !== undefined) return dependent(node, frame.module, origin, open);
  const plain: Primitive[] = [];
  for (const item of items) {
    if (item.known && item.data.kind === "primitive") plain.push(item.data.value);
    else if (name === "join") return unsupported(node, frame.module, "puts a whole object into a text");
    else plain.push(undefined);
  }
  if (args.length !== 1 && name !== "join") return unsupported(node, frame.module, "is not followed");
  // An object in the list stands as `undefined` here, so a search for that could find the wrong thing.
  if (name !== "join" && args[0] === undefined) return unsupported(node, frame.module, "searches for nothing");
  if (name === "join") return finish(node, frame, origin, asText(plain.join(args[0] === undefined ? "," : String(args[0]))));
  return primitive(name === "includes" ? plain.includes(args[0]) : plain.indexOf(args[0]), origin);
}

function splitText(text: string, [separator, limit]: readonly Primitive[], node: ts.Node, frame: Frame, origin: Origin): Value {
  if (typeof separator !== "string" || limit !== undefined)
    return unsupported(node, frame.module, "is not followed", origin.from);
  return known({ kind: "array", items: text.split(separator).map((part) => primitive(part, origin)) }, origin);
}

function applyToText(text: string, name: string, args: readonly Primitive[]): Outcome {
  const kinds = args.map((arg) => typeof arg);
  if (!kinds.every((kind) => kind === "string" || kind === "number" || kind === "undefined")) return refuse("is not followed");
  if (
    (name === "repeat" || name.startsWith("pad")) &&
    !(Number(args[0]) >= 0 && Number(args[0]) * (text.length + 1) <= LONGEST_TEXT * 2)
  ) {
    return refuse("makes a very long text");
  }
  return outcomeOf(() => (String.prototype as unknown as Methods)[name]?.apply(text, [...args]));
}

function applyToNumber(value: number, name: string, args: readonly Primitive[]): Outcome {
  if (!args.every((arg) => typeof arg === "number" || arg === undefined)) return refuse("is not followed");
  return outcomeOf(() => (Number.prototype as unknown as Methods)[name]?.apply(value, [...args]));
}

type Methods = Readonly<Record<string, ((...args: Primitive[]) => unknown) | undefined>>;

/** The language's own methods throw for a count or a base out of range, and so would the program. */
function outcomeOf(apply: () => unknown): Outcome {
  try {
    const value = apply();
    if (typeof value === "string") return asText(value);
    if (typeof value === "number") return asNumber(value);
    return typeof value === "boolean" || value === undefined ? { ok: true, value } : refuse("is not followed");
  } catch {
    return refuse("throws an error");
  }
}

function picked(value: Value, node: ts.CallExpression, frame: Frame): Value {
  const origin = originOf("access", node, frame, [value]);
  return value.known ? known(value.data, origin) : dependent(node, frame.module, origin, value);
}

/** Says the same as reading the method without calling it would. */
function missingMethod(ctx: Context, receiver: Known, name: string, node: ts.CallExpression, frame: Frame): Value {
  const value = getProperty(ctx, receiver, name, node.expression, frame);
  return value.known ? unsupported(node, frame.module, "calls something that is not a function") : value;
}
