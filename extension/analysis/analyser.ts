/**
 * The one entrance: a snapshot of texts in; mechanisms, numbers and findings out.
 *
 * Synchronous, and pure but for its caches: the same snapshot gives the same result. Does not read files; what the snapshot lacks comes
 * back in `wanted`.
 */
import { DEFINITIONS, SPECIFIER } from "../declarations/table.js";
import { createEvaluator } from "../evaluator/evaluator.js";
import type { TypeScript } from "../evaluator/typescript.js";
import type { FileEvaluation, Snapshot } from "../evaluator/value.js";
import { applyAllowances } from "./allowances.js";
import type { Analysis, Finding } from "./analysis.js";
import { findInDeclarations } from "./declarationFindings.js";
import { collectDeclared } from "./declared.js";
import { createJudge } from "./judge.js";
import { createSettingsReader } from "./settings.js";

export interface Analyser {
  /** `roots`: the files to check; what they import is checked with them. File names are slash-separated and absolute, or URIs. */
  analyse(roots: readonly string[], snapshot: Snapshot): Analysis;
}

/** True for texts worth evaluating: a cheap test before any parsing. */
export function mentionsDeclarations(text: string): boolean {
  return text.includes(SPECIFIER);
}

/** `typescript`: the loaded parser, so that loading it stays the host's decision. */
export function createAnalyser(typescript: TypeScript): Analyser {
  const evaluator = createEvaluator(typescript, { specifier: SPECIFIER, definitions: DEFINITIONS });
  const judge = createJudge();
  const readSettings = createSettingsReader(typescript);
  return {
    analyse(roots, snapshot) {
      const files = new Map<string, FileEvaluation>();
      const wanted = new Set<string>();
      const queue = [...roots];
      for (let file = queue.pop(); file !== undefined; file = queue.pop()) {
        if (files.has(file)) continue;
        const text = snapshot.read(file);
        if (text === undefined) wanted.add(file);
        if (typeof text !== "string") continue;
        const evaluation = evaluator.evaluateFile(file, snapshot);
        files.set(file, evaluation);
        for (const one of evaluation.wanted) wanted.add(one);
        queue.push(...evaluation.dependencies.filter((one) => !files.has(one) && isWorthEvaluating(snapshot.read(one))));
      }
      const sorted = new Map([...files].sort(([a], [b]) => (a < b ? -1 : 1)));
      const calls = [...sorted.values()].flatMap((evaluation) => evaluation.calls);
      const settings = readSettings([...sorted.keys()], snapshot);
      for (const one of settings.wanted) wanted.add(one);
      const declared = collectDeclared(calls);
      const judged = judge(declared);
      const found = [...findInDeclarations([...sorted.values()], declared, snapshot), ...judged.findings];
      const findings = [...settings.findings, ...settings.applyLevels(applyAllowances(found, declared))];
      return {
        mechanisms: judged.mechanisms,
        motors: declared.motors,
        robots: declared.robots,
        findings: findings.sort(byPlace),
        files: sorted,
        wanted: [...wanted].sort(),
        snapshot,
        toothCounts: settings.toothCounts,
      };
    },
  };
}

function isWorthEvaluating(text: string | null | undefined): boolean {
  return typeof text === "string" && mentionsDeclarations(text);
}

const LEVELS: readonly Finding["level"][] = ["error", "warning", "information"];

/** By file and position; of findings at one place the worst first. */
function byPlace(a: Finding, b: Finding): number {
  return (
    compare(a.at.file, b.at.file) ||
    a.at.start - b.at.start ||
    a.at.end - b.at.end ||
    LEVELS.indexOf(a.level) - LEVELS.indexOf(b.level) ||
    compare(a.rule, b.rule) ||
    compare(a.message, b.message)
  );
}

function compare(a: string, b: string): number {
  return a === b ? 0 : a < b ? -1 : 1;
}
