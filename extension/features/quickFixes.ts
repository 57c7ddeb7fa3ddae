/**
 * What the editor offers for findings: the word or unit that was meant, and last the comment that allows the finding.
 *
 * Edits only; nothing is applied here. Each is offered singly.
 */
import type { AnalysedMechanism, AnalysedRobot, Analysis, Finding } from "../analysis/analysis.js";
import type { Proposal } from "../analysis/proposal.js";
import { sameSpan } from "../analysis/spans.js";
import type { LocatedIssue, Span } from "../evaluator/value.js";
import { plainText } from "./inertText.js";

export interface QuickFix {
  readonly title: string;
  readonly finding: Finding;
  /** `propose`: changes the design, each singly; `allow`: silences instead of mending, hosts list it last. */
  readonly kind: "mend" | "propose" | "allow";
  /** Empty for the nearest miss, which its title tells. */
  readonly edits: readonly Edit[];
  /** Stretch of the first edit's `newText` that the user is to replace, offsets within it. */
  readonly placeholder?: { readonly start: number; readonly end: number };
}

export interface Edit extends Span {
  readonly newText: string;
}

/** Findings that touch the range. */
export function findingsTouching({ findings }: Analysis, file: string, start: number, end: number): readonly Finding[] {
  return findings.filter(({ at }) => at.file === file && at.start <= end && start <= at.end);
}

/** Fixes for the findings that touch the range: what was meant, then what is proposed for them, then allowances. */
export function quickFixesAt(
  analysis: Analysis,
  file: string,
  start: number,
  end: number,
  proposals: readonly Proposal[] = [],
): QuickFix[] {
  const touched = findingsTouching(analysis, file, start, end);
  const mending = touched.flatMap((finding) => mend(analysis, finding));
  const proposed = touched.flatMap((finding) =>
    proposals.filter((one) => one.finding === finding).map((one) => proposedFix(finding, one)),
  );
  return [...mending, ...proposed, ...touched.flatMap((finding) => allow(analysis, finding))];
}

/** A menu's line: room for the numbers that a proposal predicts. */
const LONGEST_TITLE = 180;

function proposedFix(finding: Finding, { title, edits }: Proposal): QuickFix {
  return { title: plainText(title, LONGEST_TITLE), finding, kind: "propose", edits };
}

/** The declarations' refusals end in the text that was meant. */
const MEANT = /(?:did you mean|between number and unit:) ("(?:[^"\\]|\\.)+"|`[^`]+`)/;

function mend(analysis: Analysis, finding: Finding): QuickFix[] {
  if (finding.rule !== "bad-declaration" && finding.rule !== "not-constant") return [];
  const meant = MEANT.exec(finding.message)?.[1];
  const at = meant === undefined ? undefined : (issueAt(analysis, finding)?.source ?? finding.at);
  const old = at && analysis.snapshot.read(at.file)?.slice(at.start, at.end);
  if (meant === undefined || at === undefined || typeof old !== "string") return [];
  const newText = rewritten(old, meant.slice(1, -1));
  if (newText === undefined) return [];
  return [{ title: `Change to ${plainText(newText)}`, finding, kind: "mend", edits: [{ ...at, newText }] }];
}

function issueAt({ files }: Analysis, { at, message }: Finding): LocatedIssue | undefined {
  const issues = files.get(at.file)?.calls.flatMap((call) => call.issues) ?? [];
  return issues.find((issue) => sameSpan(issue.span, at) && message.toLowerCase().startsWith(issue.message.toLowerCase()));
}

/** Only whole words and whole strings are replaced, in the quotes that they have; an expression is the user's own affair. */
function rewritten(old: string, meant: string): string | undefined {
  if (WORD.test(old)) return WORD.test(meant) ? meant : undefined;
  const quoted = /^(["'`])(?:[^"'`\\$]|\$(?!\{))*\1$/.exec(old);
  if (quoted !== null) return `${quoted[1]}${meant}${quoted[1]}`;
  const allowance = /^(\/\/\s*loadmark-allow\s+)[\w-]+(.*)$/.exec(old);
  if (allowance !== null) return `${allowance[1]}${meant}${allowance[2]}`;
  const dot = old.lastIndexOf(".") + 1;
  const isAccess = dot > 0 && WORD.test(old.slice(dot).trimStart()) && /^[\p{ID_Start}$_]/u.test(old);
  return isAccess ? `${old.slice(0, dot)}${meant}` : undefined;
}

const WORD = /^[\p{ID_Start}$_][\p{ID_Continue}$]*$/u;

/** Rules about what the code says, not about what the motor can do, cannot be allowed. */
const NOT_TO_ALLOW: ReadonlySet<Finding["rule"]> = new Set(["bad-declaration", "not-constant", "sheet-contradicts"]);

function allow(analysis: Analysis, finding: Finding): QuickFix[] {
  const declared = finding.robot === undefined ? mechanismOf(analysis, finding) : robotOf(analysis, finding);
  const text = declared && analysis.snapshot.read(declared.call.span.file);
  if (NOT_TO_ALLOW.has(finding.rule) || declared === undefined || typeof text !== "string") return [];
  const { call } = declared;
  const first = Math.min(call.binding?.span.start ?? call.span.start, call.span.start);
  const lineStart = text.lastIndexOf("\n", first - 1) + 1;
  const indent = /^[ \t]*/.exec(text.slice(lineStart))?.[0] ?? "";
  const lineBreak = text.includes("\r\n") ? "\r\n" : "\n";
  const start = `${indent}// loadmark-allow ${finding.rule}: `;
  return [
    {
      title: `Allow "${finding.rule}" for this ${finding.robot === undefined ? "mechanism" : "robot"}`,
      finding,
      kind: "allow",
      edits: [{ file: call.span.file, start: lineStart, end: lineStart, newText: `${start}${REASON}${lineBreak}` }],
      placeholder: { start: start.length, end: start.length + REASON.length },
    },
  ];
}

const REASON = "reason";

function mechanismOf({ mechanisms }: Analysis, { mechanism, at }: Finding): AnalysedMechanism | undefined {
  if (mechanism === null) return undefined;
  const named = mechanisms.filter(({ name }) => name === mechanism);
  return named.find((one) => sameSpan(one.at, at)) ?? named[0];
}

function robotOf({ robots }: Analysis, { at, robot }: Finding): AnalysedRobot | undefined {
  return robots.find((one) => one.name === robot?.name && sameSpan(one.at, at));
}
