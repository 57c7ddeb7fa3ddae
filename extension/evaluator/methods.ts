/**
 * Methods of texts and numbers that are pure: `toFixed`, `padStart`, `split` and their like; those of lists are in `listMethods.ts`.
 *
 * A fixed list; methods that depend on the locale are not on it.
 */
import type ts from "typescript";
import { getProperty } from "./access.js";
import { evaluateElements } from "./aggregates.js";
import type { Context, Frame } from "./context.js";
import { applyListMethod } from "./listMethods.js";
import { finish, originOf } from "./operations.js";
import { asNumber, asText, LONGEST_TEXT, type Outcome, type Primitive, refuse } from "./operators.js";
import { dependent, known, primitive, unsupported } from "./unknown.js";
import type { Known, Origin, Value } from "./value.js";

// biome-ignore format: one name a line would hide what the list says
const TEXT_METHODS = new Set([
  "at", "charAt", "charCodeAt", "concat", "endsWith", "includes", "indexOf", "lastIndexOf", "padEnd", "padStart", "repeat", "replace",
  "replaceAll", "slice", "startsWith", "substring", "toLowerCase", "toString", "toUpperCase", "trim", "trimEnd", "trimStart",
]);
const NUMBER_METHODS = new Set(["toExponential", "toFixed", "toPrecision", "toString"]);

type Methods = Readonly<Record<string, ((...args: Primitive[]) => unknown) | undefined>>;

/** Calls a method of a list or a plain value. */
export function applyMethod(ctx: Context, receiver: Known, name: string, node: ts.CallExpression, frame: Frame): Value {
  const { data } = receiver;
  const args = evaluateElements(ctx, node.arguments, frame);
  if (!Array.isArray(args)) return dependent(node, frame.module, originOf("call", node, frame, [receiver, args]), args);
  const origin = originOf("call", node, frame, [receiver, ...args]);
  const value =
    data.kind === "array"
      ? applyListMethod({ ctx, receiver, items: data.items, args, node, frame, origin }, name)
      : applyPlain(data.kind === "primitive" ? data.value : undefined, name, args, node, frame, origin);
  return value ?? missingMethod(ctx, receiver, name, node, frame);
}

function applyPlain(
  value: Primitive,
  name: string,
  args: readonly Value[],
  node: ts.Node,
  frame: Frame,
  origin: Origin,
): Value | undefined {
  const plain: Primitive[] = [];
  for (const arg of args) {
    if (!arg.known) return dependent(node, frame.module, origin, arg);
    if (arg.data.kind !== "primitive") return unsupported(node, frame.module, "is not followed", origin.from);
    plain.push(arg.data.value);
  }
  if (typeof value === "string" && name === "split") return splitText(value, plain, node, frame, origin);
  if (typeof value === "string" && TEXT_METHODS.has(name)) return finish(node, frame, origin, applyToText(value, name, plain));
  const isNumber = typeof value === "number" && NUMBER_METHODS.has(name);
  return isNumber ? finish(node, frame, origin, applyToNumber(value, name, plain)) : undefined;
}

function splitText(text: string, [separator, limit]: readonly Primitive[], node: ts.Node, frame: Frame, origin: Origin): Value {
  if (typeof separator !== "string" || limit !== undefined)
    return unsupported(node, frame.module, "is not followed", origin.from);
  return known({ kind: "array", items: text.split(separator).map((part) => primitive(part, origin)) }, origin);
}

function applyToText(text: string, name: string, args: readonly Primitive[]): Outcome {
  const kinds = args.map((arg) => typeof arg);
  if (!kinds.every((kind) => kind === "string" || kind === "number" || kind === "undefined")) return refuse("is not followed");
  const lengthens = name === "repeat" || name.startsWith("pad");
  if (lengthens && !(Math.abs(Number(args[0])) * (text.length + 1) <= LONGEST_TEXT * 2)) return refuse("makes a very long text");
  return outcomeOf(() => (String.prototype as unknown as Methods)[name]?.apply(text, [...args]));
}

function applyToNumber(value: number, name: string, args: readonly Primitive[]): Outcome {
  if (!args.every((arg) => typeof arg === "number" || arg === undefined)) return refuse("is not followed");
  return outcomeOf(() => (Number.prototype as unknown as Methods)[name]?.apply(value, [...args]));
}

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

/** Says the same as reading the method without calling it would. */
function missingMethod(ctx: Context, receiver: Known, name: string, node: ts.CallExpression, frame: Frame): Value {
  const value = getProperty(ctx, receiver, name, node.expression, frame);
  return value.known ? unsupported(node, frame.module, "calls something that is not a function") : value;
}
