/**
 * Helpers that people write around their numbers: `const inches = (n: number) => n * 25.4`, as far as they only give a value back.
 *
 * Constants, conditions and `return` are followed; anything that assigns, loops or waits is not. Each call opens one frame, kept
 * where the call stands, so that what is built inside it is built once.
 */
import type ts from "typescript";
import { evaluateElements } from "./aggregates.js";
import type { Callable } from "./callable.js";
import { type Context, type Frame, openFrame } from "./context.js";
import { isTruthy, originOf } from "./operations.js";
import { listParameters } from "./parameters.js";
import { bindPattern } from "./patterns.js";
import type { Binding } from "./source.js";
import { dependent, known, primitive, tooDeep, unknown, unsupported } from "./unknown.js";
import type { Origin, Value } from "./value.js";

export type Closure = Extract<Callable, { kind: "closure" }>;

/** Helpers that call helpers, or themselves. */
const DEEPEST_CALL = 30;
/** Deeper frames aren't kept: a helper that calls itself twice would fill the memory with them. */
const DEEPEST_KEPT = 6;

export function callFunction(ctx: Context, closure: Closure, node: ts.CallExpression, frame: Frame): Value {
  const args = evaluateElements(ctx, node.arguments, frame);
  if (!Array.isArray(args)) return dependent(node, frame.module, originOf("call", node, frame, [args]), args);
  const opened = openCall(ctx, closure, args, node, frame, 0);
  return opened === undefined ? tooDeep(node, frame.module) : locate(runFunction(ctx, closure, opened), node, frame);
}

/** Calls a helper with values, as `map` and its like do; `turn` tells the calls from one place apart. */
export function callWith(
  ctx: Context,
  closure: Closure,
  args: readonly Value[],
  node: ts.CallExpression,
  frame: Frame,
  turn: number,
): Value {
  const opened = openCall(ctx, closure, args, node, frame, turn);
  return opened === undefined ? tooDeep(node, frame.module) : runFunction(ctx, closure, opened);
}

/** The frame of one call; `undefined` when helpers call each other too deeply. */
export function openCall(
  ctx: Context,
  { node, frame }: Closure,
  args: readonly Value[],
  call: ts.CallExpression,
  caller: Frame,
  turn: number,
): Frame | undefined {
  if (caller.height >= DEEPEST_CALL) return undefined;
  if (listParameters(ctx.ts, node).length === 0) return openShared(frame, node);
  const turns = caller.children.get(call) ?? [];
  if (caller.height < DEEPEST_KEPT) caller.children.set(call, turns);
  const present = turns[turn];
  if (present !== undefined) return present;
  const bound = new Map<Binding, Value>();
  const opened = openFrame(frame, node, bound, caller.height + 1);
  turns[turn] = opened;
  for (const [index, parameter] of listParameters(ctx.ts, node).entries()) {
    const rest = parameter.dotDotDotToken !== undefined;
    const origin: Origin = originOf("call", call, caller, []);
    const given = rest
      ? known({ kind: "array", items: args.slice(index) }, origin)
      : (args[index] ?? primitive(undefined, origin));
    bindPattern(ctx, parameter, given, opened, bound);
  }
  return opened;
}

/** The one frame of a function without parameters: every call of it gives the same. */
export function openShared(frame: Frame, node: ts.FunctionLikeDeclaration): Frame {
  const [kept] = frame.children.get(node) ?? [];
  const opened = kept ?? openFrame(frame, node, new Map(), frame.height + 1);
  frame.children.set(node, [opened]);
  return opened;
}

/** What a function gives back in an open frame. */
export function runFunction(ctx: Context, { node }: Closure, frame: Frame): Value {
  const { ts } = ctx;
  const { body } = node;
  const isPlain =
    node.asteriskToken === undefined &&
    !ts.getModifiers(node as ts.FunctionDeclaration)?.some(({ kind }) => kind === ts.SyntaxKind.AsyncKeyword);
  if (body === undefined || !isPlain) return unsupported(node, frame.module, "gives its value later");
  if (!ts.isBlock(body)) return ctx.evaluate(body, frame);
  return runStatements(ctx, body.statements, frame) ?? primitive(undefined, originOf("call", body, frame, []));
}

/** The value that the statements return; `undefined` when they run to their end. */
function runStatements(ctx: Context, statements: readonly ts.Statement[], frame: Frame): Value | undefined {
  for (const statement of statements) {
    const value = runStatement(ctx, statement, frame);
    if (value !== undefined) return value;
  }
  return undefined;
}

function runStatement(ctx: Context, statement: ts.Statement, frame: Frame): Value | undefined {
  const { ts } = ctx;
  if (ts.isReturnStatement(statement)) {
    if (statement.expression === undefined) return primitive(undefined, originOf("call", statement, frame, []));
    return ctx.evaluate(statement.expression, frame);
  }
  if (ts.isBlock(statement)) return runStatements(ctx, statement.statements, frame);
  if (ts.isIfStatement(statement)) {
    const condition = ctx.evaluate(statement.expression, frame);
    if (!condition.known) return condition;
    const taken = isTruthy(condition) ? statement.thenStatement : statement.elseStatement;
    return taken === undefined ? undefined : runStatement(ctx, taken, frame);
  }
  // Names are evaluated when they are needed.
  const declares = ts.isVariableStatement(statement) || ts.isFunctionDeclaration(statement) || ts.isEmptyStatement(statement);
  if (declares || ts.isInterfaceDeclaration(statement) || ts.isTypeAliasDeclaration(statement)) return undefined;
  if (ts.isThrowStatement(statement)) {
    return unknown("unsupported", "The function throws an error for these values.", "", originOf("call", statement, frame, []));
  }
  // What a call does besides can't reach the numbers: written objects are followed elsewhere.
  if (ts.isExpressionStatement(statement) && ts.isCallExpression(statement.expression)) return undefined;
  return unsupported(statement, frame.module, "is not followed inside a function");
}

function locate(value: Value, node: ts.CallExpression, frame: Frame): Value {
  const origin = originOf("call", node, frame, [value]);
  return value.known ? known(value.data, origin) : dependent(node, frame.module, origin, value);
}
