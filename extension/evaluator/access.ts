/**
 * Properties and elements: `a.b`, `a["b"]`, `a[0]`, `a?.b`, of everything that a value may be.
 *
 * A property that isn't there is a located unknown with "did you mean", not `undefined`: it is nearly always a slip.
 */
import type ts from "typescript";
import { fromPlain } from "./built.js";
import { callableOf } from "./callable.js";
import { memberOfClass } from "./classes.js";
import type { Context, Frame } from "./context.js";
import { findDeclaredMember } from "./enums.js";
import { exportsOf } from "./exports.js";
import { evaluateGlobalMember } from "./globals.js";
import { exportOf, follow } from "./modules.js";
import { dependent, known, primitive, quote, spanOf, suggest, unknown, unsupported } from "./unknown.js";
import type { Known, Origin, Span, Value } from "./value.js";

export interface Property {
  readonly name: string;
  readonly value: Value;
  /** Where the name is written. */
  readonly key?: Span;
}

export function evaluatePropertyAccess(ctx: Context, node: ts.PropertyAccessExpression, frame: Frame): Value {
  return evaluateLink(ctx, node, frame) ?? skipped(node, frame);
}

export function evaluateElementAccess(ctx: Context, node: ts.ElementAccessExpression, frame: Frame): Value {
  return evaluateLink(ctx, node, frame) ?? skipped(node, frame);
}

/** One link of a chain of accesses; `undefined` when `?.` further left cut the chain short. */
export function evaluateLink(
  ctx: Context,
  node: ts.PropertyAccessExpression | ts.ElementAccessExpression,
  frame: Frame,
): Value | undefined {
  const { ts } = ctx;
  const span = spanOf(node, frame.module);
  const declared = ts.isPropertyAccessExpression(node)
    ? findDeclaredMember(ctx, node.expression, node.name.text, frame)
    : undefined;
  if (declared !== undefined) return located(declared, node, frame, undefined);
  const base = evaluateBase(ctx, node, frame);
  if (base === undefined) return undefined;
  if (!base.known) return dependent(node, frame.module, { kind: "access", span, from: [base.origin] }, base);
  if (ts.isPropertyAccessExpression(node)) {
    if (node.name.text === "")
      return unknown("missing", "Nothing is written here yet.", "", { kind: "access", span, from: [base.origin] });
    return getProperty(ctx, base, node.name.text, node, frame);
  }
  const index = ctx.evaluate(node.argumentExpression, frame);
  if (!index.known) return dependent(node, frame.module, { kind: "access", span, from: [base.origin, index.origin] }, index);
  if (index.data.kind !== "primitive")
    return unsupported(node, frame.module, "looks up something that is not a name or a number");
  return getProperty(ctx, base, String(index.data.value), node, frame, index.origin);
}

/** What stands before the dot; `undefined` when the chain is cut short here or further left. */
export function evaluateBase(
  ctx: Context,
  node: ts.PropertyAccessExpression | ts.ElementAccessExpression | ts.CallExpression,
  frame: Frame,
): Value | undefined {
  const { ts } = ctx;
  const before = withoutBang(ctx, node.expression);
  // Inside one chain, a `?.` further left cuts all of it short.
  const goesOn = (before.flags & ts.NodeFlags.OptionalChain) !== 0;
  const isAccess = ts.isPropertyAccessExpression(before) || ts.isElementAccessExpression(before);
  const base = isAccess && goesOn ? evaluateLink(ctx, before, frame) : ctx.evaluate(node.expression, frame);
  if (base === undefined || node.questionDotToken === undefined) return base;
  if (!base.known) {
    const absent = base.reason.code === "no-such-property" && base.cause === undefined;
    return absent ? undefined : base;
  }
  const nullish = base.data.kind === "primitive" && (base.data.value ?? undefined) === undefined;
  return nullish ? undefined : base;
}

function withoutBang({ ts }: Context, expression: ts.Expression): ts.Expression {
  let bare = expression;
  while (ts.isNonNullExpression(bare)) bare = bare.expression;
  return bare;
}

/** A property of a known value, located at the access. */
export function getProperty(ctx: Context, base: Known, name: string, node: ts.Node, frame: Frame, index?: Origin): Value {
  const property = findProperty(ctx, base, name, node, frame);
  return property === undefined ? missingProperty(ctx, base, name, node, frame) : located(property, node, frame, index);
}

function located({ value, key }: Pick<Property, "value" | "key">, node: ts.Node, frame: Frame, index: Origin | undefined): Value {
  const from = index === undefined || index.kind === "literal" ? [value.origin] : [value.origin, index];
  const origin: Origin = {
    kind: "access",
    span: spanOf(node, frame.module),
    from,
    ...(key === undefined ? {} : { declaredAt: key }),
  };
  return value.known ? known(value.data, origin) : dependent(node, frame.module, origin, value);
}

/** The elements that a value gives when it is spread or looped over. */
export function listItems(ctx: Context, { data, origin }: Known): readonly Value[] | undefined {
  if (data.kind === "array") return data.items;
  if (data.kind === "primitive" && typeof data.value === "string")
    return [...data.value].map((character) => primitive(character, origin));
  if (data.kind === "built" && Array.isArray(data.built))
    return data.built.map((item) => fromPlain(ctx, item, origin, data.call));
  return undefined;
}

/** The own properties of a value, in order; `undefined` where they can't be listed. */
export function listProperties(ctx: Context, whole: Known): readonly Property[] | undefined {
  const { data, origin } = whole;
  switch (data.kind) {
    case "object":
      return [...data.entries].map(([name, value]) => withKey(name, value, data.keys.get(name)));
    case "array":
      return data.items.map((value, index) => ({ name: String(index), value }));
    case "built":
      return Object.entries(data.built).map(([name, inner]) => ({ name, value: fromPlain(ctx, inner, origin, data.call, name) }));
    case "primitive":
      if (typeof data.value !== "string") return [];
      return [...data.value].map((character, index) => ({ name: String(index), value: primitive(character, origin) }));
    case "module":
      return moduleProperties(ctx, data.file, origin.span);
    default:
      return undefined;
  }
}

function findProperty(ctx: Context, base: Known, name: string, node: ts.Node, frame: Frame): Property | undefined {
  const { data, origin } = base;
  const span = spanOf(node, frame.module);
  switch (data.kind) {
    case "object": {
      const value = data.entries.get(name);
      return value === undefined ? undefined : withKey(name, value, data.keys.get(name));
    }
    case "array": {
      if (name === "length") return { name, value: primitive(data.items.length, origin) };
      const item = isIndex(name) ? data.items[Number(name)] : undefined;
      return item === undefined ? undefined : { name, value: item };
    }
    case "primitive": {
      if (typeof data.value !== "string") return undefined;
      if (name === "length") return { name, value: primitive(data.value.length, origin) };
      const character = isIndex(name) ? data.value[Number(name)] : undefined;
      return character === undefined ? undefined : { name, value: primitive(character, origin) };
    }
    case "built":
      if (!Object.hasOwn(data.built, name)) return undefined;
      return { name, value: fromPlain(ctx, Reflect.get(data.built, name), origin, data.call, name) };
    case "module": {
      const module = ctx.modules.get(data.file);
      if (module === undefined) return undefined;
      return { name, value: ctx.valueOfTarget(follow(ctx, exportOf(ctx, { kind: "module", module }, name, span)), span) };
    }
    case "function":
      return memberOfFunction(ctx, base, name, span);
  }
}

function memberOfFunction(ctx: Context, base: Known, name: string, span: Span): Property | undefined {
  const callable = callableOf(base.data);
  const origin: Origin = { kind: "access", span, from: [base.origin] };
  if (callable?.kind === "global") return { name, value: evaluateGlobalMember(callable.name, name, span, origin) };
  if (callable?.kind === "library") return { name, value: ctx.valueOfTarget(exportOf(ctx, callable, name, span), span) };
  if (callable?.kind === "class") return memberOfClass(ctx, callable, name);
  return undefined;
}

function missingProperty(ctx: Context, base: Known, name: string, node: ts.Node, frame: Frame): Value {
  const { data } = base;
  const origin: Origin = { kind: "access", span: spanOf(node, frame.module), from: [base.origin] };
  const text = quote(node, frame.module);
  const nullish = data.kind === "primitive" && (data.value ?? undefined) === undefined;
  if (nullish) return unknown("unsupported", `${text} reads a property of ${data.value}.`, "", origin);
  const inherited = data.kind === "function" || name in Object.prototype || (data.kind === "array" && name in Array.prototype);
  const ofPrimitive = data.kind === "primitive" && name in Object(data.value);
  if (inherited || ofPrimitive) return unsupported(node, frame.module, "is not followed");
  if (data.kind === "array") {
    const count = data.items.length;
    return unknown(
      "no-such-property",
      `${text} does not exist: the list has ${count} element${count === 1 ? "" : "s"}.`,
      "",
      origin,
    );
  }
  const names = (listProperties(ctx, base) ?? []).map((property) => property.name).filter((each) => !isIndex(each));
  const hint = suggest(name, names);
  return unknown("no-such-property", `${text} does not exist${hint}`, "", origin);
}

function moduleProperties(ctx: Context, file: string, span: Span): readonly Property[] | undefined {
  const module = ctx.modules.get(file);
  if (module === undefined) return undefined;
  const { named, stars } = exportsOf(ctx.ts, module.source);
  // What a star passes on is found by name only.
  if (stars.length > 0) return undefined;
  const names = [...named.keys()].filter((name) => name !== "export=").sort();
  return names.map((name) => {
    const target = follow(ctx, exportOf(ctx, { kind: "module", module }, name, span));
    return { name, value: ctx.valueOfTarget(target, span) };
  });
}

function withKey(name: string, value: Value, key: Span | undefined): Property {
  return key === undefined ? { name, value } : { name, value, key };
}

function isIndex(name: string): boolean {
  return /^(0|[1-9]\d*)$/.test(name);
}

function skipped(node: ts.Node, frame: Frame): Value {
  return primitive(undefined, { kind: "access", span: spanOf(node, frame.module), from: [] });
}
