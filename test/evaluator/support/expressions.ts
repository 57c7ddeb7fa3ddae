/** Random expressions over what the evaluator reads, mostly of fitting kinds, so that few of them throw. */
import fc from "fast-check";

export type Kind = "number" | "text" | "truth" | "list" | "object";
/** Writes itself, given what can be referred to. */
export type Write = (scope: Scope) => string;

export interface Scope {
  readonly names: readonly { readonly name: string; readonly kind: Kind }[];
  readonly helpers: readonly string[];
}

export const pick = <Item>(items: readonly Item[], index: number): Item | undefined =>
  items.length === 0 ? undefined : items[index % items.length];

export function named(kind: Kind, otherwise: string): fc.Arbitrary<Write> {
  return fc.nat(50).map(
    (index) =>
      ({ names }) =>
        pick(
          names.filter((each) => each.kind === kind),
          index,
        )?.name ?? otherwise,
  );
}

/** Joins parts that write themselves: `${a} + ${b}`. */
function code(strings: TemplateStringsArray, ...parts: (fc.Arbitrary<Write> | string)[]): fc.Arbitrary<Write> {
  const made = parts.map((part) => (typeof part === "string" ? fc.constant<Write>(() => part) : part));
  return fc
    .tuple(...made)
    .map((writes) => (scope) => strings.map((text, index) => text + (writes[index]?.(scope) ?? "")).join(""));
}

export const word = (...words: string[]): fc.Arbitrary<Write> => fc.constantFrom(...words).map((each) => () => each);

export const arbitraries = fc.letrec<Record<Kind | "any", Write>>((tie) => {
  const number = tie("number");
  const text = tie("text");
  const truth = tie("truth");
  const list = tie("list");
  const object = tie("object");
  const any = tie("any");
  const choose = (kind: fc.Arbitrary<Write>) => [
    code`(${truth} ? ${kind} : ${kind})`,
    code`(${kind} ?? ${any})`,
    code`((p) => ${kind})(${any})`,
  ];
  const leaf = { maxDepth: 3, depthSize: "small" as const };
  return {
    number: fc.oneof(
      leaf,
      word(
        "0",
        "1",
        "2",
        "3",
        "7",
        "40",
        "1_000",
        "0x1f",
        "2.5",
        "1e-3",
        "(-4)",
        "(-0)",
        "Math.PI",
        "Number.EPSILON",
        "Infinity",
      ),
      named("number", "5"),
      code`(${number} ${word("+", "-", "*", "/", "%", "**", "<<", ">>", ">>>", "&", "|", "^")} ${number})`,
      code`(${word("-", "+", "~")}(${number}))`,
      code`Math.${word("max", "min", "hypot", "pow", "atan2")}(${number}, ${number})`,
      code`Math.${word("abs", "sqrt", "sin", "cos", "round", "floor", "ceil", "trunc", "sign", "log", "exp", "cbrt", "log2")}(${number})`,
      code`Number(${word("'12'", "'1e3'", "' 4 '", "'x'", "''")})`,
      code`parseFloat(${word("'3.5 kg'", "'-2'", "'kg'")})`,
      code`${list}.length`,
      code`${text}.length`,
      code`${list}[${word("0", "1", "2")}]`,
      code`${list}.reduce((p, q) => p + q, 0)`,
      code`${list}.indexOf(${number})`,
      code`${object}.a`,
      code`${object}?.b`,
      code`${object}["c"]`,
      code`[${number}, ...${list}].at(-1)`,
      code`f${word("0", "1")}(${number}, ${number})`.map(
        (write) => (scope: Scope) => (scope.helpers.length > 1 ? write(scope) : "6"),
      ),
      ...choose(number),
    ),
    text: fc.oneof(
      leaf,
      word("''", '"kg"', "'3 mm'", "`é`", "'a\\nb'"),
      named("text", "'x'"),
      code`(${text} + ${any})`,
      code`(${any} + ${text})`,
      code`\`\${${number}} \${${text}}\``,
      code`${text}.${word("toUpperCase()", "trim()", "slice(1)", "padStart(4, '0')", "repeat(2)", "replace('k', 'g')", "charAt(0)", "at(0)")}`,
      code`(${number}).${word("toFixed(2)", "toString()", "toPrecision(3)", "toString(16)")}`,
      code`String(${any})`,
      code`(typeof ${any})`,
      code`${list}.join('-')`,
      ...choose(text),
    ),
    truth: fc.oneof(
      leaf,
      word("true", "false"),
      named("truth", "true"),
      code`(${number} ${word("<", ">", "<=", ">=", "===", "!==", "==", "!=")} ${number})`,
      code`(${any} ${word("===", "!==", "==", "!=")} ${any})`,
      code`(${text} ${word("<", ">", "===")} ${text})`,
      code`(!${any})`,
      code`(${any} ${word("&&", "||")} ${truth})`,
      code`${list}.includes(${number})`,
      code`${list}.${word("some", "every")}((p) => p > ${number})`,
      code`Number.isInteger(${number})`,
      code`Array.isArray(${any})`,
    ),
    list: fc.oneof(
      leaf,
      named("list", "[1, 2]"),
      code`[${number}, ${number}]`,
      code`[${number}, ...${list}]`,
      code`(${list}).map((p, q) => ${word("p * 2", "p + q", "q", "-p", "Math.sqrt(p)", "[p][0]")})`,
      code`(${list}).map(Math.${word("abs", "floor")})`,
      code`(${list}).filter((p) => p ${word(">", "<=")} ${number})`,
      code`(${list}).slice(${word("1", "-1", "0, 1")})`,
      code`(${list}).concat(${list}, ${number})`,
      code`[...${list}].sort((p, q) => p - q)`,
      code`[...${list}].sort()`,
      code`[...${list}].reverse()`,
      code`(${list}).flatMap((p) => [p, p])`,
      code`Object.values(${object}).filter((p) => typeof p === "number")`,
      code`Array.from({ length: ${word("0", "1", "3")} }, (_, p) => p * 2)`,
      code`Object.freeze([${number}])`,
      code`([${number}, 3] as const)`,
      ...choose(list),
    ),
    object: fc.oneof(
      leaf,
      named("object", "{ a: 1, b: 2, c: 3 }").map((write) => (scope: Scope) => `(${write(scope)})`),
      code`({ a: ${number}, b: ${number}, c: ${any} })`,
      code`({ a: ${number}, ...${object}, c: ${number} })`,
      code`({ ...${object}, [${text}]: ${any}, 2: 1, 1: 2 })`,
      code`({ a: ${number}, b: ${list}, in: ${object} })`,
      code`Object.freeze({ a: ${number}, b: 1 })`,
      code`({ a: ${number}, b: 2 } as const)`,
      code`Object.fromEntries(Object.entries(${object}))`,
      code`Object.assign({}, ${object}, { b: ${number} })`,
      ...choose(object),
    ),
    any: fc.oneof(leaf, word("null", "undefined"), number, text, truth, list, object),
  };
});
