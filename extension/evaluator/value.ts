/**
 * What the evaluator hands out: values with their origins, unknowns with their causes, and the calls to definitions.
 *
 * Knows nothing of motors. A value never loses where it came from: `origin` is the expression at the use, `from` what that
 * expression was made of, down to literals.
 */

/** A stretch of one file: UTF-16 offsets, `end` exclusive. */
export interface Span {
  readonly file: string;
  readonly start: number;
  readonly end: number;
}

/** Where a value came from; a graph without cycles whose leaves are literals. */
export interface Origin {
  readonly span: Span;
  /**
   * `name`: an identifier that stands for a declared value; its `from` is the initialiser. `access`: a property or element,
   * spread or destructured too; `from[0]` is what stands there, the rest worked out which. `choice`: `?:`, `??`, `&&`, `||`;
   * `from[0]` is the part chosen, the rest decided. `import`: a whole module.
   */
  readonly kind: "literal" | "name" | "access" | "operation" | "choice" | "template" | "array" | "object" | "call" | "import";
  readonly from: readonly Origin[];
  /** For `name`: the identifier in the declaration that it refers to; for `access`: the property's name where it is written. */
  readonly declaredAt?: Span;
}

export type Value = Known | Unknown;

export interface Known {
  readonly known: true;
  readonly data: Data;
  readonly origin: Origin;
}

export type Data =
  | { readonly kind: "primitive"; readonly value: string | number | boolean | bigint | null | undefined }
  /** `frozen`: cannot change after it was made (`Object.freeze`, `as const`). */
  | { readonly kind: "array"; readonly items: readonly Value[]; readonly frozen?: boolean }
  /** `keys`: where each property's name is written. */
  | {
      readonly kind: "object";
      readonly entries: ReadonlyMap<string, Value>;
      readonly keys: ReadonlyMap<string, Span>;
      readonly frozen?: boolean;
    }
  /** The object that a definition built, by identity, with the call that made it. */
  | { readonly kind: "built"; readonly built: object; readonly call: DefinitionCall }
  /** Something callable, or a global such as `Math`, that the evaluator understands. */
  | { readonly kind: "function"; readonly name: string }
  /** All exports of a file (`import * as`); each is evaluated when it is asked for. */
  | { readonly kind: "module"; readonly file: string };

export interface Unknown {
  readonly known: false;
  readonly reason: UnknownReason;
  readonly origin: Origin;
  /** The unknown that this one depends on; absent at the root of the chain. */
  readonly cause?: Unknown;
  /** The call to a definition whose own findings say this already. */
  readonly reportedBy?: DefinitionCall;
}

export interface UnknownReason {
  /**
   * `depends`: some part is unknown, see `cause`. `rejected`: a definition refused its arguments; that finding says it already.
   * `missing`: nothing is written there yet (half-typed code).
   */
  readonly code:
    | "depends"
    | "rejected"
    | "missing"
    | "not-const"
    | "mutated"
    | "cycle"
    | "call"
    | "parameter"
    | "ambient"
    | "unresolved-import"
    | "no-such-export"
    | "no-such-property"
    | "no-such-name"
    | "not-a-number"
    | "too-deep"
    | "unsupported";
  /** One plain sentence: which expression, why it cannot be known. */
  readonly message: string;
  /** What to write instead, as a short phrase; empty where there is nothing to suggest. */
  readonly advice: string;
}

/** One issue that a definition has with its arguments. */
export interface DefinitionIssue {
  readonly message: string;
  /** From the argument tuple inwards: [0, "noLoad", "speed"]. */
  readonly path: readonly (string | number)[];
  /** Which characters: the value at `path`, the property name at `path`, or the callee's name. */
  readonly at: "value" | "key" | "callee";
}

/** What the evaluator needs of a definition; the declarations room supplies the table. */
export interface Definition {
  readonly name: string;
  /** All issues of an argument list; `built` only when there is none. Never throws. */
  check(args: readonly unknown[]): { readonly issues: readonly DefinitionIssue[]; readonly built?: object };
}

/** A call to a definition that stands in a file. */
export interface DefinitionCall {
  readonly definition: string;
  /** The whole call expression. */
  readonly span: Span;
  readonly callee: Span;
  readonly args: readonly Value[];
  /** Present when every argument is known and accepted. */
  readonly built?: object;
  /** Issues, located: primary at the use, `source` at the literal where that is elsewhere. */
  readonly issues: readonly LocatedIssue[];
  /** The leaves among the arguments that are unknown for a reason of their own (not `rejected`), each located inside the call. */
  readonly unknowns: readonly Unknown[];
  /** Other calls whose own findings keep this one silent. */
  readonly waitsFor: readonly DefinitionCall[];
  /** No known run reaches it: parameters or loop variables around it are unknown. */
  readonly open?: true;
  /** The variable or property that the call initialises. */
  readonly binding?: { readonly name: string; readonly span: Span };
  /** The comments right above the statement or property that holds the call, in order. */
  readonly leadingComments: readonly { readonly text: string; readonly span: Span }[];
}

export interface LocatedIssue {
  readonly message: string;
  readonly path: readonly (string | number)[];
  /** Always inside the call. */
  readonly span: Span;
  /** The literal, or the property name, that the issue is about, where that stands outside `span`. */
  readonly source?: Span;
}

/** Texts at one moment; one object answers the same for good. `null`: there is no such file; `undefined`: not loaded yet, ask for it. */
export interface Snapshot {
  read(file: string): string | null | undefined;
  /** The file behind symbolic links; absent: names are what they seem. */
  canonical?(file: string): string;
  /**
   * The files that import this one, as far as the workspace is known; `undefined`: not known yet. Absent: what a file exports counts
   * as if no other file wrote to it. `aliases`: last words of specifiers that lead to it, besides its own names.
   */
  importersOf?(file: string, aliases: readonly string[]): readonly string[] | undefined;
  /** What its host knows of changes. Absent: every file is compared. */
  readonly changes?: Changes;
}

export interface Changes {
  /**
   * Files whose text may differ between two snapshots, where that is all that does; `undefined` where it is not known, as for a snapshot
   * that was made out of another.
   */
  between(one: Snapshot, other: Snapshot): ReadonlySet<string> | undefined;
}

/** What one file says. */
export interface FileEvaluation {
  readonly file: string;
  /**
   * Every call to a definition in the file, in order of position (inner calls after the call that holds them), once for each known
   * run of the function or loop around it; then the calls in helpers of other files that this file's calls reach.
   */
  readonly calls: readonly DefinitionCall[];
  /** Files that this evaluation read, itself included. */
  readonly dependencies: readonly string[];
  /** Files that it would have read, and that the snapshot has not loaded. */
  readonly wanted: readonly string[];
  /** Files that it looked for in vain: creating one of them may change this evaluation. */
  readonly missing: readonly string[];
  /** Files whose exports this one exports as well, and the specifier of the definitions where it exports those; absent: none. */
  readonly passesOn?: readonly string[];
  /** Why nothing of the file could be read; `calls` is then empty. */
  readonly problem?: Unknown;
}
