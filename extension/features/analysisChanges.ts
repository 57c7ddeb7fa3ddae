/**
 * What two analyses tell differently, by file: what is shown of any other file is the same.
 *
 * Compares by identity, which an analysis keeps for what did not change. Names a file too many rather than one too few.
 */
import type { Analysis, FileAnalysis } from "../analysis/analysis.js";
import type { Mechanism } from "../declarations/mechanism.js";
import { differingFiles } from "./fileIndex.js";
import type { MechanismIndex } from "./mechanismIndex.js";

export interface AnalysisChanges {
  /** Files in which something else is found. */
  readonly found: ReadonlySet<string>;
  /** Files of which a mechanism or a robot, what is found of it, or who lists it, may be another. */
  readonly touched: ReadonlySet<string>;
}

/** `index`: that of `now`. */
export function changesBetween(before: Analysis, now: Analysis, index: MechanismIndex): AnalysisChanges {
  const declared = differingFiles(before.inFile, now.inFile);
  const found = differingFiles(before.findingsIn, now.findingsIn);
  const touched = new Set(declared);
  // What is found of a robot as a whole is told by where it is.
  for (const file of found) for (const one of index.standingIn(file)) touched.add(one);
  for (const file of declared) {
    for (const mechanism of relisted(before.inFile.get(file), now.inFile.get(file))) {
      const located = index.declared(mechanism);
      if (located !== undefined) touched.add(located.file);
    }
  }
  for (const analysis of [before, now]) addListing(touched, analysis, index);
  return { found, touched };
}

/** Adds the files of robots that list mechanisms of those files: a robot shows where its mechanisms are, and how they stand. */
export function addListing(files: Set<string>, { inFile }: Analysis, index: MechanismIndex): void {
  for (const file of [...files]) {
    for (const { declared } of inFile.get(file)?.mechanisms ?? []) {
      if (declared !== undefined) for (const one of index.listing(declared)) files.add(one);
    }
  }
}

/** Mechanisms that the robots of only one of the two list. */
function relisted(before: FileAnalysis | undefined, now: FileAnalysis | undefined): Mechanism[] {
  const [one, other] = [listedBy(before), listedBy(now)];
  return [...[...one].filter((mechanism) => !other.has(mechanism)), ...[...other].filter((mechanism) => !one.has(mechanism))];
}

function listedBy(file: FileAnalysis | undefined): ReadonlySet<Mechanism> {
  return new Set((file?.robots ?? []).flatMap(({ declared }) => declared?.mechanisms ?? []));
}
