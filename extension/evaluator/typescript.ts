/**
 * Loads TypeScript's parser, once and late: it is by far the largest thing that the product carries.
 *
 * Everything else in this room takes the namespace as a value, so that importing the room costs nothing.
 */
import type ts from "typescript";

export type TypeScript = typeof ts;

/** The compiler's namespace, whichever way the bundler or the runtime wraps a CommonJS module. */
export async function loadTypeScript(): Promise<TypeScript> {
  const loaded: TypeScript & { readonly default?: TypeScript } = await import("typescript");
  return loaded.default?.createSourceFile === undefined ? loaded : loaded.default;
}
