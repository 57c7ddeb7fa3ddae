/** `bad-declaration`: wrong units, missing or unknown fields, impossible values, names used twice, code that is not finished. */
import type { LocatedIssue, Unknown } from "../evaluator/value.js";
import type { Level, RuleId } from "./rule.js";

export const badDeclaration: { readonly id: RuleId; readonly level: Level } = { id: "bad-declaration", level: "error" };

/** A refusal of the declarations as a sentence. */
export function tellIssue(issue: LocatedIssue): string {
  return sentence(issue.message);
}

/** Half-typed code: nothing stands where a value should. */
export function tellMissing(unknown: Unknown): string {
  return sentence(unknown.reason.message);
}

/** The second use of a name that must be unique. */
export function tellNameTwice(kind: "mechanism" | "robot", name: string): string {
  return `The name "${name}" is used by another ${kind} already; give this one a name of its own.`;
}

function sentence(text: string): string {
  const capital = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.?!]$/.test(capital) ? capital : `${capital}.`;
}
