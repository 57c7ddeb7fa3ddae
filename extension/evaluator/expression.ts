/**
 * From a kind of expression to the part that evaluates it, with the guard against endless work around all of them.
 *
 * What has no entry here is unsupported: a located unknown.
 */
import type ts from "typescript";
import { evaluateElementAccess, evaluatePropertyAccess } from "./access.js";
import { evaluateArray, evaluateObject } from "./aggregates.js";
import { evaluateAssertion } from "./assertion.js";
import { callableData } from "./callable.js";
import { evaluateCall } from "./calls.js";
import { evaluateClass, evaluateNew, evaluateThis } from "./classes.js";
import type { Context, Frame } from "./context.js";
import { evaluateIdentifier } from "./names.js";
import {
  evaluateBinary,
  evaluateConditional,
  evaluatePrefix,
  evaluateTemplate,
  evaluateTypeof,
  evaluateVoid,
} from "./operations.js";
import type { TypeScript } from "./typescript.js";
import { known, primitive, spanOf, tooDeep, unsupported } from "./unknown.js";
import type { Origin, Value } from "./value.js";

/** Nesting of expressions, names and helpers; well inside the engine's stack. */
const DEEPEST = 400;
/** Expressions for one file. */
const MOST_STEPS = 200_000;

type Handler = (ctx: Context, node: ts.Expression, frame: Frame) => Value;
type Handlers = ReadonlyMap<ts.SyntaxKind, Handler>;

/** The evaluator's heart: the value of an expression in a frame of its own file. Never throws. */
export function createEvaluate(ts: TypeScript): Handler {
  const handlers = listHandlers(ts);
  return (ctx, node, frame) => {
    if (ctx.depth >= DEEPEST || ctx.steps >= MOST_STEPS) return tooDeep(node, frame.module);
    ctx.depth++;
    ctx.steps++;
    const handler = handlers.get(node.kind);
    const value = handler === undefined ? unsupported(node, frame.module, "is not followed") : handler(ctx, node, frame);
    ctx.depth--;
    return value;
  };
}

function listHandlers(ts: TypeScript): Handlers {
  const { SyntaxKind } = ts;
  return new Map<ts.SyntaxKind, Handler>([
    [SyntaxKind.NumericLiteral, on((_ctx, node: ts.NumericLiteral, frame) => literal(node, frame, Number(node.text)))],
    [SyntaxKind.StringLiteral, on((_ctx, node: ts.StringLiteral, frame) => literal(node, frame, node.text))],
    [
      SyntaxKind.NoSubstitutionTemplateLiteral,
      on((_ctx, node: ts.NoSubstitutionTemplateLiteral, frame) => literal(node, frame, node.text)),
    ],
    [SyntaxKind.TrueKeyword, on((_ctx, node, frame) => literal(node, frame, true))],
    [SyntaxKind.FalseKeyword, on((_ctx, node, frame) => literal(node, frame, false))],
    [SyntaxKind.NullKeyword, on((_ctx, node, frame) => literal(node, frame, null))],
    [
      SyntaxKind.BigIntLiteral,
      on((_ctx, node, frame) => unsupported(node, frame.module, "is a bigint; only plain numbers are followed")),
    ],
    [SyntaxKind.Identifier, on(evaluateIdentifier)],
    [
      SyntaxKind.ParenthesizedExpression,
      on((ctx, node: ts.ParenthesizedExpression, frame) => ctx.evaluate(node.expression, frame)),
    ],
    [SyntaxKind.NonNullExpression, on((ctx, node: ts.NonNullExpression, frame) => ctx.evaluate(node.expression, frame))],
    [SyntaxKind.SatisfiesExpression, on((ctx, node: ts.SatisfiesExpression, frame) => ctx.evaluate(node.expression, frame))],
    [SyntaxKind.AsExpression, on(evaluateAssertion)],
    [SyntaxKind.TypeAssertionExpression, on(evaluateAssertion)],
    [SyntaxKind.PrefixUnaryExpression, on(evaluatePrefix)],
    [SyntaxKind.BinaryExpression, on(evaluateBinary)],
    [SyntaxKind.ConditionalExpression, on(evaluateConditional)],
    [SyntaxKind.TemplateExpression, on(evaluateTemplate)],
    [SyntaxKind.TypeOfExpression, on(evaluateTypeof)],
    [SyntaxKind.VoidExpression, on(evaluateVoid)],
    [SyntaxKind.ArrayLiteralExpression, on(evaluateArray)],
    [SyntaxKind.ObjectLiteralExpression, on(evaluateObject)],
    [SyntaxKind.PropertyAccessExpression, on(evaluatePropertyAccess)],
    [SyntaxKind.ElementAccessExpression, on(evaluateElementAccess)],
    [SyntaxKind.CallExpression, on(evaluateCall)],
    [SyntaxKind.NewExpression, on(evaluateNew)],
    [SyntaxKind.ThisKeyword, on(evaluateThis)],
    [SyntaxKind.ClassExpression, on((ctx, node: ts.ClassExpression, frame) => evaluateClass(ctx, node, frame))],
    [SyntaxKind.ArrowFunction, on(evaluateFunction)],
    [SyntaxKind.FunctionExpression, on(evaluateFunction)],
  ]);
}

/** The table's key is what makes the narrower node type true. */
function on<Node extends ts.Expression>(handler: (ctx: Context, node: Node, frame: Frame) => Value): Handler {
  return handler as unknown as Handler;
}

function literal(node: ts.Expression, frame: Frame, value: string | number | boolean | null): Value {
  const origin: Origin = { kind: "literal", span: spanOf(node, frame.module), from: [] };
  return primitive(value, origin);
}

function evaluateFunction(_ctx: Context, node: ts.ArrowFunction | ts.FunctionExpression, frame: Frame): Value {
  const origin: Origin = { kind: "literal", span: spanOf(node, frame.module), from: [] };
  return known(callableData(node.name?.text ?? "", { kind: "closure", node, frame }), origin);
}
