/**
 * Which files of a workspace are looked at: sources outside of installed packages and hidden folders.
 *
 * Says nothing about texts; that a file counts only when it mentions the declarations is decided where its text is read.
 */

export interface FileHost {
  /** The text on disk; `null` where there is no such file, or none that can be read. Never rejects. */
  readFile(file: string): Promise<string | null>;
  /** The sources below a folder, in batches; nothing where it is no folder. Never rejects. */
  listSources(folder: string): AsyncIterable<readonly string[]>;
}

/** True for files that may declare or hold constants as code. */
export function isSource(file: string): boolean {
  return /\.(?:[mc]?[jt]s|[jt]sx)$/i.test(file) && !/\.d\.[mc]?ts$/i.test(file);
}

export function isSkippedFolder(name: string): boolean {
  return name === "node_modules" || name.startsWith(".");
}

/** True for files that no workspace scan reaches: `path` starts at the workspace folder. */
export function isBelowSkippedFolder(path: string): boolean {
  return path.split("/").slice(0, -1).some(isSkippedFolder);
}
