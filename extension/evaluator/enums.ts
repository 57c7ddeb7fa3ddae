/**
 * Enums and namespaces: numeric, text, counted on, computed, merged, `const`.
 *
 * Members are evaluated one by one, so that one may be written in terms of another.
 */
import type ts from "typescript";
import { type Context, type Frame, homeOf, type Module } from "./context.js";
import { isAmbient } from "./declare.js";
import { findTarget } from "./modules.js";
import { finish, originOf } from "./operations.js";
import { asNumber } from "./operators.js";
import { evaluateName, inOrder } from "./propertyName.js";
import type { Binding } from "./source.js";
import { known, quote, spanOf, unknown, unsupported } from "./unknown.js";
import type { Origin, Span, Value } from "./value.js";

interface Member {
  readonly value: Value;
  readonly key: Span;
}

/** `E.A` or `space.A` for an enum or a namespace, found without evaluating all of it. */
export function findDeclaredMember(ctx: Context, holder: ts.Expression, name: string, frame: Frame): Member | undefined {
  const { ts } = ctx;
  const target = findTarget(ctx, holder, frame.module);
  if (target?.kind !== "binding") return undefined;
  const { binding, module } = target;
  for (const declaration of [...binding.declarations].reverse()) {
    if (binding.kind === "enum" && ts.isEnumDeclaration(declaration)) {
      const member = declaration.members.find((each) => evaluateName(ctx, each.name, module.root) === name);
      if (member === undefined) continue;
      const home = module === frame.module ? homeOf(binding, frame) : module.root;
      return { value: memberValue(ctx, member, home), key: spanOf(member.name, module) };
    }
    if (binding.kind === "namespace" && ts.isModuleDeclaration(declaration)) {
      const found = findInNamespace(ctx, declaration, name, module);
      if (found !== undefined) return found;
    }
  }
  return undefined;
}

/** A whole enum as the object that it is when the program runs, numbers leading back to names. */
export function enumValue(ctx: Context, binding: Binding, home: Frame): Value {
  const { ts } = ctx;
  const entries = new Map<string, Value>();
  const keys = new Map<string, Span>();
  for (const declaration of binding.declarations) {
    if (!ts.isEnumDeclaration(declaration)) continue;
    for (const member of declaration.members) {
      const name = evaluateName(ctx, member.name, home);
      if (typeof name !== "string") return name;
      const value = memberValue(ctx, member, home);
      entries.set(name, value);
      keys.set(name, spanOf(member.name, home.module));
      if (!value.known || value.data.kind !== "primitive" || typeof value.data.value !== "number") continue;
      const back: Origin = { kind: "literal", span: spanOf(member.name, home.module), from: [] };
      entries.set(String(value.data.value), known({ kind: "primitive", value: name }, back));
    }
  }
  const first = binding.declarations[0] ?? home.node;
  return known({ kind: "object", entries: inOrder(entries), keys, frozen: true }, originOf("object", first, home, []));
}

/** One member's value: its initialiser, or one more than the member before. */
export function memberValue(ctx: Context, member: ts.EnumMember, home: Frame): Value {
  const { module, memo } = home;
  const origin: Origin = { kind: "name", span: spanOf(member.name, module), from: [] };
  if (memo.has(member))
    return memo.get(member) ?? unknown("cycle", `${quote(member.name, module)} is defined in terms of itself.`, "", origin);
  memo.set(member, undefined);
  const value = member.initializer === undefined ? counted(ctx, member, home) : initialised(ctx, member.initializer, home);
  memo.set(member, value);
  return value;
}

function initialised(ctx: Context, initializer: ts.Expression, home: Frame): Value {
  const value = ctx.evaluate(initializer, home);
  if (!value.known) return value;
  const { data } = value;
  const fits = data.kind === "primitive" && (typeof data.value === "number" || typeof data.value === "string");
  return fits ? value : unsupported(initializer, home.module, "is neither a number nor a text");
}

function counted(ctx: Context, member: ts.EnumMember, home: Frame): Value {
  const { module } = home;
  if (isAmbient(ctx.ts, member.parent)) {
    const message = `${quote(member.name, module)} is declared without a value: only the running program has it.`;
    return unknown("ambient", message, "give it its value here", originOf("name", member.name, home, []));
  }
  const { members } = member.parent;
  const index = members.indexOf(member);
  const start = members.slice(0, index).findLastIndex(({ initializer }) => initializer !== undefined);
  const base = members[start];
  if (base === undefined) return known({ kind: "primitive", value: index }, originOf("literal", member.name, home, []));
  if (base.initializer !== undefined && !isCountable(ctx, base.initializer, module)) {
    return unsupported(member.name, module, "counts on from a member that is calculated");
  }
  const from = memberValue(ctx, base, home);
  const origin = originOf("operation", member.name, home, [from]);
  if (!from.known) {
    const message = `${quote(member.name, module)} counts on from a member that cannot be known.`;
    return unknown("depends", message, "give it its value here", origin, from);
  }
  if (from.data.kind !== "primitive" || typeof from.data.value !== "number") {
    return unsupported(member.name, module, "counts on from a text");
  }
  let value = from.data.value;
  for (let step = start; step < index; step++) value += 1;
  return finish(member.name, home, origin, asNumber(value));
}

/**
 * Whether a member may count on from this expression: the compiler does so only from literals, operators on them, and names of
 * constants and members that come down to these.
 */
function isCountable(ctx: Context, expression: ts.Expression, module: Module, hops = 0): boolean {
  const { ts } = ctx;
  if (hops > 20) return false;
  const within = (inner: ts.Expression) => isCountable(ctx, inner, module, hops + 1);
  if (ts.isNumericLiteral(expression)) return true;
  if (ts.isParenthesizedExpression(expression)) return within(expression.expression);
  if (ts.isPrefixUnaryExpression(expression)) return within(expression.operand);
  if (ts.isBinaryExpression(expression)) return within(expression.left) && within(expression.right);
  if (ts.isPropertyAccessExpression(expression)) {
    const holder = findTarget(ctx, expression.expression, module);
    if (holder?.kind !== "binding" || holder.binding.kind !== "enum") return false;
    const members = holder.binding.declarations.flatMap((each) => (ts.isEnumDeclaration(each) ? [...each.members] : []));
    const member = members.find(({ name }) => evaluateName(ctx, name, holder.module.root) === expression.name.text);
    return member !== undefined && isCountableMember(ctx, member, holder.module, hops + 1);
  }
  const target = ts.isIdentifier(expression) ? findTarget(ctx, expression, module) : undefined;
  const declaration = target?.kind === "binding" ? target.binding.declarations[0] : undefined;
  if (target?.kind !== "binding" || declaration === undefined) return false;
  if (ts.isEnumMember(declaration)) return isCountableMember(ctx, declaration, target.module, hops + 1);
  const isConstant = target.binding.kind === "const" && ts.isVariableDeclaration(declaration) && declaration.type === undefined;
  const initializer = isConstant ? declaration.initializer : undefined;
  return initializer !== undefined && isCountable(ctx, initializer, target.module, hops + 1);
}

function isCountableMember(ctx: Context, member: ts.EnumMember, module: Module, hops: number): boolean {
  const { members } = member.parent;
  const first = members.slice(0, members.indexOf(member) + 1).findLast(({ initializer }) => initializer !== undefined);
  return first?.initializer === undefined || isCountable(ctx, first.initializer, module, hops);
}

function findInNamespace(ctx: Context, declaration: ts.ModuleDeclaration, name: string, module: Module): Member | undefined {
  const { body } = declaration;
  if (body === undefined || !ctx.ts.isModuleBlock(body)) return undefined;
  const binding = module.source.scopes.get(body)?.names?.get(name);
  const at = binding?.names[0];
  if (binding === undefined || at === undefined) return undefined;
  return { value: ctx.valueOf(binding, module.root), key: spanOf(at, module) };
}
