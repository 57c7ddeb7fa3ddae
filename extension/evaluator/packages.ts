/**
 * From a specifier that is not relative to a file: path aliases, a package's own `imports`, and packages of the same workspace,
 * through TypeScript's resolver.
 *
 * Installed packages are not followed: what a robot's constants rest on is written by its team. So nothing below node_modules is
 * asked for, but where a workspace links its own packages there.
 */
import type ts from "typescript";
import type { Context } from "./context.js";
import { listFolders, type Read, readProjectOptions } from "./projectConfig.js";

export type Resolution = { readonly file: string } | "not-loaded" | "installed" | "not-found";

/** New files that one specifier may ask for in one round. */
const MOST_QUESTIONS = 8;

export function resolvePackage(ctx: Context, from: string, specifier: string, read: Read): Resolution {
  const { ts } = ctx;
  let questions = 0;
  const ask: Read = (file) => {
    if (ctx.snapshot.read(file) !== undefined) return read(file);
    // What is beyond the limit is asked for in the next round, if it still matters then.
    if (questions++ < MOST_QUESTIONS) read(file);
    return undefined;
  };
  if (/^[a-z]+:/.test(specifier)) return "installed";
  const optionSets = readProjectOptions(ts, from, ask);
  if (optionSets === undefined) return "not-loaded";
  const isOwnName = specifier.startsWith("#");
  for (const options of optionSets.length === 0 && isOwnName ? [{}] : optionSets) {
    if (!isOwnName && !isAlias(specifier, options)) continue;
    const resolution = resolve(ctx, from, specifier, options, ask, undefined);
    if (resolution !== "not-found") return resolution;
  }
  const linked = findLinkedPackage(from, specifier, ask);
  if (linked === "not-loaded" || linked === undefined) return linked ?? (isOwnName ? "not-found" : "installed");
  return resolve(ctx, from, specifier, optionSets[0] ?? {}, ask, linked);
}

function resolve(
  { ts, snapshot }: Context,
  from: string,
  specifier: string,
  options: ts.CompilerOptions,
  ask: Read,
  linked: LinkedPackage | undefined,
): Resolution {
  let isOpen = false;
  const isOffLimits = (name: string) => /\/node_modules(\/|$)/.test(name) && !(linked && isBelow(linked, name));
  const read = (name: string): string | undefined => {
    if (isOffLimits(name)) return undefined;
    const text = ask(name);
    isOpen ||= text === undefined;
    return text ?? undefined;
  };
  const host: ts.ModuleResolutionHost = {
    fileExists: (name) => read(name) !== undefined,
    readFile: read,
    directoryExists: (name) => !isOffLimits(name),
    getCurrentDirectory: () => "/",
    useCaseSensitiveFileNames: true,
  };
  const { resolvedModule } = ts.resolveModuleName(specifier, from, { ...options, ...settingsFor(ts) }, host);
  if (isOpen) return "not-loaded";
  if (resolvedModule === undefined) return "not-found";
  const { resolvedFileName: file, extension } = resolvedModule;
  if (extension.startsWith(".d.") || (linked !== undefined && !linked.isOwn && /^\.[cm]?jsx?$/.test(extension)))
    return "installed";
  return { file: snapshot.canonical?.(file) ?? file };
}

/** Whatever the project compiles to, its sources are found in the same way. */
function settingsFor(ts: Context["ts"]): ts.CompilerOptions {
  return {
    module: ts.ModuleKind.ESNext,
    moduleResolution: ts.ModuleResolutionKind.Bundler,
    allowJs: true,
    resolveJsonModule: true,
    allowImportingTsExtensions: true,
  };
}

function isAlias(specifier: string, { paths, baseUrl }: ts.CompilerOptions): boolean {
  if (baseUrl !== undefined) return true;
  return Object.keys(paths ?? {}).some((pattern) => {
    const [before = "", after] = pattern.split("*");
    return after === undefined ? specifier === pattern : specifier.startsWith(before) && specifier.endsWith(after);
  });
}

interface LinkedPackage {
  readonly folder: string;
  readonly parent: string;
  /** Marked private, so nobody has published it: its plain JavaScript is source, too. */
  readonly isOwn: boolean;
}

/** Where a workspace links one of its own packages; `undefined` when the file is in no workspace, or the package isn't linked. */
function findLinkedPackage(from: string, specifier: string, read: Read): LinkedPackage | "not-loaded" | undefined {
  const [first = "", second = ""] = specifier.split("/");
  const name = first.startsWith("@") ? `${first}/${second}` : first;
  const folders = listFolders(from);
  const owners: string[] = [];
  let isWorkspace = false;
  for (const folder of folders) {
    const text = read(`${folder}/package.json`);
    if (text === undefined) return "not-loaded";
    if (text === null) continue;
    owners.push(folder);
    const listsPackages = "workspaces" in parse(text);
    const pnpm = listsPackages ? null : read(`${folder}/pnpm-workspace.yaml`);
    if (pnpm === undefined) return "not-loaded";
    isWorkspace = listsPackages || pnpm !== null;
    if (isWorkspace) break;
  }
  if (!isWorkspace) return undefined;
  for (const parent of owners) {
    const folder = `${parent}/node_modules/${name}`;
    const text = read(`${folder}/package.json`);
    if (text === undefined) return "not-loaded";
    if (text !== null) return { folder, parent: `${parent}/node_modules`, isOwn: Reflect.get(parse(text), "private") === true };
  }
  return undefined;
}

function isBelow({ folder, parent }: LinkedPackage, name: string): boolean {
  if (name === folder || name === parent || folder.startsWith(`${name}/`)) return true;
  return name.startsWith(`${folder}/`) && !name.slice(folder.length).includes("/node_modules");
}

function parse(text: string): object {
  try {
    const data: unknown = JSON.parse(text);
    return typeof data === "object" && data !== null ? data : {};
  } catch {
    return {};
  }
}
