/**
 * Functions of the language that take or give whole objects: `Object.freeze`, `Object.entries`, `Array.from` and their like.
 *
 * A fixed list; what isn't on it is looked up as a property instead.
 */
import type ts from "typescript";
import { listItems, listProperties, type Property } from "./access.js";
import { evaluateElements, MOST_ITEMS } from "./aggregates.js";
import { callableOf } from "./callable.js";
import type { Context, Frame } from "./context.js";
import { callWith } from "./functions.js";
import { originOf } from "./operations.js";
import { inOrder } from "./propertyName.js";
import { dependent, known, primitive, tooDeep, unsupported } from "./unknown.js";
import type { Known, Origin, Span, Value } from "./value.js";

type Intrinsic = (
  call: { readonly ctx: Context; readonly node: ts.CallExpression; readonly frame: Frame; readonly origin: Origin },
  args: readonly Known[],
) => Value | undefined;

const INTRINSICS: ReadonlyMap<string, Intrinsic> = new Map<string, Intrinsic>([
  ["Object.freeze", (_call, [value]) => (value === undefined ? undefined : freeze(value))],
  ["Object.seal", (_call, [value]) => value],
  ["Object.keys", (call, [value]) => mapProperties(call, value, ({ name }) => primitive(name, call.origin))],
  ["Object.values", (call, [value]) => mapProperties(call, value, (property) => property.value)],
  [
    "Object.entries",
    (call, [value]) =>
      mapProperties(call, value, (property) =>
        known({ kind: "array", items: [primitive(property.name, call.origin), property.value] }, call.origin),
      ),
  ],
  ["Object.fromEntries", (call, [value]) => fromEntries(call.ctx, value, call.origin)],
  ["Object.assign", (call, values) => assign(call.ctx, values, call.origin)],
  ["Array.isArray", (call, [value]) => (value === undefined ? undefined : primitive(value.data.kind === "array", call.origin))],
  ["Array.of", ({ origin }, items) => known({ kind: "array", items }, origin)],
  ["Array.from", ({ ctx, node, frame, origin }, args) => arrayFrom(ctx, args, node, frame, origin)],
]);

/** The value of `Object.freeze(…)` and its like; `undefined` for any other call. */
export function applyIntrinsic(
  ctx: Context,
  receiver: Known,
  member: string,
  node: ts.CallExpression,
  frame: Frame,
): Value | undefined {
  const callable = callableOf(receiver.data);
  const intrinsic = callable?.kind === "global" ? INTRINSICS.get(`${callable.name}.${member}`) : undefined;
  if (intrinsic === undefined) return undefined;
  const args = evaluateElements(ctx, node.arguments, frame);
  if (!Array.isArray(args)) return dependent(node, frame.module, originOf("call", node, frame, [args]), args);
  const origin = originOf("call", node, frame, args);
  const plain: Known[] = [];
  for (const arg of args) {
    if (!arg.known) return dependent(node, frame.module, origin, arg);
    plain.push(arg);
  }
  return intrinsic({ ctx, node, frame, origin }, plain) ?? unsupported(node, frame.module, "is not followed", origin.from);
}

/** The same object; its place is that of what was frozen, so that its parts are found where they are written. */
function freeze(value: Known): Value {
  const { data, origin } = value;
  return data.kind === "array" || data.kind === "object" ? known({ ...data, frozen: true }, origin) : value;
}

function mapProperties(
  { ctx, origin }: { readonly ctx: Context; readonly origin: Origin },
  value: Known | undefined,
  make: (property: Property) => Value,
): Value | undefined {
  const properties = value === undefined || value.data.kind === "primitive" ? undefined : listProperties(ctx, value);
  return properties === undefined ? undefined : known({ kind: "array", items: properties.map(make) }, origin);
}

function fromEntries(ctx: Context, value: Known | undefined, origin: Origin): Value | undefined {
  const pairs = value === undefined ? undefined : listItems(ctx, value);
  if (pairs === undefined) return undefined;
  const entries = new Map<string, Value>();
  for (const pair of pairs) {
    const [key, inner] = (pair.known && listItems(ctx, pair)) || [];
    if (key?.known !== true || key.data.kind !== "primitive" || inner === undefined) return undefined;
    entries.set(String(key.data.value), inner);
  }
  return known({ kind: "object", entries: inOrder(entries), keys: new Map() }, origin);
}

/** Into a fresh literal only: into anything else it would be a change, which the names' own check finds. */
function assign(ctx: Context, values: readonly Known[], origin: Origin): Value | undefined {
  if (values[0]?.data.kind !== "object" || values[0].origin.kind !== "object") return undefined;
  const entries = new Map<string, Value>();
  const keys = new Map<string, Span>();
  for (const value of values) {
    const properties = listProperties(ctx, value);
    if (properties === undefined) return undefined;
    for (const property of properties) {
      entries.set(property.name, property.value);
      if (property.key !== undefined) keys.set(property.name, property.key);
    }
  }
  return known({ kind: "object", entries: inOrder(entries), keys }, origin);
}

/** `Array.from(list)`, `Array.from({ length: 4 }, (_, index) => …)`. */
function arrayFrom(
  ctx: Context,
  [from, callback]: readonly Known[],
  node: ts.CallExpression,
  frame: Frame,
  origin: Origin,
): Value | undefined {
  if (from === undefined) return undefined;
  let items = listItems(ctx, from);
  if (items === undefined && from.data.kind === "object") {
    const length = from.data.entries.get("length");
    const count = length?.known === true && length.data.kind === "primitive" ? Number(length.data.value) : Number.NaN;
    if (!Number.isInteger(count) || count < 0 || from.data.entries.size !== 1) return undefined;
    if (count > MOST_ITEMS) return tooDeep(node, frame.module);
    items = Array.from({ length: count }, () => primitive(undefined, origin));
  }
  if (items === undefined || callback === undefined)
    return items === undefined ? undefined : known({ kind: "array", items }, origin);
  const callable = callableOf(callback.data);
  if (callable?.kind !== "closure") return undefined;
  const made = items.map((item, index) => callWith(ctx, callable, [item, primitive(index, origin)], node, frame, index));
  return known({ kind: "array", items: made }, originOf("call", node, frame, made));
}
