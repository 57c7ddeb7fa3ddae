/** `// loadmark-allow rule: reason` above a mechanism: silences one rule there. A reason is required; one that matches nothing is told. */
import type { Span } from "../evaluator/value.js";
import { badDeclaration } from "../rules/badDeclaration.js";
import { RULES } from "../rules/table.js";
import { nearest } from "../units/nearest.js";
import type { Finding } from "./analysis.js";
import type { Declared } from "./declared.js";

/** The findings that no allowance silences, and those about the allowances themselves. */
export function applyAllowances(findings: readonly Finding[], declared: Declared): Finding[] {
  const about: Finding[] = [];
  const silenced = new Set<Finding>();
  for (const { at, text, names } of listComments(declared)) {
    const match = /^\/\/\s*loadmark-allow\b\s*([\w-]*)\s*(?::\s*(.*))?$/.exec(text.trim());
    if (match === null) continue;
    const [, rule = "", reason = ""] = match;
    const hit = findings.filter((finding) => finding.rule === rule && finding.mechanism !== null && names.has(finding.mechanism));
    const [name = ""] = names;
    const refusal = refuse(rule, reason, hit.length > 0, name);
    if (refusal !== undefined) about.push(refusal(at));
    else for (const finding of hit) silenced.add(finding);
  }
  return [...findings.filter((finding) => !silenced.has(finding)), ...about];
}

interface Comment {
  readonly at: Span;
  readonly text: string;
  /** The mechanisms below it: several where a loop or a helper declares them by one piece of text. */
  readonly names: Set<string>;
}

function listComments({ mechanisms }: Declared): Comment[] {
  const comments = new Map<string, Comment>();
  for (const { name, call } of mechanisms) {
    for (const { text, span } of call.leadingComments) {
      const key = `${span.start} ${span.file}`;
      const comment = comments.get(key) ?? { at: span, text, names: new Set() };
      comments.set(key, comment);
      comment.names.add(name);
    }
  }
  return [...comments.values()];
}

function refuse(rule: string, reason: string, matches: boolean, mechanism: string): ((at: Span) => Finding) | undefined {
  const told = (level: Finding["level"], message: string) => (at: Span) => ({
    rule: badDeclaration.id,
    level,
    mechanism,
    message,
    at,
    related: [],
  });
  const names = RULES.map(({ id }) => id);
  if (!names.some((id) => id === rule)) {
    const near = nearest(rule, names);
    return told(
      "error",
      `"${rule}" is not a rule; ${near === undefined ? `known are ${names.join(", ")}` : `did you mean "${near}"?`}`,
    );
  }
  if (reason.trim() === "") return told("error", `The allowance of "${rule}" needs a reason: "// loadmark-allow ${rule}: why".`);
  return matches ? undefined : told("warning", `Nothing to allow: "${rule}" does not speak here. Take the comment away.`);
}
