/**
 * Where a file uses properties of a certain name, whatever they belong to: fields of classes are told apart by name alone.
 *
 * Coarser than following one object, but a field has no name of its own to follow.
 */
import type ts from "typescript";
import { innermost } from "./outer.js";
import { type Binding, resolveName, type Source } from "./source.js";
import type { TypeScript } from "./typescript.js";
import { isWritten } from "./writes.js";

export interface PropertyTable {
  /** Accesses, and names that a pattern takes such a property into. */
  readonly uses: ReadonlyMap<string, readonly (ts.Node | Binding)[]>;
  readonly written: ReadonlySet<string>;
}

const DEFINING = new Set([
  "Object.assign",
  "Object.defineProperty",
  "Object.defineProperties",
  "Reflect.set",
  "Reflect.defineProperty",
]);
/** Stands for a property whose name only the running program knows. */
const ANY = "*";

/** Whether anything in the file writes to a property of that name. */
export function isPropertyWritten(ts: TypeScript, name: string, source: Source): boolean {
  const { written } = tableOf(ts, source);
  return written.has(name) || written.has(ANY);
}

export function propertyUses(ts: TypeScript, name: string, source: Source): readonly (ts.Node | Binding)[] {
  return tableOf(ts, source).uses.get(name) ?? [];
}

function tableOf(ts: TypeScript, source: Source): PropertyTable {
  source.derived.properties ??= listProperties(ts, source);
  return source.derived.properties;
}

function listProperties(ts: TypeScript, source: Source): PropertyTable {
  const uses = new Map<string, (ts.Node | Binding)[]>();
  const written = new Set<string>();
  const add = (name: string, use: ts.Node | Binding): void => {
    uses.set(name, [...(uses.get(name) ?? []), use]);
  };
  const stack: ts.Node[] = [source.root];
  for (let node = stack.pop(); node !== undefined; node = stack.pop()) {
    if (ts.isPropertyAccessExpression(node) || ts.isElementAccessExpression(node)) {
      const name = nameOf(ts, node);
      if (name !== undefined) add(name, node);
      if (isWritten(ts, node) && (name !== undefined || isClassOrThis(ts, node.expression, source))) written.add(name ?? ANY);
    } else if (ts.isBindingElement(node)) {
      const property = node.propertyName ?? node.name;
      const binding = ts.isIdentifier(node.name) ? resolveName(ts, node.name, source) : undefined;
      if (ts.isIdentifier(property) && binding !== undefined) add(property.text, binding);
    } else if (ts.isCallExpression(node)) {
      const [first] = node.arguments;
      if (first !== undefined && DEFINING.has(source.textOf(node.expression)) && isClassOrThis(ts, first, source))
        written.add(ANY);
    }
    ts.forEachChild(node, (child) => {
      stack.push(child);
    });
  }
  return { uses, written };
}

function nameOf(ts: TypeScript, access: ts.PropertyAccessExpression | ts.ElementAccessExpression): string | undefined {
  if (ts.isPropertyAccessExpression(access)) return access.name.text;
  const { argumentExpression } = access;
  return ts.isStringLiteralLike(argumentExpression) ? argumentExpression.text : undefined;
}

function isClassOrThis(ts: TypeScript, expression: ts.Expression, source: Source): boolean {
  const bare = innermost(ts, expression);
  if (bare.kind === ts.SyntaxKind.ThisKeyword) return true;
  return ts.isIdentifier(bare) && resolveName(ts, bare, source)?.kind === "class";
}
