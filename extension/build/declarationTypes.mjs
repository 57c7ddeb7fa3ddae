// Writes the type declarations that robot code sees: what TypeScript emits for the declarations' entry, and of that only
// the files that the entry reaches. A mention of the schema library is refused, because where a user has not installed
// it every check would silently become `any`. It does not report type errors: the type check does.

import { mkdir, readFile, writeFile } from "node:fs/promises";
import { dirname, join, relative, resolve } from "node:path";
import ts from "typescript";
import { repositoryRoot } from "./repositoryRoot.mjs";

/**
 * @param {string} entry path from the repository's root
 * @param {string} outFolder
 * @returns {Promise<string[]>} the files written
 */
export async function writeDeclarationTypes(entry, outFolder) {
  const rootFolder = join(repositoryRoot, "extension");
  const emitted = emitTypes(join(repositoryRoot, entry), rootFolder, outFolder);
  const first = join(outFolder, relative(rootFolder, join(repositoryRoot, entry))).replace(/\.ts$/, ".d.ts");
  const reached = reachFrom(first, emitted);
  for (const [file, text] of reached) await writeIfChanged(file, text);
  return [...reached.keys()];
}

/**
 * @param {string} entry
 * @param {string} rootDir
 * @param {string} outDir
 */
function emitTypes(entry, rootDir, outDir) {
  const shared = ts.readConfigFile(join(rootDir, "tsconfig.base.json"), ts.sys.readFile).config.compilerOptions;
  const { options } = ts.convertCompilerOptionsFromJson(
    {
      ...shared,
      rootDir,
      outDir,
      composite: false,
      incremental: false,
      declaration: true,
      emitDeclarationOnly: true,
      removeComments: false,
    },
    rootDir,
  );
  const program = ts.createProgram([entry], options);
  /** @type {Map<string, string>} */
  const emitted = new Map();
  const { diagnostics } = program.emit(undefined, (file, text) => emitted.set(resolve(file), text), undefined, true);
  if (diagnostics.length > 0) throw new Error(ts.formatDiagnostics(diagnostics, formatHost));
  return emitted;
}

/** @type {ts.FormatDiagnosticsHost} */
const formatHost = { getCanonicalFileName: (name) => name, getCurrentDirectory: () => repositoryRoot, getNewLine: () => "\n" };

/**
 * @param {string} first
 * @param {Map<string, string>} emitted
 */
function reachFrom(first, emitted) {
  /** @type {Map<string, string>} */
  const reached = new Map();
  const waiting = [first];
  for (let file = waiting.pop(); file !== undefined; file = waiting.pop()) {
    if (reached.has(file)) continue;
    const shown = relative(repositoryRoot, file);
    const text = emitted.get(file);
    if (text === undefined) throw new Error(`The type declarations need ${shown}, which was not emitted.`);
    if (/valibot/.test(text))
      throw new Error(`The type declarations must not mention valibot, but ${shown} does (${mentioning(text)}).`);
    reached.set(file, text);
    for (const { fileName } of ts.preProcessFile(text, true, true).importedFiles) {
      if (!fileName.startsWith("."))
        throw new Error(`The type declarations must stand alone, but ${shown} imports "${fileName}".`);
      waiting.push(resolve(dirname(file), fileName.replace(/\.js$/, ".d.ts")));
    }
  }
  return reached;
}

/** @param {string} text */
function mentioning(text) {
  return text
    .split("\n")
    .find((line) => line.includes("valibot"))
    ?.trim();
}

/**
 * An editor that watches these files should not reload them at every build.
 * @param {string} file
 * @param {string} text
 */
async function writeIfChanged(file, text) {
  if ((await readFile(file, "utf8").catch(() => undefined)) === text) return;
  await mkdir(dirname(file), { recursive: true });
  await writeFile(file, text);
}
