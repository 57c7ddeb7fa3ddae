/**
 * Unary and binary operators, conditions, templates: evaluates the operands and lets `operators.ts` calculate.
 *
 * What isn't needed isn't evaluated, so an unknown on the side not taken does no harm.
 */
import type ts from "typescript";
import type { Context, Frame } from "./context.js";
import { applyBinary, applyUnary, asText, type Outcome, type Primitive } from "./operators.js";
import { dependent, known, primitive, quote, spanOf, unknown, unsupported } from "./unknown.js";
import type { Known, Origin, Value } from "./value.js";
import { isAssignment } from "./writes.js";

export function evaluateBinary(ctx: Context, node: ts.BinaryExpression, frame: Frame): Value {
  const { ts } = ctx;
  const operator = ts.tokenToString(node.operatorToken.kind) ?? "";
  if (operator === "&&" || operator === "||" || operator === "??") return evaluateLogical(ctx, operator, node, frame);
  if (operator === ",") return ctx.evaluate(node.right, frame);
  if (isAssignment(ts, node)) return unsupported(node, frame.module, "assigns while it is evaluated");
  const left = leniently(ctx, node.left, frame, isEquality(operator));
  const right = leniently(ctx, node.right, frame, isEquality(operator));
  const origin = originOf("operation", node, frame, [left, right]);
  if (!left.known) return dependent(node, frame.module, origin, left);
  if (!right.known) return dependent(node, frame.module, origin, right);
  if (left.data.kind === "primitive" && right.data.kind === "primitive") {
    return finish(node, frame, origin, applyBinary(operator, left.data.value, right.data.value));
  }
  return compareObjects(operator, left, right, node, frame, origin);
}

export function evaluatePrefix(ctx: Context, node: ts.PrefixUnaryExpression, frame: Frame): Value {
  const operator = ctx.ts.tokenToString(node.operator) ?? "";
  const operand = ctx.evaluate(node.operand, frame);
  // A negative number is one literal to its reader.
  const isNegative = operator === "-" && ctx.ts.isNumericLiteral(node.operand);
  const origin: Origin = isNegative
    ? { kind: "literal", span: spanOf(node, frame.module), from: [] }
    : originOf("operation", node, frame, [operand]);
  if (!operand.known) return dependent(node, frame.module, origin, operand);
  if (operator === "!") return primitive(!isTruthy(operand), origin);
  if (operator !== "-" && operator !== "+" && operator !== "~") return unsupported(node, frame.module, "changes a value");
  if (operand.data.kind !== "primitive") return unsupported(node, frame.module, "calculates with a value that is not a number");
  return finish(node, frame, origin, applyUnary(operator, operand.data.value));
}

export function evaluateConditional(ctx: Context, node: ts.ConditionalExpression, frame: Frame): Value {
  const condition = ctx.evaluate(node.condition, frame);
  if (!condition.known) return dependent(node, frame.module, originOf("choice", node, frame, [condition]), condition);
  const chosen = ctx.evaluate(isTruthy(condition) ? node.whenTrue : node.whenFalse, frame);
  return choose(node, frame, chosen, condition);
}

export function evaluateTemplate(ctx: Context, node: ts.TemplateExpression, frame: Frame): Value {
  const parts: Known[] = [];
  let text = node.head.text;
  for (const { expression, literal } of node.templateSpans) {
    const part = ctx.evaluate(expression, frame);
    const origin = originOf("template", node, frame, [...parts, part]);
    if (!part.known) return dependent(node, frame.module, origin, part);
    if (part.data.kind !== "primitive")
      return unsupported(node, frame.module, "puts a value into text that is not a number or text");
    parts.push(part);
    text += `${part.data.value}${literal.text}`;
  }
  return finish(node, frame, originOf("template", node, frame, parts), asText(text));
}

export function evaluateTypeof(ctx: Context, node: ts.TypeOfExpression, frame: Frame): Value {
  const operand = ctx.evaluate(node.expression, frame);
  const origin = originOf("operation", node, frame, [operand]);
  if (!operand.known) return dependent(node, frame.module, origin, operand);
  const { data } = operand;
  if (data.kind === "primitive") return primitive(typeof data.value, origin);
  // Some globals are functions and some are objects, and nobody asks.
  if (data.kind === "function") return unsupported(node, frame.module, "asks for the kind of a function");
  return primitive("object", origin);
}

export function evaluateVoid(_ctx: Context, node: ts.VoidExpression, frame: Frame): Value {
  return primitive(undefined, originOf("operation", node, frame, []));
}

export function isTruthy(value: Known): boolean {
  return value.data.kind !== "primitive" || Boolean(value.data.value);
}

/** A value, where a property that isn't there is plainly expected: `options.ratio ?? 1`. */
export function leniently(ctx: Context, node: ts.Expression, frame: Frame, lenient = true): Value {
  const value = ctx.evaluate(node, frame);
  const absent = !value.known && value.cause === undefined && value.reason.code === "no-such-property";
  return lenient && absent ? primitive(undefined, value.origin) : value;
}

/** The value of a calculation, or a located unknown that says why there is none. */
export function finish(node: ts.Node, frame: Frame, origin: Origin, outcome: Outcome): Value {
  if (outcome.ok) return primitive(outcome.value, origin);
  return unknown(outcome.code, `${quote(node, frame.module)} ${outcome.why}.`, "write the value as a constant", origin);
}

export function originOf(kind: Origin["kind"], node: ts.Node, frame: Frame, from: readonly Value[]): Origin {
  return { kind, span: spanOf(node, frame.module), from: from.map(({ origin }) => origin) };
}

function evaluateLogical(ctx: Context, operator: "&&" | "||" | "??", node: ts.BinaryExpression, frame: Frame): Value {
  const left = leniently(ctx, node.left, frame, operator !== "&&");
  if (!left.known) return dependent(node, frame.module, originOf("choice", node, frame, [left]), left);
  const nullish = left.data.kind === "primitive" && (left.data.value ?? undefined) === undefined;
  const takesLeft = operator === "??" ? !nullish : isTruthy(left) === (operator === "||");
  return takesLeft ? choose(node, frame, left) : choose(node, frame, ctx.evaluate(node.right, frame), left);
}

function choose(node: ts.Expression, frame: Frame, chosen: Value, condition?: Known): Value {
  const origin = originOf("choice", node, frame, condition === undefined ? [chosen] : [chosen, condition]);
  return chosen.known ? known(chosen.data, origin) : dependent(node, frame.module, origin, chosen);
}

function isEquality(operator: string): boolean {
  return operator === "===" || operator === "!==" || operator === "==" || operator === "!=";
}

/** An object never equals a plain value; whether two objects are the same one is not followed. */
function compareObjects(operator: string, left: Known, right: Known, node: ts.Node, frame: Frame, origin: Origin): Value {
  const [a, b]: (Primitive | object)[] = [left, right].map(({ data }) => (data.kind === "primitive" ? data.value : data));
  const onlyOne = (left.data.kind === "primitive") !== (right.data.kind === "primitive");
  const strict = operator === "===" || operator === "!==";
  const nullish = (a ?? undefined) === undefined || (b ?? undefined) === undefined;
  if (isEquality(operator) && onlyOne && (strict || nullish)) return primitive(operator.startsWith("!"), origin);
  return unsupported(node, frame.module, "calculates with or compares a whole object", origin.from);
}
