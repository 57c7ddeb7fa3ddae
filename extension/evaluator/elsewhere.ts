/**
 * Calls to definitions that a file reaches through helpers of other files: `export const left = makeArm("left", 40)`.
 *
 * They stand in the helper's file, but only the file that calls it knows the parameters.
 */
import type ts from "typescript";
import { listActivations, listBelow, runLoop } from "./activations.js";
import type { Context, Frame, Module, Target } from "./context.js";
import { evaluateDefinitionCall } from "./definitionCall.js";
import { findTarget } from "./modules.js";
import { isReached } from "./reach.js";
import type { DefinitionCall } from "./value.js";

/** What a call of another file's helper declares there; nothing for any other call. */
export function listCallsElsewhere(
  ctx: Context,
  node: ts.CallExpression,
  target: Target | undefined,
  module: Module,
): DefinitionCall[] {
  if (target?.kind !== "binding" || target.module === module || !isFunction(ctx, target.binding.declarations)) return [];
  const found = new Set<DefinitionCall>();
  for (const frame of listActivations(ctx, node, module)) {
    ctx.evaluate(node, frame);
    const pending = listBelow(frame.children.get(node) ?? [], () => true);
    const seen = new Set<Frame>();
    // What is called on the way joins at the end.
    for (const next of pending) {
      if (seen.has(next)) continue;
      seen.add(next);
      for (const call of evaluateIn(ctx, next, pending)) if (call.span.file !== module.file) found.add(call);
    }
  }
  return [...found];
}

/** The calls that stand directly in a run; those of helpers that it calls in turn are put on the list of runs. */
function evaluateIn(ctx: Context, frame: Frame, pending: Frame[]): DefinitionCall[] {
  const calls: DefinitionCall[] = [];
  for (const node of frame.module.source.calls) {
    if (node.pos < frame.node.pos || node.end > frame.node.end || enclosing(ctx, node) !== frame.node) continue;
    if (!isReached(ctx, node, frame)) continue;
    const target = findTarget(ctx, node.expression, frame.module);
    if (target?.kind === "definition")
      calls.push(...[evaluateDefinitionCall(ctx, target.definition, node, frame).call ?? []].flat());
    else if (target?.kind === "binding" && isFunction(ctx, target.binding.declarations)) {
      ctx.evaluate(node, frame);
      pending.push(...listBelow(frame.children.get(node) ?? [], () => true));
    }
  }
  for (const loop of loopsIn(ctx, frame)) pending.push(...runLoop(ctx, loop, frame).filter((run) => run !== frame));
  return calls;
}

function loopsIn(ctx: Context, frame: Frame): ts.ForOfStatement[] {
  const { source } = frame.module;
  const loops = [...source.scopes.keys()].filter(ctx.ts.isForOfStatement);
  return loops.filter(
    (loop) =>
      loop.pos >= frame.node.pos && loop.end <= frame.node.end && loop !== frame.node && enclosing(ctx, loop) === frame.node,
  );
}

function enclosing({ ts }: Context, node: ts.Node): ts.Node | undefined {
  return ts.findAncestor(node.parent, (each) => ts.isSourceFile(each) || ts.isFunctionLike(each) || ts.isForOfStatement(each));
}

function isFunction({ ts }: Context, declarations: readonly ts.Node[]): boolean {
  return declarations.some(
    (node) =>
      ts.isFunctionDeclaration(node) ||
      (ts.isVariableDeclaration(node) &&
        node.initializer !== undefined &&
        (ts.isArrowFunction(node.initializer) || ts.isFunctionExpression(node.initializer))),
  );
}
