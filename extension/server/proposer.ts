/**
 * Searches proposals when they are asked for, a slice at a time, so that the server goes on answering; a change of any text stops it.
 *
 * What was found is kept as long as its finding lives, since the editor asks again with every move of the caret.
 */
import type { Finding } from "../analysis/analysis.js";
import type { Proposal } from "../analysis/proposal.js";
import { searchProposals } from "../analysis/propose.js";
import type { Result } from "./session.js";
import { runInSlices, type Slices } from "./slices.js";

/** The proposals for a finding of the result; `undefined` where the text changed before they were found. */
export type Proposer = (result: Result, finding: Finding) => Promise<readonly Proposal[] | undefined>;

export function createProposer(slices: Slices): Proposer {
  const known = new WeakMap<Finding, readonly Proposal[]>();
  const running = new WeakMap<Finding, Promise<readonly Proposal[] | undefined>>();
  return async (result, finding) => {
    const before = known.get(finding) ?? running.get(finding);
    if (before !== undefined) return before;
    const search = searchInSlices(result, finding, slices);
    running.set(finding, search);
    try {
      const found = await search;
      if (found !== undefined) known.set(finding, found);
      return found;
    } finally {
      running.delete(finding);
    }
  };
}

async function searchInSlices(
  { analysis, analyse }: Result,
  finding: Finding,
  slices: Slices,
): Promise<readonly Proposal[] | undefined> {
  return (await runInSlices(searchProposals(analysis, finding, analyse), slices))?.result;
}
