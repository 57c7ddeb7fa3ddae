/**
 * Fields of classes: `static readonly TEETH = 48`, `readonly teeth = 48` through `this` or through an instance.
 *
 * A field counts only while nothing in its file writes to a property of that name, and another file couldn't either. What
 * constructors do is not followed.
 */
import type ts from "typescript";
import { type Callable, callableData, callableOf } from "./callable.js";
import type { Context, Frame } from "./context.js";
import { isExported } from "./exports.js";
import { isFrozen } from "./flow.js";
import { findChangeFrom } from "./mutation.js";
import { originOf } from "./operations.js";
import { isPropertyWritten, propertyUses } from "./properties.js";
import { evaluateName } from "./propertyName.js";
import { dependent, known, quote, quoteText, spanOf, unknown, unsupported } from "./unknown.js";
import type { Origin, Span, Value } from "./value.js";

type ClassCallable = Extract<Callable, { kind: "class" }>;
interface Member {
  readonly name: string;
  readonly value: Value;
  readonly key: Span;
}

export function evaluateClass(_ctx: Context, node: ts.ClassLikeDeclaration, frame: Frame): Value {
  const data = callableData(node.name?.text ?? "", { kind: "class", node, frame, instance: false });
  return known(data, originOf("literal", node, frame, []));
}

/** `this`, where it is plain which class it belongs to. */
export function evaluateThis(ctx: Context, node: ts.Expression, frame: Frame): Value {
  const { ts } = ctx;
  const holder = findThisHolder(ctx, node);
  if (holder === undefined || !ts.isClassLike(holder.parent)) return unsupported(node, frame.module, "depends on the caller");
  const owner = holder.parent;
  let home = frame;
  while (home.parent !== undefined && isInside(home.node, owner)) home = home.parent;
  const instance = !isMarked(ctx, holder, ts.SyntaxKind.StaticKeyword) && !ts.isClassStaticBlockDeclaration(holder);
  const overridable = instance && !ts.isPropertyDeclaration(holder) && !ts.isConstructorDeclaration(holder);
  const callable: Callable = { kind: "class", node: owner, frame: home, instance, overridable };
  return known(callableData("this", callable), originOf("name", node, frame, []));
}

/** `new Arm()`, for a class that has fields and no constructor. */
export function evaluateNew(ctx: Context, node: ts.NewExpression, frame: Frame): Value {
  const { ts } = ctx;
  const made = ctx.evaluate(node.expression, frame);
  const callable = made.known ? callableOf(made.data) : undefined;
  const origin = originOf("call", node, frame, [made]);
  if (callable?.kind !== "class") {
    return unknown(
      "call",
      `${quote(node, frame.module)} is made when the program runs.`,
      "write the value as a constant",
      origin,
    );
  }
  const plain = callable.node.heritageClauses === undefined && !callable.node.members.some(ts.isConstructorDeclaration);
  if (!plain) return unsupported(node, frame.module, "runs a constructor");
  const entries = new Map<string, Value>();
  const keys = new Map<string, Span>();
  for (const member of callable.node.members) {
    if (!ts.isPropertyDeclaration(member) || isMarked(ctx, member, ts.SyntaxKind.StaticKeyword)) continue;
    const name = evaluateName(ctx, member.name, callable.frame);
    if (typeof name !== "string") return dependent(node, frame.module, origin, name);
    entries.set(name, fieldValue(ctx, callable, member, name));
    keys.set(name, spanOf(member.name, callable.frame.module));
  }
  return known({ kind: "object", entries, keys }, origin);
}

/** A static member, or a field of an instance; `undefined` when the class has none of that name. */
export function memberOfClass(ctx: Context, callable: ClassCallable, name: string): Member | undefined {
  const { ts } = ctx;
  const { node, frame, instance } = callable;
  for (const member of node.members) {
    const isStatic = isMarked(ctx, member, ts.SyntaxKind.StaticKeyword);
    if (isStatic === instance || member.name === undefined) continue;
    if (evaluateName(ctx, member.name, frame) !== name) continue;
    const key = spanOf(member.name, frame.module);
    if (ts.isPropertyDeclaration(member)) return { name, key, value: fieldValue(ctx, callable, member, name) };
    if (ts.isMethodDeclaration(member)) {
      return {
        name,
        key,
        value: known(callableData(name, { kind: "closure", node: member, frame }), originOf("literal", member, frame, [])),
      };
    }
    return { name, key, value: unsupported(member.name, frame.module, "is worked out each time it is read") };
  }
  const base = node.heritageClauses?.find(({ token }) => token === ts.SyntaxKind.ExtendsKeyword)?.types[0]?.expression;
  const parent = base === undefined ? undefined : ctx.evaluate(base, frame);
  const inherited = parent?.known === true ? callableOf(parent.data) : undefined;
  if (inherited?.kind !== "class") return undefined;
  return memberOfClass(ctx, { ...callable, node: inherited.node, frame: inherited.frame }, name);
}

function fieldValue(
  ctx: Context,
  { frame, node, overridable }: ClassCallable,
  member: ts.PropertyDeclaration,
  name: string,
): Value {
  const { ts } = ctx;
  const { module, memo } = frame;
  const origin = originOf("name", member.name, frame, []);
  if (memo.has(member))
    return memo.get(member) ?? unknown("cycle", `${quoteText(name)} is defined in terms of itself.`, "", origin);
  if ([member, node].some((each) => (ts.getDecorators(each)?.length ?? 0) > 0)) {
    return unsupported(member.name, module, "may be changed by a decorator");
  }
  const isPrivate = ts.isPrivateIdentifier(member.name) || isMarked(ctx, member, ts.SyntaxKind.PrivateKeyword);
  const isFixed = isPrivate || isMarked(ctx, member, ts.SyntaxKind.ReadonlyKeyword) || !isReachable(ctx, node, frame);
  if (!isFixed || isPropertyWritten(ctx.ts, name, module.source)) {
    const why = isFixed ? "gets another value later" : "is not `readonly`";
    return unknown("not-const", `The field ${quoteText(name)} ${why}.`, "make it `readonly`, with its value", origin);
  }
  if (overridable === true && !isPrivate)
    return unsupported(member.name, module, "may be another in a class that extends this one");
  if (member.initializer === undefined) {
    return unknown(
      "parameter",
      `The field ${quoteText(name)} gets its value when the program runs.`,
      "give it its value here",
      origin,
    );
  }
  memo.set(member, undefined);
  const value = guardField(ctx, ctx.evaluate(member.initializer, frame), name, node, frame, origin);
  memo.set(member, value);
  return value;
}

/** An object in a field is handed on only when nothing can have changed it: accesses of that name stand for it. */
function guardField(
  ctx: Context,
  value: Value,
  name: string,
  node: ts.ClassLikeDeclaration,
  frame: Frame,
  origin: Origin,
): Value {
  if (!value.known || isFrozen(value.data)) return value;
  const { module } = frame;
  if (isReachable(ctx, node, frame)) {
    const message = `The field ${quoteText(name)} holds an object that other files may change.`;
    return unknown("mutated", message, "add `as const`", origin);
  }
  const change = findChangeFrom(ctx, module, propertyUses(ctx.ts, name, module.source), value.data);
  if (change === undefined) return value;
  const place: Origin = { kind: "operation", span: spanOf(change.node, change.module), from: [] };
  const cause = unknown("mutated", `${quote(change.node, change.module)} ${change.wording}.`, "", place);
  return unknown(
    "mutated",
    `The field ${quoteText(name)} may hold something else than what is written here.`,
    "add `as const`",
    origin,
    cause,
  );
}

function isReachable(ctx: Context, node: ts.ClassLikeDeclaration, { module }: Frame): boolean {
  const binding = node.name === undefined ? undefined : module.source.scopes.get(module.source.root)?.names?.get(node.name.text);
  return binding === undefined || isExported(ctx.ts, binding, module.source);
}

/** The member of a class, or the function, that decides what `this` is. */
function findThisHolder({ ts }: Context, node: ts.Node): ts.Node | undefined {
  return ts.findAncestor(
    node,
    (at) =>
      ts.isPropertyDeclaration(at) || ts.isClassStaticBlockDeclaration(at) || (ts.isFunctionLike(at) && !ts.isArrowFunction(at)),
  );
}

function isInside(node: ts.Node, outer: ts.Node): boolean {
  return node.pos >= outer.pos && node.end <= outer.end;
}

function isMarked({ ts }: Context, node: ts.Node, kind: ts.SyntaxKind): boolean {
  return ts.canHaveModifiers(node) && (ts.getModifiers(node)?.some((modifier) => modifier.kind === kind) ?? false);
}
