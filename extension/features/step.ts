/**
 * The small changes of a value that are worth trying: one tooth more or less where teeth are counted, a tenth more elsewhere.
 *
 * Only says how to write them; what they lead to is computed by analysing the rewritten text.
 */
import { parseAnyQuantity } from "../units/parse.js";
import { typeset, writeNumber } from "../units/write.js";
import type { Leaf } from "./feeds.js";
import type { Constant } from "./subject.js";

export interface Step {
  /** The first that is accepted stands for the step. */
  readonly rewrites: readonly Rewrite[];
}

export interface Rewrite {
  /** Such as "41 (one tooth more)". */
  readonly label: string;
  readonly rewrite: (text: string) => string;
}

export function stepsOf(constant: Constant, fed: readonly { readonly leaves: readonly Leaf[] }[]): Step[] {
  const counts = fed.flatMap(({ leaves }) => leaves).flatMap((leaf) => countedBy(leaf) ?? []);
  const whole = constant.plain === undefined || Number.isInteger(constant.plain);
  if (counts.length > 0 && whole)
    return [{ rewrites: [byOne(constant, counts, 1)] }, { rewrites: [byOne(constant, counts, -1)] }];
  return [{ rewrites: [byShare(constant, 0.1), byShare(constant, -0.1)] }];
}

/** What the field counts, in the singular; `undefined` for a field that measures. */
export function countedBy({ call, path }: Leaf): string | undefined {
  const [first, second] = path;
  if (call.definition === "mechanism" && second === "motorCount") return "motor";
  if (path.length !== 1 || typeof first !== "number" || first > 1) return undefined;
  if (call.definition === "worm") return first === 0 ? "start" : "tooth";
  return TOOTHED.has(call.definition) ? "tooth" : undefined;
}

const TOOTHED: ReadonlySet<string> = new Set(["spur", "chain", "belt", "planetary"]);

function byOne({ plain }: Constant, counts: readonly string[], step: 1 | -1): Rewrite {
  const unit = new Set(counts).size === 1 ? ` ${counts[0]}` : "";
  const words = `one${unit} ${step > 0 ? "more" : "fewer"}`;
  if (typeof plain !== "number") return { label: words, rewrite: (text) => `(${text}) ${step > 0 ? "+" : "-"} 1` };
  return { label: `${plain + step}, ${words}`, rewrite: () => String(plain + step) };
}

function byShare({ plain }: Constant, share: number): Rewrite {
  const words = share > 0 ? "10 % more" : "10 % less";
  if (typeof plain === "number") {
    const changed = times(plain, 1 + share);
    return { label: `${writeNumber(changed)}, ${words}`, rewrite: () => String(changed) };
  }
  const parsed = plain === undefined ? undefined : parseAnyQuantity(plain);
  if (parsed === undefined) return { label: words, rewrite: (text) => `(${text}) * ${1 + share}` };
  const changed = times(parsed.number, 1 + share);
  const { symbol } = parsed.unit;
  return { label: `${writeNumber(changed)} ${typeset(symbol)}, ${words}`, rewrite: () => JSON.stringify(`${changed} ${symbol}`) };
}

/** Without the digits that binary fractions add: 20 × 1.1 is 22. */
function times(value: number, factor: number): number {
  return Number((value * factor).toPrecision(12));
}
