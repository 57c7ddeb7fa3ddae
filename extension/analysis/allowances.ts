/** `// loadmark-allow rule: reason` above a mechanism or a robot: silences one rule there. A reason is required; one that matches nothing is told. */
import type { DefinitionCall, Span } from "../evaluator/value.js";
import { badDeclaration } from "../rules/badDeclaration.js";
import { RULES } from "../rules/table.js";
import { nearest } from "../units/nearest.js";
import type { Finding } from "./analysis.js";
import type { Declared } from "./declared.js";

/** The findings that no allowance silences, and those about the allowances themselves. */
export function applyAllowances(findings: readonly Finding[], declared: Declared): Finding[] {
  const about: Finding[] = [];
  const silenced = new Set<Finding>();
  for (const { at, text, names, robots } of listComments(declared)) {
    const match = ALLOWANCE.exec(text.trim());
    if (match === null) continue;
    const [, rule = "", reason = ""] = match;
    const isMeant = (finding: Finding): boolean =>
      finding.mechanism === null ? robots.some((one) => isAt(finding, one)) : names.has(finding.mechanism);
    const hit = findings.filter((finding) => finding.rule === rule && isMeant(finding));
    const [name = null] = names;
    const refusal = refuse(rule, reason, hit.length > 0, name);
    if (refusal !== undefined) about.push(refusal(at));
    else for (const finding of hit) silenced.add(finding);
  }
  return [...findings.filter((finding) => !silenced.has(finding)), ...about];
}

const ALLOWANCE = /^\/\/\s*loadmark-allow\b\s*([\w-]*)\s*(?::\s*(.*))?$/;

/** Rules that are allowed, with a reason, above a declaration. */
export function allowedRules({ leadingComments }: DefinitionCall): Set<string> {
  return new Set(
    leadingComments.flatMap(({ text }) => {
      const [, rule = "", reason = ""] = ALLOWANCE.exec(text.trim()) ?? [];
      return reason.trim() === "" ? [] : [rule];
    }),
  );
}

interface Comment {
  readonly at: Span;
  readonly text: string;
  /** The mechanisms below it: several where a loop or a helper declares them by one piece of text. */
  readonly names: Set<string>;
  /** Where the findings of a robot below it sit. */
  readonly robots: Span[];
}

function listComments({ mechanisms, robots }: Declared): Comment[] {
  const comments = new Map<string, Comment>();
  const commentsAbove = ({ leadingComments }: DefinitionCall): Comment[] =>
    leadingComments.map(({ text, span }) => {
      const key = `${span.start} ${span.file}`;
      const comment = comments.get(key) ?? { at: span, text, names: new Set(), robots: [] };
      comments.set(key, comment);
      return comment;
    });
  for (const { name, call } of mechanisms) for (const { names } of commentsAbove(call)) names.add(name);
  for (const { at, call } of robots) for (const comment of commentsAbove(call)) comment.robots.push(at);
  return [...comments.values()];
}

function isAt({ at }: Finding, { file, start, end }: Span): boolean {
  return at.file === file && at.start === start && at.end === end;
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
