/** Findings about the declarations themselves: refused arguments, names used twice, values that cannot be known. */
import type { DefinitionCall, FileEvaluation, Snapshot, Span, Unknown } from "../evaluator/value.js";
import { badDeclaration, tellIssue, tellMissing, tellNameTwice } from "../rules/badDeclaration.js";
import { notConstant, tellUnknown } from "../rules/notConstant.js";
import type { Finding } from "./analysis.js";
import { type Declared, stringIn } from "./declared.js";

type Finder = (evaluations: readonly FileEvaluation[], declared: Declared, snapshot: Snapshot) => Finding[];

/** What concerns one file alone is kept for as long as its evaluation is; names and causes are compared over all files. */
export function createDeclarationFinder(): Finder {
  const known = new WeakMap<FileEvaluation, FileFacts>();
  const factsOf = (evaluation: FileEvaluation, snapshot: Snapshot): FileFacts => {
    const before = known.get(evaluation);
    if (before !== undefined) return before;
    const { calls } = evaluation;
    const facts: FileFacts = {
      findings: [...findProblem(evaluation), ...calls.flatMap((call) => findIssues(call, calls, snapshot))],
      unknowns: calls.flatMap((call) => call.unknowns),
      names: calls.flatMap(namesGivenBy),
    };
    known.set(evaluation, facts);
    return facts;
  };
  return (evaluations, declared, snapshot) => {
    const all = evaluations.map((evaluation) => factsOf(evaluation, snapshot));
    const names = all.flatMap((facts) => facts.names);
    const aboutText = [
      ...all.flatMap((facts) => facts.findings),
      ...findNamesTwice("mechanism", names),
      ...findNamesTwice("robot", names),
    ];
    const unknowns = findUnknowns(all.flatMap((facts) => facts.unknowns));
    return [...mergeAlike(aboutText), ...unknowns].map((finding) => ({
      ...finding,
      mechanism: finding.mechanism ?? mechanismAround(finding.at, declared),
    }));
  };
}

interface FileFacts {
  readonly findings: readonly Finding[];
  readonly unknowns: readonly Unknown[];
  readonly names: readonly GivenName[];
}

interface GivenName {
  readonly kind: "mechanism" | "robot";
  readonly name: string;
  readonly at: Span;
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

/** One finding per root cause, at the use that lies nearest to it; other uses are related. */
function findUnknowns(unknowns: readonly Unknown[]): Finding[] {
  const byRoot = new Map<string, Unknown[]>();
  for (const unknown of unknowns) {
    const root = rootOf(unknown);
    const key = JSON.stringify([root.origin.span, root.reason.code]);
    const uses = byRoot.get(key);
    if (uses === undefined) byRoot.set(key, [unknown]);
    else uses.push(unknown);
  }
  return [...byRoot.values()].map((uses) => {
    const nearest = uses.reduce((best, use) => (depthOf(use) < depthOf(best) ? use : best));
    const { message, chain } = tellUnknown(nearest);
    const root = rootOf(nearest);
    const missing = isMissing(root);
    const steps = chain.map((link) => ({
      at: link.origin.span,
      message: link === root ? "This cannot be known." : "It comes through here.",
    }));
    const others = uses
      .filter((use) => use !== nearest && !sameSpan(use.origin.span, nearest.origin.span))
      .map((use) => ({ at: use.origin.span, message: "This depends on it too." }));
    return {
      rule: missing ? badDeclaration.id : notConstant.id,
      level: missing ? badDeclaration.level : notConstant.level,
      mechanism: null,
      message: missing ? tellMissing(root) : message,
      at: nearest.origin.span,
      related: distinct([...steps, ...others], nearest.origin.span),
    };
  });
}

function namesGivenBy({ definition, args }: DefinitionCall): GivenName[] {
  const [value] = args;
  const name = value === undefined ? undefined : stringIn(value);
  if (value === undefined || name === undefined || (definition !== "mechanism" && definition !== "robot")) return [];
  return [{ kind: definition, name, at: value.origin.span }];
}

function findNamesTwice(wanted: GivenName["kind"], names: readonly GivenName[]): Finding[] {
  const first = new Map<string, Span>();
  const findings: Finding[] = [];
  for (const { kind, name, at } of names) {
    if (kind !== wanted) continue;
    const before = first.get(name);
    if (before === undefined) first.set(name, at);
    else {
      findings.push({
        ...badDeclaration,
        rule: badDeclaration.id,
        mechanism: kind === "mechanism" ? name : null,
        message: tellNameTwice(kind, name),
        at,
        related: [{ at: before, message: "First used here." }],
      });
    }
  }
  return findings;
}

/** The runs of a loop or a helper say the same of its text: told once, with all that is related. */
function mergeAlike(findings: readonly Finding[]): Finding[] {
  const merged = new Map<string, Finding>();
  for (const finding of findings) {
    const { at, rule, message, related } = finding;
    const key = JSON.stringify([at.file, at.start, at.end, rule, message]);
    const before = merged.get(key);
    merged.set(key, { ...(before ?? finding), related: distinct([...(before?.related ?? []), ...related], at) });
  }
  return [...merged.values()];
}

function mechanismAround(at: Span, declared: Declared): string | null {
  const around = declared.mechanisms.find(
    ({ call: { span } }) => span.file === at.file && span.start <= at.start && at.end <= span.end,
  );
  return around?.name ?? null;
}

function isMissing(unknown: Unknown): boolean {
  return rootOf(unknown).reason.code === "missing";
}

function rootOf(unknown: Unknown): Unknown {
  return unknown.cause === undefined ? unknown : rootOf(unknown.cause);
}

function depthOf(unknown: Unknown): number {
  return unknown.cause === undefined ? 0 : 1 + depthOf(unknown.cause);
}

function distinct<Item extends { readonly at: Span }>(items: readonly Item[], except: Span): Item[] {
  const seen = new Set([keyOf(except)]);
  return items.filter(({ at }) => seen.size < seen.add(keyOf(at)).size);
}

function keyOf({ file, start, end }: Span): string {
  return `${start} ${end} ${file}`;
}

function sameSpan(a: Span, b: Span): boolean {
  return a.file === b.file && a.start === b.start && a.end === b.end;
}
