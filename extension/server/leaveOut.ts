/**
 * Which files the project's settings leave out of the check, by the rules of the command.
 *
 * Reads settings through a snapshot; where one isn't loaded yet, nothing is left out by it.
 */
import { type FolderRules, isLeftOut, readFolderRules } from "../analysis/sources.js";
import type { Snapshot } from "../evaluator/value.js";
import { folderOf } from "./fileKeys.js";

/** The files that stay. `settingsFiles`: wherever there may be one. */
export function withoutLeftOut(files: readonly string[], settingsFiles: Iterable<string>, snapshot: Snapshot): readonly string[] {
  const rules: FolderRules[] = [];
  for (const file of settingsFiles) {
    const text = snapshot.read(file);
    const read = typeof text === "string" ? readFolderRules(folderOf(file), text) : undefined;
    if (read !== undefined && read.leaveOut.length > 0) rules.push(read);
  }
  return rules.length === 0
    ? files
    : files.filter((file) => !foldersUpTo(rules, file).some((folder) => isLeftOut(folder, rules)));
}

/** The folders that hold a file, down from those of the settings above it: what lies further up is theirs to judge. */
function foldersUpTo(rules: readonly FolderRules[], file: string): string[] {
  const folders: string[] = [];
  for (
    let folder = folderOf(file);
    rules.some(({ settingsFolder }) => folder.startsWith(`${settingsFolder}/`));
    folder = folderOf(folder)
  ) {
    folders.push(folder);
  }
  return folders;
}
