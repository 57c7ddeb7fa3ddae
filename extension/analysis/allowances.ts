/** `// loadmark-allow rule: reason` above a mechanism or a robot: silences one rule there. A reason is required; one that matches nothing is told. */
import type { Span } from "../evaluator/value.js";
import { badDeclaration } from "../rules/badDeclaration.js";
import { RULES } from "../rules/table.js";
import { nearest } from "../units/nearest.js";
import type { Finding } from "./analysis.js";
import type { Declared } from "./declared.js";
import { sameSpan } from "./spans.js";

/** The findings of a file that no allowance in it silences, and those about the allowances themselves. */
export function applyAllowances(findings: readonly Finding[], allowances: Declared["allowances"]): readonly Finding[] {
  if (allowances.length === 0) return findings;
  const about: Finding[] = [];
  const silenced = new Set<Finding>();
  for (const { at, rule, reason, names, robots } of allowances) {
    const isMeant = (finding: Finding): boolean =>
      finding.mechanism === null ? robots.some((one) => sameSpan(finding.at, one)) : names.has(finding.mechanism);
    const hit = findings.filter((finding) => finding.rule === rule && isMeant(finding));
    const [name = null] = names;
    const refusal = refuse(rule, reason, hit.length > 0, name);
    if (refusal !== undefined) about.push(refusal(at));
    else for (const finding of hit) silenced.add(finding);
  }
  return [...findings.filter((finding) => !silenced.has(finding)), ...about];
}

function refuse(rule: string, reason: string, matches: boolean, mechanism: string | null): ((at: Span) => Finding) | undefined {
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
