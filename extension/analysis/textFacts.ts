/** What one file's declarations say by themselves: what is refused in them, what is unknown, which names they give. */
import type { DefinitionCall, FileEvaluation, Snapshot, Span, Unknown } from "../evaluator/value.js";
import { badDeclaration, tellIssue } from "../rules/badDeclaration.js";
import { notConstant, tellUnknown } from "../rules/notConstant.js";
import type { Finding } from "./analysis.js";
import { stringIn } from "./declared.js";
import { isMissing } from "./unknownFindings.js";

export interface TextFacts {
  /** Those that sit in the file. */
  readonly findings: readonly Finding[];
  /** Those that sit in a helper's file that is not analysed by itself. */
  readonly strays: readonly Finding[];
  readonly unknowns: readonly Unknown[];
  readonly names: readonly GivenName[];
}

export interface GivenName {
  readonly kind: "mechanism" | "robot";
  readonly name: string;
  readonly at: Span;
}

export function readTextFacts(evaluation: FileEvaluation, snapshot: Snapshot): TextFacts {
  const { file, calls } = evaluation;
  const findings = [...findProblem(evaluation), ...calls.flatMap((call) => findIssues(call, calls, snapshot))];
  return {
    findings: findings.filter(({ at }) => at.file === file),
    strays: findings.filter(({ at }) => at.file !== file),
    unknowns: calls.flatMap((call) => call.unknowns),
    names: calls.flatMap(namesGivenBy),
  };
}

/** A file that could not be read at all, such as one nested too deeply for any parser. */
function findProblem({ problem }: FileEvaluation): Finding[] {
  if (problem === undefined) return [];
  const { message } = tellUnknown(problem);
  return [{ rule: notConstant.id, level: notConstant.level, mechanism: null, message, at: problem.origin.span, related: [] }];
}

function findIssues(call: DefinitionCall, calls: readonly DefinitionCall[], snapshot: Snapshot): Finding[] {
  return issuesToTell(call, calls, snapshot).map((issue) => ({
    rule: badDeclaration.id,
    level: badDeclaration.level,
    mechanism: null,
    message: tellIssue(issue),
    at: issue.span,
    related: issue.source ? [{ at: issue.source, message: "The value comes from here." }] : [],
  }));
}

/** Of a call that is still being typed, one issue: the innermost, since the fields around it are yet to come. */
function issuesToTell(call: DefinitionCall, calls: readonly DefinitionCall[], snapshot: Snapshot): DefinitionCall["issues"] {
  if (call.issues.length === 0) return [];
  const { file, start, end } = call.span;
  const isFinished = snapshot.read(file)?.[end - 1] === ")";
  if (isFinished) return call.issues;
  const isTold = calls.some(
    ({ span, issues, unknowns }) =>
      span.file === file && span.start > start && span.end <= end && issues.length + unknowns.filter(isMissing).length > 0,
  );
  return isTold ? [] : call.issues.slice(0, 1);
}

function namesGivenBy({ definition, args }: DefinitionCall): GivenName[] {
  const [value] = args;
  const name = value === undefined ? undefined : stringIn(value);
  if (value === undefined || name === undefined || (definition !== "mechanism" && definition !== "robot")) return [];
  return [{ kind: definition, name, at: value.origin.span }];
}
