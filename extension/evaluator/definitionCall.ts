/**
 * A call to a definition: its arguments as values, what the definition has to say about them, and what it built.
 *
 * Evaluated once a frame, so that what it builds is one object however often it is mentioned.
 */
import type ts from "typescript";
import { evaluateElements } from "./aggregates.js";
import { findBinding, findComments } from "./callSite.js";
import type { Context, Frame } from "./context.js";
import { OPENS_FRAME } from "./kinds.js";
import { locateIssue, locateUnknown } from "./locate.js";
import { originOf } from "./operations.js";
import { innermost } from "./outer.js";
import { toPlain } from "./plain.js";
import { dependent, known, quote, spanOf, tooDeep, unknown } from "./unknown.js";
import type { Definition, DefinitionCall, Unknown, Value } from "./value.js";

/** A call, and its value to whoever uses it; no call where it would be evaluated inside itself. */
export function evaluateDefinitionCall(
  ctx: Context,
  definition: Definition,
  node: ts.CallExpression,
  frame: Frame,
): { readonly value: Value; readonly call?: DefinitionCall } {
  if (frame.memo.has(node)) {
    const value = frame.memo.get(node);
    const call =
      value?.known === true && value.data.kind === "built"
        ? value.data.call
        : value?.known === false
          ? value.reportedBy
          : undefined;
    if (value !== undefined && call !== undefined) return { value, call };
    const origin = originOf("call", node, frame, []);
    return { value: unknown("cycle", `${quote(node, frame.module)} is one of its own arguments.`, "", origin) };
  }
  frame.memo.set(node, undefined);
  const { call, blocked } = makeCall(ctx, definition, node, frame);
  const value = valueOfCall(ctx, call, blocked, node, frame);
  frame.memo.set(node, value);
  return { value, call };
}

function makeCall(
  ctx: Context,
  definition: Definition,
  node: ts.CallExpression,
  frame: Frame,
): { readonly call: DefinitionCall; readonly blocked: Unknown | undefined } {
  const elements = evaluateElements(ctx, node.arguments, frame);
  const isOpen = !Array.isArray(elements);
  const args = isOpen ? [elements] : elements;
  const place = { span: spanOf(node, frame.module), callee: calleeSpan(ctx, node, frame), args };
  const { plain, unknowns } = toPlain(ctx, args);
  const checked = isOpen ? { issues: [] } : check(definition, plain);
  const own = unknowns.filter(({ unknown }) => reporterOf(unknown) === undefined);
  const isHidden = (path: readonly (string | number)[]) =>
    unknowns.some((part) => part.path.every((key, index) => key === path[index]));
  const binding = findBinding(ctx, node, frame.module);
  const built = unknowns.length === 0 ? checked?.built : undefined;
  const call: DefinitionCall = {
    definition: definition.name,
    ...place,
    ...(built === undefined ? {} : { built }),
    issues: (checked?.issues ?? []).filter(({ path }) => !isHidden(path)).map((issue) => locateIssue(issue, place)),
    unknowns: [
      ...own.map(({ unknown, path }) => locateUnknown(unknown, path, place)),
      ...(checked === undefined ? [tooDeep(node, frame.module)] : []),
    ],
    waitsFor: [...new Set(unknowns.flatMap(({ unknown }) => reporterOf(unknown) ?? []))],
    ...(isOpenRun(ctx, node, frame) || own.some(({ unknown }) => isParameter(unknown)) ? { open: true } : {}),
    ...(binding === undefined ? {} : { binding }),
    leadingComments: findComments(ctx, node, frame.module),
  };
  return { call, blocked: unknowns[0]?.unknown };
}

function valueOfCall(
  ctx: Context,
  call: DefinitionCall,
  blocked: Unknown | undefined,
  node: ts.CallExpression,
  frame: Frame,
): Value {
  const origin = originOf("call", node, frame, call.args);
  if (call.built !== undefined) {
    ctx.makers.set(call.built, call);
    return known({ kind: "built", built: call.built, call }, origin);
  }
  if (call.issues.length === 0 && blocked !== undefined)
    return { ...dependent(node, frame.module, origin, blocked), reportedBy: call };
  const message = `${quote(node.expression, frame.module)} was given something that it does not accept.`;
  return { ...unknown("rejected", message, "", origin), reportedBy: call };
}

/** A definition never throws; a list nested past the stack's end inside one is all that could. */
function check(definition: Definition, plain: readonly unknown[]): ReturnType<Definition["check"]> | undefined {
  try {
    return definition.check(plain);
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return undefined;
  }
}

/** The call whose own findings already tell of an unknown. */
function reporterOf(part: Unknown): DefinitionCall | undefined {
  for (let link: Unknown | undefined = part; link !== undefined; link = link.cause) {
    if (link.reportedBy !== undefined) return link.reportedBy;
  }
  return undefined;
}

/** Whether something around the node has parameters or a loop variable that the frame doesn't know. */
function isOpenRun({ ts }: Context, node: ts.Node, frame: Frame): boolean {
  const { kinds } = frame.module.source;
  for (let each: ts.Node = node.parent; each !== undefined; each = each.parent) {
    if (((kinds[each.kind] ?? 0) & OPENS_FRAME) === 0 || runsThrough(frame, each)) continue;
    if (ts.isForOfStatement(each) && node.pos >= each.statement.pos) return true;
    if (ts.isFunctionLike(each) && each.parameters.length > 0) return true;
  }
  return false;
}

function runsThrough(frame: Frame, node: ts.Node): boolean {
  let run: Frame | undefined = frame;
  while (run !== undefined && run.node !== node) run = run.parent;
  return run !== undefined;
}

function isParameter(part: Unknown): boolean {
  let root = part;
  while (root.cause !== undefined) root = root.cause;
  return root.reason.code === "parameter";
}

function calleeSpan({ ts }: Context, node: ts.CallExpression, { module }: Frame): DefinitionCall["callee"] {
  const callee = innermost(ts, node.expression);
  return spanOf(ts.isPropertyAccessExpression(callee) ? callee.name : callee, module);
}
