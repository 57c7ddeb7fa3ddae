/** The one line that the status bar shows about the whole workspace. */
import type { Analysis } from "../analysis/analysis.js";
import { type State, verdictOf } from "./verdict.js";

export interface Status {
  /** A few words, plain text. */
  readonly text: string;
  /** Plain text. */
  readonly tooltip: string;
  readonly state: State;
}

/** `undefined` where nothing is declared: there is then nothing to show. */
export function statusOf(analysis: Analysis): Status | undefined {
  const { mechanisms, motors, robots, findings } = analysis;
  if (mechanisms.length + motors.length + robots.length === 0) return undefined;
  const errors = findings.filter(({ level }) => level === "error").length;
  const warnings = findings.filter(({ level }) => level === "warning").length;
  // Only one without numbers can be unknown: the others need no verdict, and there may be hundreds.
  const unknown = mechanisms.filter(
    (mechanism) => mechanism.numbers === undefined && verdictOf(analysis, mechanism).state === "unknown",
  ).length;
  const tooltip = [
    count(mechanisms.length, "mechanism"),
    ...(robots.length > 0 ? [count(robots.length, "robot")] : []),
    count(errors, "error"),
    count(warnings, "warning"),
    ...(unknown > 0 ? [`${unknown} not checked`] : []),
  ].join(", ");
  if (errors > 0) return { text: count(errors, "error"), tooltip, state: "error" };
  if (warnings > 0) return { text: count(warnings, "warning"), tooltip, state: "warning" };
  if (unknown > 0) return { text: `${unknown} not checked`, tooltip, state: "unknown" };
  return {
    text: mechanisms.length === 0 ? "no mechanisms" : `${count(mechanisms.length, "mechanism")} fine`,
    tooltip,
    state: "fine",
  };
}

function count(number: number, noun: string): string {
  return `${number} ${noun}${number === 1 ? "" : "s"}`;
}
