/** What the page says instead of a chart, and what to do then. */
import type { ChartAnswer } from "../../extension/protocol/chartMessages.js";

type Reason = Extract<ChartAnswer, { kind: "nothing" }>["reason"];

const TEXTS: Readonly<Record<Reason, string>> = {
  "nothing-declared":
    'No mechanism is declared in this workspace yet. Declare one with mechanism(…) from "loadmark", and its operating point appears here.',
  "nothing-computed":
    "No mechanism can be computed yet. The Problems view says which values are missing; the operating point appears here once they are known.",
};

export function emptyText(reason: Reason): string {
  return TEXTS[reason];
}
