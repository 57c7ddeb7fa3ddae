/**
 * Puts together what was found about each file: allowances and levels applied, findings in order, by what they are about and by where they
 * sit. A finding about a file's declaration may sit in another file, as where a caller gives a helper the name.
 */
import type { FileEvaluation } from "../evaluator/value.js";
import { applyAllowances } from "./allowances.js";
import type { Analysis, FileAnalysis, Finding } from "./analysis.js";
import { type ByFile, createKeeper } from "./byFile.js";
import type { DeclarationFindings } from "./declarationFindings.js";
import type { Declared } from "./declared.js";
import type { Judged } from "./judge.js";
import type { JudgedRobots } from "./judgeRobots.js";
import { groupBy, sameContent, sameItems, union } from "./lists.js";
import { rankOf } from "./rank.js";
import type { ReadSettings } from "./settings.js";

export interface Parts {
  readonly evaluations: ByFile<FileEvaluation>;
  readonly declared: ByFile<Declared>;
  readonly texts: DeclarationFindings;
  readonly judged: ByFile<Judged>;
  readonly robots: ByFile<JudgedRobots>;
  readonly settings: ReadSettings;
}

export type Gathered = Pick<Analysis, "inFile" | "findingsIn">;

export function createGatherer(): (parts: Parts) => Gathered {
  const kept = createKeeper<FileAnalysis>();
  const place = createPlacer();
  let settings: ReadSettings | undefined;
  let inFile: Analysis["inFile"] = new Map();
  return (parts) => {
    const { evaluations, texts, judged, robots } = parts;
    const touched =
      settings === parts.settings
        ? union(evaluations.changed, texts.changed, judged.changed, robots.changed)
        : union(kept.of.keys(), evaluations.of.keys());
    settings = parts.settings;
    const files = kept.update(evaluations.of, touched, (file) => gatherFile(file, parts, kept.of.get(file)));
    if (files.changed.size > 0) inFile = new Map(files.of);
    return { inFile, findingsIn: place(files, parts) };
  };
}

/** The same object as before where nothing of it changed. */
function gatherFile(file: string, parts: Parts, before: FileAnalysis | undefined): FileAnalysis | undefined {
  const { evaluations, texts, judged, robots, declared, settings } = parts;
  const evaluation = evaluations.of.get(file);
  if (evaluation === undefined) return undefined;
  const [judgedHere, robotsHere, declaredHere] = [judged.of.get(file), robots.of.get(file), declared.of.get(file)];
  const found = [...(texts.of.get(file) ?? []), ...(judgedHere?.findings ?? []), ...(robotsHere?.findings ?? [])];
  const allowed = applyAllowances(found, declaredHere?.allowances ?? []);
  const findings = settings.applyLevels(allowed).sort(byPlace);
  const now: FileAnalysis = {
    evaluation,
    mechanisms: judgedHere?.mechanisms ?? [],
    motors: declaredHere?.motors ?? [],
    robots: robotsHere?.robots ?? [],
    findings: before !== undefined && sameContent(before.findings, findings) ? before.findings : findings,
  };
  return before !== undefined && isSame(before, now) ? before : now;
}

function isSame(one: FileAnalysis, other: FileAnalysis): boolean {
  return (
    one.evaluation === other.evaluation &&
    one.findings === other.findings &&
    sameItems(one.mechanisms, other.mechanisms) &&
    sameItems(one.motors, other.motors) &&
    sameItems(one.robots, other.robots)
  );
}

/** By the file that they sit in; a list stays the same object as long as it says the same. */
function createPlacer(): (files: ByFile<FileAnalysis>, parts: Parts) => Analysis["findingsIn"] {
  const sitting = new Map<string, readonly Finding[]>();
  /** By the file of what they are about, those that sit elsewhere. */
  const away = new Map<string, readonly Finding[]>();
  /** By the file that they sit in, those that are about another one or about none. */
  let arrived: ReadonlyMap<string, readonly Finding[]> = new Map();
  let result: Analysis["findingsIn"] = new Map();
  return ({ of, changed }, { settings, texts }) => {
    for (const file of changed) {
      const elsewhere = of.get(file)?.findings.filter(({ at }) => at.file !== file) ?? [];
      if (elsewhere.length > 0) away.set(file, elsewhere);
      else away.delete(file);
    }
    const outside = settings.applyLevels([...texts.outside.values()].flat());
    const strangers = [...away.values()].flat();
    const before = arrived;
    if (before.size + strangers.length + outside.length + settings.findings.length > 0) {
      arrived = groupBy([...strangers, ...outside, ...settings.findings], ({ at }) => at.file);
    }
    let isNew = false;
    for (const file of union(changed, before.keys(), arrived.keys())) {
      const own = of.get(file)?.findings ?? [];
      const here = away.has(file) ? own.filter(({ at }) => at.file === file) : own;
      const others = arrived.get(file);
      const list = others === undefined ? here : [...here, ...others].sort(byPlace);
      const known = sitting.get(file);
      if (known === list || (known === undefined && list.length === 0)) continue;
      if (known !== undefined && sameContent(known, list)) continue;
      isNew = true;
      if (list.length === 0) sitting.delete(file);
      else sitting.set(file, list);
    }
    if (isNew) result = new Map(sitting);
    return result;
  };
}

/** By position; of findings at one place the worst first. */
function byPlace(a: Finding, b: Finding): number {
  return (
    compare(a.at.file, b.at.file) ||
    a.at.start - b.at.start ||
    a.at.end - b.at.end ||
    rankOf(b.level) - rankOf(a.level) ||
    compare(a.rule, b.rule) ||
    compare(a.message, b.message)
  );
}

function compare(a: string, b: string): number {
  return a === b ? 0 : a < b ? -1 : 1;
}
