/**
 * Which files may import which, for a host that has seen the texts of a whole workspace: an exported object may be changed there.
 *
 * Compares the last words of specifiers with the names of files, so it needs no parser and no disk, and may name a file too many but
 * none too few.
 */

export interface ImportIndex {
  /** Notes a file's text, new or changed. */
  set(file: string, text: string): void;
  delete(file: string): void;
  /** Files that may import this one, sorted. */
  importersOf(file: string): readonly string[];
}

export function createImportIndex(): ImportIndex {
  const wordsByFile = new Map<string, ReadonlySet<string>>();
  const filesByWord = new Map<string, Set<string>>();
  const drop = (file: string): void => {
    for (const word of wordsByFile.get(file) ?? []) filesByWord.get(word)?.delete(file);
    wordsByFile.delete(file);
  };
  return {
    set(file, text) {
      drop(file);
      const words = new Set(listSpecifiers(text).map(lastWord));
      wordsByFile.set(file, words);
      for (const word of words) {
        const files = filesByWord.get(word) ?? new Set();
        filesByWord.set(word, files.add(file));
      }
    },
    delete: drop,
    importersOf(file) {
      const found = wordsOf(file).flatMap((word) => [...(filesByWord.get(word) ?? [])]);
      return [...new Set(found)].filter((other) => other !== file).sort();
    },
  };
}

/** Whether a specifier may lead to a file, by its last word. */
export function mayLeadTo(specifier: string, file: string): boolean {
  return wordsOf(file).includes(lastWord(specifier));
}

/** Every text that follows `from`, `import` or `require`. */
function listSpecifiers(text: string): string[] {
  return [...text.matchAll(/\b(?:from|import|require)\s*\(?\s*["'`]([^"'`\n]+)["'`]/g)].map(([, specifier = ""]) => specifier);
}

/** What a specifier of this file may end with. */
function wordsOf(file: string): string[] {
  const segments = file.split("/");
  const name = withoutEnding(segments.at(-1) ?? "");
  // An index file stands for its folder, and a package's entry for whatever the package is called.
  return name === "index" || name === "main" ? [name, segments.at(-2) ?? "", segments.at(-3) ?? "", ""] : [name];
}

function lastWord(specifier: string): string {
  const word = specifier.split("/").findLast((segment) => segment !== "");
  return word === undefined || word === "." || word === ".." ? "" : withoutEnding(word).replace(/^#/, "");
}

function withoutEnding(name: string): string {
  return name.replace(/(\.d)?\.(json|[cm]?[jt]sx?)$/, "");
}
