/**
 * Which runs reach a call that stands inside functions and loops: a loop over a known list runs once for each element, a helper once
 * for each known call of it.
 *
 * Where no run is known (a function that other files call, a loop over something unknown) there is one open run, in which parameters
 * and loop variables are unknown.
 */
import type ts from "typescript";
import { listItems } from "./access.js";
import { type Context, type Frame, type Module, openFrame } from "./context.js";
import { openShared } from "./functions.js";
import { outermost } from "./outer.js";
import { listParameters } from "./parameters.js";
import { bindPattern } from "./patterns.js";
import { isReached, leavesLoop } from "./reach.js";
import { type Binding, findReferences, resolveName } from "./source.js";
import type { Value } from "./value.js";

/** More runs of one place than this are not told apart. */
const MOST_RUNS = 1000;

export function listActivations(ctx: Context, node: ts.CallExpression, module: Module): readonly Frame[] {
  return runsAround(ctx, node, module, new Set()).filter((frame) => isReached(ctx, node, frame));
}

/** The runs of the function or loop around a node. */
function runsAround(ctx: Context, node: ts.Node, module: Module, visiting: Set<ts.Node>): readonly Frame[] {
  const { ts } = ctx;
  const around = ts.findAncestor(
    node.parent,
    (each) => ts.isSourceFile(each) || ts.isFunctionLike(each) || isLoopBody(ts, each, node),
  );
  if (around === undefined || ts.isSourceFile(around)) return [module.root];
  const kept = module.runs.get(around);
  if (kept !== undefined) return kept;
  const outer = runsAround(ctx, around, module, visiting);
  // Helpers that call each other in a circle have no first call here.
  if (visiting.has(around)) return outer;
  visiting.add(around);
  const found = ts.isForOfStatement(around)
    ? outer.flatMap((frame) => runLoop(ctx, around, frame))
    : runsOfFunction(ctx, around as ts.FunctionLikeDeclaration, module, outer, visiting);
  visiting.delete(around);
  const runs = found.length === 0 || found.length > MOST_RUNS ? outer : found;
  module.runs.set(around, runs);
  return runs;
}

function runsOfFunction(
  ctx: Context,
  node: ts.FunctionLikeDeclaration,
  module: Module,
  outer: readonly Frame[],
  visiting: Set<ts.Node>,
): readonly Frame[] {
  const { ts } = ctx;
  if (ts.isClassElement(node) || ts.isAccessor(node)) return [];
  if (listParameters(ts, node).length === 0) return outer.map((frame) => openShared(frame, node));
  const runs = listCalls(ctx, node, module).flatMap((call) => {
    const callers = runsAround(ctx, call, module, visiting).filter((frame) => isReached(ctx, call, frame));
    return callers.flatMap((frame) => {
      ctx.evaluate(call, frame);
      return listBelow(frame.children.get(call) ?? [], (each) => each.node === node);
    });
  });
  return [...new Set(runs)];
}

/** The calls in the file that run a function: calls of it, and calls that it is given to. */
function listCalls(ctx: Context, node: ts.FunctionLikeDeclaration, module: Module): ts.CallExpression[] {
  const { ts } = ctx;
  const outer = outermost(ts, node);
  if (ts.isCallExpression(outer.parent)) return [outer.parent];
  const name = ts.isFunctionDeclaration(node)
    ? node.name
    : ts.isVariableDeclaration(outer.parent)
      ? outer.parent.name
      : undefined;
  const binding = name !== undefined && ts.isIdentifier(name) ? resolveName(ts, name, module.source) : undefined;
  if (binding === undefined) return [];
  const calls = findReferences(ts, binding, module.source).flatMap((reference) => {
    const { parent } = outermost(ts, reference);
    const isInside = reference.pos >= node.pos && reference.end <= node.end;
    return ts.isCallExpression(parent) && !isInside ? [parent] : [];
  });
  return calls.sort((a, b) => a.pos - b.pos);
}

/** The runs of a loop's body, one for each element of the list. */
export function runLoop(ctx: Context, loop: ts.ForOfStatement, outer: Frame): readonly Frame[] {
  const { ts } = ctx;
  const kept = outer.children.get(loop);
  if (kept !== undefined) return kept;
  const list = ctx.evaluate(loop.expression, outer);
  const items = list.known ? listItems(ctx, list) : undefined;
  const declaration = ts.isVariableDeclarationList(loop.initializer) ? loop.initializer.declarations[0] : undefined;
  if (items === undefined || declaration === undefined || loop.awaitModifier !== undefined) return [outer];
  const runs: Frame[] = [];
  outer.children.set(loop, runs);
  for (const item of items) {
    const bound = new Map<Binding, Value>();
    const frame = openFrame(outer, loop, bound);
    bindPattern(ctx, declaration, item, frame, bound);
    runs.push(frame);
    if (leavesLoop(ctx, loop, frame)) break;
  }
  return runs;
}

/** All frames at or below some that fit, each once. */
export function listBelow(frames: readonly (Frame | undefined)[], fits: (frame: Frame) => boolean): Frame[] {
  const found: Frame[] = [];
  const stack = [...frames].reverse();
  while (stack.length > 0) {
    const frame = stack.pop();
    if (frame === undefined) continue;
    if (fits(frame)) found.push(frame);
    stack.push(...[...frame.children.values()].flat().reverse());
  }
  return found;
}

/** A loop's head is evaluated outside of its runs. */
function isLoopBody(ts: Context["ts"], node: ts.Node, inner: ts.Node): boolean {
  return ts.isForOfStatement(node) && node.statement.pos <= inner.pos && inner.end <= node.statement.end;
}
