/**
 * The server as a process of its own, with the disk through Node.
 *
 * Talks over whichever channel its arguments name (`--stdio`, `--node-ipc`). Beside `start.ts` the only file of the room that knows Node.
 */
import { readFileSync, realpathSync } from "node:fs";
import { readdir } from "node:fs/promises";
import { join } from "node:path";
import { setImmediate } from "node:timers/promises";
import { fileURLToPath } from "node:url";
import { createConnection, ProposedFeatures } from "vscode-languageserver/node";
import { isSourceName } from "../analysis/sources.js";
import { type FileHost, isSkippedFolder } from "./discovery.js";
import { loadEngine } from "./engine.js";
import { keyOf, uriOf } from "./fileKeys.js";
import { describeError } from "./guard.js";
import { serve } from "./serve.js";

const connection = createConnection(ProposedFeatures.all);
const report = (error: unknown) => connection.console.error(`Unexpected: ${describeError(error)}`);
process.on("uncaughtException", report);
process.on("unhandledRejection", report);
serve(connection, { host: createDisk(), loadEngine });

/** Files read before others get their turn. */
const READS_AT_ONCE = 16;

/** Source files are read faster than they are asked for through promises, of which a workspace would take thousands. */
function createDisk(): FileHost {
  let reads = 0;
  const readFile = async (file: string): Promise<string | null> => {
    reads += 1;
    if (reads % READS_AT_ONCE === 0) await setImmediate();
    return readText(file);
  };
  return { readFile, listSources, realPath };
}

function readText(file: string): string | null {
  const path = pathOf(file);
  if (path === undefined) return null;
  try {
    const text = readFileSync(path, "utf8");
    // Editors count characters without the byte order mark.
    return text.startsWith("\ufeff") ? text.slice(1) : text;
  } catch {
    return null;
  }
}

function realPath(file: string): string | undefined {
  const path = pathOf(file);
  try {
    return path === undefined ? undefined : keyOfPath(realpathSync.native(path));
  } catch {
    return undefined;
  }
}

/** Breadth first, one batch a level of folders. Links to folders are not followed: they may run in a circle. */
async function* listSources(folder: string): AsyncIterable<readonly string[]> {
  const start = pathOf(folder);
  const top = realPath(folder) ?? folder;
  for (let level = start === undefined ? [] : [start]; level.length > 0; ) {
    const listings = await Promise.all(level.map((one) => listFolder(one, top)));
    const files = listings.flatMap((listing) => listing.files);
    if (files.length > 0) yield files;
    level = listings.flatMap((listing) => listing.folders);
  }
}

async function listFolder(folder: string, top: string): Promise<{ readonly files: string[]; readonly folders: string[] }> {
  try {
    const entries = await readdir(folder, { withFileTypes: true });
    const folders = entries.filter((entry) => entry.isDirectory() && !isSkippedFolder(entry.name));
    const sources = entries.filter(({ name }) => isSourceName(name));
    const files = sources.filter(
      (entry) => entry.isFile() || (entry.isSymbolicLink() && leadsOut(join(folder, entry.name), top)),
    );
    return {
      folders: folders.map(({ name }) => join(folder, name)),
      files: files.map(({ name }) => keyOfPath(join(folder, name))),
    };
  } catch {
    return { files: [], folders: [] };
  }
}

/** A link to a file of the same folder would count it twice. */
function leadsOut(link: string, top: string): boolean {
  const real = realPath(keyOfPath(link));
  return real !== undefined && !real.startsWith(`${top}/`);
}

function keyOfPath(path: string): string {
  return keyOf(uriOf(path.replaceAll("\\", "/")));
}

/** A path that Node understands; `undefined` for what is not on its disk. */
function pathOf(file: string): string | undefined {
  const uri = uriOf(file);
  return uri.startsWith("file:") ? fileURLToPath(uri) : undefined;
}
