/**
 * The files of a workspace as the session asks for them, and which of them no scan reaches.
 *
 * The rules are those of the command, so that both check the same files. Says nothing about texts.
 */
import { isLeftOut } from "../analysis/sources.js";

export interface FileHost {
  /** The text on disk; `null` where there is no such file, or none that can be read. Never rejects. */
  readFile(file: string): Promise<string | null>;
  /** Where a file really lies, links followed; `undefined` where nobody can tell. Absent: no links are known. */
  realPath?(file: string): string | undefined;
  /** The sources below a folder, in batches; nothing where it is no folder. Never rejects. */
  listSources(folder: string): AsyncIterable<readonly string[]>;
}

/** True for folders that are never entered, whatever the settings say. */
export function isSkippedFolder(name: string): boolean {
  return isLeftOut(name, []);
}

/** True for files that no workspace scan reaches: `path` starts at the workspace folder. */
export function isBelowSkippedFolder(path: string): boolean {
  return path.split("/").slice(0, -1).some(isSkippedFolder);
}
