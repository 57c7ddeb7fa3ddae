/**
 * From an issue's path back to characters: the expression in the call that it is about, and the literal that this came from.
 *
 * The place is always inside the call, at the deepest part of the path that is written there.
 */

import { unknown } from "./unknown.js";
import type { DefinitionCall, DefinitionIssue, LocatedIssue, Origin, Span, Unknown, Value } from "./value.js";

/** Where the parts of a call stand. */
export type CallPlace = Pick<DefinitionCall, "span" | "callee" | "args">;

/** Literals further away than this many steps are not looked for. */
const MOST_ORIGINS = 2000;

export function locateIssue(issue: DefinitionIssue, place: CallPlace): LocatedIssue {
  const { message, path, at } = issue;
  const steps = walk(path, place);
  const inside = steps.findLast(({ span }) => contains(place.span, span))?.span ?? place.callee;
  if (at === "callee") return { message, path, span: place.callee };
  const last = steps.length === path.length ? steps.at(-1) : undefined;
  if (at === "key") {
    const key = last?.key;
    if (key === undefined) return { message, path, span: inside };
    return contains(place.span, key) ? { message, path, span: key } : { message, path, span: inside, source: key };
  }
  const source = last === undefined ? undefined : findSource(last.value.origin, inside);
  return source === undefined ? { message, path, span: inside } : { message, path, span: inside, source };
}

/** An unknown part of a call, located at what is written in the call. */
export function locateUnknown(part: Unknown, path: readonly (string | number)[], place: CallPlace): Unknown {
  if (contains(place.span, part.origin.span)) return part;
  const inside = walk(path, place).findLast(({ span }) => contains(place.span, span))?.span ?? place.callee;
  const name = path.filter((key) => typeof key === "string").at(-1);
  const message = name === undefined ? "A part of this cannot be known." : `\`${name}\` in this cannot be known.`;
  return unknown("depends", message, part.reason.advice, { kind: "access", span: inside, from: [part.origin] }, part);
}

/** The one literal outside `span` that a value came from; `undefined` when there is none, or more than one. */
export function findSource(origin: Origin, span: Span): Span | undefined {
  const literals = new Map<string, Span>();
  const seen = new Set<Origin>();
  const stack = [origin];
  for (let next = stack.pop(); next !== undefined && seen.size < MOST_ORIGINS; next = stack.pop()) {
    if (seen.has(next)) continue;
    seen.add(next);
    if (next.kind === "literal" && !contains(span, next.span)) {
      literals.set(`${next.span.file}:${next.span.start}`, next.span);
      if (literals.size > 1) return undefined;
    }
    const [first] = next.from;
    // What decided between values is no part of the value.
    const onlyFirst = next.kind === "access" || next.kind === "choice";
    stack.push(...(onlyFirst ? (first === undefined ? [] : [first]) : next.from));
  }
  return stack.length > 0 ? undefined : literals.values().next().value;
}

export function contains(outer: Span, inner: Span): boolean {
  return outer.file === inner.file && outer.start <= inner.start && inner.end <= outer.end;
}

interface Step {
  readonly value: Value;
  /** The value's expression, as far as it is written. */
  readonly span: Span;
  readonly key?: Span;
}

/** The values along a path, as far as they are written. */
function walk(path: readonly (string | number)[], { args }: CallPlace): Step[] {
  const steps: Step[] = [];
  let value: Value | undefined = typeof path[0] === "number" ? args[path[0]] : undefined;
  let key: Span | undefined;
  for (let index = 1; value !== undefined; index++) {
    steps.push({ value, span: value.origin.span, ...(key === undefined ? {} : { key }) });
    const name = path[index];
    const data = value.known ? value.data : undefined;
    if (name === undefined || data === undefined) break;
    key = data.kind === "object" ? data.keys.get(String(name)) : undefined;
    if (data.kind === "object") value = data.entries.get(String(name));
    else value = data.kind === "array" ? data.items[Number(name)] : undefined;
  }
  return steps;
}
