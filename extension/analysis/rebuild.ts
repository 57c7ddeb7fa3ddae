/**
 * What a declaration would have been with other values: the same calls, checked and built again with some leaves replaced.
 *
 * Works on the evaluated calls, not on text, so that a thousand variants cost no parsing. Untouched parts keep their identity.
 */
import { ARGUMENT_NAMES, DEFINITIONS } from "../declarations/table.js";
import type { DefinitionCall, Value } from "../evaluator/value.js";

/** A place among the arguments of a call; the last key may be a field that is not written, or "+" for the end of a list. */
export interface Place {
  readonly call: DefinitionCall;
  /** From the argument tuple inwards. */
  readonly path: readonly (string | number)[];
}

/** A written number or quantity among the arguments of a call, or a whole `between` call. */
export interface Leaf extends Place {
  readonly plain: string | number;
  /** From the outermost declaration inwards, such as "motor.stall.torque" or "stages[0].driver". */
  readonly label: string;
  /** Set where the leaf is a range: both ends; `plain` is then its low end. */
  readonly range?: readonly [low: string | number, high: string | number];
}

export type Replacements = ReadonlyMap<Place, unknown>;

/** Every leaf that `call` rests on, through all calls that it uses, each call once. */
export function leavesBelow(call: DefinitionCall): Leaf[] {
  const seen = new Set<DefinitionCall>();
  const leaves: Leaf[] = [];
  const visitCall = (one: DefinitionCall, label: string): void => {
    if (seen.has(one)) return;
    seen.add(one);
    for (const [index, arg] of one.args.entries())
      visit(one, arg, [index], join(label, ARGUMENT_NAMES.get(one.definition)?.[index]));
  };
  const visit = (owner: DefinitionCall, value: Value, path: readonly (string | number)[], label: string): void => {
    if (!value.known) return;
    const { data } = value;
    if (data.kind === "array")
      for (const [index, item] of data.items.entries()) visit(owner, item, [...path, index], `${label}[${index}]`);
    if (data.kind === "object") for (const [key, item] of data.entries) visit(owner, item, [...path, key], join(label, key));
    if (data.kind === "primitive" && (typeof data.value === "string" || typeof data.value === "number")) {
      leaves.push({ call: owner, path, plain: data.value, label });
    }
    if (data.kind === "built") {
      const range = rangeOf(data.call);
      if (range === undefined) visitCall(data.call, label);
      else leaves.push({ call: owner, path, plain: range[0], label, range });
    }
  };
  visitCall(call, "");
  return leaves;
}

function join(label: string, key: string | undefined): string {
  return key === undefined || label === "" ? `${label}${key ?? ""}` : `${label}.${key}`;
}

/** What `call` builds with the replacements; `undefined` where a definition refuses them. */
export function rebuild(call: DefinitionCall, replacements: Replacements): object | undefined {
  const byCall = new Map<DefinitionCall, Map<string, unknown>>();
  for (const [{ call: owner, path }, plain] of replacements) {
    const places = byCall.get(owner) ?? new Map<string, unknown>();
    byCall.set(owner, places.set(JSON.stringify(path), plain));
  }
  const made = new Map<DefinitionCall, object | undefined>();
  const touched = new Map<DefinitionCall, boolean>();
  const isTouched = (one: DefinitionCall): boolean => {
    const known = touched.get(one);
    if (known !== undefined) return known;
    const result = byCall.has(one) || one.args.some((arg) => usedIn(arg).some(isTouched));
    touched.set(one, result);
    return result;
  };
  const build = (one: DefinitionCall): object | undefined => {
    if (!isTouched(one)) return one.built;
    if (!made.has(one)) {
      const places = byCall.get(one);
      const args = one.args.map((arg, index) => plainOf(arg, [index], places, build));
      made.set(one, DEFINITIONS.get(one.definition)?.check(args).built);
    }
    return made.get(one);
  };
  return build(call);
}

function plainOf(
  value: Value,
  path: readonly (string | number)[],
  places: ReadonlyMap<string, unknown> | undefined,
  build: (call: DefinitionCall) => object | undefined,
): unknown {
  if (places !== undefined) {
    const key = JSON.stringify(path);
    if (places.has(key)) return places.get(key);
  }
  if (!value.known) return undefined;
  const { data } = value;
  if (data.kind === "primitive") return data.value;
  if (data.kind === "built") return build(data.call);
  if (data.kind === "array") {
    const items = data.items.map((item, index) => plainOf(item, [...path, index], places, build));
    const added = places && JSON.stringify([...path, "+"]);
    return added !== undefined && places?.has(added) ? [...items, places.get(added)] : items;
  }
  if (data.kind !== "object") return undefined;
  const written = [...data.entries].map(([name, item]) => [name, plainOf(item, [...path, name], places, build)] as const);
  return Object.fromEntries([...written, ...addedFields(data.entries, path, places)]);
}

function addedFields(
  entries: ReadonlyMap<string, Value>,
  path: readonly (string | number)[],
  places: ReadonlyMap<string, unknown> | undefined,
): (readonly [string, unknown])[] {
  return [...(places ?? [])].flatMap(([key, plain]) => {
    const at: (string | number)[] = JSON.parse(key);
    const name = at.at(-1);
    const isHere = at.length === path.length + 1 && path.every((step, index) => step === at[index]);
    return isHere && typeof name === "string" && !entries.has(name) ? [[name, plain] as const] : [];
  });
}

function usedIn(value: Value): DefinitionCall[] {
  if (!value.known) return [];
  const { data } = value;
  if (data.kind === "built") return [data.call];
  if (data.kind === "array") return data.items.flatMap(usedIn);
  return data.kind === "object" ? [...data.entries.values()].flatMap(usedIn) : [];
}

function rangeOf(call: DefinitionCall): readonly [string | number, string | number] | undefined {
  if (call.definition !== "between" || call.built === undefined) return undefined;
  const { low, high } = call.built as { readonly low: string | number; readonly high: string | number };
  return [low, high];
}
