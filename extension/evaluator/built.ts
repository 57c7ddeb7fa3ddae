/**
 * The parts of what a definition built, as values: `hoist.ratio`.
 *
 * They keep the way back to the call, and to its arguments where these are handed through.
 */
import type { Context } from "./context.js";
import { known, primitive, quoteText, unknown } from "./unknown.js";
import type { DefinitionCall, Known, Origin, Value } from "./value.js";

/**
 * A part of a built object as a value. Where it equals what was passed under the same name, it has the argument's own origin;
 * else it comes from the call.
 */
export function fromPlain(ctx: Context, plain: unknown, origin: Origin, call: DefinitionCall, name?: string): Value {
  const passed = name === undefined ? undefined : findPassed(call, name);
  if (passed?.known === true && equals(passed, plain)) return passed;
  if (typeof plain === "object" && plain !== null) {
    const maker = ctx.makers.get(plain);
    if (maker !== undefined) return known({ kind: "built", built: plain, call: maker }, origin);
    if (Array.isArray(plain)) {
      return known({ kind: "array", items: plain.map((item) => fromPlain(ctx, item, origin, call)), frozen: true }, origin);
    }
    const entries = Object.entries(plain).map(([key, inner]) => [key, fromPlain(ctx, inner, origin, call)] as const);
    return known({ kind: "object", entries: new Map(entries), keys: new Map(), frozen: true }, origin);
  }
  if (typeof plain === "function" || typeof plain === "symbol") {
    return unknown("unsupported", `${quoteText(name ?? call.definition)} is not a plain value.`, "", origin);
  }
  return primitive(plain as string | number | boolean | bigint | null | undefined, origin);
}

function findPassed(call: DefinitionCall, name: string): Value | undefined {
  for (const arg of call.args) {
    if (arg.known && arg.data.kind === "object" && arg.data.entries.has(name)) return arg.data.entries.get(name);
  }
  return undefined;
}

function equals({ data }: Known, plain: unknown): boolean {
  return data.kind === "built" ? data.built === plain : data.kind === "primitive" && Object.is(data.value, plain);
}
