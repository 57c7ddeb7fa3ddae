/**
 * One parsed file: its scopes, the names that they declare, the places that refer to them, and its calls.
 *
 * Depends on the file's text alone, so it outlives every re-evaluation that an edit elsewhere causes. Resolves names within
 * the file; what another file exports is the business of `modules.ts`.
 */
import type ts from "typescript";
import { declareNames } from "./declare.js";
import type { ExportTable } from "./exports.js";
import { DECLARES, ERASED, FUNCTION, type Kinds, OPENS_FRAME, OPENS_SCOPE, PARAMETER, SHORTHAND, SPECIFIER } from "./kinds.js";
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
  /** Absent where nothing is declared, as in most. */
  names?: Map<string, Binding>;
  /** The source file, function or loop whose runs each give its names new values. */
  readonly frame: ts.Node;
}

export interface Source {
  readonly file: string;
  readonly text: string;
  readonly root: ts.SourceFile;
  /** Set for a file that is nested too deeply for the parser; it then counts as empty. */
  readonly unreadable: boolean;
  readonly kinds: Kinds;
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
  identifiersByText?: ReadonlyMap<string, readonly ts.Identifier[]>;
  references?: Map<Binding, readonly ts.Identifier[]>;
  exports?: ExportTable;
  properties?: PropertyTable;
}

/** Parses a file. Never throws: what cannot be parsed is an empty file that says so. */
export function parseSource(ts: TypeScript, kinds: Kinds, file: string, text: string): Source {
  try {
    return walk(ts, kinds, file, text, parse(ts, file, text), false);
  } catch (error) {
    // The parser descends by recursion, so nesting of a thousand brackets overflows the stack.
    if (!(error instanceof RangeError)) throw error;
    return walk(ts, kinds, file, text, parse(ts, file, ""), true);
  }
}

/** The binding that an identifier refers to; `undefined` for a global, or for a name that is not there. */
export function resolveName(ts: TypeScript, identifier: ts.Identifier, source: Source): Binding | undefined {
  const { kinds, scopes } = source;
  const name = identifier.text;
  let fromParameter = false;
  for (let node: ts.Node = identifier; node !== undefined; node = node.parent) {
    const kind = kinds[node.kind] ?? 0;
    if ((kind & (OPENS_SCOPE | PARAMETER)) === 0) continue;
    if ((kind & PARAMETER) !== 0) fromParameter = true;
    const binding = scopes.get(node)?.names?.get(name) ?? findMergedMember(ts, node, name, source);
    const isFunction = (kind & FUNCTION) !== 0;
    // A parameter's default doesn't see the names that the function's body declares.
    const hidden = fromParameter && isFunction && binding !== undefined && binding.kind !== "parameter";
    if (binding !== undefined && !hidden) return binding;
    if (isFunction) fromParameter = false;
  }
  return undefined;
}

/** The parts of a merged enum see each other's members. */
function findMergedMember(ts: TypeScript, node: ts.Node, name: string, source: Source): Binding | undefined {
  if (!ts.isEnumDeclaration(node)) return undefined;
  const parts = source.scopes.get(node)?.parent?.names?.get(node.name.text)?.declarations ?? [];
  return parts.map((part) => source.scopes.get(part)?.names?.get(name)).find((member) => member !== undefined);
}

/** Every place in its file that refers to a binding. */
export function findReferences(ts: TypeScript, binding: Binding, source: Source): readonly ts.Identifier[] {
  const { derived } = source;
  derived.references ??= new Map();
  const known = derived.references.get(binding);
  if (known !== undefined) return known;
  // Few names are ever asked for, so only those of the same text are looked up.
  derived.identifiersByText ??= groupByText(source.identifiers);
  const alike = derived.identifiersByText.get(binding.name) ?? [];
  const references = alike.filter((identifier) => resolveName(ts, identifier, source) === binding);
  derived.references.set(binding, references);
  return references;
}

function groupByText(identifiers: readonly ts.Identifier[]): ReadonlyMap<string, readonly ts.Identifier[]> {
  const groups = new Map<string, ts.Identifier[]>();
  for (const identifier of identifiers) {
    const { text } = identifier;
    const group = groups.get(text);
    if (group === undefined) groups.set(text, [identifier]);
    else group.push(identifier);
  }
  return groups;
}

function parse(ts: TypeScript, file: string, text: string): ts.SourceFile {
  const options = { languageVersion: ts.ScriptTarget.ESNext, jsDocParsingMode: ts.JSDocParsingMode.ParseNone };
  const kind = /\.(json|[cm]?[jt]sx?)$/.test(file) ? undefined : ts.ScriptKind.TS;
  // `walk` tells nodes their parents, in passing.
  return ts.createSourceFile(file, text, options, false, kind);
}

/**
 * Goes through the tree with a stack of its own: trees may be far deeper than the engine's stack. Types leave nothing behind at run
 * time, so nobody looks into them, and the nodes there have no parents.
 */
function walk(ts: TypeScript, kinds: Kinds, file: string, text: string, root: ts.SourceFile, unreadable: boolean): Source {
  const { CallExpression, FirstNode, Identifier } = ts.SyntaxKind;
  const scopes = new Map<ts.Node, Scope>();
  const calls: ts.CallExpression[] = [];
  const identifiers: ts.Identifier[] = [];
  const nodes: ts.Node[] = [];
  // The scope around each of `nodes`.
  const around: Scope[] = [];
  let parent: ts.Node = root;
  let scope = openScope(root, undefined, OPENS_FRAME);
  const visit = (child: Child): void => {
    child.parent = parent;
    // More than half of a tree are names, literals and keywords, which hold nothing.
    if (child.kind < FirstNode) {
      if (child.kind === Identifier && isReference(kinds, child, parent)) identifiers.push(child as ts.Identifier);
    } else if (((kinds[child.kind] ?? 0) & ERASED) === 0) {
      nodes.push(child);
      around.push(scope);
    }
  };
  scopes.set(root, scope);
  ts.forEachChild(root, visit);
  for (
    let node = nodes.pop(), outer = around.pop();
    node !== undefined && outer !== undefined;
    node = nodes.pop(), outer = around.pop()
  ) {
    const kind = kinds[node.kind] ?? 0;
    parent = node;
    scope = outer;
    if ((kind & OPENS_SCOPE) !== 0 && !isBody(ts, kinds, node)) {
      scope = openScope(node, outer, kind);
      scopes.set(node, scope);
    }
    if ((kind & DECLARES) !== 0) declareNames(ts, node, scope);
    if (node.kind === CallExpression) calls.push(node as ts.CallExpression);
    ts.forEachChild(node, visit);
  }
  const startOf = (each: ts.Node): number => ts.getTokenPosOfNode(each, root);
  const textOf = (each: ts.Node): string => text.slice(startOf(each), each.end);
  calls.sort((a, b) => a.pos - b.pos || b.end - a.end);
  return { file, text, root, unreadable, kinds, scopes, calls, identifiers, derived: {}, startOf, textOf };
}

type Child = { -readonly [Key in keyof ts.Node]: ts.Node[Key] };

function openScope(node: ts.Node, parent: Scope | undefined, kind: number): Scope {
  const frame = parent === undefined || (kind & OPENS_FRAME) !== 0 ? node : parent.frame;
  return { node, parent, frame };
}

/** A function's body shares the scope of its parameters. */
function isBody(ts: TypeScript, kinds: Kinds, node: ts.Node): boolean {
  return node.kind === ts.SyntaxKind.Block && ((kinds[node.parent.kind] ?? 0) & FUNCTION) !== 0;
}

function isReference(kinds: Kinds, node: ts.Node, parent: ts.Node): boolean {
  const kind = kinds[parent.kind] ?? 0;
  if ((kind & (SHORTHAND | SPECIFIER)) !== 0) return (kind & SHORTHAND) !== 0;
  const named = parent as { readonly name?: ts.Node; readonly propertyName?: ts.Node; readonly label?: ts.Node };
  return named.name !== node && named.propertyName !== node && named.label !== node;
}
