/** A fixture with a cursor, which is a comment that holds nothing but a bar, analysed. */

import { type Analyser, createAnalyser } from "../../extension/analysis/analyser.js";
import type { Analysis } from "../../extension/analysis/analysis.js";
import { readFixture } from "./fixture.js";
import { parser as ts } from "./parser.js";

export interface Analysed {
  readonly analysis: Analysis;
  readonly analyse: Analyser["analyse"];
  readonly files: ReadonlyMap<string, string>;
  /** Where the cursor is; the start of the first file in a fixture without one. */
  readonly cursor: { readonly file: string; readonly offset: number };
}

const CURSOR = "/*|*/";

export function analyseWithCursor(source: string): Analysed {
  const files = new Map<string, string>();
  const cursors: Analysed["cursor"][] = [];
  for (const [file, marked] of readFixture(source).files) {
    const [before = "", ...after] = marked.split(CURSOR);
    if (after.length > 0) cursors.push({ file, offset: before.length });
    if (after.length > 1 || cursors.length > 1) throw new Error("A fixture has one cursor.");
    files.set(file, before + after.join(""));
  }
  const { analyse } = createAnalyser(ts);
  const roots = [...files.keys()].filter((file) => !file.endsWith(".json"));
  const analysis = analyse(roots, { read: (file) => files.get(file) ?? null });
  return { analysis, analyse, files, cursor: cursors[0] ?? { file: roots[0] ?? "", offset: 0 } };
}
