/** Runs small programs for real, to compare with what the evaluator claims. Only tests run anything. */
import ts from "typescript/lib/typescript.js";
import { expect } from "vitest";
import type { Value } from "../../../extension/evaluator/value.js";
import type { Statement } from "./programs.js";
import { evaluate, plain, splitFiles } from "./workspace.js";

/** Runs the statements in order until one throws; what each name that it got to stands for in the end. */
export function runStatements(statements: readonly Statement[]): ReadonlyMap<string, unknown> {
  const lines = statements.map(
    ({ text, names }) => `${text}\n${names.map((name) => `record_("${name}", () => ${name});`).join(" ")}`,
  );
  const readers = new Map<string, () => unknown>();
  const record = (name: string, read: () => unknown): void => {
    readers.set(name, read);
  };
  try {
    runModule(lines.join("\n"), () => ({}), { record_: record });
  } catch (error) {
    // A generated program that doesn't even parse would make every comparison vacuous.
    if (error instanceof SyntaxError) throw error;
  }
  return new Map([...readers].map(([name, read]) => [name, read()]));
}

/** Runs one file as a module and gives its exports. */
export function runModule(text: string, require: (specifier: string) => unknown, globals: Record<string, unknown> = {}): unknown {
  const { outputText, diagnostics } = ts.transpileModule(text, {
    reportDiagnostics: true,
    compilerOptions: {
      module: ts.ModuleKind.CommonJS,
      target: ts.ScriptTarget.ES2022,
      esModuleInterop: true,
      alwaysStrict: true,
    },
  });
  // `a < (b) > (c)` of a generated program may read as type arguments, and then as nothing that can run.
  if (diagnostics !== undefined && diagnostics.length > 0) throw new Error("The program doesn't compile.");
  const module = { exports: {} as unknown };
  const names = ["require", "module", "exports", ...Object.keys(globals)];
  new Function(...names, outputText)(require, module, module.exports, ...Object.values(globals));
  return module.exports;
}

/** Runs `/main.ts`; what was probed under each name, as it is in the end, or nothing when the program throws. */
export function runFiles(files: ReadonlyMap<string, string>): ReadonlyMap<string, unknown> {
  const probed = new Map<string, unknown>();
  const probe = (name: string, value: unknown): void => {
    probed.set(name, value);
  };
  const load = (file: string): unknown =>
    runModule(files.get(file) ?? "", (specifier) => (specifier === "gearbox" ? { probe } : load(`/${specifier.slice(2)}.ts`)));
  try {
    load("/main.ts");
  } catch (error) {
    if (error instanceof SyntaxError) throw error;
  }
  return probed;
}

/** Runs a fixture's first file with `expression` at its end, and gives the expression's value. */
export function runFixture(fixture: string, expression: string): unknown {
  const files = splitFiles(fixture.trim() === "" ? "\n" : fixture);
  const [[main, text] = ["/main.ts", ""]] = files;
  files.set(main, `${text}\nexport const shown_ = (${expression});\n`);
  const ran = new Map<string, unknown>();
  const load = (file: string): unknown => {
    if (!ran.has(file)) {
      const source = files.get(file);
      if (source === undefined) throw new Error(`No file ${file}.`);
      ran.set(
        file,
        runModule(source, (specifier) => (specifier === "gearbox" ? { probe: () => ({}) } : load(find(files, specifier)))),
      );
    }
    return ran.get(file);
  };
  return Reflect.get(load(main) as object, "shown_");
}

/** Expects a value to be known, to be this, and to be what the running program has. */
export function checkValue(fixture: string, expression: string, expected: unknown): void {
  const value = evaluate(fixture, expression);
  expect(plain(value)).toEqual(expected);
  expect(findDifference(value, runFixture(fixture, expression))).toBeUndefined();
}

function find(files: ReadonlyMap<string, string>, specifier: string): string {
  return (
    [...files.keys()].find((file) => file.replace(/\.[a-z]+$/, "") === specifier.slice(1).replace(/\.[a-z]+$/, "")) ?? specifier
  );
}

/** Whether everything that the evaluator claims about a value is true of what the program made; the first difference, or nothing. */
export function findDifference(claimed: Value, actual: unknown, path = ""): string | undefined {
  if (!claimed.known) return undefined;
  const { data } = claimed;
  const differs = `${path || "value"}: claimed ${JSON.stringify(data.kind === "primitive" ? (data.value ?? String(data.value)) : data.kind)}, is ${show(actual)}`;
  // Compilers write the -0 of an enum as 0.
  if (data.kind === "primitive") return Object.is(data.value, actual) || (data.value === 0 && actual === 0) ? undefined : differs;
  if (data.kind === "function") return typeof actual === "function" ? undefined : differs;
  if (typeof actual !== "object" || actual === null || data.kind === "built" || data.kind === "module") return differs;
  if (data.kind === "array") {
    if (!Array.isArray(actual) || actual.length !== data.items.length) return differs;
    return first(data.items.map((item, index) => findDifference(item, actual[index], `${path}[${index}]`)));
  }
  const keys = [...data.entries.keys()];
  if (Array.isArray(actual) || JSON.stringify(keys) !== JSON.stringify(Object.keys(actual))) return `${differs} with ${keys}`;
  return first(keys.map((key) => findDifference(data.entries.get(key) as Value, Reflect.get(actual, key), `${path}.${key}`)));
}

/** Whether a value is known through and through. */
export function isKnownThrough(value: Value): boolean {
  if (!value.known) return false;
  const { data } = value;
  if (data.kind === "array") return data.items.every(isKnownThrough);
  return data.kind !== "object" || [...data.entries.values()].every(isKnownThrough);
}

function show(value: unknown): string {
  return typeof value === "number" || typeof value === "function" ? String(value) : (JSON.stringify(value) ?? String(value));
}

function first(differences: readonly (string | undefined)[]): string | undefined {
  return differences.find((difference) => difference !== undefined);
}
