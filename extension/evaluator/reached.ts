/** What a module rests on, through all the modules that it imports. */
import type { Module } from "./context.js";

/** The module and everything that its values rest on. */
export function listReached(start: Module): Set<Module> {
  const reached = new Set([start]);
  for (const module of reached) for (const used of module.imports) reached.add(used);
  return reached;
}
