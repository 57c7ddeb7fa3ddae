/**
 * The entrance of this room: evaluates a file of a snapshot, and keeps what it worked out for as long as it stays true.
 *
 * A file's parse is kept while its text is the same, its values while every file that they rest on is. Nothing is read but
 * through the snapshot; what that lacks is listed as wanted.
 */
import type ts from "typescript";
import { listActivations } from "./activations.js";
import { listAliases } from "./aliases.js";
import type { Context, Frame, Module } from "./context.js";
import { evaluateDefinitionCall } from "./definitionCall.js";
import { noteRead, release } from "./dependencies.js";
import { listCallsElsewhere } from "./elsewhere.js";
import { createEvaluate } from "./expression.js";
import { dropStale, sameFiles, uncheckChanged } from "./freshness.js";
import { type Kinds, listKinds } from "./kinds.js";
import { loadSpecifier } from "./load.js";
import { findTarget } from "./modules.js";
import { valueOfBinding, valueOfTarget } from "./names.js";
import { listPassedOn } from "./passedOn.js";
import { listReached } from "./reached.js";
import { parseSource, type Source } from "./source.js";
import type { TypeScript } from "./typescript.js";
import { tooDeep, unknown } from "./unknown.js";
import type { Definition, DefinitionCall, FileEvaluation, Snapshot, Unknown } from "./value.js";

/** Parses kept for a file: a hover tries a value or two and goes back to the text that is there. */
const KEPT_TEXTS = 3;

export interface Evaluator {
  /** What a file says. Never throws; microseconds when nothing that it rests on has changed. */
  evaluateFile(file: string, snapshot: Snapshot): FileEvaluation;
  /** The files that import this one, by whatever name; what the snapshot lacks to tell is added to `wanted`. */
  importersOf(file: string, snapshot: Snapshot, wanted: Set<string>): readonly string[];
  /** Drops what is kept about a file that is gone or no longer of interest. */
  forget(file: string): void;
}

export interface EvaluatorOptions {
  /** The module whose exports are the definitions. */
  readonly specifier: string;
  /** By export name. */
  readonly definitions: ReadonlyMap<string, Definition>;
}

export function createEvaluator(ts: TypeScript, { specifier, definitions }: EvaluatorOptions): Evaluator {
  const sources = new Map<string, readonly Source[]>();
  const evaluations = new WeakMap<Module, FileEvaluation>();
  const nothing: Snapshot = { read: () => undefined };
  const modules = new Map<string, Module>();
  const evaluate = createEvaluate(ts);
  const kinds = listKinds(ts);
  const ctx: Context = {
    ts,
    specifier,
    definitions,
    modules,
    readers: new Map(),
    makers: new WeakMap(),
    snapshot: nothing,
    checked: new Set(),
    relooked: new Set(),
    depth: 0,
    steps: 0,
    evaluate: (node, frame) => evaluate(ctx, node, frame),
    valueOf: (binding, frame) => valueOfBinding(ctx, binding, frame),
    valueOfTarget: (target, span) => valueOfTarget(ctx, target, span),
    load: (module, name, span) => loadSpecifier(ctx, module, name, span),
    open: (file, text) => open(ctx, kinds, sources, file, text),
  };
  return {
    evaluateFile(file, snapshot) {
      if (ctx.snapshot !== snapshot) {
        uncheckChanged(ctx, snapshot.changes?.between(ctx.snapshot, snapshot));
        ctx.relooked.clear();
      }
      ctx.snapshot = snapshot;
      const text = snapshot.read(file);
      if (typeof text !== "string") {
        dropStale(ctx, file);
        return withoutText(file, text);
      }
      const module = ctx.open(file, text);
      const known = evaluations.get(module);
      const evaluation = known === undefined ? evaluateModule(ctx, module) : withFilesOfNow(ctx, known, module);
      evaluations.set(module, evaluation);
      return evaluation;
    },
    importersOf(file, snapshot, wanted) {
      const read = (name: string) => {
        const text = snapshot.read(name);
        if (text === undefined) wanted.add(name);
        return text;
      };
      return snapshot.importersOf?.(file, listAliases(ts, file, read) ?? []) ?? [];
    },
    forget(file) {
      sources.delete(file);
      const module = modules.get(file);
      if (module === undefined) return;
      modules.delete(file);
      release(ctx, module);
    },
  };
}

function evaluateModule(ctx: Context, module: Module): FileEvaluation {
  const { file, source } = module;
  ctx.depth = 0;
  ctx.steps = 0;
  const calls = new Set<DefinitionCall>();
  const elsewhere = new Set<DefinitionCall>();
  let problem = source.unreadable ? unreadable(file) : undefined;
  for (const node of source.calls) {
    const found = evaluateAt(ctx, node, module);
    if (!Array.isArray(found)) problem ??= found;
    else for (const call of found) (call.span.file === file ? calls : elsewhere).add(call);
  }
  const passesOn = listPassedOn(ctx, module);
  return {
    file,
    calls: [...calls, ...elsewhere],
    ...listFiles(file, listReached(module)),
    ...(passesOn.length === 0 ? {} : { passesOn }),
    ...(problem === undefined ? {} : { problem }),
  };
}

/** What a module's values rest on may have changed, and they not. */
function withFilesOfNow(ctx: Context, known: FileEvaluation, module: Module): FileEvaluation {
  if (ctx.relooked.size === 0) return known;
  const reached = listReached(module);
  if (![...reached].some((each) => ctx.relooked.has(each))) return known;
  const files = listFiles(module.file, reached);
  const isSame = LISTS.every((list) => sameFiles(files[list], known[list]));
  return isSame ? known : { ...known, ...files };
}

const LISTS = ["dependencies", "wanted", "missing"] as const;

function listFiles(file: string, reached: ReadonlySet<Module>): Pick<FileEvaluation, "dependencies" | "wanted" | "missing"> {
  const reads = new Map<string, string | null | undefined>();
  for (const each of reached) {
    for (const [name, text] of each.reads) reads.set(name, text);
    for (const [name, text] of each.importers.reads) reads.set(name, text);
  }
  const dependencies = new Set([file]);
  const wanted: string[] = [];
  const missing: string[] = [];
  for (const [name, text] of reads) {
    if (typeof text === "string") dependencies.add(name);
    else (text === null ? missing : wanted).push(name);
  }
  return { dependencies: [...dependencies], wanted, missing };
}

/** A call to a definition, once for every run that reaches it; nothing for any other call. */
function evaluateAt(ctx: Context, node: ts.CallExpression, module: Module): DefinitionCall[] | Unknown {
  try {
    const target = findTarget(ctx, node.expression, module);
    if (target?.kind !== "definition") return listCallsElsewhere(ctx, node, target, module);
    const frames: readonly Frame[] = listActivations(ctx, node, module);
    return frames.flatMap((frame) => evaluateDefinitionCall(ctx, target.definition, node, frame).call ?? []);
  } catch {
    // Every walk is bounded, so this should not happen; a host with a smaller stack must not go down by it.
    ctx.depth = 0;
    return tooDeep(node, module);
  }
}

function open(ctx: Context, kinds: Kinds, sources: Map<string, readonly Source[]>, file: string, text: string): Module {
  dropStale(ctx, file);
  const present = ctx.modules.get(file);
  if (present !== undefined) return present;
  const kept = sources.get(file) ?? [];
  const source = kept.find((each) => each.text === text) ?? parseSource(ctx.ts, kinds, file, text);
  sources.set(file, [source, ...kept.filter((each) => each !== source)].slice(0, KEPT_TEXTS));
  const module: { -readonly [Key in keyof Module]: Module[Key] } = {
    file,
    source,
    root: undefined as unknown as Frame,
    reads: new Map(),
    imports: new Set(),
    users: new Set(),
    loads: new Map(),
    imported: new Map(),
    exports: new Map(),
    importers: { lists: new Map(), reads: new Map(), guards: [] },
    harmlessTo: new WeakMap(),
    runs: new Map(),
  };
  module.root = {
    module,
    node: source.root,
    parent: undefined,
    bound: new Map(),
    memo: new Map(),
    children: new Map(),
    height: 0,
  };
  noteRead(ctx, module, file, text);
  ctx.modules.set(file, module);
  ctx.checked.add(module);
  return module;
}

function withoutText(file: string, text: null | undefined): FileEvaluation {
  const lists = text === null ? { wanted: [], missing: [file] } : { wanted: [file], missing: [] };
  return { file, calls: [], dependencies: [file], ...lists };
}

function unreadable(file: string): Unknown {
  const origin = { kind: "operation", span: { file, start: 0, end: 0 }, from: [] } as const;
  return unknown("too-deep", "The file is nested too deeply to be read.", "split the deepest part off", origin);
}
