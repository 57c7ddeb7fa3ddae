/**
 * What modules rest on, noted both ways: from a module to the files that it read and the modules that it uses, and back, so that a change
 * finds what rests on it without asking every module.
 *
 * A module that is dropped is taken out of what it rested on, so that nothing holds on to it.
 */
import type { Context, Module } from "./context.js";

type Text = string | null | undefined;

/** The module's values rest on what the snapshot answered for a file. */
export function noteRead(ctx: Context, module: Module, file: string, text: Text): void {
  module.reads.set(file, text);
  noteReader(ctx, module, file);
}

/** Whether others leave the module's objects alone rests on it. */
export function noteImporterRead(ctx: Context, module: Module, file: string, text: Text): void {
  module.importers.reads.set(file, text);
  noteReader(ctx, module, file);
}

/** The module's values rest on those of another. */
export function noteImport(module: Module, used: Module): void {
  module.imports.add(used);
  used.users.add(module);
}

/** What was known of the files that import the module's objects is to be found anew. */
export function forgetImporters(ctx: Context, module: Module): void {
  const { lists, reads } = module.importers;
  for (const file of reads.keys()) if (!module.reads.has(file)) forgetReader(ctx, module, file);
  lists.clear();
  reads.clear();
}

/** A module that is dropped rests on nothing any more. */
export function release(ctx: Context, module: Module): void {
  for (const file of module.reads.keys()) forgetReader(ctx, module, file);
  for (const file of module.importers.reads.keys()) forgetReader(ctx, module, file);
  for (const used of module.imports) used.users.delete(module);
}

function noteReader({ readers }: Context, module: Module, file: string): void {
  const present = readers.get(file);
  if (present === undefined) readers.set(file, new Set([module]));
  else present.add(module);
}

function forgetReader({ readers }: Context, module: Module, file: string): void {
  const present = readers.get(file);
  present?.delete(module);
  if (present?.size === 0) readers.delete(file);
}
