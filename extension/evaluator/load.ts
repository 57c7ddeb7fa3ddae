/**
 * From a specifier to the module that it names, through the snapshot.
 *
 * What the snapshot hasn't loaded is read again in the next run; until then the names from there are unknown.
 */
import type { Context, Loaded, Module } from "./context.js";
import { noteImport, noteRead } from "./dependencies.js";
import { resolvePackage } from "./packages.js";
import { isRelative, listCandidates } from "./specifier.js";
import { quoteText, unknown } from "./unknown.js";
import type { Span, UnknownReason } from "./value.js";

export function loadSpecifier(ctx: Context, from: Module, specifier: string, span: Span): Loaded {
  const kept = from.loads.get(specifier);
  if (kept !== undefined) return kept;
  const loaded = find(ctx, from, specifier, span);
  from.loads.set(specifier, loaded);
  return loaded;
}

function find(ctx: Context, from: Module, specifier: string, span: Span): Loaded {
  if (specifier === ctx.specifier) return { kind: "library" };
  if (!isRelative(specifier)) return findPackage(ctx, from, specifier, span);
  const candidates = listCandidates(from.file, specifier);
  const first = candidates.next().value;
  if (first === undefined) return fail("unresolved-import", `${quoteText(specifier)} leads out of the file system.`, span);
  // The likeliest file alone first: asking for all at once would make a host look for a dozen files that nobody has.
  const found = ask(ctx, from, [first]);
  const answer = found === null ? ask(ctx, from, [...candidates]) : found;
  if (answer === undefined) return fail("unresolved-import", `${quoteText(specifier)} is not loaded yet.`, span);
  if (answer === null) return fail("unresolved-import", `${quoteText(specifier)} does not lead to a file.`, span);
  noteImport(from, answer);
  return { kind: "module", module: answer };
}

function findPackage(ctx: Context, from: Module, specifier: string, span: Span): Loaded {
  const read = (file: string) => {
    const text = ctx.snapshot.read(file);
    noteRead(ctx, from, file, text);
    return text;
  };
  const resolution = resolvePackage(ctx, from.file, specifier, read);
  const quoted = quoteText(specifier);
  if (resolution === "installed") return fail("unresolved-import", `${quoted} is a package, whose code is not read.`, span);
  if (resolution === "not-loaded") return fail("unresolved-import", `${quoted} is not loaded yet.`, span);
  const text = resolution === "not-found" ? null : read(resolution.file);
  if (resolution === "not-found" || text === null) return fail("unresolved-import", `${quoted} does not lead to a file.`, span);
  if (text === undefined) return fail("unresolved-import", `${quoted} is not loaded yet.`, span);
  const module = ctx.open(resolution.file, text);
  noteImport(from, module);
  return { kind: "module", module };
}

/** The first of the files that is there; `undefined` while one before it, or all, are not loaded. */
function ask(ctx: Context, from: Module, files: readonly string[]): Module | null | undefined {
  let open: readonly string[] = [];
  for (const [index, file] of files.entries()) {
    const text = ctx.snapshot.read(file);
    noteRead(ctx, from, file, text);
    if (text === undefined) {
      open = files.slice(index + 1);
      break;
    }
    if (text !== null) return ctx.open(file, text);
  }
  if (open.length === 0 && files.every((file) => from.reads.get(file) === null)) return null;
  // The others are wanted as well, so that one more round answers everything.
  for (const file of open) noteRead(ctx, from, file, ctx.snapshot.read(file));
  return undefined;
}

function fail(code: UnknownReason["code"], message: string, span: Span): Loaded {
  return { kind: "failed", unknown: unknown(code, message, "", { kind: "import", span, from: [] }) };
}
