/**
 * Which files may import which, for a host that has seen the texts of a whole workspace: an exported object may be changed there.
 *
 * Compares the last words of specifiers with the names of files, so it needs no parser and no disk, and may name a file too many. Who uses
 * an alias of another name is found by that name. Keeps no text.
 */

export interface ImportIndex extends ImportView {
  /** Notes a file's text, new or changed; says whether the file imports something else than before. */
  set(file: string, text: string): boolean;
  /** Says whether the file imported anything. */
  delete(file: string): boolean;
  /** Whether `set` would say so. */
  differs(file: string, text: string): boolean;
  /** The index as it is now, for good; the same object as long as nothing changes. */
  capture(): ImportView;
}

export interface ImportView {
  has(file: string): boolean;
  files(): Iterable<string>;
  /** The last words of the file's specifiers, each once, in order. */
  wordsOf(file: string): readonly string[];
  /** Files that may import this one, sorted; `aliases`: last words that lead to it as well. */
  importersOf(file: string, aliases?: readonly string[]): readonly string[];
}

const NONE: readonly string[] = [];

export function createImportIndex(): ImportIndex {
  let wordsByFile = new Map<string, readonly string[]>();
  let view: ImportView | undefined;
  const pool = new Map<string, string>();
  const capture = (): ImportView => {
    view ??= createView(wordsByFile);
    return view;
  };
  const change = (): Map<string, readonly string[]> => {
    // A view that was handed out keeps the map that it knows.
    if (view !== undefined) wordsByFile = new Map(wordsByFile);
    view = undefined;
    return wordsByFile;
  };
  return {
    set(file, text) {
      const before = wordsByFile.get(file);
      const words = wordsIn(text).map((word) => keep(pool, word));
      if (before !== undefined && sameWords(before, words)) return false;
      change().set(file, words);
      return !sameWords(before ?? NONE, words);
    },
    delete(file) {
      const before = wordsByFile.get(file);
      if (before !== undefined) change().delete(file);
      return before !== undefined && before.length > 0;
    },
    differs: (file, text) => !sameWords(wordsByFile.get(file) ?? NONE, wordsIn(text)),
    capture,
    has: (file) => wordsByFile.has(file),
    files: () => wordsByFile.keys(),
    wordsOf: (file) => wordsByFile.get(file) ?? NONE,
    importersOf: (file, aliases) => capture().importersOf(file, aliases),
  };
}

/** Whether a specifier may lead to a file, by its last word. */
export function mayLeadTo(specifier: string, file: string, aliases: readonly string[]): boolean {
  const word = lastWord(specifier);
  return namesOf(file).includes(word) || aliases.includes(word);
}

/** Turned round when it is first asked: most views never are. */
function createView(wordsByFile: ReadonlyMap<string, readonly string[]>): ImportView {
  let filesByWord: Map<string, string[]> | undefined;
  const turnRound = (): Map<string, string[]> => {
    const files = new Map<string, string[]>();
    for (const [file, words] of wordsByFile) {
      for (const word of words) {
        const sharing = files.get(word);
        if (sharing === undefined) files.set(word, [file]);
        else sharing.push(file);
      }
    }
    return files;
  };
  return {
    has: (file) => wordsByFile.has(file),
    files: () => wordsByFile.keys(),
    wordsOf: (file) => wordsByFile.get(file) ?? NONE,
    importersOf(file, aliases = NONE) {
      filesByWord ??= turnRound();
      const found = [...namesOf(file), ...aliases].flatMap((word) => filesByWord?.get(word) ?? []);
      return [...new Set(found)].filter((other) => other !== file).sort();
    },
  };
}

/** Each once, in order. */
function wordsIn(text: string): readonly string[] {
  return [...new Set(listSpecifiers(text).map(lastWord))];
}

export function sameWords(before: readonly string[], after: readonly string[]): boolean {
  return before.length === after.length && before.every((word, index) => word === after[index]);
}

/** A part of a string may hold on to the whole of it, so that one word would keep its file's text: copied once. */
function keep(pool: Map<string, string>, word: string): string {
  const known = pool.get(word);
  if (known !== undefined) return known;
  const own: string = JSON.parse(JSON.stringify(word));
  pool.set(own, own);
  return own;
}

/** Every text that follows `from`, `import` or `require`. */
function listSpecifiers(text: string): string[] {
  return [...text.matchAll(/\b(?:from|import|require)\s*\(?\s*["'`]([^"'`\n]+)["'`]/g)].map(([, specifier = ""]) => specifier);
}

/** What a specifier of this file may end with. */
export function namesOf(file: string): string[] {
  const segments = file.split("/");
  const name = withoutEnding(segments.at(-1) ?? "");
  // An index file stands for its folder, and a package's entry for whatever the package is called.
  return name === "index" || name === "main" ? [name, segments.at(-2) ?? "", segments.at(-3) ?? "", ""] : [name];
}

export function lastWord(specifier: string): string {
  const word = specifier.split("/").findLast((segment) => segment !== "");
  return word === undefined || word === "." || word === ".." ? "" : withoutEnding(word).replace(/^[#@~$]+/, "");
}

function withoutEnding(name: string): string {
  return name.replace(/(\.d)?\.(json|[cm]?[jt]sx?)$/, "");
}
