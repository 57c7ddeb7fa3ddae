/**
 * Searches proposals when they are asked for, a slice at a time, so that the server goes on answering; a change of any text stops it.
 *
 * What was found is kept as long as its finding lives, since the editor asks again with every move of the caret.
 */
import type { Finding } from "../analysis/analysis.js";
import type { Proposal } from "../analysis/proposal.js";
import { searchProposals } from "../analysis/propose.js";
import type { Result } from "./session.js";

/** The proposals for a finding of the result; `undefined` where the text changed before they were found. */
export type Proposer = (result: Result, finding: Finding) => Promise<readonly Proposal[] | undefined>;

/** Longest time between two chances for others, ms: a little more than one candidate takes. */
const SLICE_MS = 15;

/** `moment`: counts what happened to texts. */
export function createProposer(moment: () => number, sliceMs = SLICE_MS): Proposer {
  const known = new WeakMap<Finding, readonly Proposal[]>();
  const running = new WeakMap<Finding, Promise<readonly Proposal[] | undefined>>();
  return async (result, finding) => {
    const before = known.get(finding) ?? running.get(finding);
    if (before !== undefined) return before;
    const search = searchInSlices(result, finding, moment, sliceMs);
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
  moment: () => number,
  sliceMs: number,
): Promise<readonly Proposal[] | undefined> {
  const started = moment();
  const search = searchProposals(analysis, finding, analyse);
  for (;;) {
    const end = performance.now() + sliceMs;
    do {
      const next = search.next();
      if (next.done === true) return next.value;
    } while (performance.now() < end);
    await new Promise<void>((resolve) => setTimeout(resolve, 0));
    if (moment() !== started) return undefined;
  }
}
