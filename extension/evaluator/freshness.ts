/**
 * Which of the modules that are kept are still true for a snapshot.
 *
 * A module rests on texts, on other modules, and on nobody changing the objects that it exports; it goes when one of these is no
 * longer so. Each module is looked at once a run.
 */
import type { Context, Module } from "./context.js";
import { forgetImporters, release } from "./dependencies.js";
import { findChange } from "./mutation.js";
import { listReached } from "./reached.js";

/** Drops the module of a file, and those below that have gone stale, with everything that rests on them. */
export function dropStale(ctx: Context, file: string): void {
  const start = ctx.modules.get(file);
  if (start === undefined || ctx.checked.has(start)) return;
  const reached = listReached(start);
  const unchecked = [...reached].filter((module) => !ctx.checked.has(module));
  drop(
    ctx,
    unchecked.filter((module) => !isCurrent(ctx, module)),
    reached,
  );
  for (const module of unchecked) if (ctx.modules.get(module.file) === module) ctx.checked.add(module);
  // Only now may other files be opened, which may lead back here.
  const changed = unchecked.filter((module) => ctx.modules.get(module.file) === module && !isGuarded(ctx, module));
  drop(ctx, changed, reached);
}

/** Forgets which modules are true, but for those that rest on none of the changed files; `undefined`: any file may have changed. */
export function uncheckChanged(ctx: Context, changed: ReadonlySet<string> | undefined): void {
  if (changed === undefined) {
    ctx.checked.clear();
    return;
  }
  const unchecked = new Set<Module>();
  for (const file of changed)
    for (const module of ctx.readers.get(file) ?? []) if (ctx.checked.delete(module)) unchecked.add(module);
  uncheckUsers(ctx, unchecked);
}

/** Drops modules, and those of `reached` that rest on them. */
function drop(ctx: Context, stale: readonly Module[], reached: ReadonlySet<Module>): void {
  const dropped = new Set(stale);
  for (const module of dropped) {
    ctx.checked.delete(module);
    if (ctx.modules.get(module.file) === module) ctx.modules.delete(module.file);
    for (const user of module.users) if (reached.has(user)) dropped.add(user);
  }
  for (const module of dropped) release(ctx, module);
  uncheckUsers(ctx, dropped);
}

/** Files outside of what was looked at may rest on what was dropped, and must be looked at again. */
function uncheckUsers(ctx: Context, gone: Set<Module>): void {
  for (const module of gone) for (const user of module.users) if (ctx.checked.delete(user)) gone.add(user);
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
  forgetImporters(ctx, module);
  ctx.relooked.add(module);
  return guards.every(({ binding, data, isChanged }) => (findChange(ctx, module, binding, data) !== undefined) === isChanged);
}

export function sameFiles(a: readonly string[] | undefined, b: readonly string[] | undefined): boolean {
  if (a === b) return true;
  return a !== undefined && b !== undefined && a.length === b.length && a.every((file, index) => file === b[index]);
}
