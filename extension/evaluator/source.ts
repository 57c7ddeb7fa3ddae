/**
 * One parsed file: its scopes, the names that they declare, the places that refer to them, and its calls.
 *
 * Depends on the file's text alone, so it outlives every re-evaluation that an edit elsewhere causes. Resolves names within
 * the file; what another file exports is the business of `modules.ts`.
 */
import type ts from "typescript";
import { declareNames } from "./declare.js";
import type { ExportTable } from "./exports.js";
import type { PropertyTable } from "./properties.js";
import type { TypeScript } from "./typescript.js";

export type BindingKind =
  | "const"
  | "let"
  | "var"
  | "loop"
  | "catch"
  | "parameter"
  | "function"
  | "class"
  | "enum"
  | "member"
  | "namespace"
  | "import";

export interface Binding {
  readonly name: string;
  readonly kind: BindingKind;
  /** The identifiers that declare it; several for a merged enum or a repeated `var`. */
  readonly names: ts.Identifier[];
  /** The declaration of each of `names`. */
  readonly declarations: ts.Node[];
  readonly scope: Scope;
  /** Declared with `declare`: there is no value in this file. */
  readonly ambient: boolean;
}

export interface Scope {
  readonly node: ts.Node;
  readonly parent: Scope | undefined;
  readonly names: Map<string, Binding>;
  /** The source file, function or loop whose runs each give its names new values. */
  readonly frame: ts.Node;
}

export interface Source {
  readonly file: string;
  readonly text: string;
  readonly root: ts.SourceFile;
  /** Set for a file that is nested too deeply for the parser; it then counts as empty. */
  readonly unreadable: boolean;
  readonly scopes: ReadonlyMap<ts.Node, Scope>;
  /** Calls in order of position, the outer before the inner. */
  readonly calls: readonly ts.CallExpression[];
  /** Identifiers that stand for a value, in no order. */
  readonly identifiers: readonly ts.Identifier[];
  readonly derived: Derived;
  /** Offset of a node's first character, behind the blanks and comments before it. */
  startOf(node: ts.Node): number;
  textOf(node: ts.Node): string;
}

/** What follows from the text as well, worked out once something asks for it. */
export interface Derived {
  references?: ReadonlyMap<Binding, readonly ts.Identifier[]>;
  exports?: ExportTable;
  properties?: PropertyTable;
}

/** Parses a file. Never throws: what cannot be parsed is an empty file that says so. */
export function parseSource(ts: TypeScript, file: string, text: string): Source {
  try {
    return walk(ts, file, text, parse(ts, file, text), false);
  } catch (error) {
    // The parser descends by recursion, so nesting of a thousand brackets overflows the stack.
    if (!(error instanceof RangeError)) throw error;
    return walk(ts, file, text, parse(ts, file, ""), true);
  }
}

/** The binding that an identifier refers to; `undefined` for a global, or for a name that is not there. */
export function resolveName(ts: TypeScript, identifier: ts.Identifier, source: Source): Binding | undefined {
  let fromParameter = false;
  for (let node: ts.Node = identifier; node !== undefined; node = node.parent) {
    if (ts.isParameter(node)) fromParameter = true;
    const binding = source.scopes.get(node)?.names.get(identifier.text) ?? findMergedMember(ts, node, identifier.text, source);
    // A parameter's default doesn't see the names that the function's body declares.
    const hidden = fromParameter && ts.isFunctionLike(node) && binding !== undefined && binding.kind !== "parameter";
    if (binding !== undefined && !hidden) return binding;
    if (ts.isFunctionLike(node)) fromParameter = false;
  }
  return undefined;
}

/** The parts of a merged enum see each other's members. */
function findMergedMember(ts: TypeScript, node: ts.Node, name: string, source: Source): Binding | undefined {
  if (!ts.isEnumDeclaration(node)) return undefined;
  const parts = source.scopes.get(node)?.parent?.names.get(node.name.text)?.declarations ?? [];
  return parts.map((part) => source.scopes.get(part)?.names.get(name)).find((member) => member !== undefined);
}

/** Every place in its file that refers to a binding. */
export function findReferences(ts: TypeScript, binding: Binding, source: Source): readonly ts.Identifier[] {
  source.derived.references ??= groupReferences(ts, source);
  return source.derived.references.get(binding) ?? [];
}

function groupReferences(ts: TypeScript, source: Source): ReadonlyMap<Binding, readonly ts.Identifier[]> {
  const groups = new Map<Binding, ts.Identifier[]>();
  for (const identifier of source.identifiers) {
    const binding = resolveName(ts, identifier, source);
    if (binding === undefined) continue;
    const group = groups.get(binding);
    if (group === undefined) groups.set(binding, [identifier]);
    else group.push(identifier);
  }
  return groups;
}

function parse(ts: TypeScript, file: string, text: string): ts.SourceFile {
  const options = { languageVersion: ts.ScriptTarget.ESNext, jsDocParsingMode: ts.JSDocParsingMode.ParseNone };
  const kind = /\.(json|[cm]?[jt]sx?)$/.test(file) ? undefined : ts.ScriptKind.TS;
  return ts.createSourceFile(file, text, options, true, kind);
}

/** Goes through the tree with a stack of its own: trees may be far deeper than the engine's stack. */
function walk(ts: TypeScript, file: string, text: string, root: ts.SourceFile, unreadable: boolean): Source {
  const scopes = new Map<ts.Node, Scope>();
  const calls: ts.CallExpression[] = [];
  const identifiers: ts.Identifier[] = [];
  const nodes: ts.Node[] = [root];
  // The scope around each of `nodes`.
  const around: (Scope | undefined)[] = [undefined];
  for (let node = nodes.pop(); node !== undefined; node = nodes.pop()) {
    const outer = around.pop();
    // More than half of a tree are names, literals and keywords, which hold nothing.
    if (node.kind < ts.SyntaxKind.FirstNode) {
      if (ts.isIdentifier(node) && isReference(ts, node)) identifiers.push(node);
      continue;
    }
    if (isErased(ts, node)) continue;
    const scope = openScope(ts, node, outer);
    if (scope !== outer) scopes.set(node, scope);
    declareNames(ts, node, scope);
    if (ts.isCallExpression(node)) calls.push(node);
    ts.forEachChild(node, (child) => {
      nodes.push(child);
      around.push(scope);
    });
  }
  const startOf = (each: ts.Node): number => ts.getTokenPosOfNode(each, root);
  const textOf = (each: ts.Node): string => text.slice(startOf(each), each.end);
  calls.sort((a, b) => startOf(a) - startOf(b) || b.end - a.end);
  return { file, text, root, unreadable, scopes, calls, identifiers, derived: {}, startOf, textOf };
}

/** Types leave nothing behind at run time; `extends X<T>` is written as a type but is an expression. */
function isErased(ts: TypeScript, node: ts.Node): boolean {
  if (ts.isInterfaceDeclaration(node) || ts.isTypeAliasDeclaration(node)) return true;
  return ts.isTypeNode(node) && !ts.isExpressionWithTypeArguments(node);
}

function openScope(ts: TypeScript, node: ts.Node, parent: Scope | undefined): Scope {
  if (parent === undefined || ts.isFunctionLike(node) || ts.isForOfStatement(node)) {
    return { node, parent, names: new Map(), frame: node };
  }
  const opens =
    ts.isBlock(node) ||
    ts.isForStatement(node) ||
    ts.isForInStatement(node) ||
    ts.isCaseBlock(node) ||
    ts.isCatchClause(node) ||
    ts.isClassLike(node) ||
    ts.isEnumDeclaration(node) ||
    ts.isModuleBlock(node) ||
    ts.isClassStaticBlockDeclaration(node);
  const isBody = ts.isBlock(node) && ts.isFunctionLike(node.parent);
  return opens && !isBody ? { node, parent, names: new Map(), frame: parent.frame } : parent;
}

function isReference(ts: TypeScript, node: ts.Identifier): boolean {
  const { parent } = node;
  if (ts.isShorthandPropertyAssignment(parent)) return true;
  if (ts.isExportSpecifier(parent) || ts.isImportSpecifier(parent)) return false;
  const named = parent as { readonly name?: ts.Node; readonly propertyName?: ts.Node; readonly label?: ts.Node };
  return named.name !== node && named.propertyName !== node && named.label !== node;
}
