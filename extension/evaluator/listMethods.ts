/**
 * Methods of lists that leave the list alone: `slice`, `concat`, `join`, `toSorted`, `includes` and their like.
 *
 * `sort` and `reverse` give what they give to a list that nobody has a name for; a list with a name is unknown as soon as
 * something sorts it, so it never gets here.
 */
import { MOST_ITEMS } from "./aggregates.js";
import { callableOf } from "./callable.js";
import { callCallback, isVisiting, type ListCall, reduceList, visitList } from "./callbacks.js";
import { finish } from "./operations.js";
import { asText, type Primitive } from "./operators.js";
import { dependent, known, primitive, tooDeep, unsupported } from "./unknown.js";
import type { Known, Value } from "./value.js";

const CHANGING = new Set(["push", "pop", "shift", "unshift", "splice", "fill", "copyWithin"]);

/** The result of a method; `undefined` when the method isn't known here. */
export function applyListMethod(call: ListCall, name: string): Value | undefined {
  const { node, frame, receiver } = call;
  if (CHANGING.has(name)) return unsupported(node, frame.module, "changes the list");
  if (isVisiting(name)) return visitList(call, name);
  if (name === "reduce" || name === "reduceRight") return reduceList(call, name);
  const isFrozen = receiver.data.kind === "array" && receiver.data.frozen === true;
  if ((name === "sort" || name === "reverse") && isFrozen) return unsupported(node, frame.module, "changes a frozen list");
  if (name === "sort" || name === "toSorted") return sort(call);
  if (name === "reverse" || name === "toReversed") return list(call, [...call.items].reverse());
  if (name === "concat") return concat(call);
  const plain = plainArguments(call);
  if (plain === undefined || !Array.isArray(plain)) return plain;
  return partOf(call, name, plain) ?? search(call, name, plain);
}

function concat({ items, args, node, frame, origin }: ListCall): Value {
  const open = args.find((arg) => !arg.known);
  if (open !== undefined && !open.known) return dependent(node, frame.module, origin, open);
  const all = [...items, ...args.flatMap((arg) => (arg.known && arg.data.kind === "array" ? arg.data.items : [arg]))];
  return all.length > MOST_ITEMS ? tooDeep(node, frame.module) : known({ kind: "array", items: all }, origin);
}

function partOf(call: ListCall, name: string, args: readonly Primitive[]): Value | undefined {
  const { items, node, frame, origin } = call;
  if (!args.every((arg) => arg === undefined || typeof arg === "number")) return undefined;
  const [first, second] = args as readonly (number | undefined)[];
  if (name === "slice") return list(call, items.slice(first, second));
  if (name !== "at") return undefined;
  const item = items.at(first ?? 0);
  if (item === undefined) return primitive(undefined, origin);
  const place = { ...origin, kind: "access" as const, from: [item.origin] };
  return item.known ? known(item.data, place) : dependent(node, frame.module, place, item);
}

function search({ items, node, frame, origin }: ListCall, name: string, args: readonly Primitive[]): Value | undefined {
  if (name !== "includes" && name !== "indexOf" && name !== "join") return undefined;
  const plain: Primitive[] = [];
  for (const item of items) {
    if (!item.known) return dependent(node, frame.module, origin, item);
    if (item.data.kind === "primitive") plain.push(item.data.value);
    else if (name === "join") return unsupported(node, frame.module, "puts a whole object into a text");
    // It equals nothing plain, and what is searched for is never undefined.
    else plain.push(undefined);
  }
  const [first] = args;
  if (name === "join") return finish(node, frame, origin, asText(plain.join(first === undefined ? "," : String(first))));
  if (args.length !== 1 || first === undefined) return unsupported(node, frame.module, "is not followed");
  return primitive(name === "includes" ? plain.includes(first) : plain.indexOf(first), origin);
}

/** With a function that compares, or by text as the language does it. */
function sort(call: ListCall): Value {
  const { ctx, items, args, node, frame, origin } = call;
  const [comparing] = args;
  const open = [...items, ...args].find((part) => !part.known);
  if (open !== undefined && !open.known) return dependent(node, frame.module, origin, open);
  if (comparing === undefined) {
    const keyed = (items as readonly Known[]).map(({ data }) => (data.kind === "primitive" ? data.value : data));
    if (keyed.some((key) => typeof key === "object" && key !== null))
      return unsupported(node, frame.module, "sorts whole objects");
    const order = [...keyed.keys()]
      .filter((index) => keyed[index] !== undefined)
      .sort((a, b) => byText(String(keyed[a]), String(keyed[b])));
    const last = [...keyed.keys()].filter((index) => keyed[index] === undefined);
    return list(
      call,
      [...order, ...last].map((index) => items[index] as Value),
    );
  }
  const callable = comparing.known ? callableOf(comparing.data) : undefined;
  if (callable?.kind !== "closure") return unsupported(node, frame.module, "sorts by a function that is not followed");
  let turn = 0;
  let failure: Value | undefined;
  const sorted = [...items].sort((a, b) => {
    if (failure !== undefined) return 0;
    const result = callCallback(ctx, callable, [a, b], node, frame, turn++);
    if (result.known && result.data.kind === "primitive" && typeof result.data.value === "number") return result.data.value;
    failure = result.known ? unsupported(node, frame.module, "compares without giving a number") : result;
    return 0;
  });
  if (failure === undefined) return list(call, sorted);
  return failure.known ? failure : dependent(node, frame.module, origin, failure);
}

function byText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

function plainArguments({ args, node, frame, origin }: ListCall): Primitive[] | Value | undefined {
  const plain: Primitive[] = [];
  for (const arg of args) {
    if (!arg.known) return dependent(node, frame.module, origin, arg);
    if (arg.data.kind !== "primitive") return undefined;
    plain.push(arg.data.value);
  }
  return plain;
}

function list({ origin }: ListCall, items: readonly Value[]): Value {
  return known({ kind: "array", items }, origin);
}
