/**
 * Under which last words a file may be imported besides its own names: path aliases of its project, what its package calls itself and its
 * parts.
 *
 * Compares words, as the index of imports does, so it may give a word too many. Resolves nothing.
 */
import { lastWord, namesOf } from "./importIndex.js";
import { listFolders, type Read, readProjectOptions } from "./projectConfig.js";
import type { TypeScript } from "./typescript.js";

/** `undefined` while a file that decides is not loaded. */
export function listAliases(ts: TypeScript, file: string, read: Read): readonly string[] | undefined {
  // All are asked for at once, so that one more round answers everything.
  const asked = listFolders(file).map((folder) => [read(`${folder}/tsconfig.json`), read(`${folder}/package.json`)] as const);
  if (asked.flat().includes(undefined)) return undefined;
  const optionSets = readProjectOptions(ts, file, read);
  if (optionSets === undefined) return undefined;
  const names = namesOf(file);
  const nearest = asked.map(([, text]) => text).find((text) => typeof text === "string");
  const { name, ...entries } = readPackage(nearest ?? "{}");
  const pairs = [
    ...optionSets.flatMap(({ paths }) => Object.entries(paths ?? {})),
    ...[entries.imports, entries.exports].flatMap((table) => Object.entries(isObject(table) ? table : {})),
  ];
  const aliases = pairs.flatMap(([key, targets]) => {
    const leading = textsIn(targets).map(lastWord);
    return names.flatMap((own) =>
      leading.some((target) => target.replace("*", own) === own) ? [lastWord(key).replace("*", own)] : [],
    );
  });
  const packageName = typeof name === "string" ? [lastWord(name)] : [];
  return [...new Set([...aliases, ...packageName])].filter((word) => !names.includes(word)).sort();
}

function readPackage(text: string): { readonly name?: unknown; readonly imports?: unknown; readonly exports?: unknown } {
  try {
    const data: unknown = JSON.parse(text);
    return isObject(data) ? data : {};
  } catch {
    return {};
  }
}

function isObject(value: unknown): value is object {
  return typeof value === "object" && value !== null;
}

/** The texts in a value, however deep its conditions are nested. */
function textsIn(value: unknown): string[] {
  if (typeof value === "string") return [value];
  return isObject(value) ? Object.values(value).flatMap(textsIn) : [];
}
