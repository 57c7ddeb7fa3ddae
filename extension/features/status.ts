/**
 * The one line that the status bar shows about the whole workspace.
 *
 * Counts the findings of files where something else is found; the others' counts stand.
 */
import type { Analysis } from "../analysis/analysis.js";
import type { Counts } from "./mechanismTree.js";
import type { State } from "./verdict.js";

export interface Status {
  /** A few words, plain text. */
  readonly text: string;
  /** Plain text. */
  readonly tooltip: string;
  readonly state: State;
}

export interface FindingCounts {
  readonly errors: number;
  readonly warnings: number;
}

/** `found`: files in which something else is found than in the analysis given before; absent: in any. */
export type CountsOf = (analysis: Analysis, found?: ReadonlySet<string>) => FindingCounts;

export function createFindingCounter(): CountsOf {
  const byFile = new Map<string, FindingCounts>();
  let [errors, warnings] = [0, 0];
  return ({ findingsIn }, found = new Set([...byFile.keys(), ...findingsIn.keys()])) => {
    for (const file of found) {
      const before = byFile.get(file) ?? NONE;
      const findings = findingsIn.get(file) ?? [];
      const now = {
        errors: findings.filter(({ level }) => level === "error").length,
        warnings: findings.filter(({ level }) => level === "warning").length,
      };
      errors += now.errors - before.errors;
      warnings += now.warnings - before.warnings;
      if (findings.length === 0) byFile.delete(file);
      else byFile.set(file, now);
    }
    return { errors, warnings };
  };
}

const NONE: FindingCounts = { errors: 0, warnings: 0 };

/** `undefined` where nothing is declared: there is then nothing to show. */
export function statusOf({ mechanisms, unchecked, motors, robots }: Counts, found: FindingCounts): Status | undefined {
  const { errors, warnings } = found;
  if (mechanisms + motors + robots === 0) return undefined;
  const tooltip = [
    count(mechanisms, "mechanism"),
    ...(robots > 0 ? [count(robots, "robot")] : []),
    count(errors, "error"),
    count(warnings, "warning"),
    ...(unchecked > 0 ? [`${unchecked} not checked`] : []),
  ].join(", ");
  if (errors > 0) return { text: count(errors, "error"), tooltip, state: "error" };
  if (warnings > 0) return { text: count(warnings, "warning"), tooltip, state: "warning" };
  if (unchecked > 0) return { text: `${unchecked} not checked`, tooltip, state: "unknown" };
  return {
    text: mechanisms === 0 ? "no mechanisms" : `${count(mechanisms, "mechanism")} fine`,
    tooltip,
    state: "fine",
  };
}

function count(number: number, noun: string): string {
  return `${number} ${noun}${number === 1 ? "" : "s"}`;
}
