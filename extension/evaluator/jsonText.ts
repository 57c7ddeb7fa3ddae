/** Text of a JSON file to plain data, with the way back from a path to characters. For settings; imports of JSON are evaluated as values. */
import type ts from "typescript";
import type { TypeScript } from "./typescript.js";

export interface JsonText {
  readonly data: unknown;
  /** The first syntax error. */
  readonly broken?: { readonly message: string; readonly start: number; readonly end: number };
  /** Offsets of the value at `path`, or of the nearest place above it that is written; `of: "key"` takes the property's name. */
  placeOf(path: readonly string[], of: "value" | "key"): { readonly start: number; readonly end: number };
}

export function readJsonText(typescript: TypeScript, file: string, text: string): JsonText {
  const source: ts.JsonSourceFile & { readonly parseDiagnostics?: readonly ts.DiagnosticWithLocation[] } =
    typescript.parseJsonText(file, text);
  const error = source.parseDiagnostics?.[0];
  const root = source.statements[0]?.expression;
  return {
    data: typescript.convertToObject(source, []),
    ...describeError(typescript, error, root === undefined, text),
    placeOf(path, of) {
      const node = root === undefined ? undefined : nodeAt(typescript, root, path, of);
      return node === undefined
        ? { start: 0, end: text.length }
        : { start: typescript.getTokenPosOfNode(node, source), end: node.end };
    },
  };
}

function describeError(
  typescript: TypeScript,
  error: ts.DiagnosticWithLocation | undefined,
  isEmpty: boolean,
  text: string,
): Pick<JsonText, "broken"> {
  if (error === undefined) return isEmpty ? { broken: { message: "it is empty.", start: 0, end: text.length } } : {};
  const message = typescript.flattenDiagnosticMessageText(error.messageText, " ");
  return {
    broken: { message, start: error.start, end: Math.min(error.start + Math.max(error.length, 1), Math.max(text.length, 1)) },
  };
}

function nodeAt(typescript: TypeScript, node: ts.Node, path: readonly string[], of: "value" | "key"): ts.Node {
  const [key, ...rest] = path;
  if (key === undefined) return node;
  if (typescript.isArrayLiteralExpression(node)) {
    const element = node.elements[Number(key)];
    return element === undefined ? node : nodeAt(typescript, element, rest, of);
  }
  if (!typescript.isObjectLiteralExpression(node)) return node;
  const property = node.properties.find(
    (one) => one.name !== undefined && typescript.isStringLiteral(one.name) && one.name.text === key,
  );
  if (property === undefined || !typescript.isPropertyAssignment(property)) return node;
  return rest.length === 0 && of === "key" ? property.name : nodeAt(typescript, property.initializer, rest, of);
}
