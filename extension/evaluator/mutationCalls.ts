/**
 * What calls do to the objects that they are given: methods of lists, functions of the language, functions written in the program,
 * and what functions give back.
 *
 * A call that isn't known to leave its arguments alone may change them.
 */
import type ts from "typescript";
import type { Frame, Module } from "./context.js";
import { isExported } from "./exports.js";
import { type Change, type Flow, flowInto, flowIntoName, loseTrack, narrow, relist, type Search, wrap } from "./flow.js";
import { findTarget } from "./modules.js";
import { innermost, outermost } from "./outer.js";
import { listParameters } from "./parameters.js";
import { type Binding, findReferences, resolveName } from "./source.js";

const CHANGING = new Set(["push", "pop", "shift", "unshift", "splice", "sort", "reverse", "fill", "copyWithin"]);
const RELISTING = new Set([
  "slice",
  "filter",
  "concat",
  "flat",
  "toSorted",
  "toReversed",
  "toSpliced",
  "with",
  "sort",
  "reverse",
]);
const PICKING = new Set(["find", "findLast", "at", "pop", "shift"]);
/** Methods whose callback gets the elements. */
const VISITING = new Set([
  "forEach",
  "map",
  "flatMap",
  "filter",
  "find",
  "findLast",
  "findIndex",
  "findLastIndex",
  "some",
  "every",
]);
const REDUCING = new Set(["reduce", "reduceRight"]);
/** Methods whose result holds nothing of the list, or only what their callback gives back. */
const ANSWERING = new Set([
  ...VISITING,
  ...REDUCING,
  "join",
  "includes",
  "indexOf",
  "lastIndexOf",
  "keys",
  "toString",
  "hasOwnProperty",
]);
const SAFE_GLOBALS = new Set(["String", "Number", "Boolean", "structuredClone", "isNaN", "isFinite", "parseFloat", "parseInt"]);
const SAFE_HOLDERS = new Set(["Math", "Number", "String", "JSON", "console"]);
const SAFE_OBJECT = new Set(["keys", "hasOwn", "is", "isFrozen", "getPrototypeOf"]);
const KEEPING_OBJECT = new Set(["freeze", "seal", "preventExtensions"]);

type Access = ts.PropertyAccessExpression | ts.ElementAccessExpression;
type Next = Flow | Change | undefined;

/** The objects, or something made around them, are what a method is called on. */
export function followMethod(
  search: Search,
  module: Module,
  call: ts.CallExpression,
  access: Access,
  flow: Flow,
): Change | undefined {
  const { ts } = search.ctx;
  const method = ts.isPropertyAccessExpression(access) ? access.name.text : "";
  const isList = flow.wraps.length > 0 ? flow.wraps.at(-1) === "*" : flow.objects.every(({ kind }) => kind === "array");
  if (!isList) return callsOwnFunction(search, method, flow) ? undefined : loseTrack(call, module, flow);
  if (CHANGING.has(method) && flow.wraps.length === 0) return { node: call, module, wording: "changes it" };
  const element = narrow(flow, undefined);
  const [callback] = call.arguments;
  if (callback !== undefined && (VISITING.has(method) || REDUCING.has(method) || method === "sort" || method === "toSorted")) {
    const given = VISITING.has(method) ? [element, undefined, flow] : [element, element, undefined, flow];
    const change = followFunction(search, module, callback, given);
    if (change !== undefined) return change;
  }
  if (PICKING.has(method)) flowInto(search, module, call, element);
  else if (RELISTING.has(method)) flowInto(search, module, call, relist(flow));
  else if (!ANSWERING.has(method) && !CHANGING.has(method))
    return loseTrack(call, module, element.objects.length === 0 ? element : flow);
  if (REDUCING.has(method)) flowInto(search, module, call, element);
  return undefined;
}

/** The objects are an argument of a call. */
export function followCall(search: Search, module: Module, call: ts.CallExpression, argument: ts.Node, flow: Flow): Next {
  const { ts } = search.ctx;
  const callee = innermost(ts, call.expression);
  const index = call.arguments.indexOf(argument as ts.Expression);
  const target = findTarget(search.ctx, callee, module);
  if (target?.kind === "definition") return undefined;
  const isSpread = ts.isSpreadElement(argument) || call.arguments.slice(0, index).some(ts.isSpreadElement);
  if (ts.isIdentifier(callee) && resolveName(ts, callee, module.source) === undefined && SAFE_GLOBALS.has(callee.text))
    return undefined;
  if (ts.isPropertyAccessExpression(callee)) {
    const next = followGlobalOrMethod(search, module, call, callee, index, flow);
    if (next !== "unknown") return next;
  }
  if (isSpread) return loseTrack(call, module, flow);
  const given: (Flow | undefined)[] = [];
  given[index] = flow;
  return followFunction(search, module, callee, given);
}

/** The objects are what a function gives back. */
export function followResult(search: Search, module: Module, from: ts.Node, flow: Flow): Next {
  const { ts } = search.ctx;
  const made = ts.findAncestor(from, ts.isFunctionLike);
  if (made === undefined) return undefined;
  const outer = outermost(ts, made);
  const { parent } = outer;
  if (ts.isCallExpression(parent)) {
    if (innermost(ts, parent.expression) === made) flowInto(search, module, parent, flow);
    else return followCallbackResult(search, module, parent, flow);
    return undefined;
  }
  const named = ts.isFunctionDeclaration(made) ? made.name : ts.isVariableDeclaration(parent) ? parent.name : undefined;
  const binding = named !== undefined && ts.isIdentifier(named) ? resolveName(ts, named, module.source) : undefined;
  if (binding === undefined || isExported(ts, binding, module.source)) return loseTrack(made, module, flow);
  return followCallers(search, module, binding, flow);
}

function followCallers(search: Search, module: Module, binding: Binding, flow: Flow): Change | undefined {
  const { ts } = search.ctx;
  for (const reference of findReferences(ts, binding, module.source)) {
    const outer = outermost(ts, reference);
    const { parent } = outer;
    if (!ts.isCallExpression(parent)) return loseTrack(reference, module, flow);
    if (parent.expression === outer) flowInto(search, module, parent, flow);
    else {
      const change = followCallbackResult(search, module, parent, flow);
      if (change !== undefined) return change;
    }
  }
  return undefined;
}

/** What a callback gives back lands in the result of the method that it was given to. */
function followCallbackResult(search: Search, module: Module, call: ts.CallExpression, flow: Flow): Change | undefined {
  const { ts } = search.ctx;
  const callee = innermost(ts, call.expression);
  const method = ts.isPropertyAccessExpression(callee) ? callee.name.text : "";
  if (method === "map" || method === "flatMap" || method === "from") flowInto(search, module, call, wrap(flow, "*"));
  if (method === "flatMap") flowInto(search, module, call, relist(flow));
  if (REDUCING.has(method)) flowInto(search, module, call, flow);
  const isKnown = VISITING.has(method) || REDUCING.has(method) || method === "from" || method === "sort" || method === "toSorted";
  return isKnown ? undefined : loseTrack(call, module, flow);
}

/** Objects reach the parameters of a function, where it can be found. */
function followFunction(search: Search, module: Module, node: ts.Node, given: readonly (Flow | undefined)[]): Change | undefined {
  const { ts } = search.ctx;
  const found = findFunction(search, module, node);
  if (found === "harmless") return undefined;
  const whole = given.find((flow) => flow !== undefined && loseTrack(node, module, flow) !== undefined);
  if (found === undefined) return whole === undefined ? undefined : loseTrack(node.parent, module, whole);
  // `arguments` reaches every parameter under no name of its own.
  if (/\barguments\b/.test(found.module.source.textOf(found.node))) return whole && loseTrack(node.parent, module, whole);
  const parameters = listParameters(ts, found.node);
  for (const [index, flow] of given.entries()) {
    const last = parameters.at(-1);
    const parameter = parameters[index] ?? (last?.dotDotDotToken === undefined ? undefined : last);
    if (flow === undefined || parameter === undefined) continue;
    flowIntoName(search, found.module, parameter.name, parameter.dotDotDotToken === undefined ? flow : wrap(flow, "*"));
  }
  return undefined;
}

type Found = { readonly node: ts.SignatureDeclaration; readonly module: Module };

function findFunction(search: Search, module: Module, node: ts.Node): Found | "harmless" | undefined {
  const { ts } = search.ctx;
  const bare = innermost(ts, node as ts.Expression);
  if (ts.isArrowFunction(bare) || ts.isFunctionExpression(bare)) return { node: bare, module };
  if (ts.isIdentifier(bare) && SAFE_GLOBALS.has(bare.text) && resolveName(ts, bare, module.source) === undefined)
    return "harmless";
  const target = findTarget(search.ctx, bare, module);
  if (target?.kind === "definition") return "harmless";
  if (target?.kind !== "binding") return undefined;
  const { binding } = target;
  const bodies = binding.declarations.filter((each) => ts.isFunctionDeclaration(each) && each.body !== undefined);
  const [declaration] = bodies.length > 0 ? bodies : binding.declarations;
  if (declaration === undefined) return undefined;
  if (ts.isFunctionDeclaration(declaration)) return { node: declaration, module: target.module };
  if (binding.kind !== "const" || !ts.isVariableDeclaration(declaration) || declaration.initializer === undefined)
    return undefined;
  const made = innermost(ts, declaration.initializer);
  return ts.isArrowFunction(made) || ts.isFunctionExpression(made) ? { node: made, module: target.module } : undefined;
}

/** `Object.freeze(x)` and the like, and lists that take the objects in; `unknown` for any other callee. */
function followGlobalOrMethod(
  search: Search,
  module: Module,
  call: ts.CallExpression,
  { expression, name: { text: method } }: ts.PropertyAccessExpression,
  index: number,
  flow: Flow,
): Next | "unknown" {
  const { ts } = search.ctx;
  const holder = innermost(ts, expression);
  const binding = ts.isIdentifier(holder) ? resolveName(ts, holder, module.source) : undefined;
  if (ts.isIdentifier(holder) && binding === undefined)
    return followGlobal(module, call, `${holder.text}.${method}`, index, flow);
  if (method === "includes" || method === "indexOf" || method === "lastIndexOf") return undefined;
  if (method === "concat") return relist(flow);
  if (REDUCING.has(method) && index === 1 && call.arguments[0] !== undefined) {
    const change = followFunction(search, module, call.arguments[0], [flow]);
    return change ?? flow;
  }
  if ((method === "push" || method === "unshift") && binding !== undefined) {
    flowInto(search, module, binding, wrap(flow, "*"));
    return undefined;
  }
  return "unknown";
}

function followGlobal(module: Module, call: ts.CallExpression, name: string, index: number, flow: Flow): Next | "unknown" {
  const [holder = "", method = ""] = name.split(".");
  if (SAFE_HOLDERS.has(holder) || name === "Array.isArray") return undefined;
  if (name === "Array.from" && call.arguments.length === 1) return relist(flow);
  if (name === "Array.of") return wrap(flow, "*");
  if (holder !== "Object") return "unknown";
  if (SAFE_OBJECT.has(method)) return undefined;
  if (KEEPING_OBJECT.has(method)) return flow;
  if (method === "values") return relist(flow);
  if (method === "entries") return wrap(wrap(narrow(flow, undefined), "1"), "*");
  if (method === "fromEntries") return wrap(narrow(narrow(flow, undefined), undefined), "*");
  if (method !== "assign") return "unknown";
  if (index === 0) return flow.wraps.length > 0 ? flow : { node: call, module, wording: "changes it" };
  const parts = relist(flow);
  return loseTrack(call, module, parts) ?? parts;
}

/** A method that the object was written with, and that doesn't use `this`. */
function callsOwnFunction({ ctx }: Search, method: string, { objects, wraps }: Flow): boolean {
  if (wraps.length > 0) return false;
  return objects.every((data) => {
    const own = data.kind === "object" ? data.entries.get(method) : undefined;
    const callable =
      own?.known === true && own.data.kind === "function" && "callable" in own.data ? own.data.callable : undefined;
    const { node, frame } = (callable ?? {}) as { readonly node?: ts.Node; readonly frame?: Frame };
    if (node === undefined || frame === undefined || !ctx.ts.isFunctionLike(node)) return false;
    return !/\bthis\b/.test(frame.module.source.textOf(node));
  });
}
