/**
 * Where the values that a finding blames come from: the gear constants and motors that are declared elsewhere.
 *
 * What stands in the blamed declaration itself is left out: whoever reads the finding has it before their eyes.
 */
import type { DefinitionCall, Origin, Span, Value } from "../evaluator/value.js";
import type { Finding } from "./analysis.js";
import { valueAt } from "./places.js";

/** More places than these are no longer followed by anyone. */
const MOST = 4;

export function comesFrom(call: DefinitionCall, blamed: readonly (readonly (string | number)[])[]): Finding["related"] {
  const argument = call.args.at(-1);
  if (argument === undefined) return [];
  const found = blamed.flatMap((path) => {
    const value = valueAt(argument, path);
    const sources = value === undefined ? [] : sourcesOf(value, call.span);
    return sources.map(({ at, what }) => ({ at, message: `"${path.join(".")}" takes ${what} from here.` }));
  });
  const isFirst = ({ at }: { at: Span }, index: number) =>
    found.findIndex((one) => one.at.file === at.file && one.at.start === at.start) === index;
  return found.filter(isFirst).slice(0, MOST);
}

interface Source {
  readonly at: Span;
  /** In a few characters of code. */
  readonly what: string;
}

/** Outside of `around`, in the order of the arguments. */
function sourcesOf(value: Value, around: Span): Source[] {
  if (!value.known) return [];
  const { data, origin } = value;
  switch (data.kind) {
    case "array":
      return data.items.flatMap((item) => sourcesOf(item, around));
    case "object":
      return [...data.entries.values()].flatMap((entry) => sourcesOf(entry, around));
    case "built": {
      const { call } = data;
      if (isWithin(call.span, around)) return call.args.flatMap((arg) => sourcesOf(arg, around));
      return [{ at: call.binding?.span ?? call.callee, what: call.binding?.name ?? `a ${call.definition}` }];
    }
    case "primitive": {
      const elsewhere = literalsOf(origin).filter(({ span }) => !isWithin(span, around));
      return elsewhere.map(({ span }) => ({ at: span, what: String(data.value) }));
    }
    default:
      return [];
  }
}

/** In the order in which they are written; an origin that serves several times counts once. */
function literalsOf(origin: Origin): Origin[] {
  const seen = new Set<Origin>();
  const stack = [origin];
  for (let one = stack.pop(); one !== undefined; one = stack.pop()) {
    if (seen.has(one)) continue;
    seen.add(one);
    stack.push(...one.from.toReversed());
  }
  return [...seen].filter(({ kind }) => kind === "literal");
}

function isWithin(span: Span, around: Span): boolean {
  return span.file === around.file && around.start <= span.start && span.end <= around.end;
}
