/** The texts of a folder as a commit holds them, read through the user's own git. Nothing is checked out. */
import { execFileSync } from "node:child_process";
import path from "node:path";
import type { Analysis } from "../analysis/analysis.js";
import { isLeftOut, isSourceName } from "../analysis/sources.js";
import { toName } from "./disk.js";
import { createImporters } from "./importers.js";

export interface CommittedTexts {
  readonly snapshot: Analysis["snapshot"];
  /** Source files below the checked folder, in order of name. */
  readonly sources: readonly string[];
}

/** Throws with git's own words where the folder is in no repository or the revision is not known. */
export function readCommitted(folder: string, revision: string): CommittedTexts {
  const top = git(folder, ["rev-parse", "--show-toplevel"]).trim();
  // A revision is one word for git: nothing in it may be taken for an option.
  const commit = git(
    top,
    ["rev-parse", "--verify", "--quiet", "--end-of-options", `${revision}^{commit}`],
    `"${revision}" is not a commit`,
  ).trim();
  const files = new Set(
    git(top, ["ls-tree", "-r", "-z", "--name-only", commit])
      .split("\0")
      .filter((name) => name !== "")
      .map((name) => `${toName(top)}/${name}`),
  );
  const texts = new Map<string, string | null>();
  const read = (file: string): string | null => {
    const known = texts.get(file);
    if (known !== undefined) return known;
    const text = files.has(file) ? git(top, ["show", `${commit}:${path.posix.relative(toName(top), file)}`]) : null;
    texts.set(file, text);
    return text;
  };
  const below = `${toName(folder)}/`;
  const sources = [...files].filter((file) => file.startsWith(below) && isSourceName(file) && !isBelowLeftOut(file, below));
  return { snapshot: { read, importersOf: createImporters(() => sources, read) }, sources: sources.sort() };
}

function isBelowLeftOut(file: string, below: string): boolean {
  const folders = file.slice(below.length).split("/").slice(0, -1);
  return folders.some((folder) => isLeftOut(folder, []));
}

function git(cwd: string, args: readonly string[], complaint?: string): string {
  try {
    return execFileSync("git", args, { cwd, encoding: "utf8", maxBuffer: 1 << 28, stdio: ["ignore", "pipe", "pipe"] });
  } catch (error) {
    const said = error instanceof Error && "stderr" in error ? String(error.stderr).trim() : "";
    throw new Error(complaint ?? (said === "" ? "git could not be run" : said));
  }
}
