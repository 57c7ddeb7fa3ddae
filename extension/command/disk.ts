/** Files on disk for the analysis: names with slashes, texts read once, folders walked by the shared rules. */
import { type Dirent, readdirSync, readFileSync, realpathSync } from "node:fs";
import path from "node:path";
import type { Analysis } from "../analysis/analysis.js";
import { nameBehindLinks } from "../analysis/linkedName.js";
import { SETTINGS_FILE } from "../analysis/settings.js";
import { type FolderRules, isLeftOut, isSourceName, mentionsDeclarations, readFolderRules } from "../analysis/sources.js";
import { createImporters } from "./importers.js";
import { projectFolderOf } from "./projectFolder.js";

/**
 * Every text is read at most once, so that the whole check sees one moment. `checked`: the folder that is checked, or that holds the
 * checked file.
 */
export function createDiskSnapshot(checked: string): Analysis["snapshot"] {
  const texts = new Map<string, string | null>();
  const read = (file: string): string | null => {
    const known = texts.get(file);
    if (known !== undefined) return known;
    const text = readText(file);
    texts.set(file, text);
    return text;
  };
  // What is checked may lie where the rules of its project do not lead.
  const listAround = () =>
    [projectFolderOf(checked), checked].flatMap((folder) => [...listSources({ top: folder, read, list: listReadable })]);
  return {
    read,
    canonical: (file) => nameBehindLinks(file, realName),
    importersOf: createImporters(listAround, (file) => texts.get(file) ?? readText(file)),
  };
}

/** The files below `folder` that mention the declarations, in order of name. */
export function findSources(folder: string, snapshot: Analysis["snapshot"]): string[] {
  return [...listSources({ top: folder, read: snapshot.read, list: listEntries })].filter((file) =>
    mentionsDeclarations(snapshot.read(file) ?? ""),
  );
}

/** A path of this platform with slashes. */
export function toName(file: string): string {
  return file.split(path.sep).join("/");
}

interface Walk {
  readonly top: string;
  readonly read: Analysis["snapshot"]["read"];
  readonly list: (folder: string) => Dirent[];
}

/** In order of name. */
function* listSources(walk: Walk, folder = walk.top, above: readonly FolderRules[] = []): Generator<string> {
  const name = toName(folder);
  const settings = walk.read(`${name}/${SETTINGS_FILE}`);
  const rules = typeof settings === "string" ? [...above, readFolderRules(name, settings)] : above;
  for (const entry of walk.list(folder).sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const inner = path.join(folder, entry.name);
    if (isSourceName(entry.name) && (entry.isFile() || (entry.isSymbolicLink() && leadsOut(walk.top, inner))))
      yield toName(inner);
    if (entry.isDirectory() && !isLeftOut(toName(inner), rules)) yield* listSources(walk, inner, rules);
  }
}

/** A link to a file of the same folder would count it twice. */
function leadsOut(top: string, link: string): boolean {
  const real = realName(toName(link));
  return real !== undefined && !real.startsWith(`${realName(toName(top))}/`);
}

function listEntries(folder: string): Dirent[] {
  return readdirSync(folder, { withFileTypes: true });
}

/** A folder beside what is checked that cannot be read is no reason to give up. */
function listReadable(folder: string): Dirent[] {
  try {
    return listEntries(folder);
  } catch {
    return [];
  }
}

function realName(name: string): string | undefined {
  try {
    return toName(realpathSync.native(name));
  } catch {
    return undefined;
  }
}

function readText(file: string): string | null {
  try {
    return readFileSync(file, "utf8");
  } catch {
    return null;
  }
}
