/**
 * Folders that the nearest settings file leaves out of the check.
 *
 * Reads settings through a snapshot; where one isn't loaded yet, nothing is left out by it.
 */
import type { Snapshot } from "../evaluator/value.js";
import { folderOf, pathBelow } from "./fileKeys.js";

export type ReadLeaveOut = (settingsFile: string, text: string) => readonly string[];

export interface LeaveOut {
  /** The files that are not left out. `settingsFiles`: wherever there may be one. */
  filter(files: readonly string[], settingsFiles: Iterable<string>, snapshot: Snapshot): readonly string[];
}

interface Settings {
  readonly base: string;
  readonly text: string;
  readonly folders: readonly string[];
}

/** Parsed settings are kept while their text stays the same. */
export function createLeaveOut(read: ReadLeaveOut): LeaveOut {
  const parsed = new Map<string, Settings>();
  const settingsOf = (file: string, text: string): Settings => {
    const known = parsed.get(file);
    if (known?.text === text) return known;
    const base = folderOf(file);
    const settings = { base, text, folders: read(file, text).map((folder) => `${base}/${withoutDots(folder)}`) };
    parsed.set(file, settings);
    return settings;
  };
  return {
    filter(files, settingsFiles, snapshot) {
      const all: Settings[] = [];
      for (const file of settingsFiles) {
        const text = snapshot.read(file);
        if (typeof text === "string") all.push(settingsOf(file, text));
      }
      if (all.every(({ folders }) => folders.length === 0)) return files;
      const nearestFirst = all.sort((a, b) => b.base.length - a.base.length);
      return files.filter((file) => {
        const nearest = nearestFirst.find(({ base }) => pathBelow(base, file) !== undefined);
        return !nearest?.folders.some((folder) => pathBelow(folder, file) !== undefined);
      });
    },
  };
}

function withoutDots(folder: string): string {
  return folder
    .split("/")
    .filter((segment) => segment !== "" && segment !== ".")
    .join("/");
}
