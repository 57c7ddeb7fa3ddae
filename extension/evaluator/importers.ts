/**
 * Follows an exported object into the files that import it: they may write to it as well.
 *
 * Only where the host knows who imports what; a frozen object needs no such search.
 */
import type ts from "typescript";
import { listAliases } from "./aliases.js";
import { requiredSpecifier } from "./commonjs.js";
import type { Context, Module, Target } from "./context.js";
import { noteImporterRead } from "./dependencies.js";
import { type Export, exportsOf } from "./exports.js";
import { type Change, type Flow, flowInto, isFrozen, narrow, type Search, wrap } from "./flow.js";
import { mayLeadTo } from "./importIndex.js";
import { innermost } from "./outer.js";
import { listReached } from "./reached.js";
import { resolveName } from "./source.js";

type Exported = Extract<Target, { kind: "binding" | "expression" }>;
/** A file whose exports hold the object, with the words that lead to it besides its own names. */
interface Passer {
  readonly module: Module;
  readonly aliases: readonly string[];
}

/** Names from a file's exports inwards to the object; `export=` is all that a file exports at once. */
type Path = readonly string[];

export function followImporters(search: Search, target: Exported, flow: Flow): Change | undefined {
  const { ctx, home } = search;
  const { importersOf } = ctx.snapshot;
  if (importersOf === undefined || flow.objects.every(isFrozen)) return undefined;
  const own = pathsOf(ctx, target);
  const paths = new Map<Module, readonly Path[]>(own.length > 0 ? [[target.module, own]] : []);
  const read = (file: string) => {
    const text = ctx.snapshot.read(file);
    noteImporterRead(ctx, home, file, text);
    return text;
  };
  for (const [module, passed] of paths) {
    const aliases = listAliases(ctx.ts, module.file, read);
    if (aliases === undefined) return notRead(target);
    const passer: Passer = { module, aliases };
    const files = importersOf.call(ctx.snapshot, module.file, aliases);
    home.importers.lists.set(module.file, { aliases, files });
    if (files === undefined) return notRead(target);
    for (const file of files) {
      const text = read(file);
      if (text === undefined) return notRead(target);
      if (text === null) continue;
      const importer = ctx.open(file, text);
      if (!isKnownHarmless(importer, passer, target, flow)) {
        const further = passedOn(ctx, importer, passer, passed);
        if (further.length > 0 && !paths.has(importer)) paths.set(importer, further);
        const change = followInto(search, importer, passer, target, passed, flow, further.length > 0);
        if (change !== undefined) return change;
      }
      // It may hand the object to a function of yet another file.
      for (const { reads } of listReached(importer)) for (const [name, known] of reads) noteImporterRead(ctx, home, name, known);
    }
  }
  return undefined;
}

/** The uses of the object in one file that imports it from `passer`; what leads out of the file is left pending. */
function followInto(
  outer: Search,
  importer: Module,
  passer: Passer,
  target: Exported,
  paths: readonly Path[],
  flow: Flow,
  isPassedOn: boolean,
): Change | undefined {
  const search: Search = { ...outer, pending: [] };
  const { lists } = outer.home.importers;
  const before = lists.size;
  listUses(search, importer, passer, paths, flow);
  const change = search.exploreIn(search.pending, importer);
  if (change !== undefined) return change;
  const [data] = flow.objects;
  const endsHere = search.pending.length === 0 && !isPassedOn && lists.size === before;
  if (endsHere && data !== undefined && isWhole(flow)) {
    const targets = importer.harmlessTo.get(data) ?? new Map<object, Set<Module>>();
    importer.harmlessTo.set(data, targets.set(keyOf(target), (targets.get(keyOf(target)) ?? new Set()).add(passer.module)));
  }
  outer.pending.push(...search.pending);
  return undefined;
}

/** Most edits leave most files as they are: what such a file does with the object is known from the last time. */
function isKnownHarmless(importer: Module, passer: Passer, target: Exported, flow: Flow): boolean {
  const [data] = flow.objects;
  return data !== undefined && isWhole(flow) && importer.harmlessTo.get(data)?.get(keyOf(target))?.has(passer.module) === true;
}

function keyOf(target: Exported): object {
  return target.kind === "binding" ? target.binding : target.node;
}

function isWhole({ objects, wraps }: Flow): boolean {
  return objects.length === 1 && wraps.length === 0;
}

function listUses(search: Search, importer: Module, passer: Passer, paths: readonly Path[], flow: Flow): void {
  const { ctx } = search;
  const { ts } = ctx;
  const { source } = importer;
  for (const statement of source.root.statements) {
    const specifier = specifierOf(ts, statement);
    if (specifier === undefined || !leadsTo(ctx, importer, specifier, passer)) continue;
    for (const { local, name } of importedNames(ts, statement)) {
      const binding = source.scopes.get(source.root)?.names?.get(local);
      if (binding === undefined) continue;
      for (const path of paths) flowInto(search, importer, binding, flowAs(flow, path, name));
    }
  }
  for (const call of source.calls) {
    const [argument] = call.arguments;
    const isDynamic = call.expression.kind === ts.SyntaxKind.ImportKeyword;
    const dynamic = isDynamic && argument !== undefined && ts.isStringLiteralLike(argument) ? argument : undefined;
    const specifier = dynamic ?? requiredSpecifier(ts, call, source);
    if (specifier === undefined || !leadsTo(ctx, importer, specifier, passer)) continue;
    for (const path of paths) flowInto(search, importer, call, flowAs(flow, path, undefined));
  }
}

/** What flows into an import of one name, or of the whole where `name` is undefined. */
function flowAs(flow: Flow, path: Path, name: string | undefined): Flow {
  const [first, ...rest] = path;
  const isAll = first === "export=";
  const whole = (isAll ? rest : path).toReversed().reduce(wrap, flow);
  return name === undefined || (isAll && name === "default") ? whole : narrow(whole, name);
}

/** Where in its own file's exports the object is. */
function pathsOf(ctx: Context, target: Exported): Path[] {
  const { module } = target;
  if (module.file.endsWith(".json")) {
    const inside = target.kind === "expression" ? pathInJson(ctx.ts, target.node) : [];
    return [
      ["export=", ...inside],
      ["default", ...inside],
    ];
  }
  const fits = (entry: Export): boolean =>
    target.kind === "binding"
      ? entry.kind === "binding" && entry.binding === target.binding
      : entry.kind === "expression" && innermost(ctx.ts, entry.node) === innermost(ctx.ts, target.node);
  return [...exportsOf(ctx.ts, module.source).named].flatMap(([name, entry]) => (fits(entry) ? [[name]] : []));
}

function pathInJson(ts: Context["ts"], node: ts.Node): string[] {
  const path: string[] = [];
  for (let inner = node; inner.parent !== undefined; inner = inner.parent) {
    if (ts.isPropertyAssignment(inner) && ts.isStringLiteral(inner.name)) path.unshift(inner.name.text);
  }
  return path;
}

/** The paths under which a file passes on what it imports from another. */
function passedOn(ctx: Context, importer: Module, passer: Passer, paths: readonly Path[]): Path[] {
  const { ts } = ctx;
  const { named, stars } = exportsOf(ts, importer.source);
  const under = (exported: string, name: string | undefined): Path[] =>
    paths.flatMap((path) => {
      if (name === undefined) return [[exported, ...path]];
      if (path[0] === "export=") return [[exported, ...(name === "default" ? path.slice(1) : path.slice(2))]];
      return path[0] === name ? [[exported, ...path.slice(1)]] : [];
    });
  const found = [...named].flatMap(([exported, entry]) => {
    if (entry.kind === "passed-on") return leadsTo(ctx, importer, entry.node, passer) ? under(exported, entry.name) : [];
    const imported = importBehind(ctx, entry, importer);
    return imported !== undefined && leadsTo(ctx, importer, imported.specifier, passer) ? under(exported, imported.name) : [];
  });
  const byStar = stars.some((star) => leadsTo(ctx, importer, star, passer)) ? paths.filter(([first]) => first !== "default") : [];
  return [...found, ...byStar];
}

/** The import that an exported name stands for: `import { A } from …; export { A };`. */
export function importBehind(
  ctx: Context,
  entry: Export,
  module: Module,
): { specifier: ts.StringLiteralLike; name: string | undefined } | undefined {
  const { ts } = ctx;
  const isName = entry.kind === "expression" && ts.isIdentifier(entry.node);
  const binding =
    entry.kind === "binding" ? entry.binding : isName ? resolveName(ts, entry.node as ts.Identifier, module.source) : undefined;
  if (binding?.kind !== "import") return undefined;
  for (const statement of module.source.root.statements) {
    const specifier = specifierOf(ts, statement);
    const imported = specifier && importedNames(ts, statement).find(({ local }) => local === binding.name);
    if (specifier !== undefined && imported !== undefined) return { specifier, name: imported.name };
  }
  return undefined;
}

function leadsTo(ctx: Context, from: Module, specifier: ts.StringLiteralLike, passer: Passer): boolean {
  if (!mayLeadTo(specifier.text, passer.module.file, passer.aliases)) return false;
  const span = { file: from.file, start: from.source.startOf(specifier), end: specifier.end };
  const loaded = ctx.load(from, specifier.text, span);
  return loaded.kind === "module" && loaded.module === passer.module;
}

function specifierOf(ts: Context["ts"], statement: ts.Statement): ts.StringLiteralLike | undefined {
  const node = ts.isImportDeclaration(statement)
    ? statement.moduleSpecifier
    : ts.isImportEqualsDeclaration(statement) && ts.isExternalModuleReference(statement.moduleReference)
      ? statement.moduleReference.expression
      : undefined;
  return node !== undefined && ts.isStringLiteralLike(node) ? node : undefined;
}

/** Local names with the exported name that each stands for; undefined for a whole module. */
function importedNames(
  ts: Context["ts"],
  statement: ts.Statement,
): { readonly local: string; readonly name: string | undefined }[] {
  if (ts.isImportEqualsDeclaration(statement)) return [{ local: statement.name.text, name: undefined }];
  const clause = ts.isImportDeclaration(statement) ? statement.importClause : undefined;
  const bindings = clause?.namedBindings;
  const names =
    bindings === undefined
      ? []
      : ts.isNamespaceImport(bindings)
        ? [{ local: bindings.name.text, name: undefined }]
        : bindings.elements.map(({ name, propertyName }) => ({ local: name.text, name: (propertyName ?? name).text }));
  return clause?.name === undefined ? names : [{ local: clause.name.text, name: "default" }, ...names];
}

function notRead(target: Exported): Change {
  const node = target.kind === "binding" ? target.binding.names[0] : target.node;
  return {
    node: node ?? target.module.source.root,
    module: target.module,
    wording: "is exported, and not all files are read yet",
  };
}
