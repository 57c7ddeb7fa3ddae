/**
 * What a kind of node is to scopes and names, as one number each: every file's tree is walked through by it, and every name looked up.
 *
 * Made once for a parser. Says nothing that depends on more of a node than its kind.
 */
import type ts from "typescript";
import type { TypeScript } from "./typescript.js";

/** By kind, the sum of what is true of it. */
export type Kinds = Uint8Array;

/** A type or a declaration of one: nothing of it is left at run time. */
export const ERASED = 1;
/** Opens a scope of its own, but for the block that is a function's body. */
export const OPENS_SCOPE = 2;
/** Each of its runs gives the names in it new values. */
export const OPENS_FRAME = 4;
export const FUNCTION = 8;
export const PARAMETER = 16;
/** May declare a name. */
export const DECLARES = 32;
/** `{ a }`: one name for the property and the value. */
export const SHORTHAND = 64;
/** One of the names of an import or an export: refers to nothing in its own file. */
export const SPECIFIER = 128;

export function listKinds(ts: TypeScript): Kinds {
  const { SyntaxKind } = ts;
  const kinds = new Uint8Array(SyntaxKind.Count);
  const mark = (sign: number, ...marked: readonly ts.SyntaxKind[]): void => {
    for (const kind of marked) kinds[kind] = (kinds[kind] ?? 0) | sign;
  };
  for (let kind = 0; kind < SyntaxKind.Count; kind++) {
    const node = { kind } as ts.Node;
    if (ts.isTypeNode(node)) mark(ERASED, kind);
    if (ts.isFunctionLike(node)) mark(FUNCTION | OPENS_SCOPE | OPENS_FRAME, kind);
  }
  mark(ERASED, SyntaxKind.InterfaceDeclaration, SyntaxKind.TypeAliasDeclaration);
  // `extends X<T>` is written as a type but is an expression.
  kinds[SyntaxKind.ExpressionWithTypeArguments] = 0;
  mark(OPENS_SCOPE | OPENS_FRAME, SyntaxKind.SourceFile, SyntaxKind.ForOfStatement);
  mark(OPENS_SCOPE, SyntaxKind.Block, SyntaxKind.CaseBlock, SyntaxKind.CatchClause, SyntaxKind.ModuleBlock);
  mark(OPENS_SCOPE, SyntaxKind.ForStatement, SyntaxKind.ForInStatement, SyntaxKind.ClassStaticBlockDeclaration);
  mark(OPENS_SCOPE | DECLARES, SyntaxKind.ClassDeclaration, SyntaxKind.ClassExpression, SyntaxKind.EnumDeclaration);
  mark(PARAMETER | DECLARES, SyntaxKind.Parameter);
  mark(DECLARES, SyntaxKind.VariableDeclaration, SyntaxKind.BindingElement, SyntaxKind.EnumMember);
  mark(DECLARES, SyntaxKind.FunctionDeclaration, SyntaxKind.FunctionExpression, SyntaxKind.ModuleDeclaration);
  mark(DECLARES, SyntaxKind.ImportClause, SyntaxKind.NamespaceImport, SyntaxKind.ImportEqualsDeclaration);
  mark(SPECIFIER | DECLARES, SyntaxKind.ImportSpecifier);
  mark(SPECIFIER, SyntaxKind.ExportSpecifier);
  mark(SHORTHAND, SyntaxKind.ShorthandPropertyAssignment);
  return kinds;
}
