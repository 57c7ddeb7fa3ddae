/** What a proposal is: a change that clears a finding, with the result that it is predicted to have. Plain data; nothing is applied. */
import type { Finding } from "./analysis.js";
import type { Edit } from "./writeChange.js";

/** Results at the hardest position, over the travel and at stall; `null` where they do not apply. */
export interface Predicted {
  readonly ratio: number;
  readonly stallShare: number | null;
  readonly motorCurrentA: number;
  readonly timeS: number | null;
  /** In the travel; null: protection stays closed. */
  readonly tripsAfterS: number | null;
  /** Share of what opens it that protection has left at the end of the travel, 0 where it opens; null without any. */
  readonly tripMargin: number | null;
  readonly windingPeakC: number | null;
  /** What is left below the winding's limit in the travel, K; below 0 where it is passed. */
  readonly windingMarginK: number | null;
  readonly stalledTripsAfterS: number | null;
  readonly stalledLimitAfterS: number | null;
}

/** Results over the load cycle. */
export interface RobotPredicted {
  readonly lowestVoltageV: number;
  readonly peakCurrentA: number;
  /** Share of what opens it that the protection in question has left, or the one that has least left; null without any. */
  readonly tripMargin: number | null;
  /** First opening of the same; null: it stays closed. */
  readonly tripsAfterS: number | null;
  /** The hottest winding; null without thermal data. */
  readonly windingPeakC: number | null;
  readonly cycleS: number;
  readonly cyclesDone: number;
}

interface ProposalParts {
  readonly finding: Finding;
  readonly rule: Finding["rule"];
  /** One sentence or two: what is changed, what it gives instead of what is, what gets worse, whom else it touches. */
  readonly summary: string;
  /** The same for a menu's line: without what is, which stands beside it. */
  readonly title: string;
  /** Other mechanisms whose numbers change with it; for a robot's proposal, every mechanism whose numbers do. */
  readonly touches: readonly Touched[];
  /** Empty where nothing in stock clears the finding: the summary then tells the nearest miss. */
  readonly edits: readonly Edit[];
}

export interface Touched {
  readonly mechanism: string;
  readonly predicted: Predicted;
}

export type Proposal = ProposalParts &
  (
    | { readonly mechanism: string; readonly robot: null; readonly predicted: Predicted }
    | { readonly mechanism: null; readonly robot: string; readonly predicted: RobotPredicted }
  );
