/**
 * What stands around a call: the name that it initialises, and the comments right above it.
 *
 * Says nothing about what the comments mean.
 */
import type ts from "typescript";
import type { Context, Module } from "./context.js";
import { innermost, outermost } from "./outer.js";
import { spanOf } from "./unknown.js";
import type { DefinitionCall } from "./value.js";

/** The variable, property or field that a call initialises. */
export function findBinding({ ts }: Context, node: ts.CallExpression, module: Module): DefinitionCall["binding"] {
  let outer = outermost(ts, node);
  while (isFreeze(ts, outer.parent)) outer = outermost(ts, outer.parent);
  const { parent } = outer;
  const assigned =
    ts.isBinaryExpression(parent) && parent.operatorToken.kind === ts.SyntaxKind.EqualsToken && parent.right === outer;
  if (assigned) {
    const left = innermost(ts, parent.left);
    const name = ts.isPropertyAccessExpression(left) ? left.name : left;
    return ts.isIdentifier(name) || ts.isPrivateIdentifier(name) ? { name: name.text, span: spanOf(name, module) } : undefined;
  }
  const holds = ts.isVariableDeclaration(parent) || ts.isPropertyAssignment(parent) || ts.isPropertyDeclaration(parent);
  if (!holds || parent.initializer !== outer) return undefined;
  const { name } = parent;
  const named =
    ts.isIdentifier(name) || ts.isStringLiteralLike(name) || ts.isPrivateIdentifier(name) || ts.isNumericLiteral(name);
  return named ? { name: name.text, span: spanOf(name, module) } : undefined;
}

/** The comments that end on the line above the statement, property or element that holds the call, or above each other so. */
export function findComments({ ts }: Context, node: ts.CallExpression, module: Module): DefinitionCall["leadingComments"] {
  const { text } = module.source;
  let holder: ts.Node = node;
  while (holder.parent !== undefined && !(isHolder(ts, holder) && startsItsLine(text, module.source.startOf(holder)))) {
    holder = holder.parent;
  }
  const comments: { text: string; span: { file: string; start: number; end: number } }[] = [];
  let below = module.source.startOf(holder);
  for (const { pos, end } of [...(ts.getLeadingCommentRanges(text, holder.pos) ?? [])].reverse()) {
    const isRightAbove = text.slice(end, below).split("\n").length <= 2;
    // A comment behind the code of the line before belongs to that line.
    if (!isRightAbove || !startsItsLine(text, pos)) break;
    comments.unshift({ text: text.slice(pos, end), span: { file: module.file, start: pos, end } });
    below = pos;
  }
  return comments;
}

function isHolder(ts: Context["ts"], node: ts.Node): boolean {
  const { parent } = node;
  return (
    ts.isStatement(node) ||
    ts.isObjectLiteralElementLike(node) ||
    ts.isClassElement(node) ||
    (ts.isArrayLiteralExpression(parent) && ts.isExpression(node)) ||
    (ts.isCallExpression(parent) && parent.expression !== node)
  );
}

function startsItsLine(text: string, at: number): boolean {
  return text.slice(text.lastIndexOf("\n", at - 1) + 1, at).trim() === "";
}

function isFreeze(ts: Context["ts"], node: ts.Node): node is ts.CallExpression {
  if (!ts.isCallExpression(node) || !ts.isPropertyAccessExpression(node.expression)) return false;
  const { expression, name } = node.expression;
  return ts.isIdentifier(expression) && expression.text === "Object" && name.text === "freeze";
}
