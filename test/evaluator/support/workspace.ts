/** Evaluates code that is given as one string, against two small definitions of this room's own. */

import { createEvaluator, type Evaluator } from "../../../extension/evaluator/evaluator.js";
import { createImportIndex } from "../../../extension/evaluator/importIndex.js";
import type { TypeScript } from "../../../extension/evaluator/typescript.js";
import type {
  Definition,
  DefinitionIssue,
  FileEvaluation,
  Known,
  Snapshot,
  Unknown,
  Value,
} from "../../../extension/evaluator/value.js";
import { parser as ts } from "../../support/parser.js";

/** Accepts anything: for looking at values. */
const probe: Definition = {
  name: "probe",
  check: (args) => ({ issues: [], built: { probed: args.length } }),
};

/** `gear({ teeth, name? })`: teeth is a whole number above 0; anything else in it is a mistake. */
const gear: Definition = {
  name: "gear",
  check(args) {
    const issues: DefinitionIssue[] = [];
    const [options] = args as [Record<string, unknown> | undefined];
    if (typeof options !== "object" || options === null) return { issues: [{ message: "no options", path: [0], at: "value" }] };
    for (const key of Object.keys(options)) {
      if (key !== "teeth" && key !== "name") issues.push({ message: `unknown field ${key}`, path: [0, key], at: "key" });
    }
    const { teeth, name } = options;
    if (teeth === undefined) issues.push({ message: "teeth missing", path: [0, "teeth"], at: "callee" });
    else if (!Number.isInteger(teeth) || Number(teeth) <= 0)
      issues.push({ message: "bad teeth", path: [0, "teeth"], at: "value" });
    return issues.length > 0 ? { issues } : { issues, built: Object.freeze({ teeth, name, double: Number(teeth) * 2 }) };
  },
};

/** `pair(first, second)`: two gears, kept by identity. */
const pair: Definition = {
  name: "pair",
  check([first, second]) {
    const issues: DefinitionIssue[] = [];
    const isGear = (value: unknown) => typeof value === "object" && value !== null && "double" in value;
    if (!isGear(first)) issues.push({ message: "not a gear", path: [0], at: "value" });
    if (!isGear(second)) issues.push({ message: "not a gear", path: [1], at: "value" });
    return issues.length > 0 ? { issues } : { issues, built: Object.freeze({ first, second }) };
  },
};

export function makeEvaluator(parser: TypeScript = ts): Evaluator {
  const definitions = new Map([probe, gear, pair].map((definition) => [definition.name, definition]));
  return createEvaluator(parser, { specifier: "gearbox", definitions });
}

/** Files by name; a fixture names them in lines `//- name.ts`, and what stands before the first is `main.ts`. */
export function splitFiles(fixture: string): Map<string, string> {
  const files = new Map<string, string>();
  const parts = fixture.split(/^[ \t]*\/\/- (\S+)[ \t]*\n/m);
  if (parts[0]?.trim() !== "") files.set("/main.ts", parts[0] ?? "");
  for (let index = 1; index < parts.length; index += 2) files.set(`/${parts[index]}`, parts[index + 1] ?? "");
  return files;
}

export function snapshotOf(files: ReadonlyMap<string, string>, more: Partial<Snapshot> = {}): Snapshot {
  return { read: (file) => files.get(file) ?? null, ...more };
}

/** A snapshot whose host has seen every text. */
export function indexed(files: ReadonlyMap<string, string>): Snapshot {
  const index = createImportIndex();
  for (const [file, text] of files) index.set(file, text);
  return { read: (file) => files.get(file) ?? null, importersOf: (file, aliases) => index.importersOf(file, aliases) };
}

/** What the fixture's first file says, or that of `file`. */
export function evaluateFixture(fixture: string, file?: string): FileEvaluation {
  const files = splitFiles(fixture);
  return makeEvaluator().evaluateFile(file ?? [...files.keys()][0] ?? "", snapshotOf(files));
}

/** The value of `expression` at the end of the fixture's first file. */
export function evaluate(code: string, expression: string): Value {
  const files = splitFiles(code.trim() === "" ? "\n" : code);
  const [[main, text] = ["/main.ts", ""]] = files;
  files.set(main, `import { probe as probe_ } from "gearbox";\n${text}\nprobe_(${expression});\n`);
  const { calls } = makeEvaluator().evaluateFile(main, snapshotOf(files));
  const value = calls.findLast(({ definition }) => definition === "probe")?.args[0];
  if (value === undefined) throw new Error("The probe was not found.");
  return value;
}

/** The value as plain data, or `unknown: <code>` for what is not known. */
export function plain(value: Value): unknown {
  if (!value.known) return `unknown: ${rootOf(value).reason.code}`;
  const { data } = value;
  switch (data.kind) {
    case "primitive":
      return data.value;
    case "array":
      return data.items.map(plain);
    case "object":
      return Object.fromEntries([...data.entries].map(([name, inner]) => [name, plain(inner)]));
    case "built":
      return data.built;
    case "function":
      return `function: ${data.name}`;
    case "module":
      return `module: ${data.file}`;
  }
}

export function rootOf(value: Unknown): Unknown {
  let root = value;
  while (root.cause !== undefined) root = root.cause;
  return root;
}

/** The plain value of an expression after some code. */
export function dataOf(code: string, expression: string): unknown {
  return plain(evaluate(code, expression));
}

/** Why an expression is unknown: the codes from the use down to the root, and the root's message. */
export function unknownOf(
  code: string,
  expression: string,
): { readonly codes: string[]; readonly message: string; readonly advice: string } {
  const value = evaluate(code, expression);
  if (value.known) throw new Error(`Known: ${JSON.stringify(plain(value))}`);
  const codes: string[] = [];
  for (let link: Unknown | undefined = value; link !== undefined; link = link.cause) codes.push(link.reason.code);
  const root = rootOf(value);
  return { codes, message: root.reason.message, advice: root.reason.advice };
}

export function isKnown(value: Value | undefined): value is Known {
  return value?.known === true;
}
