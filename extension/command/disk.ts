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
  const listAround = () => [projectFolderOf(checked), checked].flatMap((folder) => [...listSources(folder, read, listReadable)]);
  return {
    read,
    canonical: (file) => nameBehindLinks(file, realName),
    importersOf: createImporters(listAround, (file) => texts.get(file) ?? readText(file)),
  };
}

/** The files below `folder` that mention the declarations, in order of name. */
export function findSources(folder: string, snapshot: Analysis["snapshot"]): string[] {
  return [...listSources(folder, snapshot.read, listEntries)].filter((file) => mentionsDeclarations(snapshot.read(file) ?? ""));
}

/** A path of this platform with slashes. */
export function toName(file: string): string {
  return file.split(path.sep).join("/");
}

/** In order of name. Links are not followed: what they lead to is found where it lies. */
function* listSources(
  folder: string,
  read: Analysis["snapshot"]["read"],
  list: (folder: string) => Dirent[],
  above: readonly FolderRules[] = [],
): Generator<string> {
  const name = toName(folder);
  const settings = read(`${name}/${SETTINGS_FILE}`);
  const rules = typeof settings === "string" ? [...above, readFolderRules(name, settings)] : above;
  for (const entry of list(folder).sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const inner = path.join(folder, entry.name);
    if (entry.isFile() && isSourceName(entry.name)) yield toName(inner);
    if (entry.isDirectory() && !isLeftOut(toName(inner), rules)) yield* listSources(inner, read, list, rules);
  }
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
