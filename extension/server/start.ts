/**
 * Starts the server, from code that the engine compiled at an earlier start where there is some: an opening takes a sixth less time then.
 *
 * Compiled code lies in a folder of the extension's own (`--compiled-code=<folder>`; without it, none is kept). It is written when a server
 * ends that found none, and counts only for the very files and the very engine that it was made of. Whatever is wrong with it, the files
 * are compiled as if it were not there. Runs nothing but the extension's own files.
 */
import { createHash } from "node:crypto";
import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { join } from "node:path";
import { cachedDataVersionTag, setFlagsFromString } from "node:v8";
import { Script } from "node:vm";

// The engine lets its memory grow to several times of what is in use before it tidies up; a third more costs no time that could be
// measured and saves a quarter of the memory (`npm run bench`). Compiled code is refused under other settings than those it was made under.
setFlagsFromString("--heap-growing-percent=30");

const ENDING = ".compiled";
const SUM_BYTES = 32;
const folder = process.argv.find((argument) => argument.startsWith("--compiled-code="))?.replace("--compiled-code=", "");
const compiled = new Map<string, Script>();
const requireOther = createRequire(__filename);
const loaded = new Map<string, unknown>();

process.on("exit", keepCompiled);
load("server.main.cjs");

/** The exports of one of the extension's own files. */
function load(name: string): unknown {
  const known = loaded.get(name);
  if (known !== undefined) return known;
  const path = join(__dirname, name);
  const source = `(function (exports, require, module) { ${asFunctionBody(readFileSync(path, "utf8"))}\n})`;
  const file = compiledFileOf(name, path);
  const cachedData = file === undefined ? undefined : readCompiled(file);
  const script = new Script(source, { filename: path, ...(cachedData === undefined ? {} : { cachedData }) });
  if (file !== undefined && (cachedData === undefined || script.cachedDataRejected === true)) compiled.set(file, script);
  const module = { exports: {} };
  const requireOwn = (wanted: string): unknown => (wanted === "./typescript.js" ? load("typescript.js") : requireOther(wanted));
  script.runInThisContext()(module.exports, requireOwn, module);
  loaded.set(name, module.exports);
  return module.exports;
}

/** The parser is a module, whose one export comes last. */
function asFunctionBody(source: string): string {
  const at = source.lastIndexOf("export{");
  const name = at < 0 ? undefined : /^export\{([\w$]+) as default\};/.exec(source.slice(at, at + 100))?.[1];
  return name === undefined ? source : `${source.slice(0, at)}module.exports=${name};`;
}

/** Another one for every other text and engine. */
function compiledFileOf(name: string, path: string): string | undefined {
  if (folder === undefined) return undefined;
  const { mtimeMs, size } = statSync(path);
  const key = createHash("sha256").update(JSON.stringify([mtimeMs, size, process.version, process.arch, cachedDataVersionTag()]));
  return join(folder, `${name}-${key.digest("hex").slice(0, 16)}${ENDING}`);
}

/** The engine trusts what it is given, so a file counts only with its sum in front. */
function readCompiled(file: string): Buffer | undefined {
  try {
    const content = readFileSync(file);
    const data = content.subarray(SUM_BYTES);
    return sumOf(data).equals(content.subarray(0, SUM_BYTES)) ? data : undefined;
  } catch {
    return undefined;
  }
}

function keepCompiled(): void {
  if (folder === undefined || compiled.size === 0) return;
  try {
    mkdirSync(folder, { recursive: true });
    for (const [file, script] of compiled) {
      const data = script.createCachedData();
      // Another server may be reading or writing the same file.
      const unfinished = `${file}.${process.pid}`;
      writeFileSync(unfinished, Buffer.concat([sumOf(data), data]));
      renameSync(unfinished, file);
      removeOlder(folder, file);
    }
  } catch {
    // Compiled code only saves time.
  }
}

/** What earlier versions of the extension or of the engine left of the same file. */
function removeOlder(folder: string, file: string): void {
  const prefix = file.slice(0, file.lastIndexOf("-") + 1);
  for (const name of readdirSync(folder)) {
    const other = join(folder, name);
    if (other.startsWith(prefix) && other !== file && other.endsWith(ENDING)) rmSync(other, { force: true });
  }
}

function sumOf(data: Buffer): Buffer {
  return createHash("sha256").update(data).digest();
}
