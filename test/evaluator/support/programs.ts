/**
 * Random programs over what the evaluator reads: constants, lists, objects, helpers, enums, patterns, and things that change objects.
 *
 * Mostly of fitting kinds, so that few of them throw. Each statement says which names it declares.
 */
import fc from "fast-check";
import { arbitraries, type Kind, named, pick, type Scope, word } from "./expressions.js";

export interface Statement {
  readonly text: string;
  readonly names: readonly string[];
}

const kinds: readonly Kind[] = ["number", "text", "truth", "list", "object"];

/** One statement; `index` makes its names unlike all others. */
type MakeStatement = (
  index: number,
  scope: Scope,
) => { readonly text: string; readonly declared: readonly { name: string; kind: Kind }[]; readonly helper?: string };

const { number, object, list } = arbitraries;
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
