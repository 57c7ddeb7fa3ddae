/**
 * Which of the modules that are kept are still true for a snapshot.
 *
 * A module rests on texts, on other modules, and on nobody changing the objects that it exports; it goes when one of these is no
 * longer so. Each module is looked at once a run.
 */
import type { Context, Module } from "./context.js";
import { findChange } from "./mutation.js";
import { listReached } from "./reached.js";

/** Drops the module of a file, and those below that have gone stale, with everything that rests on them. */
export function dropStale(ctx: Context, file: string): void {
  const start = ctx.modules.get(file);
  if (start === undefined || ctx.checked.has(start)) return;
  const reached = listReached(start);
  const users = new Map<Module, Module[]>();
  const stale: Module[] = [];
  for (const module of reached) {
    if (!ctx.checked.has(module) && !isCurrent(ctx, module)) stale.push(module);
    for (const used of module.imports) users.set(used, [...(users.get(used) ?? []), module]);
  }
  drop(ctx, stale, users);
  for (const module of reached) if (ctx.modules.get(module.file) === module) ctx.checked.add(module);
  // Only now may other files be opened, which may lead back here.
  const changed = [...reached].filter((module) => ctx.modules.get(module.file) === module && !isGuarded(ctx, module));
  for (const module of changed) ctx.checked.delete(module);
  drop(ctx, changed, users);
}

/** Forgets which modules are true, but for those that rest on none of the changed files; `undefined`: any file may have changed. */
export function uncheckChanged(ctx: Context, changed: ReadonlySet<string> | undefined): void {
  if (changed === undefined) {
    ctx.checked.clear();
    return;
  }
  const unchecked = new Set<Module>();
  for (const module of ctx.checked) if (restsOn(module, changed)) unchecked.add(module);
  for (const module of unchecked) ctx.checked.delete(module);
  if (unchecked.size > 0) uncheckUsers(ctx, unchecked);
}

function restsOn({ reads, importers }: Module, changed: ReadonlySet<string>): boolean {
  for (const file of changed) if (reads.has(file) || importers.reads.has(file)) return true;
  return false;
}

function drop(ctx: Context, stale: readonly Module[], users: ReadonlyMap<Module, readonly Module[]>): void {
  const pending = [...stale];
  const dropped = new Set<Module>();
  for (let module = pending.pop(); module !== undefined; module = pending.pop()) {
    if (dropped.has(module)) continue;
    dropped.add(module);
    ctx.checked.delete(module);
    if (ctx.modules.get(module.file) === module) ctx.modules.delete(module.file);
    pending.push(...(users.get(module) ?? []));
  }
  if (dropped.size > 0) uncheckUsers(ctx, dropped);
}

/** Files outside of what was looked at may rest on what was dropped, and must be looked at again. */
function uncheckUsers(ctx: Context, dropped: Set<Module>): void {
  for (const gone of dropped) {
    for (const module of ctx.checked) {
      if (!module.imports.has(gone)) continue;
      ctx.checked.delete(module);
      dropped.add(module);
    }
  }
}

function isCurrent(ctx: Context, module: Module): boolean {
  if (ctx.modules.get(module.file) !== module) return false;
  for (const [file, text] of module.reads) if (ctx.snapshot.read(file) !== text) return false;
  return true;
}

/** Whether the files that import the module's objects still leave them alone, or still don't. */
function isGuarded(ctx: Context, module: Module): boolean {
  const { lists, reads, guards } = module.importers;
  const sameLists = [...lists].every(([file, { aliases, files }]) => sameFiles(ctx.snapshot.importersOf?.(file, aliases), files));
  if (sameLists && [...reads].every(([file, text]) => ctx.snapshot.read(file) === text)) return true;
  // While files are missing, the evaluation must be made anew to ask for them.
  if ([...lists.values()].some(({ files }) => files === undefined) || [...reads.values()].includes(undefined)) return false;
  lists.clear();
  reads.clear();
  ctx.relooked.add(module);
  return guards.every(({ binding, data, isChanged }) => (findChange(ctx, module, binding, data) !== undefined) === isChanged);
}

function sameFiles(a: readonly string[] | undefined, b: readonly string[] | undefined): boolean {
  if (a === b) return true;
  return a !== undefined && b !== undefined && a.length === b.length && a.every((file, index) => file === b[index]);
}
