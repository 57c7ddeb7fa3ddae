/** The robots in whose declaration a place lies. */
import type { AnalysedRobot, Analysis } from "../analysis/analysis.js";

export function robotsAround(analysis: Analysis, file: string, offset: number): readonly AnalysedRobot[] {
  return analysis.robots.filter(({ at, call: { span } }) => {
    if (span.file !== file) return false;
    const start = at.file === file ? Math.min(at.start, span.start) : span.start;
    return start <= offset && offset <= span.end;
  });
}
