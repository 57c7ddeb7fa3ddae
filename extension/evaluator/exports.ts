/**
 * What a file exports, by name, as its statements say it: its own names, expressions, and names passed on from other files.
 *
 * Reads no other file.
 */
import type ts from "typescript";
import { listCommonExports } from "./commonjs.js";
import { type Binding, resolveName, type Source } from "./source.js";
import type { TypeScript } from "./typescript.js";

export type Export =
  | { readonly kind: "binding"; readonly binding: Binding }
  | { readonly kind: "expression"; readonly node: ts.Expression }
  /** Given at more than one place, so that only running it could tell. */
  | { readonly kind: "unclear"; readonly node: ts.Node }
  /** `name` is undefined for a whole module passed on under one name. */
  | { readonly kind: "passed-on"; readonly node: ts.StringLiteral; readonly name: string | undefined };

export interface ExportTable {
  readonly named: ReadonlyMap<string, Export>;
  /** Specifiers of `export * from`. */
  readonly stars: readonly ts.StringLiteral[];
}

export function exportsOf(ts: TypeScript, source: Source): ExportTable {
  source.derived.exports ??= listExports(ts, source);
  return source.derived.exports;
}

/** Whether other files can reach the binding itself. */
export function isExported(ts: TypeScript, binding: Binding, source: Source): boolean {
  for (const entry of exportsOf(ts, source).named.values()) {
    if (entry.kind === "binding" && entry.binding === binding) return true;
    if (entry.kind !== "expression") continue;
    if (ts.isIdentifier(entry.node) && resolveName(ts, entry.node, source) === binding) return true;
  }
  return false;
}

function listExports(ts: TypeScript, source: Source): ExportTable {
  const named = new Map<string, Export>();
  const stars: ts.StringLiteral[] = [];
  for (const statement of source.root.statements) {
    if (ts.isExportDeclaration(statement)) listPassedOn(ts, source, statement, named, stars);
    else if (ts.isExportAssignment(statement)) {
      named.set(statement.isExportEquals === true ? "export=" : "default", { kind: "expression", node: statement.expression });
    } else if (isMarked(ts, statement, ts.SyntaxKind.ExportKeyword)) listDeclared(ts, source, statement, named);
  }
  if (named.size === 0 && stars.length === 0) listCommonExports(ts, source, named);
  return { named, stars };
}

function listPassedOn(
  ts: TypeScript,
  source: Source,
  { isTypeOnly, exportClause, moduleSpecifier }: ts.ExportDeclaration,
  named: Map<string, Export>,
  stars: ts.StringLiteral[],
): void {
  if (isTypeOnly) return;
  const specifier = moduleSpecifier !== undefined && ts.isStringLiteral(moduleSpecifier) ? moduleSpecifier : undefined;
  if (exportClause === undefined) {
    if (specifier !== undefined) stars.push(specifier);
    return;
  }
  if (ts.isNamespaceExport(exportClause)) {
    if (specifier !== undefined) named.set(exportClause.name.text, { kind: "passed-on", node: specifier, name: undefined });
    return;
  }
  for (const element of exportClause.elements) {
    if (element.isTypeOnly) continue;
    const local = element.propertyName ?? element.name;
    if (specifier !== undefined) named.set(element.name.text, { kind: "passed-on", node: specifier, name: local.text });
    else {
      const binding = source.scopes.get(source.root)?.names?.get(local.text);
      if (binding !== undefined) named.set(element.name.text, { kind: "binding", binding });
    }
  }
}

function listDeclared(ts: TypeScript, source: Source, statement: ts.Statement, named: Map<string, Export>): void {
  const names = source.scopes.get(source.root)?.names;
  const byDefault = isMarked(ts, statement, ts.SyntaxKind.DefaultKeyword);
  const list = (name: ts.Identifier): void => {
    const binding = names?.get(name.text);
    if (binding !== undefined) named.set(byDefault ? "default" : name.text, { kind: "binding", binding });
  };
  if (ts.isVariableStatement(statement)) {
    for (const declaration of statement.declarationList.declarations) listNames(ts, declaration.name, list);
  } else if (
    ts.isFunctionDeclaration(statement) ||
    ts.isClassDeclaration(statement) ||
    ts.isEnumDeclaration(statement) ||
    ts.isModuleDeclaration(statement)
  ) {
    if (statement.name !== undefined && ts.isIdentifier(statement.name)) list(statement.name);
  }
}

function listNames(ts: TypeScript, name: ts.BindingName, list: (name: ts.Identifier) => void): void {
  if (ts.isIdentifier(name)) list(name);
  else for (const element of name.elements) if (!ts.isOmittedExpression(element)) listNames(ts, element.name, list);
}

function isMarked(ts: TypeScript, statement: ts.Statement, kind: ts.SyntaxKind): boolean {
  return ts.canHaveModifiers(statement) && (ts.getModifiers(statement)?.some((modifier) => modifier.kind === kind) ?? false);
}
