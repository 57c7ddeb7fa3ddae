/**
 * What a name stands for: finds its binding, evaluates the declaration once, and keeps where it was declared.
 *
 * A binding whose value is being worked out is a cycle: an unknown, never a number. Objects are handed out only when nothing
 * can have changed them.
 */
import type ts from "typescript";
import { callableData } from "./callable.js";
import { evaluateClass } from "./classes.js";
import { type Context, type Frame, homeOf, type Module, type Target } from "./context.js";
import { rootOf } from "./declare.js";
import { enumValue, memberValue } from "./enums.js";
import { isExported } from "./exports.js";
import { evaluateGlobal } from "./globals.js";
import { follow } from "./modules.js";
import { findChange } from "./mutation.js";
import { valueOfElement } from "./patterns.js";
import { type Binding, resolveName } from "./source.js";
import { dependent, known, quote, quoteText, spanOf, suggest, unknown, unsupported } from "./unknown.js";
import type { Origin, Span, Unknown, Value } from "./value.js";
import { isReassigned } from "./writes.js";

export function evaluateIdentifier(ctx: Context, node: ts.Identifier, frame: Frame): Value {
  const { module } = frame;
  const span = spanOf(node, module);
  if (node.text === "") {
    return unknown("missing", "Nothing is written here yet.", "", { kind: "name", span, from: [] });
  }
  const binding = resolveName(ctx.ts, node, module.source);
  if (binding === undefined) return evaluateGlobal(node.text, span) ?? missingName(node, module, span);
  const value = isEarlyVar(ctx, binding, node, frame) ? earlyVar(binding, node, module) : ctx.valueOf(binding, frame);
  const declaredAt = declarationOf(ctx, binding, module);
  const origin: Origin = { kind: "name", span, from: [value.origin], ...(declaredAt === undefined ? {} : { declaredAt }) };
  return value.known ? known(value.data, origin) : dependent(node, module, origin, value);
}

/** The value that a binding was given; works for any frame inside the binding's own file. */
export function valueOfBinding(ctx: Context, binding: Binding, frame: Frame): Value {
  const home = homeOf(binding, frame);
  if (home.memo.has(binding)) return home.memo.get(binding) ?? cycle(binding, frame.module);
  home.memo.set(binding, undefined);
  const value = guard(ctx, binding, home, home.bound.get(binding) ?? initialValue(ctx, binding, home));
  home.memo.set(binding, value);
  return value;
}

/** The value that an import, an export or an alias leads to. */
export function valueOfTarget(ctx: Context, target: Target, span: Span): Value {
  const origin: Origin = { kind: "import", span, from: [] };
  if (target.kind === "failed") return target.unknown;
  if (target.kind === "binding") return ctx.valueOf(target.binding, target.module.root);
  if (target.kind === "module") return known({ kind: "module", file: target.module.file }, origin);
  if (target.kind === "library") return known(callableData(ctx.specifier, target), origin);
  if (target.kind === "definition") return known(callableData(target.definition.name, target), origin);
  return once(ctx, target.node, target.module.root);
}

/** The identifier that declares what a binding stands for, through imports. */
export function declarationOf(ctx: Context, binding: Binding, module: Module): Span | undefined {
  if (binding.kind !== "import") {
    const name = binding.names[0];
    return name === undefined ? undefined : spanOf(name, module);
  }
  const target = follow(ctx, { kind: "binding", module, binding });
  if (target.kind === "binding")
    return target.binding === binding ? undefined : declarationOf(ctx, target.binding, target.module);
  return target.kind === "expression" ? spanOf(target.node, target.module) : undefined;
}

/** An expression that several names share, or that a file exports without a name: evaluated once a frame. */
function once(ctx: Context, node: ts.Expression, home: Frame): Value {
  // A call to a definition keeps its own value under its own node.
  const key = ctx.ts.isVariableDeclaration(node.parent) || ctx.ts.isExportAssignment(node.parent) ? node.parent : node;
  if (home.memo.has(key)) {
    const origin: Origin = { kind: "name", span: spanOf(node, home.module), from: [] };
    return home.memo.get(key) ?? unknown("cycle", `${quote(node, home.module)} is defined in terms of itself.`, "", origin);
  }
  home.memo.set(key, undefined);
  const value = ctx.evaluate(node, home);
  home.memo.set(key, value);
  return value;
}

function initialValue(ctx: Context, binding: Binding, home: Frame): Value {
  const { ts } = ctx;
  const { module } = home;
  const declaration = binding.declarations[0];
  const declared = at(binding, module);
  if (declaration === undefined) return missingDeclaration(binding, module);
  if (binding.ambient) {
    const message = `${quoteText(binding.name)} is declared without a value: only the running program has it.`;
    return unknown("ambient", message, "write the value as a constant", declared);
  }
  switch (binding.kind) {
    case "import":
      return valueOfTarget(ctx, follow(ctx, { kind: "binding", module, binding }), declared.span);
    case "parameter":
    case "catch":
      return unknown(
        "parameter",
        `${quoteText(binding.name)} is given by whoever calls the function.`,
        "write the value as a constant",
        declared,
      );
    case "loop":
      return unknown(
        "not-const",
        `${quoteText(binding.name)} changes with every turn of the loop.`,
        "loop over a list of constants",
        declared,
      );
    case "const":
    case "let":
    case "var":
      return variableValue(ctx, binding, declaration, home);
    case "function":
      return functionValue(ctx, binding, home);
    case "class":
      return ts.isClassLike(declaration) ? evaluateClass(ctx, declaration, home) : missingDeclaration(binding, module);
    case "enum":
      return enumValue(ctx, binding, home);
    case "member":
      return ts.isEnumMember(declaration) ? memberValue(ctx, declaration, home) : missingDeclaration(binding, module);
    default:
      return unsupported(binding.names[0] ?? declaration, module, "is not followed");
  }
}

function variableValue(ctx: Context, binding: Binding, declaration: ts.Node, home: Frame): Value {
  const { ts } = ctx;
  const { module } = home;
  if (binding.kind !== "const") {
    const changes = binding.declarations.length > 1 || isReassigned(ts, binding, module.source) || isConditionalVar(ctx, binding);
    if (changes || isExported(ts, binding, module.source)) {
      const message = `${quoteText(binding.name)} is declared with \`${binding.kind}\`${changes ? " and gets another value later" : ""}.`;
      return unknown("not-const", message, "declare it with `const`", at(binding, module));
    }
  }
  const root = rootOf(ts, declaration);
  if (!ts.isVariableDeclaration(root)) return missingDeclaration(binding, module);
  const { initializer } = root;
  if (initializer === undefined) return missingDeclaration(binding, module);
  if (!ts.isBindingElement(declaration)) return ctx.evaluate(initializer, home);
  return valueOfElement(ctx, declaration, home, () => once(ctx, initializer, home));
}

function functionValue(ctx: Context, binding: Binding, home: Frame): Value {
  const { ts } = ctx;
  const { module } = home;
  const isShared = binding.declarations.some((each) => !ts.isFunctionDeclaration(each) && !ts.isFunctionExpression(each));
  if (isShared || isReassigned(ts, binding, module.source)) {
    return unknown("not-const", `${quoteText(binding.name)} gets another value later.`, "", at(binding, module));
  }
  const bodies = binding.declarations.filter((node) => ts.isFunctionLike(node) && "body" in node && node.body !== undefined);
  const node = bodies[0];
  if (bodies.length !== 1 || node === undefined) return missingDeclaration(binding, module);
  const data = callableData(binding.name, { kind: "closure", node: node as ts.FunctionLikeDeclaration, frame: home });
  return known(data, at(binding, module));
}

/** Hands an object on only when nothing can have changed it since. */
function guard(ctx: Context, binding: Binding, home: Frame, value: Value): Value {
  if (!value.known || (value.data.kind !== "array" && value.data.kind !== "object")) return value;
  const change = findChange(ctx, home.module, binding, value.data);
  home.module.importers.guards.push({ binding, data: value.data, isChanged: change !== undefined });
  if (change === undefined) return value;
  const { node, module, wording } = change;
  const cause = unknown("mutated", `${quote(node, module)} ${wording}.`, "", {
    kind: "operation",
    span: spanOf(node, module),
    from: [],
  });
  const message = `${quoteText(binding.name)} may hold something else than what is written here.`;
  const origin: Origin = { ...at(binding, home.module), from: [value.origin] };
  return unknown("mutated", message, "add `as const`, or keep the changing part apart", origin, cause);
}

/** A `var` is undefined before its line runs. */
function isEarlyVar(ctx: Context, binding: Binding, node: ts.Identifier, frame: Frame): boolean {
  const declaration = binding.declarations[0];
  if (binding.kind !== "var" || declaration === undefined || node.pos > declaration.end) return false;
  return (
    ctx.ts.findAncestor(node, ctx.ts.isFunctionLike) === ctx.ts.findAncestor(declaration, ctx.ts.isFunctionLike) &&
    frame !== undefined
  );
}

function earlyVar(binding: Binding, node: ts.Identifier, module: Module): Unknown {
  const origin: Origin = { kind: "name", span: spanOf(node, module), from: [] };
  return unknown(
    "not-const",
    `${quoteText(binding.name)} is used before its line runs.`,
    "declare it with `const`, before its use",
    origin,
  );
}

/** A `var` inside a block may never get its value. */
function isConditionalVar({ ts }: Context, binding: Binding): boolean {
  if (binding.kind !== "var") return false;
  const statement = binding.declarations[0] && ts.findAncestor(binding.declarations[0], ts.isVariableStatement);
  const block = statement?.parent;
  return block === undefined || !(ts.isSourceFile(block) || (ts.isBlock(block) && ts.isFunctionLike(block.parent)));
}

function cycle(binding: Binding, module: Module): Unknown {
  return unknown(
    "cycle",
    `${quoteText(binding.name)} is defined in terms of itself.`,
    "write one of the values as a constant",
    at(binding, module),
  );
}

function missingDeclaration(binding: Binding, module: Module): Unknown {
  return unknown("missing", `${quoteText(binding.name)} has no value yet.`, "", at(binding, module));
}

function missingName(node: ts.Identifier, module: Module, span: Span): Unknown {
  const names: string[] = [];
  for (let scope: ts.Node = node; scope !== undefined; scope = scope.parent) {
    names.push(...(module.source.scopes.get(scope)?.names?.keys() ?? []));
  }
  const message = `${quoteText(node.text)} is not declared here${suggest(node.text, names)}`;
  return unknown("no-such-name", message, "", { kind: "name", span, from: [] });
}

function at(binding: Binding, module: Module): Origin {
  const name = binding.names[0];
  const span = name === undefined ? { file: module.file, start: 0, end: 0 } : spanOf(name, module);
  return { kind: "name", span, from: [], declaredAt: span };
}
