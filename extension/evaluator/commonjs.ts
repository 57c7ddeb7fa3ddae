/**
 * `require` and `module.exports`, for files that are not ES modules.
 *
 * Only what is exported once, by a statement of the file itself, counts.
 */
import type ts from "typescript";
import type { Export } from "./exports.js";
import { innermost } from "./outer.js";
import { resolveName, type Source } from "./source.js";
import type { TypeScript } from "./typescript.js";
import { isWritten } from "./writes.js";

/** The specifier of `require("…")`, when this is the runtime's own `require`. */
export function requiredSpecifier(ts: TypeScript, call: ts.CallExpression, source: Source): ts.StringLiteralLike | undefined {
  const { expression, arguments: args } = call;
  const [specifier] = args;
  if (!ts.isIdentifier(expression) || expression.text !== "require" || args.length !== 1) return undefined;
  if (specifier === undefined || !ts.isStringLiteralLike(specifier)) return undefined;
  return resolveName(ts, expression, source) === undefined ? specifier : undefined;
}

/** Adds what the file assigns to `exports` and `module.exports`. */
export function listCommonExports(ts: TypeScript, source: Source, named: Map<string, Export>): void {
  for (const identifier of source.identifiers) {
    const holder = exportsObject(ts, identifier, source);
    if (holder === undefined) continue;
    const access = accessOf(ts, holder);
    const target = access ?? holder;
    if (!isWritten(ts, target)) continue;
    const name = access?.name.text ?? "export=";
    const value = assignedAtTop(ts, target);
    const isFirst = value !== undefined && !named.has(name);
    named.set(name, isFirst ? { kind: "expression", node: value } : { kind: "unclear", node: target });
    if (access === undefined && value !== undefined) listProperties(ts, value, named);
  }
}

/** `exports` or `module.exports` at an identifier, when it is the runtime's own. */
export function exportsObject(ts: TypeScript, identifier: ts.Identifier, source: Source): ts.Expression | undefined {
  const { text, parent } = identifier;
  if ((text !== "exports" && text !== "module") || resolveName(ts, identifier, source) !== undefined) return undefined;
  if (text === "exports") return identifier;
  const isExports = ts.isPropertyAccessExpression(parent) && parent.expression === identifier && parent.name.text === "exports";
  return isExports ? parent : undefined;
}

function accessOf(ts: TypeScript, holder: ts.Expression): ts.PropertyAccessExpression | undefined {
  const { parent } = holder;
  return ts.isPropertyAccessExpression(parent) && parent.expression === holder ? parent : undefined;
}

/** The value of `target = value;` as a statement of the file. */
function assignedAtTop(ts: TypeScript, target: ts.Expression): ts.Expression | undefined {
  const { parent } = target;
  if (!ts.isBinaryExpression(parent) || parent.operatorToken.kind !== ts.SyntaxKind.EqualsToken) return undefined;
  const isStatement = ts.isExpressionStatement(parent.parent) && ts.isSourceFile(parent.parent.parent);
  return isStatement && parent.left === target ? parent.right : undefined;
}

function listProperties(ts: TypeScript, value: ts.Expression, named: Map<string, Export>): void {
  const literal = innermost(ts, value);
  if (!ts.isObjectLiteralExpression(literal)) return;
  for (const property of literal.properties) {
    if (ts.isShorthandPropertyAssignment(property)) named.set(property.name.text, { kind: "expression", node: property.name });
    else if (ts.isPropertyAssignment(property) && (ts.isIdentifier(property.name) || ts.isStringLiteralLike(property.name))) {
      named.set(property.name.text, { kind: "expression", node: property.initializer });
    }
  }
}
