/**
 * Operators on plain values, exactly as the language defines them, for the combinations that are worth claiming.
 *
 * Text is never turned into a number without being asked (`Number("5")`), since that is nearly always a slip; such a
 * combination is refused. So is every result that is not a finite number. Knows nothing of syntax trees.
 */

export type Primitive = string | number | boolean | bigint | null | undefined;

export type Outcome =
  | { readonly ok: true; readonly value: Primitive }
  /** `why` continues a sentence that begins with the expression. */
  | { readonly ok: false; readonly code: "not-a-number" | "unsupported" | "too-deep"; readonly why: string };

/** Text longer than this is not followed: doubling a string sixty times must not fill the memory. */
export const LONGEST_TEXT = 20_000;

const ARITHMETIC: Readonly<Record<string, (left: number, right: number) => number>> = {
  "+": (left, right) => left + right,
  "-": (left, right) => left - right,
  "*": (left, right) => left * right,
  "/": (left, right) => left / right,
  "%": (left, right) => left % right,
  "**": (left, right) => left ** right,
  "<<": (left, right) => left << right,
  ">>": (left, right) => left >> right,
  ">>>": (left, right) => left >>> right,
  "&": (left, right) => left & right,
  "|": (left, right) => left | right,
  "^": (left, right) => left ^ right,
};

const ORDER: Readonly<Record<string, (left: number | string, right: number | string) => boolean>> = {
  "<": (left, right) => left < right,
  "<=": (left, right) => left <= right,
  ">": (left, right) => left > right,
  ">=": (left, right) => left >= right,
};

/** Two operands; not the operators that may leave the right one out. */
export function applyBinary(operator: string, left: Primitive, right: Primitive): Outcome {
  if (typeof left === "bigint" || typeof right === "bigint") return refuse("uses a bigint");
  if (operator === "===") return { ok: true, value: left === right };
  if (operator === "!==") return { ok: true, value: left !== right };
  if (operator === "==" || operator === "!=") return compareLoosely(operator, left, right);
  const order = ORDER[operator];
  if (order !== undefined) {
    const same =
      (typeof left === "number" && typeof right === "number") || (typeof left === "string" && typeof right === "string");
    return same ? { ok: true, value: order(left, right) } : refuse("compares different kinds of values");
  }
  if (operator === "+" && (typeof left === "string" || typeof right === "string")) return asText(`${left}${right}`);
  const arithmetic = ARITHMETIC[operator];
  if (arithmetic === undefined) return refuse(`uses \`${operator}\`, which is not followed`);
  if (typeof left !== "number" || typeof right !== "number") return refuse("calculates with a value that is not a number");
  return asNumber(arithmetic(left, right));
}

export function applyUnary(operator: "+" | "-" | "~", operand: Primitive): Outcome {
  if (typeof operand !== "number") return refuse("calculates with a value that is not a number");
  if (operator === "~") return { ok: true, value: ~operand };
  return { ok: true, value: operator === "-" ? -operand : operand };
}

/** A calculated number; `NaN` and the infinities are refused. */
export function asNumber(value: number): Outcome {
  return Number.isFinite(value) ? { ok: true, value } : { ok: false, code: "not-a-number", why: `gives ${value}` };
}

/** A calculated text, unless it is too long. */
export function asText(value: string): Outcome {
  if (value.length <= LONGEST_TEXT) return { ok: true, value };
  return { ok: false, code: "too-deep", why: "makes a very long text" };
}

export function refuse(why: string): Outcome {
  return { ok: false, code: "unsupported", why };
}

function compareLoosely(operator: "==" | "!=", left: Primitive, right: Primitive): Outcome {
  const nullish = left === null || left === undefined || right === null || right === undefined;
  if (!nullish && typeof left !== typeof right) return refuse("compares different kinds of values");
  const equal = nullish ? (left ?? null) === (right ?? null) : left === right;
  return { ok: true, value: operator === "==" ? equal : !equal };
}
