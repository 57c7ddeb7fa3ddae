/**
 * Loads TypeScript's parser, once and late: it is by far the largest thing that the product carries.
 *
 * Everything else in this room takes the namespace as a value, so that importing the room costs nothing.
 */
import type ts from "typescript";
import type { PARSER_NAMES, START_OF_NODE } from "./parserNames.js";

export type TypeScript = Pick<typeof ts, (typeof PARSER_NAMES)[number]> &
  Record<typeof START_OF_NODE, (node: ts.Node, source: ts.SourceFile) => number>;

/** The compiler's namespace, whichever way the bundler or the runtime wraps a CommonJS module. */
export async function loadTypeScript(): Promise<TypeScript> {
  const loaded = (await import("typescript")) as unknown as TypeScript & { readonly default?: TypeScript };
  return loaded.default?.createSourceFile === undefined ? loaded : loaded.default;
}
