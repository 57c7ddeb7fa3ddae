/** The tree of mechanisms and the status of one analysis, as for a client that has just come. */
import type { Analysis } from "../../extension/analysis/analysis.js";
import { createIndexReader } from "../../extension/features/mechanismIndex.js";
import { createTreeReader, type MechanismNode, type RobotNode } from "../../extension/features/mechanismTree.js";
import { createFindingCounter, type Status, statusOf } from "../../extension/features/status.js";

export interface Tree {
  readonly robots: readonly RobotNode[];
  readonly apart: readonly MechanismNode[];
}

export function wholeTree(analysis: Analysis): Tree {
  const { byFile } = createTreeReader(createIndexReader())(analysis);
  const trees = [...analysis.inFile.keys()].flatMap((file) => byFile.get(file) ?? []);
  return { robots: trees.flatMap(({ robots }) => robots), apart: trees.flatMap(({ apart }) => apart) };
}

export function wholeStatus(analysis: Analysis): Status | undefined {
  const { counts } = createTreeReader(createIndexReader())(analysis);
  return statusOf(counts, createFindingCounter()(analysis));
}
