/**
 * One view of the chart panel as the server asks for it: what it may be about, its data, and what to say where there are none.
 *
 * Charts are plain SI data. What the page does with them, and how the answer travels, is not known here.
 */
import type { Analyser } from "../../analysis/analyser.js";
import type { AnalysedMechanism, AnalysedRobot, Analysis } from "../../analysis/analysis.js";
import type { Edit } from "../../analysis/writeChange.js";

/** Whose chart is wished for. */
export interface Wish {
  /** At the caret; several where a loop declares them by one piece of text. */
  readonly mechanisms: readonly AnalysedMechanism[];
  readonly robots: readonly AnalysedRobot[];
  /** The file of the caret. */
  readonly file: string | undefined;
  /** What is shown now, by name. */
  readonly shownMechanism: string | null;
  readonly shownRobot: string | null;
}

export interface NoChart {
  readonly reason: "nothing-declared" | "nothing-computed" | "does-not-apply";
  readonly says: readonly string[];
  readonly example: string | null;
}

/** `Want`: what the page wants to see of it. */
export interface ChartFeature<Chart, Want> {
  /** Names of mechanisms or robots, the most wanted first. */
  readonly subjects: (analysis: Analysis, wish: Wish) => readonly string[];
  /** `undefined` for an unknown name, or where there are no numbers. */
  readonly chartOf: (analysis: Analysis, name: string, want: Want) => Chart | undefined;
  /** Long work that `chartOf` rests on, step by step: the host stops it when the text changes. Absent: there is none. */
  readonly prepare?: (analysis: Analysis, name: string, want: Want) => Generator<undefined, void>;
  /** Why the chart of a name that has one no more is its last result. */
  readonly whyOld: (analysis: Analysis, name: string) => string;
  /** What the answer holds beside the chart; `analyse` says what another text would give. */
  readonly besides?: (
    analysis: Analysis,
    name: string,
    want: Want,
    analyse: Analyser["analyse"],
  ) => Readonly<Record<string, unknown>>;
  /** What would write what is wanted to the code; `undefined` where nothing would. */
  readonly editsFor?: (analysis: Analysis, name: string, want: Want) => readonly Edit[] | undefined;
  /** What to say where no subject has a chart. */
  readonly nothing: (analysis: Analysis, wish: Wish) => NoChart;
}
