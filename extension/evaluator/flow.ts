/**
 * The bookkeeping of a search for changes: which objects flow where, and what is left to look at.
 *
 * Decides nothing about what changes an object; `mutation.ts` and `mutationCalls.ts` do.
 */
import type ts from "typescript";
import type { Context, Module } from "./context.js";
import { type Binding, resolveName } from "./source.js";
import type { Data } from "./value.js";

/** Why an object may hold something else; `wording` continues a sentence that begins with the expression at `node`. */
export interface Change {
  readonly node: ts.Node;
  readonly module: Module;
  readonly wording: string;
}

/** What flows through an expression: the objects themselves, or something made around them. */
export interface Flow {
  readonly objects: readonly Data[];
  /** Properties to go through from the outside in, the outermost last; `*` is any of them. */
  readonly wraps: readonly string[];
}

export interface Search {
  readonly ctx: Context;
  /** The module whose value depends on the outcome. */
  readonly home: Module;
  /** Names and expressions that the objects flow into. */
  readonly pending: { readonly module: Module; readonly start: Binding | ts.Node; readonly flow: Flow }[];
  readonly seen: Map<object, Set<string>>;
  /** Follows what is pending in one file; what leads out of it is left. */
  exploreIn(pending: Search["pending"], module: Module): Change | undefined;
}

const NOTHING: Flow = { objects: [], wraps: [] };

/** The objects flow into a name, or out of an expression; nothing is looked at twice. */
export function flowInto(search: Search, module: Module, start: Binding | ts.Node, flow: Flow): void {
  if (flow.objects.length === 0) return;
  const key = flow.wraps.join("/");
  const seen = search.seen.get(start) ?? new Set();
  search.seen.set(start, seen);
  if (seen.has(key)) return;
  seen.add(key);
  search.pending.push({ module, start, flow });
}

/** The objects flow into the names of a pattern, a parameter or a variable. */
export function flowIntoName(search: Search, module: Module, name: ts.BindingName, flow: Flow): void {
  const { ts } = search.ctx;
  if (ts.isIdentifier(name)) {
    const binding = resolveName(ts, name, module.source);
    if (binding !== undefined) flowInto(search, module, binding, flow);
    return;
  }
  for (const element of name.elements) {
    if (ts.isOmittedExpression(element)) continue;
    const property = element.propertyName ?? element.name;
    const key = ts.isObjectBindingPattern(name) && ts.isIdentifier(property) ? property.text : undefined;
    const rest = element.dotDotDotToken !== undefined;
    flowIntoName(search, module, element.name, rest ? relist(flow) : narrow(flow, key));
  }
}

/** What is inside: one property, or any where `name` is undefined. Plain values drop out, for nobody can change them. */
export function narrow({ objects, wraps }: Flow, name: string | undefined): Flow {
  const outer = wraps.at(-1);
  if (outer !== undefined) {
    const other = name !== undefined && (outer === "*" ? name === "length" : outer !== name);
    return other ? NOTHING : { objects, wraps: wraps.slice(0, -1) };
  }
  const inner = objects.flatMap((data) => innerValues(data, name)).filter(({ kind }) => kind === "array" || kind === "object");
  return { objects: inner, wraps: [] };
}

export function wrap({ objects, wraps }: Flow, name: string): Flow {
  return { objects, wraps: [...wraps, name] };
}

/** A new list or object that holds the same parts. */
export function relist(flow: Flow): Flow {
  return flow.wraps.length > 0 ? flow : wrap(narrow(flow, undefined), "*");
}

/** The objects reach code that is not followed: it may change them, unless they are frozen through and through. */
export function loseTrack(node: ts.Node, module: Module, { objects }: Flow): Change | undefined {
  return objects.every(isFrozen) ? undefined : { node, module, wording: "may change it" };
}

export function isFrozen(data: Data): boolean {
  if (data.kind !== "array" && data.kind !== "object") return true;
  return data.frozen === true && innerValues(data, undefined).every(isFrozen);
}

function innerValues(data: Data, name: string | undefined): Data[] {
  if (data.kind !== "array" && data.kind !== "object") return [];
  const values = data.kind === "array" ? data.items : name === undefined ? [...data.entries.values()] : [data.entries.get(name)];
  return values.flatMap((value) => (value?.known === true ? [value.data] : []));
}
