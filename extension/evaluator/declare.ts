/**
 * Which names a node declares, and in which scope: hoisting, patterns, imports.
 *
 * Only value names: types share no namespace with them.
 */
import type ts from "typescript";
import type { Binding, BindingKind, Scope } from "./source.js";
import type { TypeScript } from "./typescript.js";

/** Adds the names that `node` declares; `scope` is the innermost around it, its own if it opens one. */
export function declareNames(ts: TypeScript, node: ts.Node, scope: Scope): void {
  if (ts.isVariableDeclaration(node) || ts.isBindingElement(node) || ts.isParameter(node)) {
    if (ts.isIdentifier(node.name)) declareVariable(ts, node, node.name, scope);
  } else if (ts.isFunctionDeclaration(node) || ts.isClassDeclaration(node)) {
    if (node.name !== undefined)
      add(scope.parent ?? scope, node.name, node, ts.isClassLike(node) ? "class" : "function", isAmbient(ts, node));
  } else if (ts.isFunctionExpression(node) || ts.isClassExpression(node)) {
    if (node.name !== undefined) add(scope, node.name, node, ts.isClassLike(node) ? "class" : "function", false);
  } else if (ts.isEnumDeclaration(node)) {
    add(scope.parent ?? scope, node.name, node, "enum", isAmbient(ts, node));
  } else if (ts.isEnumMember(node)) {
    if (ts.isIdentifier(node.name)) add(scope, node.name, node, "member", false);
  } else if (ts.isModuleDeclaration(node)) {
    if (ts.isIdentifier(node.name)) add(scope, node.name, node, "namespace", isAmbient(ts, node));
  } else if (isValueImport(ts, node)) {
    add(scope, node.name, node, "import", false);
  }
}

/** The outermost declaration that a destructured name belongs to. */
export function rootOf(ts: TypeScript, node: ts.Node): ts.Node {
  let root = node;
  while (ts.isBindingElement(root)) root = root.parent.parent;
  return root;
}

function declareVariable(ts: TypeScript, node: ts.Node, name: ts.Identifier, scope: Scope): void {
  const root = rootOf(ts, node);
  if (ts.isParameter(root)) {
    add(scope, name, node, "parameter", false);
    return;
  }
  const list = root.parent;
  if (!ts.isVariableDeclarationList(list)) {
    add(scope, name, node, "catch", false);
    return;
  }
  const statement = list.parent;
  const kind = variableKind(ts, list);
  add(kind === "var" ? functionScope(ts, scope) : scope, name, node, kind, isAmbient(ts, statement));
}

function variableKind(ts: TypeScript, list: ts.VariableDeclarationList): BindingKind {
  const constant = (list.flags & ts.NodeFlags.Constant) !== 0;
  const scoped = (list.flags & ts.NodeFlags.BlockScoped) !== 0;
  if (!scoped) return "var";
  const loop = ts.isForOfStatement(list.parent) || ts.isForInStatement(list.parent);
  if (loop) return constant ? "loop" : "let";
  return constant ? "const" : "let";
}

function functionScope(ts: TypeScript, scope: Scope): Scope {
  let found = scope;
  while (found.parent !== undefined && !opensFunction(ts, found.node)) found = found.parent;
  return found;
}

function opensFunction(ts: TypeScript, node: ts.Node): boolean {
  return ts.isFunctionLike(node) || ts.isModuleBlock(node) || ts.isClassStaticBlockDeclaration(node);
}

function isValueImport(
  ts: TypeScript,
  node: ts.Node,
): node is (ts.ImportClause | ts.NamespaceImport | ts.ImportSpecifier | ts.ImportEqualsDeclaration) & {
  readonly name: ts.Identifier;
} {
  if (ts.isImportClause(node)) return node.name !== undefined && node.phaseModifier !== ts.SyntaxKind.TypeKeyword;
  if (ts.isNamespaceImport(node)) return node.parent.phaseModifier !== ts.SyntaxKind.TypeKeyword;
  if (ts.isImportSpecifier(node)) return !node.isTypeOnly && node.parent.parent.phaseModifier !== ts.SyntaxKind.TypeKeyword;
  return ts.isImportEqualsDeclaration(node) && !node.isTypeOnly;
}

/** Declared with `declare`. */
export function isAmbient(ts: TypeScript, node: ts.Node): boolean {
  return ts.canHaveModifiers(node) && (ts.getModifiers(node)?.some(({ kind }) => kind === ts.SyntaxKind.DeclareKeyword) ?? false);
}

function add(scope: Scope, name: ts.Identifier, declaration: ts.Node, kind: BindingKind, ambient: boolean): void {
  if (name.text === "") return;
  scope.names ??= new Map();
  const present = scope.names.get(name.text);
  if (present === undefined) {
    const binding: Binding = { name: name.text, kind, names: [name], declarations: [declaration], scope, ambient };
    scope.names.set(name.text, binding);
    return;
  }
  present.names.push(name);
  present.declarations.push(declaration);
}
