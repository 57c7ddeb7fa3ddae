/**
 * What the parts of the evaluator share: the files that are open to it, frames of evaluation, and the way back into the evaluator.
 *
 * Parts that need each other in a circle do so through `Context`, so that their imports run one way.
 */
import type ts from "typescript";
import type { Binding, Source } from "./source.js";
import type { TypeScript } from "./typescript.js";
import type { Data, Definition, DefinitionCall, Snapshot, Span, Unknown, Value } from "./value.js";

/** One file as it is now, with what was worked out about it; dropped when anything that it read has changed. */
export interface Module {
  readonly file: string;
  readonly source: Source;
  readonly root: Frame;
  /** Every answer of the snapshot that this module's values rest on. */
  readonly reads: Map<string, string | null | undefined>;
  /** Modules that this module's values rest on, as they were then. */
  readonly imports: Set<Module>;
  /** Modules whose values rest on this one's. */
  readonly users: Set<Module>;
  readonly loads: Map<string, Loaded>;
  /** What its imports stand for. */
  readonly imported: Map<ts.Node, Target>;
  readonly exports: Map<string, Target>;
  readonly importers: Importers;
  /** Objects of other files that this one leaves alone, by the name that they are exported for and the file it imports that from. */
  readonly harmlessTo: WeakMap<Data, Map<object, Set<Module>>>;
  /** By function or loop, the runs that are known of it. */
  readonly runs: Map<ts.Node, readonly Frame[]>;
}

/** What is known of the files that import a module: they may change the objects that it exports. */
export interface Importers {
  readonly lists: Map<string, { readonly aliases: readonly string[]; readonly files: readonly string[] | undefined }>;
  readonly reads: Map<string, string | null | undefined>;
  /** The objects, with what was found about them. */
  readonly guards: { readonly binding: Binding; readonly data: Data; readonly isChanged: boolean }[];
}

/** One run through a file, a function's body or a loop's body: what its names stand for. */
export interface Frame {
  readonly module: Module;
  /** The source file, function or loop that it runs through. */
  readonly node: ts.Node;
  readonly parent: Frame | undefined;
  /** Parameters and loop variables. */
  readonly bound: ReadonlyMap<Binding, Value>;
  /** Values by binding, declaration or call; `undefined` while being worked out. */
  readonly memo: Map<object, Value | undefined>;
  /** Frames that calls and loops in this frame opened, so that each is run through once. */
  readonly children: Map<ts.Node, Frame[]>;
  /** How many calls of helpers lead here. */
  readonly height: number;
}

/** What a specifier leads to. */
export type Loaded =
  | { readonly kind: "library" }
  | { readonly kind: "module"; readonly module: Module }
  | { readonly kind: "failed"; readonly unknown: Unknown };

/** What a name or an export stands for, found without evaluating anything. */
export type Target =
  | Loaded
  | { readonly kind: "definition"; readonly definition: Definition }
  | { readonly kind: "binding"; readonly module: Module; readonly binding: Binding }
  | { readonly kind: "expression"; readonly module: Module; readonly node: ts.Expression };

export interface Context {
  readonly ts: TypeScript;
  readonly specifier: string;
  readonly definitions: ReadonlyMap<string, Definition>;
  readonly modules: Map<string, Module>;
  /** The modules that rest on the text of a file. */
  readonly readers: Map<string, Set<Module>>;
  /** The call that made each built object. */
  readonly makers: WeakMap<object, DefinitionCall>;
  snapshot: Snapshot;
  /** Modules that are known to be true for the snapshot. */
  readonly checked: Set<Module>;
  /** Modules whose importers were looked through anew for the snapshot: they may rest on other files than before. */
  readonly relooked: Set<Module>;
  /** Nesting of the evaluation that is going on. */
  depth: number;
  /** Expressions evaluated for this file so far. */
  steps: number;
  /** Evaluates an expression; `frame` must belong to the node's own file. */
  evaluate(node: ts.Expression, frame: Frame): Value;
  /** The value that a binding was given, with the origin of its initialiser. */
  valueOf(binding: Binding, frame: Frame): Value;
  /** The value that an import, an export or an alias leads to. */
  valueOfTarget(target: Target, span: Span): Value;
  /** What a specifier in `module` leads to; `span` is where it is written. */
  load(module: Module, specifier: string, span: Span): Loaded;
  /** The module of a file that was read. */
  open(file: string, text: string): Module;
}

export function openFrame(parent: Frame, node: ts.Node, bound: ReadonlyMap<Binding, Value>, height = parent.height): Frame {
  return { module: parent.module, node, parent, bound, memo: new Map(), children: new Map(), height };
}

/** The run that a binding belongs to; the file's own for names inside a function that nobody has called. */
export function homeOf(binding: Binding, frame: Frame): Frame {
  let owner: Frame | undefined = frame;
  while (owner !== undefined && owner.node !== binding.scope.frame) owner = owner.parent;
  return owner ?? frame.module.root;
}
