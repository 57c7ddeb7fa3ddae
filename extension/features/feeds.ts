/**
 * Which written values a mechanism is made of, through every motor, stage, load and battery that it names.
 *
 * Works on values and their origins alone; knows no field and no unit.
 */
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";
import { robotOf } from "../analysis/lentSupply.js";
import type { DefinitionCall, Known, Origin, Span, Value } from "../evaluator/value.js";

/** One plain value among the arguments of a call. */
export interface Leaf {
  readonly call: DefinitionCall;
  /** From the argument tuple inwards. */
  readonly path: readonly (string | number)[];
  readonly value: Known;
  /** The plain value itself. */
  readonly plain: string | number;
}

/** Numbers and texts among a call's own arguments; what other calls built is theirs. */
export function leavesOf(call: DefinitionCall): Leaf[] {
  return call.args.flatMap((arg, index) => leavesIn(call, arg, [index]));
}

/** Numbers and texts that a mechanism's result rests on, the supply of its robot included. */
export function feedsOf(analysis: Analysis, mechanism: AnalysedMechanism): Leaf[] {
  const { declared } = mechanism;
  const robot = declared !== undefined && declared.supply === undefined ? robotOf(declared, analysis.robots) : undefined;
  const supply = robot === undefined ? undefined : valueIn(robot.call.args[1], "supply");
  return [...reachableCalls([...mechanism.call.args, ...(supply ? [supply] : [])], mechanism.call)].flatMap(leavesOf);
}

/** Every call whose result is among the arguments of `call`, at any depth, itself first. */
export function callsWithin(call: DefinitionCall): readonly DefinitionCall[] {
  return [...reachableCalls(call.args, call)];
}

/** All origins from a value down to its literals, each once. */
export function originsOf(value: Value): Set<Origin> {
  const seen = new Set<Origin>();
  const stack = [value.origin];
  for (let origin = stack.pop(); origin !== undefined; origin = stack.pop()) {
    if (seen.has(origin)) continue;
    seen.add(origin);
    stack.push(...origin.from);
  }
  return seen;
}

/** The origins through which a value passed unchanged, from its use down. */
export function passedThrough(origin: Origin): Origin[] {
  const chain = [origin];
  for (let next = origin; next.kind === "name" || next.kind === "access" || next.kind === "choice"; ) {
    const [from] = next.from;
    if (from === undefined) break;
    chain.push(from);
    next = from;
  }
  return chain;
}

/** What tells one constant from another: where it is declared, or else where it is written. */
export function keyOf(origin: Origin): Span {
  return origin.declaredAt ?? origin.span;
}

function reachableCalls(values: readonly Value[], first: DefinitionCall): Set<DefinitionCall> {
  const found = new Set([first]);
  const stack = [...values];
  for (let value = stack.pop(); value !== undefined; value = stack.pop()) {
    if (!value.known) continue;
    const { data } = value;
    if (data.kind === "array") stack.push(...data.items);
    if (data.kind === "object") stack.push(...data.entries.values());
    if (data.kind !== "built" || found.has(data.call)) continue;
    found.add(data.call);
    stack.push(...data.call.args);
  }
  return found;
}

function leavesIn(call: DefinitionCall, value: Value, path: readonly (string | number)[]): Leaf[] {
  if (!value.known) return [];
  const { data } = value;
  if (data.kind === "array") return data.items.flatMap((item, index) => leavesIn(call, item, [...path, index]));
  if (data.kind === "object") return [...data.entries].flatMap(([key, item]) => leavesIn(call, item, [...path, key]));
  if (data.kind !== "primitive") return [];
  const plain = data.value;
  return typeof plain === "string" || typeof plain === "number" ? [{ call, path, value, plain }] : [];
}

function valueIn(value: Value | undefined, key: string): Value | undefined {
  return value?.known === true && value.data.kind === "object" ? value.data.entries.get(key) : undefined;
}
