/**
 * Whether anything may have changed an object after it was made: follows every use of its name, and of the names that it flows
 * into.
 *
 * Syntax alone, never the order of execution: a write in a function that nobody calls counts. Parts that are numbers or texts
 * can't be changed by whoever gets them, so the values themselves are looked at on the way. When in doubt, it may have changed.
 */
import type ts from "typescript";
import { exportsObject } from "./commonjs.js";
import type { Context, Module, Target } from "./context.js";
import { isExported } from "./exports.js";
import { type Change, type Flow, flowInto, flowIntoName, loseTrack, narrow, relist, type Search, wrap } from "./flow.js";
import { followImporters } from "./importers.js";
import { follow } from "./modules.js";
import { followCall, followMethod, followResult } from "./mutationCalls.js";
import { innermost, isOuter, outermost } from "./outer.js";
import { type Binding, findReferences, resolveName } from "./source.js";
import type { Data } from "./value.js";
import { isAssignment, isWritten } from "./writes.js";

const MOST_FLOWS = 1000;

/** What in the program may have changed the object that `binding` stands for, or `undefined` when nothing can have. */
export function findChange(ctx: Context, module: Module, binding: Binding, data: Data): Change | undefined {
  const search = begin(ctx, module);
  const whole: Flow = { objects: [data], wraps: [] };
  flowInto(search, module, binding, whole);
  const target: Target = binding.kind === "import" ? follow(ctx, { kind: "binding", module, binding }) : { kind: "library" };
  // What is exported without a name has no search of its own.
  const elsewhere = target.kind === "expression" ? followImporters(search, target, whole) : undefined;
  return elsewhere ?? explore(search);
}

/** The same for an object that several expressions or names of a file may stand for. */
export function findChangeFrom(
  ctx: Context,
  module: Module,
  starts: readonly (ts.Node | Binding)[],
  data: Data,
): Change | undefined {
  const search = begin(ctx, module);
  for (const start of starts) flowInto(search, module, start, { objects: [data], wraps: [] });
  return explore(search);
}

function begin(ctx: Context, home: Module): Search {
  const search: Search = {
    ctx,
    home,
    pending: [],
    seen: new Map(),
    exploreIn: (pending, only) => explore({ ...search, pending }, only),
  };
  return search;
}

function explore(search: Search, only?: Module): Change | undefined {
  const { pending } = search;
  const left: Search["pending"] = [];
  let change: Change | undefined;
  for (let count = 0; change === undefined; count++) {
    const next = pending.pop();
    if (next === undefined) break;
    const { module, start, flow } = next;
    if (only !== undefined && module !== only) left.push(next);
    else if (count > MOST_FLOWS) change = { node: module.source.root, module, wording: "hands it round too often to follow" };
    else change = isNode(start) ? followUse(search, module, start, flow) : followName(search, module, start, flow);
  }
  pending.push(...left);
  return change;
}

function followName(search: Search, module: Module, binding: Binding, flow: Flow): Change | undefined {
  const { ctx } = search;
  for (const reference of findReferences(ctx.ts, binding, module.source)) {
    const change = followUse(search, module, reference, flow);
    if (change !== undefined) return change;
  }
  return isExported(ctx.ts, binding, module.source)
    ? followImporters(search, { kind: "binding", module, binding }, flow)
    : undefined;
}

/** What happens to the objects from one expression on, outwards to where they end. */
function followUse(search: Search, module: Module, start: ts.Node, startFlow: Flow): Change | undefined {
  const { ts } = search.ctx;
  let flow: Flow | undefined = startFlow;
  for (let node = start; flow !== undefined && flow.objects.length > 0; node = node.parent) {
    const { parent } = node;
    const isLink = (ts.isPropertyAccessExpression(parent) || ts.isElementAccessExpression(parent)) && parent.expression === node;
    if (!isLink) {
      const next: Flow | Change | undefined = step(search, module, node, parent, flow);
      if (next !== undefined && "wording" in next) return next;
      flow = next;
      continue;
    }
    // A write to something made around the objects is no write to them.
    if (isWritten(ts, parent))
      return flow.wraps.length > 0 ? undefined : { node: outermost(ts, parent).parent, module, wording: "changes it" };
    const call = outermost(ts, parent).parent;
    if (ts.isCallExpression(call) && innermost(ts, call.expression) === parent) {
      return followMethod(search, module, call, parent, flow);
    }
    flow = narrow(flow, nameOf(ts, parent));
  }
  return undefined;
}

/** One step outwards: what flows on, a change, or nothing more. */
function step(search: Search, module: Module, node: ts.Node, parent: ts.Node, flow: Flow): Flow | Change | undefined {
  const { ts } = search.ctx;
  if (isOuter(ts, parent) || ts.isAwaitExpression(parent) || ts.isObjectLiteralExpression(parent)) return flow;
  if (ts.isBinaryExpression(parent)) return stepBinary(search, module, node, parent, flow);
  if (ts.isConditionalExpression(parent)) return parent.condition === node ? undefined : flow;
  if (ts.isPropertyAssignment(parent)) return wrap(flow, ts.isIdentifier(parent.name) ? parent.name.text : "*");
  if (ts.isShorthandPropertyAssignment(parent)) return wrap(flow, parent.name.text);
  if (ts.isSpreadAssignment(parent)) return relist(flow);
  if (ts.isSpreadElement(parent)) return narrow(flow, undefined);
  if (ts.isArrayLiteralExpression(parent)) return wrap(flow, "*");
  if (ts.isVariableDeclaration(parent) || ts.isParameter(parent) || ts.isBindingElement(parent)) {
    flowIntoName(search, module, parent.name, flow);
    return undefined;
  }
  if (ts.isExportAssignment(parent))
    return followImporters(search, { kind: "expression", module, node: parent.expression }, flow);
  if (ts.isForOfStatement(parent)) return stepLoop(search, module, parent, flow);
  if (ts.isReturnStatement(parent) || (ts.isArrowFunction(parent) && parent.body === node)) {
    return followResult(search, module, parent, flow);
  }
  if (ts.isCallExpression(parent)) return parent.expression === node ? undefined : followCall(search, module, parent, node, flow);
  if (ts.isNewExpression(parent)) return parent.expression === node ? undefined : stepNew(search, module, parent, flow);
  return isHarmless(ts, parent) ? undefined : loseTrack(parent, module, flow);
}

function stepBinary(
  search: Search,
  module: Module,
  node: ts.Node,
  parent: ts.BinaryExpression,
  flow: Flow,
): Flow | Change | undefined {
  const { ts } = search.ctx;
  const kind = parent.operatorToken.kind;
  if (isAssignment(ts, parent)) return parent.left === node ? undefined : stepAssignment(search, module, parent.left, flow);
  if (kind === ts.SyntaxKind.CommaToken || kind === ts.SyntaxKind.AmpersandAmpersandToken) {
    return parent.right === node ? flow : undefined;
  }
  return kind === ts.SyntaxKind.BarBarToken || kind === ts.SyntaxKind.QuestionQuestionToken ? flow : undefined;
}

/** `x = object`, `x.part = object`; the assignment itself is an expression that goes on. */
function stepAssignment(search: Search, module: Module, left: ts.Expression, flow: Flow): Flow | Change | undefined {
  const { ts } = search.ctx;
  const target = innermost(ts, left);
  const property = ts.isPropertyAccessExpression(target) ? target.name.text : undefined;
  const holder = ts.isPropertyAccessExpression(target) ? innermost(ts, target.expression) : target;
  const binding = ts.isIdentifier(holder) ? resolveName(ts, holder, module.source) : undefined;
  // What is exported is followed through the files that import it.
  const root = ts.isPropertyAccessExpression(holder) ? holder.expression : holder;
  if (ts.isIdentifier(root) && exportsObject(ts, root, module.source) !== undefined) {
    return (
      followImporters(search, { kind: "expression", module, node: (left.parent as ts.BinaryExpression).right }, flow) ?? flow
    );
  }
  if (binding === undefined) return loseTrack(left.parent, module, flow) ?? flow;
  flowInto(search, module, binding, property === undefined ? flow : wrap(flow, property));
  return flow;
}

function stepLoop(search: Search, module: Module, loop: ts.ForOfStatement, flow: Flow): Change | undefined {
  const { ts } = search.ctx;
  const name = ts.isVariableDeclarationList(loop.initializer) ? loop.initializer.declarations[0]?.name : undefined;
  if (name === undefined) return loseTrack(loop.initializer, module, narrow(flow, undefined));
  flowIntoName(search, module, name, narrow(flow, undefined));
  return undefined;
}

/** A set or a map made of the parts holds them; anything else that is made may keep and change what it is given. */
function stepNew(search: Search, module: Module, made: ts.NewExpression, flow: Flow): Change | undefined {
  const { ts } = search.ctx;
  const { expression } = made;
  const copies = ts.isIdentifier(expression) && (expression.text === "Set" || expression.text === "Map");
  const isGlobal = copies && resolveName(ts, expression, module.source) === undefined;
  return loseTrack(made, module, isGlobal ? narrow(flow, undefined) : flow);
}

/** Places where a value is looked at and goes no further. */
function isHarmless(ts: Context["ts"], parent: ts.Node): boolean {
  return (
    ts.isExpressionStatement(parent) ||
    ts.isIfStatement(parent) ||
    ts.isIterationStatement(parent, false) ||
    ts.isSwitchStatement(parent) ||
    ts.isCaseClause(parent) ||
    ts.isTemplateSpan(parent) ||
    ts.isPrefixUnaryExpression(parent) ||
    ts.isPostfixUnaryExpression(parent) ||
    ts.isTypeOfExpression(parent) ||
    ts.isVoidExpression(parent) ||
    ts.isElementAccessExpression(parent) ||
    ts.isComputedPropertyName(parent) ||
    ts.isEnumMember(parent)
  );
}

function nameOf(ts: Context["ts"], access: ts.PropertyAccessExpression | ts.ElementAccessExpression): string | undefined {
  if (ts.isPropertyAccessExpression(access)) return access.name.text;
  const { argumentExpression } = access;
  return ts.isStringLiteralLike(argumentExpression) ? argumentExpression.text : undefined;
}

function isNode(start: Binding | ts.Node): start is ts.Node {
  return "pos" in start;
}
