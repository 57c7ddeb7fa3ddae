/**
 * The expression inside brackets, assertions and `!`, and the whole of it with them: they change nothing at run time.
 */
import type ts from "typescript";
import type { TypeScript } from "./typescript.js";

/** The expression without what surrounds it. */
export function innermost(ts: TypeScript, expression: ts.Expression): ts.Expression {
  let node = expression;
  while (isOuter(ts, node)) node = node.expression;
  return node;
}

/** The expression with what surrounds it. */
export function outermost(ts: TypeScript, expression: ts.Node): ts.Node {
  let node = expression;
  while (isOuter(ts, node.parent)) node = node.parent;
  return node;
}

export function isOuter(
  ts: TypeScript,
  node: ts.Node,
): node is ts.ParenthesizedExpression | ts.AsExpression | ts.SatisfiesExpression | ts.NonNullExpression | ts.TypeAssertion {
  const { kind } = node;
  const { SyntaxKind } = ts;
  // This is asked of nearly every expression, and nearly every one is one of these.
  if (kind === SyntaxKind.Identifier || kind === SyntaxKind.PropertyAccessExpression || kind === SyntaxKind.CallExpression)
    return false;
  return (
    kind === SyntaxKind.ParenthesizedExpression ||
    kind === SyntaxKind.AsExpression ||
    kind === SyntaxKind.SatisfiesExpression ||
    kind === SyntaxKind.NonNullExpression ||
    kind === SyntaxKind.TypeAssertionExpression
  );
}
