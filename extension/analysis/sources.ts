/**
 * Which files of a folder are worth reading: one answer for the editor's scan and for the command.
 *
 * Pure: the hosts walk the disk, this says where not to go.
 */
import { SPECIFIER } from "../declarations/table.js";

const SOURCE = /\.(?:ts|mts|cts|tsx|js|mjs|cjs|jsx)$/;
const DECLARATION_FILE = /\.d\.[mc]?ts$/;

// Compiled copies of the same declarations would use every name twice.
const NEVER = new Set(["node_modules", "bower_components", "dist", "out", "build", "coverage"]);

/** True for names of files that may hold declarations. */
export function isSourceName(name: string): boolean {
  return SOURCE.test(name) && !DECLARATION_FILE.test(name);
}

/** True for texts worth evaluating: a cheap test before any parsing. */
export function mentionsDeclarations(text: string): boolean {
  return text.includes(SPECIFIER);
}

/** `leaveOut`: folders named by the settings above, relative to `settingsFolder`; all names are slash-separated. */
export interface FolderRules {
  readonly settingsFolder: string;
  readonly leaveOut: readonly string[];
}

/** True for folders that are not entered: dot folders, installed packages, build output, and those that the settings name. */
export function isLeftOut(folder: string, rules: readonly FolderRules[]): boolean {
  const name = folder.slice(folder.lastIndexOf("/") + 1);
  if (NEVER.has(name) || name.startsWith(".")) return true;
  return rules.some(({ settingsFolder, leaveOut }) => leaveOut.some((one) => folder === `${settingsFolder}/${trimSlashes(one)}`));
}

/** What the settings file of a folder leaves out; a broken one leaves out nothing, and its finding comes with the analysis. */
export function readFolderRules(settingsFolder: string, text: string): FolderRules {
  try {
    const data: unknown = JSON.parse(text);
    const listed =
      typeof data === "object" && data !== null && "leaveOut" in data && Array.isArray(data.leaveOut) ? data.leaveOut : [];
    return { settingsFolder, leaveOut: listed.filter((one) => typeof one === "string") };
  } catch {
    return { settingsFolder, leaveOut: [] };
  }
}

function trimSlashes(folder: string): string {
  return folder.replace(/^(?:\.\/)+/, "").replace(/\/+$/, "");
}
