/**
 * Random programs over what the evaluator reads: constants, lists, objects, helpers, enums, patterns, and things that change objects.
 *
 * Mostly of fitting kinds, so that few of them throw. Each statement says which names it declares.
 */
import fc from "fast-check";

export interface Statement {
  readonly text: string;
  readonly names: readonly string[];
}

type Kind = "number" | "text" | "truth" | "list" | "object";
/** Writes itself, given what can be referred to. */
type Write = (scope: Scope) => string;

interface Scope {
  readonly names: readonly { readonly name: string; readonly kind: Kind }[];
  readonly helpers: readonly string[];
}

const pick = <Item>(items: readonly Item[], index: number): Item | undefined =>
  items.length === 0 ? undefined : items[index % items.length];

function named(kind: Kind, otherwise: string): fc.Arbitrary<Write> {
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

const word = (...words: string[]): fc.Arbitrary<Write> => fc.constantFrom(...words).map((each) => () => each);

const arbitraries = fc.letrec<Record<Kind | "any", Write>>((tie) => {
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

const kinds: readonly Kind[] = ["number", "text", "truth", "list", "object"];

/** One statement; `index` makes its names unlike all others. */
type MakeStatement = (
  index: number,
  scope: Scope,
) => { readonly text: string; readonly declared: readonly { name: string; kind: Kind }[]; readonly helper?: string };

const { number, object, list, any } = arbitraries;
const declare = fc.constantFrom(...kinds).chain((kind) =>
  fc.tuple(arbitraries[kind], fc.constantFrom("const", "const", "const", "let", "var")).map(
    ([write, keyword]): MakeStatement =>
      (index, scope) => {
        const name = `c${index}`;
        return { text: `${keyword} ${name} = ${write(scope)};`, declared: [{ name, kind }] };
      },
  ),
);
const alias = fc.nat(50).map(
  (at): MakeStatement =>
    (index, { names }) => {
      const other = pick(
        names.filter(({ kind }) => kind === "list" || kind === "object"),
        at,
      );
      if (other === undefined) return { text: ";", declared: [] };
      return { text: `const c${index} = ${other.name};`, declared: [{ name: `c${index}`, kind: other.kind }] };
    },
);
const takeObject = fc.tuple(object, number, fc.boolean()).map(
  ([from, fallback, rest]): MakeStatement =>
    (index, scope) => {
      const a = `c${index}`;
      const text = `const { a: ${a}, zz: ${a}z = ${fallback(scope)}${rest ? `, ...${a}r` : ""} } = ${from(scope)};`;
      const names = [{ name: `${a}z`, kind: "number" as const }];
      return { text, declared: rest ? [...names, { name: `${a}r`, kind: "object" }] : names };
    },
);
const takeList = fc.tuple(list, number).map(
  ([from, fallback]): MakeStatement =>
    (index, scope) => {
      const a = `c${index}`;
      const text = `const [${a} = ${fallback(scope)}, , ...${a}r] = ${from(scope)};`;
      return {
        text,
        declared: [
          { name: a, kind: "number" },
          { name: `${a}r`, kind: "list" },
        ],
      };
    },
);
// Counting on is only allowed from what the compiler itself works out.
const countable = fc.oneof(word("0", "7", "1 << 3", "(2 + 3) * 4", "-5"), named("number", "6"), number);
const enumeration = fc.tuple(countable, countable).map(
  ([first, later]): MakeStatement =>
    (index, scope) => {
      const e = `E${index}`;
      const text = `enum ${e} { A = ${first(scope)}, B, C = A + 2, D = ${later(scope)}, E, F = "f" }\nconst c${index} = ${e}.B + ${e}.C + ${e}.E; const c${index}o = { a: ${e}.A, b: ${e}.D };`;
      return {
        text,
        declared: [
          { name: `c${index}`, kind: "number" },
          { name: `c${index}o`, kind: "object" },
        ],
      };
    },
);
const helper = fc.tuple(number, number, fc.constantFrom("p > q", "q === 2", "!p")).map(
  ([a, b, condition]): MakeStatement =>
    (index, scope) => {
      const name = `f${scope.helpers.length}`;
      const text = `function ${name}(p = 1, q = ${a(scope)}) { const r = p * 2; if (${condition}) return r + q; const { s = ${b(scope)} } = { s: q }; return s - r; }`;
      return { text: `${text} // ${index}`, declared: [], helper: name };
    },
);
const pureClass = fc.tuple(number, list).map(
  ([a, b]): MakeStatement =>
    (index, scope) => {
      const text = `class K${index} { static readonly A = ${a(scope)}; static readonly B = K${index}.A * 2; readonly c = ${b(scope)}; readonly d = this.c.length; }\nconst c${index} = K${index}.B; const c${index}o = new K${index}().d;`;
      return {
        text,
        declared: [
          { name: `c${index}`, kind: "number" },
          { name: `c${index}o`, kind: "number" },
        ],
      };
    },
);
const change = fc.tuple(fc.nat(50), fc.nat(50), number, fc.nat(20)).map(
  ([at, other, value, way]): MakeStatement =>
    (_index, scope) => {
      const holders = scope.names.filter(({ kind }) => kind === "object" || kind === "list");
      const target = pick(holders, at);
      const inner = pick(
        scope.names.filter(({ kind }) => kind === "object"),
        other,
      );
      const variable = pick(scope.names, other);
      if (target === undefined) return { text: ";", declared: [] };
      const { name, kind } = target;
      const v = value(scope);
      const forList = [
        `${name}.push(${v});`,
        `${name}[0] = ${v};`,
        `${name}.sort();`,
        `(() => ${name})().reverse();`,
        `for (const l of [${name}]) l.length = 0;`,
      ];
      const forObject = [
        `${name}.a = ${v};`,
        `delete ${name}.b;`,
        `Object.assign(${name}, { c: ${v} });`,
        `((o) => { o.a = ${v}; })(${name});`,
        `{ const { ...o } = ${name}; o.a = ${v}; }`,
        `[${name}].forEach((o) => { o.b = ${v}; });`,
        `for (const [, o] of Object.entries({ x: ${name} })) { o.a++; }`,
        `({ x: ${name} }).x.c = ${v};`,
        inner === undefined ? ";" : `${inner.name}.in && (${inner.name}.in.a = ${v});`,
      ];
      const forAny = variable === undefined ? ";" : `try { eval; ${variable.name} = ${variable.name}; } catch {}`;
      const ways = kind === "list" ? forList : forObject;
      return { text: `try { ${pick([...ways, forAny], way)} } catch {}`, declared: [] };
    },
);

const statement = fc.oneof(
  { weight: 10, arbitrary: declare },
  { weight: 2, arbitrary: alias },
  { weight: 1, arbitrary: takeObject },
  { weight: 1, arbitrary: takeList },
  { weight: 1, arbitrary: enumeration },
  { weight: 1, arbitrary: helper },
  { weight: 1, arbitrary: pureClass },
  { weight: 2, arbitrary: change },
);

/** A program as its statements, in order; no name is used before its line. */
export const program: fc.Arbitrary<readonly Statement[]> = fc.array(statement, { minLength: 3, maxLength: 14 }).map((makers) => {
  const statements: Statement[] = [];
  let scope: Scope = { names: [], helpers: [] };
  for (const [index, make] of makers.entries()) {
    const { text, declared, helper: name } = make(index, scope);
    statements.push({ text, names: declared.map((each) => each.name) });
    scope = { names: [...scope.names, ...declared], helpers: name === undefined ? scope.helpers : [...scope.helpers, name] };
  }
  return statements;
});

export { any as anyExpression };
