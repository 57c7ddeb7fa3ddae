/**
 * Follows names across files: what an import, an export or a plain reference stands for, without evaluating any of it.
 *
 * A name that leads nowhere is a target of its own, with the hop that failed as its cause. Loading is lazy: a file is opened
 * when a name of it is needed.
 */
import type ts from "typescript";
import { requiredSpecifier } from "./commonjs.js";
import type { Context, Loaded, Module, Target } from "./context.js";
import { exportsOf } from "./exports.js";
import { innermost } from "./outer.js";
import { resolveName } from "./source.js";
import { quoteText, spanOf, suggest, unknown } from "./unknown.js";
import type { Span, Unknown } from "./value.js";
import { isReassigned } from "./writes.js";

type ImportNode = ts.ImportClause | ts.NamespaceImport | ts.ImportSpecifier | ts.ImportEqualsDeclaration;

/** What an import stands for. */
export function resolveImport(ctx: Context, module: Module, node: ts.Node): Target {
  const kept = module.imported.get(node);
  if (kept !== undefined) return kept;
  const target = findImported(ctx, module, node);
  module.imported.set(node, target);
  return target;
}

function findImported(ctx: Context, module: Module, node: ts.Node): Target {
  const { ts } = ctx;
  const declaration = node as ImportNode;
  const span = spanOf(declaration.name ?? declaration, module);
  if (ts.isImportEqualsDeclaration(declaration)) {
    const { moduleReference } = declaration;
    const external = ts.isExternalModuleReference(moduleReference) ? moduleReference.expression : undefined;
    if (external === undefined || !ts.isStringLiteral(external))
      return fail(span, "unsupported", "An import alias isn't followed.");
    return wholeOf(ctx, ctx.load(module, external.text, spanOf(external, module)), span);
  }
  let top: ts.Node = declaration;
  while (!ts.isImportDeclaration(top)) top = top.parent;
  if (!ts.isStringLiteral(top.moduleSpecifier)) return fail(span, "missing", "The import names no module yet.");
  const loaded = ctx.load(module, top.moduleSpecifier.text, spanOf(top.moduleSpecifier, module));
  if (ts.isNamespaceImport(declaration)) return loaded;
  if (ts.isImportClause(declaration)) return exportOf(ctx, loaded, "default", span);
  return exportOf(ctx, loaded, (declaration.propertyName ?? declaration.name).text, span);
}

/** What an export of a loaded module stands for; `span` is where it is asked for. */
export function exportOf(ctx: Context, loaded: Loaded, name: string, span: Span): Target {
  if (loaded.kind === "failed") return loaded;
  if (loaded.kind === "library") {
    // A default import of the declarations is their namespace: some compilers write it so.
    if (name === "default") return loaded;
    const definition = ctx.definitions.get(name);
    if (definition !== undefined) return { kind: "definition", definition };
    const hint = suggest(name, ctx.definitions.keys());
    return fail(span, "no-such-export", `${quoteText(ctx.specifier)} exports no ${quoteText(name)}${hint}`);
  }
  const { module } = loaded;
  const found = findExport(ctx, module, name, new Set());
  if (found?.kind === "failed") return { kind: "failed", unknown: hop(name, module, span, found.unknown) };
  if (found !== undefined) return found;
  return missingExport(ctx, module, name, span);
}

function missingExport(ctx: Context, module: Module, name: string, span: Span): Target {
  const hint = suggest(name, exportsOf(ctx.ts, module.source).named.keys());
  return fail(span, "no-such-export", `${quoteText(baseName(module.file))} exports no ${quoteText(name)}${hint}`);
}

/** What an expression made of names and dots stands for; `undefined` when only evaluating it could tell. */
export function findTarget(ctx: Context, node: ts.Expression, module: Module, hops = 0): Target | undefined {
  const { ts } = ctx;
  // Aliases of aliases may run in a circle.
  if (hops > 40) return undefined;
  const bare = innermost(ts, node);
  if (ts.isIdentifier(bare)) {
    const binding = resolveName(ts, bare, module.source);
    return binding === undefined ? undefined : follow(ctx, { kind: "binding", module, binding }, hops + 1);
  }
  if (ts.isPropertyAccessExpression(bare)) {
    const base = findTarget(ctx, bare.expression, module, hops + 1);
    return base === undefined ? undefined : memberOf(ctx, base, bare.name.text, bare, module, hops + 1);
  }
  if (!ts.isCallExpression(bare)) return undefined;
  const required = requiredSpecifier(ctx.ts, bare, module.source);
  return required === undefined
    ? undefined
    : wholeOf(ctx, ctx.load(module, required.text, spanOf(required, module)), spanOf(bare, module));
}

/** Follows imports and constants that merely rename something. */
export function follow(ctx: Context, target: Target, hops = 0): Target {
  const { ts } = ctx;
  if (hops > 40) return target;
  if (target.kind === "expression") return findTarget(ctx, target.node, target.module, hops + 1) ?? target;
  if (target.kind !== "binding") return target;
  const { binding, module } = target;
  const declaration = binding.declarations[0];
  if (declaration === undefined) return target;
  if (binding.kind === "import") return follow(ctx, resolveImport(ctx, module, declaration), hops + 1);
  const element = ts.isBindingElement(declaration) ? declaration : undefined;
  const root = element?.parent.parent ?? declaration;
  if (!ts.isVariableDeclaration(root) || root.initializer === undefined) return target;
  if (binding.kind !== "const" && isReassigned(ts, binding, module.source)) return target;
  if (element === undefined) return renamed(findTarget(ctx, root.initializer, module, hops + 1)) ?? target;
  const name = element.propertyName ?? element.name;
  if (!ts.isObjectBindingPattern(element.parent) || !ts.isIdentifier(name)) return target;
  const base = findTarget(ctx, root.initializer, module, hops + 1);
  return renamed(base === undefined ? base : memberOf(ctx, base, name.text, element, module, hops + 1)) ?? target;
}

/** A constant that holds a value is that value's own name; one that holds a module or a definition only renames it. */
function renamed(target: Target | undefined): Target | undefined {
  const through = target?.kind === "definition" || target?.kind === "library" || target?.kind === "module";
  return through ? target : undefined;
}

/** The node in `module` is where it is asked for. */
function memberOf(ctx: Context, base: Target, name: string, node: ts.Node, module: Module, hops: number): Target | undefined {
  if (base.kind === "failed") return base;
  if (base.kind !== "library" && base.kind !== "module") return undefined;
  return follow(ctx, exportOf(ctx, base, name, spanOf(node, module)), hops);
}

function findExport(ctx: Context, module: Module, name: string, visited: Set<Module>): Target | undefined {
  const memo = module.exports.get(name);
  if (memo !== undefined) return memo;
  if (visited.has(module)) return undefined;
  visited.add(module);
  const target = lookUpExport(ctx, module, name, visited);
  if (target !== undefined) module.exports.set(name, target);
  return target;
}

function lookUpExport(ctx: Context, module: Module, name: string, visited: Set<Module>): Target | undefined {
  const { ts } = ctx;
  if (module.source.unreadable) {
    const span = { file: module.file, start: 0, end: 0 };
    return fail(span, "too-deep", `${quoteText(baseName(module.file))} is nested too deeply to be read.`);
  }
  if (isJson(module)) {
    const [statement] = module.source.root.statements;
    const node = statement !== undefined && ts.isExpressionStatement(statement) ? statement.expression : undefined;
    if (name === "default" && node !== undefined) return { kind: "expression", module, node };
    // Bundlers give the properties of a JSON file as names, too.
    const properties = node !== undefined && ts.isObjectLiteralExpression(node) ? node.properties : [];
    const property = properties.find(
      (each) => each.name !== undefined && ts.isStringLiteral(each.name) && each.name.text === name,
    );
    return property !== undefined && ts.isPropertyAssignment(property)
      ? { kind: "expression", module, node: property.initializer }
      : undefined;
  }
  const { named, stars } = exportsOf(ts, module.source);
  const own = named.get(name);
  if (own?.kind === "binding") return { kind: "binding", module, binding: own.binding };
  if (own?.kind === "expression") return { kind: "expression", module, node: own.node };
  if (own?.kind === "unclear") {
    const message = `${quoteText(baseName(module.file))} gives ${quoteText(name)} more than one value.`;
    return fail(spanOf(own.node, module), "unsupported", message);
  }
  if (own?.kind === "passed-on") {
    const span = spanOf(own.node, module);
    const loaded = ctx.load(module, own.node.text, span);
    if (own.name === undefined) return loaded;
    if (loaded.kind !== "module") return exportOf(ctx, loaded, own.name, span);
    return findExport(ctx, loaded.module, own.name, new Set(visited)) ?? missingExport(ctx, loaded.module, own.name, span);
  }
  // A default import of a file that says `module.exports = …` gives that.
  if (name === "default") return named.has("export=") ? lookUpExport(ctx, module, "export=", visited) : undefined;
  return findInStars(ctx, module, name, stars, visited);
}

function findInStars(
  ctx: Context,
  module: Module,
  name: string,
  stars: readonly ts.StringLiteral[],
  visited: Set<Module>,
): Target | undefined {
  let found: Target | undefined;
  let failed: Target | undefined;
  for (const specifier of stars) {
    const span = spanOf(specifier, module);
    const loaded = ctx.load(module, specifier.text, span);
    const target = starOf(ctx, loaded, name, span, visited);
    if (target?.kind === "failed") failed ??= target;
    else if (target !== undefined && found !== undefined && !sameTarget(follow(ctx, found), follow(ctx, target))) {
      const message = `${quoteText(baseName(module.file))} passes on ${quoteText(name)} from two files.`;
      return fail(span, "no-such-export", message);
    } else found ??= target;
  }
  // A file that can't be read might export the name too, but then the program wouldn't compile.
  return found ?? failed;
}

function starOf(ctx: Context, loaded: Loaded, name: string, span: Span, visited: Set<Module>): Target | undefined {
  if (loaded.kind === "failed") return loaded;
  if (loaded.kind === "module") return findExport(ctx, loaded.module, name, visited);
  return ctx.definitions.has(name) ? exportOf(ctx, loaded, name, span) : undefined;
}

function wholeOf(ctx: Context, loaded: Loaded, span: Span): Target {
  if (loaded.kind !== "module") return loaded;
  const whole = findExport(ctx, loaded.module, "export=", new Set());
  if (whole !== undefined) return whole;
  return isJson(loaded.module) ? exportOf(ctx, loaded, "default", span) : loaded;
}

function sameTarget(a: Target, b: Target): boolean {
  if (a.kind === "binding") return b.kind === "binding" && a.binding === b.binding;
  if (a.kind === "module") return b.kind === "module" && a.module === b.module;
  if (a.kind === "definition") return b.kind === "definition" && a.definition === b.definition;
  return a.kind === "library" ? b.kind === "library" : a.kind === "expression" && b.kind === "expression" && a.node === b.node;
}

function hop(name: string, module: Module, span: Span, cause: Unknown): Unknown {
  const message = `${quoteText(name)} comes through ${quoteText(baseName(module.file))}, which cannot give it.`;
  return unknown("depends", message, cause.reason.advice, { kind: "import", span, from: [] }, cause);
}

function fail(span: Span, code: "unsupported" | "missing" | "no-such-export" | "too-deep", message: string): Target {
  return { kind: "failed", unknown: unknown(code, message, "", { kind: "import", span, from: [] }) };
}

function isJson({ file }: Module): boolean {
  return file.endsWith(".json");
}

function baseName(file: string): string {
  return file.slice(file.lastIndexOf("/") + 1);
}
