/**
 * The compiler options that hold for a file: those of the nearest tsconfig.json, and of the projects that it refers to.
 *
 * Read through the snapshot only; a configuration that comes from an installed package is not looked for.
 */
import type ts from "typescript";
import { joinPath } from "./specifier.js";
import type { TypeScript } from "./typescript.js";

/** Reads a file of the snapshot, on someone's account. */
export type Read = (file: string) => string | null | undefined;

/** Folders from that of the file upwards to the root. */
export function listFolders(file: string): string[] {
  const segments = file.split("/").slice(0, -1);
  const root = /^[a-z][a-z0-9+.-]*:\/\//i.test(file) ? 3 : 1;
  const folders: string[] = [];
  for (let length = segments.length; length >= root; length--) folders.push(segments.slice(0, length).join("/"));
  return folders;
}

/** Option sets to try, the nearest first; `undefined` while a file that decides is not loaded. */
export function readProjectOptions(ts: TypeScript, file: string, read: Read): readonly ts.CompilerOptions[] | undefined {
  const names = /\.[cm]?jsx?$/.test(file) ? ["tsconfig.json", "jsconfig.json"] : ["tsconfig.json"];
  for (const folder of listFolders(file)) {
    for (const name of names) {
      const config = `${folder}/${name}`;
      const text = read(config);
      if (text === undefined) return undefined;
      if (text !== null) return readConfig(ts, config, text, read, 0);
    }
  }
  return [];
}

function readConfig(
  ts: TypeScript,
  file: string,
  text: string,
  read: Read,
  depth: number,
): readonly ts.CompilerOptions[] | undefined {
  const folder = file.slice(0, Math.max(1, file.lastIndexOf("/")));
  let isOpen = false;
  const readOwn = (name: string): string | undefined => {
    if (name.includes("/node_modules/")) return undefined;
    const found = name === file ? text : read(name);
    isOpen ||= found === undefined;
    return found ?? undefined;
  };
  const host: ts.ParseConfigHost = {
    useCaseSensitiveFileNames: true,
    readDirectory: () => [],
    fileExists: (name) => readOwn(name) !== undefined,
    readFile: readOwn,
  };
  const json: { config?: { references?: unknown } } = ts.parseConfigFileTextToJson(file, text);
  const { options } = ts.parseJsonConfigFileContent(json.config ?? {}, host, folder, undefined, file);
  const all: ts.CompilerOptions[] = [options];
  const references = Array.isArray(json.config?.references) ? (json.config.references as unknown[]) : [];
  for (const reference of depth > 0 ? [] : references.slice(0, 20)) {
    const path = typeof reference === "object" && reference !== null && "path" in reference ? reference.path : undefined;
    if (typeof path !== "string" || !path.startsWith(".")) continue;
    const config = joinPath(file, path.endsWith(".json") ? path : `${path}/tsconfig.json`);
    if (config === undefined) continue;
    const inner = read(config);
    if (inner === undefined) isOpen = true;
    else if (inner !== null) all.push(...(readConfig(ts, config, inner, read, depth + 1) ?? []));
  }
  return isOpen ? undefined : all;
}
