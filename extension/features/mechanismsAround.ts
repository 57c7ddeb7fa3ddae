/** The mechanisms in whose declaration a place lies: what a chart that follows the caret shows. */
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";

/** From the binding to the end of the call; several where a loop declares them by one piece of text. */
export function mechanismsAround(analysis: Analysis, file: string, offset: number): readonly AnalysedMechanism[] {
  return analysis.mechanisms.filter(({ at, call: { span } }) => {
    if (span.file !== file) return false;
    const start = at.file === file ? Math.min(at.start, span.start) : span.start;
    return start <= offset && offset <= span.end;
  });
}
