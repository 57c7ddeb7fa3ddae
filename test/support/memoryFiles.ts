/** A disk in memory for tests of the session; reads take as long as a test wants. */
import { isSourceName } from "../../extension/analysis/sources.js";
import { type FileHost, isBelowSkippedFolder } from "../../extension/server/discovery.js";

export interface MemoryFiles extends FileHost {
  readonly texts: Map<string, string>;
  /** Every file that was read, in order. */
  readonly reads: string[];
  /** Runs before each read ends. */
  beforeRead: (file: string) => Promise<void>;
}

export function createMemoryFiles(texts: Readonly<Record<string, string>>): MemoryFiles {
  const files: MemoryFiles = {
    texts: new Map(Object.entries(texts)),
    reads: [],
    beforeRead: async () => {},
    async readFile(file) {
      files.reads.push(file);
      const text = files.texts.get(file) ?? null;
      await files.beforeRead(file);
      return text;
    },
    async *listSources(folder) {
      const below = [...files.texts.keys()].filter((file) => file.startsWith(`${folder}/`));
      yield below.filter((file) => isSourceName(file) && !isBelowSkippedFolder(file.slice(folder.length + 1)));
    },
  };
  return files;
}
