/**
 * Whether a run gets to a place: conditions around it, and jumps before it, as far as they are known.
 *
 * A condition that isn't known may go either way, so the place then counts as reached.
 */
import type ts from "typescript";
import type { Context, Frame } from "./context.js";
import { isTruthy } from "./operations.js";

/** False only when the run certainly passes the node by. */
export function isReached(ctx: Context, node: ts.Node, frame: Frame): boolean {
  for (let inner = node; inner !== frame.node && inner.parent !== undefined; inner = inner.parent) {
    // The file's own run is what people write and look at: a branch switched off there is still worth checking.
    if (frame.parent === undefined) return true;
    if (isSwitchedOff(ctx, inner, frame) || isJumpedOver(ctx, inner, frame)) return false;
  }
  return true;
}

/** Whether a run of a loop's body ends the loop. */
export function leavesLoop(ctx: Context, loop: ts.ForOfStatement, frame: Frame): boolean {
  const statements = ctx.ts.isBlock(loop.statement) ? loop.statement.statements : [loop.statement];
  return statements.some((statement) => jumps(ctx, statement, frame, (jump) => !ctx.ts.isContinueStatement(jump)));
}

function isSwitchedOff(ctx: Context, node: ts.Node, frame: Frame): boolean {
  const { ts } = ctx;
  const { parent } = node;
  if (ts.isIfStatement(parent)) {
    if (parent.thenStatement === node) return truth(ctx, parent.expression, frame) === false;
    return parent.elseStatement === node && truth(ctx, parent.expression, frame) === true;
  }
  if (ts.isConditionalExpression(parent)) {
    if (parent.whenTrue === node) return truth(ctx, parent.condition, frame) === false;
    return parent.whenFalse === node && truth(ctx, parent.condition, frame) === true;
  }
  if (!ts.isBinaryExpression(parent) || parent.right !== node) return false;
  const { kind } = parent.operatorToken;
  if (kind === ts.SyntaxKind.AmpersandAmpersandToken) return truth(ctx, parent.left, frame) === false;
  return kind === ts.SyntaxKind.BarBarToken && truth(ctx, parent.left, frame) === true;
}

function isJumpedOver(ctx: Context, node: ts.Node, frame: Frame): boolean {
  const { ts } = ctx;
  if (!ts.isBlock(node.parent)) return false;
  for (const statement of node.parent.statements) {
    if (statement === node) return false;
    if (jumps(ctx, statement, frame, () => true)) return true;
  }
  return false;
}

/** Whether a statement certainly leaves the block: a jump, or a condition that is known to lead to one. */
function jumps(ctx: Context, statement: ts.Statement, frame: Frame, counts: (jump: ts.Statement) => boolean): boolean {
  const { ts } = ctx;
  if (ts.isBlock(statement)) return statement.statements.some((inner) => jumps(ctx, inner, frame, counts));
  if (ts.isIfStatement(statement)) {
    const condition = truth(ctx, statement.expression, frame);
    if (condition === undefined) return false;
    const taken = condition ? statement.thenStatement : statement.elseStatement;
    return taken !== undefined && jumps(ctx, taken, frame, counts);
  }
  const isJump =
    ts.isReturnStatement(statement) ||
    ts.isThrowStatement(statement) ||
    ts.isContinueStatement(statement) ||
    ts.isBreakStatement(statement);
  return isJump && counts(statement);
}

function truth(ctx: Context, condition: ts.Expression, frame: Frame): boolean | undefined {
  const value = ctx.evaluate(condition, frame);
  return value.known ? isTruthy(value) : undefined;
}
