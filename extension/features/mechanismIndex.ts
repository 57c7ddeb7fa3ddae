/**
 * Where a workspace's mechanisms are: by what was declared, by robots that list them, by files that they stand in.
 *
 * Follows from one analysis to another by the files that differ, so that a feature never goes through all mechanisms for one of them.
 */
import type { AnalysedMechanism, Analysis, FileAnalysis } from "../analysis/analysis.js";
import type { Mechanism } from "../declarations/mechanism.js";
import { differingFiles, FileIndex } from "./fileIndex.js";
import { filesWithHints } from "./inlayHints.js";

/** Valid until another analysis is asked for. Files are those of calls, as in `Analysis.inFile`. */
export interface MechanismIndex {
  /** A mechanism by what it was declared to be. */
  declared(mechanism: Mechanism): LocatedMechanism | undefined;
  /** Files with robots that list a mechanism. */
  listing(mechanism: Mechanism): Iterable<string>;
  isListed(mechanism: Mechanism): boolean;
  /** Files with a mechanism or a robot that may have its place or a hint in `file`; itself among them. */
  standingIn(file: string): ReadonlySet<string>;
}

export interface LocatedMechanism {
  readonly file: string;
  readonly mechanism: AnalysedMechanism;
}

export type IndexOf = (analysis: Analysis) => MechanismIndex;

export function createIndexReader(): IndexOf {
  let maps = new IndexMaps();
  let at: Analysis | undefined;
  return (analysis) => {
    if (at === analysis) return maps;
    const before = at;
    // One that fails half-way is not built upon.
    at = undefined;
    if (before === undefined) maps = new IndexMaps();
    maps.move(before?.inFile ?? new Map(), analysis.inFile);
    at = analysis;
    return maps;
  };
}

class IndexMaps implements MechanismIndex {
  readonly #listed = new FileIndex<Mechanism>();
  /** Of files other than the call's own, which are few. */
  readonly #standing = new FileIndex<string>();
  readonly #declared = new Map<Mechanism, LocatedMechanism>();

  move(before: Analysis["inFile"], now: Analysis["inFile"]): void {
    const files = differingFiles(before, now);
    for (const file of files) {
      for (const { declared } of before.get(file)?.mechanisms ?? []) if (declared !== undefined) this.#declared.delete(declared);
    }
    for (const file of files) {
      const { mechanisms = [], robots = [] }: Partial<FileAnalysis> = now.get(file) ?? {};
      for (const mechanism of mechanisms) {
        if (mechanism.declared !== undefined) this.#declared.set(mechanism.declared, { file, mechanism });
      }
      this.#listed.set(
        file,
        robots.flatMap(({ declared }) => declared?.mechanisms ?? []),
      );
      const standing = new Set([...filesStoodIn({ mechanisms }), ...robots.flatMap(({ at, call }) => [at.file, call.span.file])]);
      standing.delete(file);
      this.#standing.set(file, standing);
    }
  }

  declared(mechanism: Mechanism): LocatedMechanism | undefined {
    return this.#declared.get(mechanism);
  }

  listing(mechanism: Mechanism): Iterable<string> {
    return this.#listed.filesOf(mechanism);
  }

  isListed(mechanism: Mechanism): boolean {
    return this.#listed.has(mechanism);
  }

  standingIn(file: string): ReadonlySet<string> {
    return new Set([file, ...this.#standing.filesOf(file)]);
  }
}

/** Files in which mechanisms have their place or may have hints. */
export function filesStoodIn({ mechanisms }: Pick<FileAnalysis, "mechanisms">): ReadonlySet<string> {
  const files = new Set<string>();
  for (const mechanism of mechanisms) {
    files.add(mechanism.at.file);
    for (const file of filesWithHints(mechanism)) files.add(file);
  }
  return files;
}

export type MechanismsIn = (analysis: Analysis, file: string) => readonly AnalysedMechanism[];

/** Mechanisms that may have their place or a hint in a file, in the analysis's order. Kept for each analysis, which is asked more than once. */
export function createMechanismsReader(indexOf: IndexOf): MechanismsIn {
  const known = new WeakMap<Analysis, Map<string, readonly AnalysedMechanism[]>>();
  return (analysis, file) => {
    const byFile = known.get(analysis) ?? new Map<string, readonly AnalysedMechanism[]>();
    known.set(analysis, byFile);
    const before = byFile.get(file);
    if (before !== undefined) return before;
    // Files of an analysis are in order of name.
    const files = [...indexOf(analysis).standingIn(file)].sort();
    const mechanisms = files.flatMap((one) => analysis.inFile.get(one)?.mechanisms ?? []);
    byFile.set(file, mechanisms);
    return mechanisms;
  };
}
