/**
 * What stands behind a `function` value: a definition, a function of the language itself, a written function or class.
 *
 * Only the data; `functions.ts`, `classes.ts` and `globals.ts` know what to do with it.
 */
import type ts from "typescript";
import type { Frame } from "./context.js";
import type { Outcome, Primitive } from "./operators.js";
import type { Data, Definition } from "./value.js";

export type Callable =
  | { readonly kind: "definition"; readonly definition: Definition }
  /** The declarations' own namespace. */
  | { readonly kind: "library" }
  /** A global such as `Math`; some can also be called. */
  | { readonly kind: "global"; readonly name: string; readonly apply?: (args: readonly Primitive[]) => Outcome }
  /** A pure function on plain values; `unary` when it looks at its first argument only. */
  | {
      readonly kind: "native";
      readonly name: string;
      readonly unary: boolean;
      readonly apply: (args: readonly Primitive[]) => Outcome;
    }
  | { readonly kind: "closure"; readonly node: ts.FunctionLikeDeclaration; readonly frame: Frame }
  /** A class, or with `instance` one of its instances; `overridable`: a class that extends it may have other fields. */
  | {
      readonly kind: "class";
      readonly node: ts.ClassLikeDeclaration;
      readonly frame: Frame;
      readonly instance: boolean;
      readonly overridable?: boolean;
    };

type FunctionData = Extract<Data, { kind: "function" }> & { readonly callable: Callable };

export function callableData(name: string, callable: Callable): Data {
  const data: FunctionData = { kind: "function", name, callable };
  return data;
}

export function callableOf(data: Data): Callable | undefined {
  return data.kind === "function" && "callable" in data ? (data as FunctionData).callable : undefined;
}
