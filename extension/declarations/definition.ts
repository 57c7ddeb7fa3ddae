/**
 * What the rest of the product may know of a word of the declarations: its name, how to check arguments, how to build.
 *
 * No schema library here: these types reach the published declarations.
 */

/** One issue with an argument list. */
export interface Issue {
  readonly message: string;
  /** From the argument tuple inwards: `[0, "noLoad", "speed"]`. */
  readonly path: readonly (string | number)[];
  /** Which characters it is about: the value at `path`, the property name at `path`, or the called word. */
  readonly at: "value" | "key" | "callee";
}

export interface Definition<Args extends readonly unknown[] = readonly never[], Built extends object = object> {
  readonly name: string;
  /** Builds, or throws one `DeclarationError` that names every issue. */
  build(...args: Args): Built;
  /** Every issue of any argument list; `built` when there is none. Never throws. */
  check(args: readonly unknown[]): { readonly issues: readonly Issue[]; readonly built?: Built };
}

/** Thrown by the words of the declarations when robot code runs with an impossible declaration. */
export class DeclarationError extends Error {
  override readonly name = "DeclarationError";
}
