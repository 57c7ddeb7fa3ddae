/**
 * The one entrance: a snapshot of texts in; mechanisms, numbers and findings out.
 *
 * Synchronous, and pure but for its caches: the same snapshot gives the same result. Does not read files; what the snapshot lacks comes
 * back in `wanted`.
 */
import { DEFINITIONS, SPECIFIER } from "../declarations/table.js";
import { createEvaluator } from "../evaluator/evaluator.js";
import type { TypeScript } from "../evaluator/typescript.js";
import type { DefinitionCall, Snapshot } from "../evaluator/value.js";
import { applyAllowances } from "./allowances.js";
import type { Analysis, Finding } from "./analysis.js";
import { createDeclarationFinder } from "./declarationFindings.js";
import { createCollector } from "./declared.js";
import { evaluateAll } from "./evaluateAll.js";
import { createJudge } from "./judge.js";
import { createRobotJudge, unjudged } from "./judgeRobots.js";
import { createCallPlacer } from "./placeCalls.js";
import { createSettingsReader } from "./settings.js";

export interface Analyser {
  /**
   * `roots`: the files to check; what they import is checked with them. File names are slash-separated and absolute, or URIs.
   * `mechanismsOnly`: for a what-if about mechanisms; robots' load cycles, which take longer, are then not run.
   */
  analyse(roots: readonly string[], snapshot: Snapshot, mechanismsOnly?: boolean): Analysis;
}

/** `typescript`: the loaded parser, so that loading it stays the host's decision. */
export function createAnalyser(typescript: TypeScript): Analyser {
  const evaluator = createEvaluator(typescript, { specifier: SPECIFIER, definitions: DEFINITIONS });
  const placeCalls = createCallPlacer();
  const collectDeclared = createCollector();
  const findInDeclarations = createDeclarationFinder();
  const judge = createJudge();
  const judgeRobots = createRobotJudge();
  const readSettings = createSettingsReader(typescript);
  return {
    analyse(roots, snapshot, mechanismsOnly = false) {
      const evaluated = evaluateAll(evaluator, roots, snapshot);
      const files = placeCalls(evaluated.files);
      const settings = readSettings([...files.keys()], snapshot);
      const declared = collectDeclared(files.values());
      const judged = judge(declared);
      const judgedRobots = mechanismsOnly ? unjudged(declared) : judgeRobots(declared, judged);
      const found = [
        ...findInDeclarations([...files.values()], declared, snapshot),
        ...judged.findings,
        ...judgedRobots.findings,
      ];
      const findings = [...settings.findings, ...settings.applyLevels(applyAllowances(found, declared))].sort(byPlace);
      return {
        mechanisms: judged.mechanisms,
        motors: declared.motors,
        robots: judgedRobots.robots,
        findings,
        findingsByMechanism: groupByMechanism(findings),
        findingsIn: groupBy(findings, ({ at }) => at.file),
        inFile: groupByFile(files, judged.mechanisms, declared.motors, judgedRobots.robots),
        files,
        wanted: [...new Set([...evaluated.wanted, ...settings.wanted])].sort(),
        snapshot,
        levels: settings.levels,
        toothCounts: settings.toothCounts,
      };
    },
  };
}

function groupByFile(
  files: Analysis["files"],
  mechanisms: Analysis["mechanisms"],
  motors: Analysis["motors"],
  robots: Analysis["robots"],
): Analysis["inFile"] {
  const fileOf = ({ call }: { readonly call: DefinitionCall }) => call.span.file;
  const [m, o, r] = [groupBy(mechanisms, fileOf), groupBy(motors, fileOf), groupBy(robots, fileOf)];
  return new Map(
    [...files].map(([file, evaluation]) => [
      file,
      { evaluation, mechanisms: m.get(file) ?? [], motors: o.get(file) ?? [], robots: r.get(file) ?? [] },
    ]),
  );
}

function groupBy<Item>(items: readonly Item[], keyOf: (item: Item) => string): ReadonlyMap<string, readonly Item[]> {
  const groups = new Map<string, Item[]>();
  for (const item of items) {
    const group = groups.get(keyOf(item));
    if (group === undefined) groups.set(keyOf(item), [item]);
    else group.push(item);
  }
  return groups;
}

function groupByMechanism(findings: readonly Finding[]): ReadonlyMap<string, readonly Finding[]> {
  const groups = new Map<string, Finding[]>();
  for (const finding of findings) {
    if (finding.mechanism === null) continue;
    const group = groups.get(finding.mechanism);
    if (group === undefined) groups.set(finding.mechanism, [finding]);
    else group.push(finding);
  }
  return groups;
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
