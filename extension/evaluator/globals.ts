/**
 * The globals that are pure: `Math`, `Number`, a few conversions. Everything else that only a running program has is ambient.
 *
 * A fixed list, so that nothing is ever looked up by a name that stands in someone's code.
 */
import { type Callable, callableData } from "./callable.js";
import { asNumber, asText, type Outcome, type Primitive, refuse } from "./operators.js";
import { known, primitive, quoteText, suggest, unknown } from "./unknown.js";
import type { Origin, Span, Value } from "./value.js";

const MATH_CONSTANTS = ["E", "LN10", "LN2", "LOG10E", "LOG2E", "PI", "SQRT1_2", "SQRT2"] as const;

// biome-ignore format: one name a line would hide what the list says
const MATH_FUNCTIONS = [
  "abs", "acos", "acosh", "asin", "asinh", "atan", "atan2", "atanh", "cbrt", "ceil", "clz32", "cos", "cosh", "exp", "expm1",
  "floor", "fround", "hypot", "imul", "log", "log10", "log1p", "log2", "max", "min", "pow", "round", "sign", "sin", "sinh",
  "sqrt", "tan", "tanh", "trunc",
] as const;

const NUMBER_CONSTANTS = [
  "EPSILON",
  "MAX_SAFE_INTEGER",
  "MAX_VALUE",
  "MIN_SAFE_INTEGER",
  "MIN_VALUE",
  "NEGATIVE_INFINITY",
  "POSITIVE_INFINITY",
] as const;

const FUNCTIONS: ReadonlyMap<string, (args: readonly Primitive[]) => Outcome> = new Map([
  ...MATH_FUNCTIONS.map((name) => [`Math.${name}`, (args: readonly Primitive[]) => applyMath(name, args)] as const),
  ["Number", ([text]) => convert(text, Number)],
  ["Number.parseFloat", ([text]) => convert(text, (from) => Number.parseFloat(String(from)))],
  ["Number.parseInt", parseInteger],
  ["parseFloat", ([text]) => convert(text, (from) => Number.parseFloat(String(from)))],
  ["parseInt", parseInteger],
  ["Number.isFinite", ([value]) => ({ ok: true, value: Number.isFinite(value) })],
  ["Number.isInteger", ([value]) => ({ ok: true, value: Number.isInteger(value) })],
  ["Number.isSafeInteger", ([value]) => ({ ok: true, value: Number.isSafeInteger(value) })],
  ["Number.isNaN", ([value]) => ({ ok: true, value: Number.isNaN(value) })],
  [
    "isFinite",
    ([value]) =>
      typeof value === "number" ? { ok: true, value: Number.isFinite(value) } : refuse("tests a value that is not a number"),
  ],
  [
    "isNaN",
    ([value]) =>
      typeof value === "number" ? { ok: true, value: Number.isNaN(value) } : refuse("tests a value that is not a number"),
  ],
  ["String", (args) => (args.length === 0 ? asText("") : asText(`${args[0]}`))],
  ["Boolean", ([value]) => ({ ok: true, value: Boolean(value) })],
]);

const CONSTANTS: ReadonlyMap<string, Primitive> = new Map<string, Primitive>([
  ...MATH_CONSTANTS.map((name) => [`Math.${name}`, Math[name]] as const),
  ...NUMBER_CONSTANTS.map((name) => [`Number.${name}`, Number[name]] as const),
  ["undefined", undefined],
  ["Infinity", Number.POSITIVE_INFINITY],
]);

const UNARY_MATH: ReadonlySet<string> = new Set(MATH_FUNCTIONS.filter((name) => Math[name].length === 1));

/** Globals with members; those of `Object` and `Array` that take objects are in `intrinsics.ts`. */
const MEMBERS: Readonly<Record<string, object>> = { Math, Number, Object, Array, String, JSON };

// biome-ignore format: one name a line would hide what the list says
const AMBIENT = new Set([
  "process", "globalThis", "window", "self", "global", "document", "navigator", "performance", "crypto", "console", "Date", "Intl",
  "require", "module", "exports", "__dirname", "__filename", "arguments", "Deno", "Bun", "fetch", "localStorage", "Symbol", "Reflect",
]);

/** The value of a name that no declaration gives; `undefined` when the language has none such. */
export function evaluateGlobal(name: string, span: Span): Value | undefined {
  const origin: Origin = { kind: "name", span, from: [] };
  if (CONSTANTS.has(name)) return primitive(CONSTANTS.get(name), origin);
  if (name === "NaN") return unknown("not-a-number", "`NaN` is not a number.", "write the value as a constant", origin);
  if (Object.hasOwn(MEMBERS, name) || FUNCTIONS.has(name)) return known(callableData(name, globalCallable(name)), origin);
  if (!AMBIENT.has(name)) return undefined;
  return unknown("ambient", `${quoteText(name)} exists only when the program runs.`, "write the value as a constant", origin);
}

/** A member of a global, such as `Math.PI`. */
export function evaluateGlobalMember(holder: string, member: string, span: Span, origin: Origin): Value {
  const name = `${holder}.${member}`;
  if (CONSTANTS.has(name)) return primitive(CONSTANTS.get(name), origin);
  if (FUNCTIONS.has(name)) return known(callableData(name, globalCallable(name)), origin);
  if (name === "Number.NaN")
    return unknown("not-a-number", "`Number.NaN` is not a number.", "write the value as a constant", origin);
  if (name === "Math.random") {
    return unknown("call", "`Math.random` gives another value each time.", "write the value as a constant", { ...origin, span });
  }
  const members = [...CONSTANTS.keys(), ...FUNCTIONS.keys()].filter((known) => known.startsWith(`${holder}.`));
  const hint = suggest(
    member,
    members.map((known) => known.slice(holder.length + 1)),
  );
  const code = Object.hasOwn(MEMBERS[holder] ?? {}, member) ? "unsupported" : "no-such-property";
  const why = code === "unsupported" ? "is not followed." : `does not exist${hint}`;
  return unknown(code, `${quoteText(name)} ${why}`, "write the value as a constant", { ...origin, span });
}

function globalCallable(name: string): Callable {
  const apply = FUNCTIONS.get(name);
  // `Number` is called and has members as well.
  if (Object.hasOwn(MEMBERS, name)) return { kind: "global", name, ...(apply === undefined ? {} : { apply }) };
  const [holder, member = ""] = name.split(".");
  const unary = holder === "Math" ? UNARY_MATH.has(member) : !name.endsWith("parseInt");
  return { kind: "native", name, unary, apply: apply ?? (() => refuse("is not followed")) };
}

function applyMath(name: (typeof MATH_FUNCTIONS)[number], args: readonly Primitive[]): Outcome {
  if (!args.every((arg) => typeof arg === "number")) return refuse("calculates with a value that is not a number");
  const apply = Math[name] as (...numbers: number[]) => number;
  const value = apply(...args);
  // The starting points of a search for the least or greatest may be infinite.
  const keepsInfinity = (name === "max" || name === "min") && !Number.isNaN(value) && args.length > 0;
  return keepsInfinity ? { ok: true, value } : asNumber(value);
}

function parseInteger([text, radix]: readonly Primitive[]): Outcome {
  if (radix !== undefined && typeof radix !== "number") return refuse("uses a base that is not a number");
  return convert(text, (from) => Number.parseInt(String(from), radix));
}

function convert(value: Primitive, conversion: (text: string | number | boolean) => number): Outcome {
  if (typeof value !== "string" && typeof value !== "number" && typeof value !== "boolean")
    return refuse("converts a value that is not a text");
  return asNumber(conversion(value as string));
}
