/** What a result may tell otherwise than the one before it: by what was analysed, and by the texts, which places rest on. */
import { type AnalysisChanges, changesBetween } from "../features/analysisChanges.js";
import { filesStoodIn, type IndexOf } from "../features/mechanismIndex.js";
import type { Result } from "./session.js";

export interface ResultChanges extends AnalysisChanges {
  /** Files whose text, version or address may be another; `undefined` where any may. */
  readonly texts: ReadonlySet<string> | undefined;
}

export function resultChanges(before: Result, now: Result, indexOf: IndexOf): ResultChanges {
  return {
    ...changesBetween(before.analysis, now.analysis, indexOf(now.analysis)),
    texts: now.snapshot.changes?.between(before.snapshot, now.snapshot),
  };
}

/** Files beside whose text something else may be told; `undefined` where beside any. */
export function retoldFiles(before: Result, now: Result, { touched, texts }: ResultChanges): ReadonlySet<string> | undefined {
  if (texts === undefined) return undefined;
  const files = new Set(texts);
  for (const file of touched) {
    for (const { analysis } of [before, now]) {
      const declared = analysis.inFile.get(file);
      if (declared !== undefined) for (const one of filesStoodIn(declared)) files.add(one);
    }
  }
  return files;
}
