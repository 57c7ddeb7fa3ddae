/**
 * Which files' names a file exports as its own, so that whoever imports it may be using theirs.
 *
 * One step only: what those files pass on in turn is theirs to say.
 */
import type ts from "typescript";
import type { Context, Module } from "./context.js";
import { exportsOf } from "./exports.js";
import { importBehind } from "./importers.js";
import { spanOf } from "./unknown.js";

/** Files whose exports the module passes on; the specifier of the definitions where it passes on theirs. */
export function listPassedOn(ctx: Context, module: Module): string[] {
  if (module.source.unreadable) return [];
  const { named, stars } = exportsOf(ctx.ts, module.source);
  const specifiers = [...named.values()].flatMap((entry): ts.StringLiteralLike[] => {
    if (entry.kind === "passed-on") return [entry.node];
    const imported = importBehind(ctx, entry, module);
    return imported === undefined ? [] : [imported.specifier];
  });
  const loaded = [...specifiers, ...stars].map((specifier) => ctx.load(module, specifier.text, spanOf(specifier, module)));
  return [
    ...new Set(
      loaded.flatMap((each) => (each.kind === "module" ? [each.module.file] : each.kind === "library" ? [ctx.specifier] : [])),
    ),
  ];
}
