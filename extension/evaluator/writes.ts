/**
 * Which places write to a name or a property: assignments, `++`, `delete`, destructuring, loop heads.
 *
 * Looks at syntax only; who else may reach an object is the business of `mutation.ts`.
 */
import type ts from "typescript";
import { outermost } from "./outer.js";
import { type Binding, findReferences, type Source } from "./source.js";
import type { TypeScript } from "./typescript.js";

/** Whether a name is ever given another value than that of its declaration. */
export function isReassigned(ts: TypeScript, binding: Binding, source: Source): boolean {
  return findReferences(ts, binding, source).some((reference) => isWritten(ts, reference));
}

/** Whether the expression is the target of a write; brackets and assertions around it count as the expression. */
export function isWritten(ts: TypeScript, expression: ts.Node): boolean {
  const node = outermost(ts, expression);
  const { parent } = node;
  if (ts.isBinaryExpression(parent)) {
    return parent.left === node && isAssignment(ts, parent);
  }
  if (ts.isPrefixUnaryExpression(parent) || ts.isPostfixUnaryExpression(parent)) {
    return parent.operator === ts.SyntaxKind.PlusPlusToken || parent.operator === ts.SyntaxKind.MinusMinusToken;
  }
  if (ts.isDeleteExpression(parent)) return true;
  if (ts.isForOfStatement(parent) || ts.isForInStatement(parent)) return parent.initializer === node;
  return isPartOfPattern(ts, node) && isWrittenLiteral(ts, node);
}

export function isAssignment(ts: TypeScript, node: ts.BinaryExpression): boolean {
  const kind = node.operatorToken.kind;
  return kind >= ts.SyntaxKind.FirstAssignment && kind <= ts.SyntaxKind.LastAssignment;
}

function isPartOfPattern(ts: TypeScript, node: ts.Node): boolean {
  const { parent } = node;
  if (ts.isPropertyAssignment(parent)) return parent.initializer === node;
  return (
    ts.isShorthandPropertyAssignment(parent) ||
    ts.isArrayLiteralExpression(parent) ||
    ts.isSpreadElement(parent) ||
    ts.isSpreadAssignment(parent)
  );
}

/** A literal is a pattern when it is itself a target: `({ a } = b)`. */
function isWrittenLiteral(ts: TypeScript, node: ts.Node): boolean {
  let literal: ts.Node = node.parent;
  while (!ts.isArrayLiteralExpression(literal) && !ts.isObjectLiteralExpression(literal)) literal = literal.parent;
  return isWritten(ts, literal);
}
