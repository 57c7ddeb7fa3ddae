/**
 * Calls: which of the things that can be called this is, and its arguments.
 *
 * A call of anything that isn't known to be pure is an unknown; nothing is ever run.
 */
import type ts from "typescript";
import { evaluateBase, getProperty } from "./access.js";
import { evaluateElements } from "./aggregates.js";
import { callableOf } from "./callable.js";
import { requiredSpecifier } from "./commonjs.js";
import type { Context, Frame } from "./context.js";
import { evaluateDefinitionCall } from "./definitionCall.js";
import { callFunction } from "./functions.js";
import { applyIntrinsic } from "./intrinsics.js";
import { applyMethod } from "./methods.js";
import { findTarget } from "./modules.js";
import { finish, originOf } from "./operations.js";
import { innermost } from "./outer.js";
import { dependent, known, primitive, quote, spanOf, unknown, unsupported } from "./unknown.js";
import type { Known, Value } from "./value.js";

export function evaluateCall(ctx: Context, node: ts.CallExpression, frame: Frame): Value {
  const { ts } = ctx;
  const target = findTarget(ctx, node.expression, frame.module);
  if (target?.kind === "definition") return evaluateDefinitionCall(ctx, target.definition, node, frame).value;
  if (requiredSpecifier(ts, node, frame.module.source) !== undefined) return evaluateRequire(ctx, node, frame);
  const callee = innermost(ts, node.expression);
  const isMethod = ts.isPropertyAccessExpression(callee) || ts.isElementAccessExpression(callee);
  return isMethod ? callMember(ctx, callee, node, frame) : callValue(ctx, ctx.evaluate(callee, frame), node, frame);
}

function evaluateRequire(ctx: Context, node: ts.CallExpression, frame: Frame): Value {
  const target = findTarget(ctx, node, frame.module);
  const value =
    target === undefined
      ? unsupported(node, frame.module, "is not followed")
      : ctx.valueOfTarget(target, spanOf(node, frame.module));
  const origin = originOf("import", node, frame, [value]);
  return value.known ? known(value.data, origin) : dependent(node, frame.module, origin, value);
}

function callMember(
  ctx: Context,
  callee: ts.PropertyAccessExpression | ts.ElementAccessExpression,
  node: ts.CallExpression,
  frame: Frame,
): Value {
  const { ts } = ctx;
  const receiver = evaluateBase(ctx, callee, frame);
  if (receiver === undefined) return primitive(undefined, originOf("access", node, frame, []));
  const fails = !receiver.known && receiver.reason.code !== "no-such-name";
  if (!receiver.known) {
    const origin = originOf("call", node, frame, [receiver]);
    return fails ? dependent(node, frame.module, origin, receiver) : receiver;
  }
  if (!ts.isPropertyAccessExpression(callee)) return callValue(ctx, ctx.evaluate(callee, frame), node, frame);
  const { data } = receiver;
  if (data.kind === "array" || data.kind === "primitive") return applyMethod(ctx, receiver, callee.name.text, node, frame);
  const intrinsic = applyIntrinsic(ctx, receiver, callee.name.text, node, frame);
  return intrinsic ?? callValue(ctx, getProperty(ctx, receiver, callee.name.text, callee, frame), node, frame);
}

function callValue(ctx: Context, callee: Value, node: ts.CallExpression, frame: Frame): Value {
  const origin = originOf("call", node, frame, [callee]);
  // `Math.random` can't be known because of what calling it does: the call is the place to name.
  if (!callee.known && callee.reason.code === "call") return { ...callee, origin };
  if (!callee.known) return dependent(node, frame.module, origin, callee);
  const callable = callableOf(callee.data);
  if (callable?.kind === "closure") return callFunction(ctx, callable, node, frame);
  if (callable?.kind === "definition") return evaluateDefinitionCall(ctx, callable.definition, node, frame).value;
  const apply = callable?.kind === "native" || callable?.kind === "global" ? callable.apply : undefined;
  if (apply === undefined) {
    return unknown(
      "call",
      `${quote(node, frame.module)} is worked out when the program runs.`,
      "write the value as a constant",
      origin,
    );
  }
  const args = evaluateElements(ctx, node.arguments, frame);
  if (!Array.isArray(args)) return dependent(node, frame.module, originOf("call", node, frame, [args]), args);
  const from = originOf("call", node, frame, args);
  const plain: Known[] = [];
  for (const arg of args) {
    if (!arg.known) return dependent(node, frame.module, from, arg);
    plain.push(arg);
  }
  if (!plain.every(({ data }) => data.kind === "primitive"))
    return unsupported(node, frame.module, "calculates with a whole object", from.from);
  return finish(node, frame, from, apply(plain.map(({ data }) => (data.kind === "primitive" ? data.value : undefined))));
}
