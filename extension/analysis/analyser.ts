/**
 * The one entrance: a snapshot of texts in; mechanisms, numbers and findings out.
 *
 * Synchronous, and pure but for its caches: the same snapshot gives the same result. Does not read files; what the snapshot lacks comes
 * back in `wanted`. Every step keeps its results by file, and an edit costs what rests on it.
 */
import { DEFINITIONS, SPECIFIER } from "../declarations/table.js";
import { createEvaluator } from "../evaluator/evaluator.js";
import type { TypeScript } from "../evaluator/typescript.js";
import type { Snapshot } from "../evaluator/value.js";
import { once } from "../model/once.js";
import type { Analysis } from "./analysis.js";
import { createDeclarationFinder } from "./declarationFindings.js";
import { createCollector } from "./declared.js";
import { createEvaluations } from "./evaluateAll.js";
import { createGatherer, type Gathered } from "./gather.js";
import { createJudge } from "./judge.js";
import { createRobotJudge } from "./judgeRobots.js";
import { createCallPlacer } from "./placeCalls.js";
import { createRobotLists } from "./robotLists.js";
import { createSettingsReader, type ReadSettings } from "./settings.js";

export interface Analyser {
  /**
   * `roots`: the files to check; what they import is checked with them. File names are slash-separated and absolute, or URIs.
   * `mechanismsOnly`: for a what-if about mechanisms; robots' load cycles, which take longer, are then not run.
   */
  analyse(roots: readonly string[], snapshot: Snapshot, mechanismsOnly?: boolean): Analysis;
}

/** `typescript`: the loaded parser, so that loading it stays the host's decision. */
export function createAnalyser(typescript: TypeScript): Analyser {
  let steps = createSteps(typescript);
  return {
    analyse(roots, snapshot, mechanismsOnly = false) {
      try {
        return steps(roots, snapshot, mechanismsOnly);
      } catch (error) {
        // Steps that were left half-way no longer know what changed.
        steps = createSteps(typescript);
        throw error;
      }
    },
  };
}

function createSteps(typescript: TypeScript) {
  const evaluate = createEvaluations(createEvaluator(typescript, { specifier: SPECIFIER, definitions: DEFINITIONS }));
  const placeCalls = createCallPlacer();
  const readSettings = createSettingsReader(typescript);
  const collectDeclared = createCollector();
  const lists = createRobotLists();
  const judge = createJudge();
  const robotJudge = createRobotJudge();
  const findInDeclarations = createDeclarationFinder();
  const gather = createGatherer();
  let settings: ReadSettings | undefined;
  return (roots: readonly string[], snapshot: Snapshot, mechanismsOnly: boolean): Analysis => {
    const evaluated = evaluate(roots, snapshot);
    const evaluations = placeCalls(evaluated);
    if (settings === undefined || !evaluated.isSameProject) settings = readSettings([...evaluations.of.keys()], snapshot);
    const declared = collectDeclared(evaluations);
    const relisted = lists.update(declared);
    const judged = judge(declared, lists, relisted);
    const round = { declared, judged, lists };
    const robots = mechanismsOnly ? robotJudge.leaveOut(round) : robotJudge.judge(round);
    const texts = findInDeclarations(evaluations, declared, snapshot);
    const gathered = gather({ evaluations, declared, texts, judged, robots, settings });
    return analysisOf(gathered, settings, [...new Set([...evaluated.wanted, ...settings.wanted])].sort(), snapshot);
  };
}

/** Lists over all files are put together when somebody asks for them. */
function analysisOf(
  { inFile, findingsIn }: Gathered,
  { levels, toothCounts }: ReadSettings,
  wanted: readonly string[],
  snapshot: Snapshot,
): Analysis {
  const perFile = () => [...inFile.values()];
  const mechanisms = once(() => perFile().flatMap((file) => file.mechanisms));
  const motors = once(() => perFile().flatMap((file) => file.motors));
  const robots = once(() => perFile().flatMap((file) => file.robots));
  const files = once(() => new Map([...inFile].map(([file, { evaluation }]) => [file, evaluation])));
  const findings = once(() => [...findingsIn.keys()].sort().flatMap((file) => findingsIn.get(file) ?? []));
  return {
    get mechanisms() {
      return mechanisms();
    },
    get motors() {
      return motors();
    },
    get robots() {
      return robots();
    },
    get findings() {
      return findings();
    },
    get files() {
      return files();
    },
    findingsIn,
    inFile,
    wanted,
    snapshot,
    levels,
    toothCounts,
  };
}
