/**
 * Proposals for a finding: the smallest changes that clear it, each proved by analysing the changed texts.
 *
 * Computed when asked for, never on the typing path; a search hands back control after every candidate, so that a host can stop it when
 * the text changes. What is searched stands in proposeForMechanism.ts and proposeForRobot.ts.
 */
import type { Analyser } from "./analyser.js";
import type { Analysis, Finding } from "./analysis.js";
import type { Proposal } from "./proposal.js";
import { proposeForMechanism } from "./proposeForMechanism.js";
import { proposeForRobot } from "./proposeForRobot.js";
import { runThrough } from "./runThrough.js";

/** Counts what a search has done so far. */
export interface Tally {
  /** Candidates that were solved. */
  solved: number;
}

/** Yields after each candidate; its result are the proposals. `analyse`: of an analyser of its own, so that the changed texts do not push the real ones out of its caches. */
export function searchProposals(
  analysis: Analysis,
  finding: Finding,
  analyse: Analyser["analyse"],
  tally: Tally = { solved: 0 },
): Generator<undefined, Proposal[]> {
  return finding.robot === undefined
    ? proposeForMechanism({ analysis, finding, analyse, tally })
    : proposeForRobot({ analysis, finding, robot: finding.robot, analyse, tally });
}

/** The same without a stop. */
export function proposalsFor(analysis: Analysis, finding: Finding, analyse: Analyser["analyse"], tally?: Tally): Proposal[] {
  return runThrough(searchProposals(analysis, finding, analyse, tally));
}
