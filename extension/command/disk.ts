/** Files on disk for the analysis: names with slashes, texts read once, folders walked by the shared rules. */
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import type { Analysis } from "../analysis/analysis.js";
import { SETTINGS_FILE } from "../analysis/settings.js";
import { type FolderRules, isLeftOut, isSourceName, mentionsDeclarations, readFolderRules } from "../analysis/sources.js";

/** Every text is read at most once, so that the whole check sees one moment. */
export function createDiskSnapshot(): Analysis["snapshot"] {
  const texts = new Map<string, string | null>();
  return {
    read(file) {
      const known = texts.get(file);
      if (known !== undefined) return known;
      const text = readText(file);
      texts.set(file, text);
      return text;
    },
  };
}

/** The files below `folder` that mention the declarations, in order of name. */
export function findSources(folder: string, snapshot: Analysis["snapshot"], above: readonly FolderRules[] = []): string[] {
  const name = toName(folder);
  const settings = snapshot.read(`${name}/${SETTINGS_FILE}`);
  const rules = typeof settings === "string" ? [...above, readFolderRules(name, settings)] : above;
  const entries = readdirSync(folder, { withFileTypes: true }).sort((a, b) => (a.name < b.name ? -1 : 1));
  return entries.flatMap((entry) => {
    const inner = path.join(folder, entry.name);
    if (entry.isDirectory()) return isLeftOut(toName(inner), rules) ? [] : findSources(inner, snapshot, rules);
    if (!entry.isFile() || !isSourceName(entry.name)) return [];
    const text = snapshot.read(toName(inner));
    return typeof text === "string" && mentionsDeclarations(text) ? [toName(inner)] : [];
  });
}

/** A path of this platform with slashes. */
export function toName(file: string): string {
  return file.split(path.sep).join("/");
}

function readText(file: string): string | null {
  try {
    return readFileSync(file, "utf8");
  } catch {
    return null;
  }
}
