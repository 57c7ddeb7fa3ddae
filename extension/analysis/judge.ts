/**
 * Runs the model over every declared mechanism and the rules over its numbers.
 *
 * Results are kept by the identity of the declared object, which the evaluator keeps while nothing that it depends on changes.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { DefinitionCall, Span } from "../evaluator/value.js";
import type { Drive, Supply } from "../model/drive.js";
import type { MechanismNumbers } from "../model/numbers.js";
import { solveMechanismRuns } from "../model/solve.js";
import type { MechanismFacts, MechanismRule, RuleId, Verdict } from "../rules/rule.js";
import { isImpossible } from "../rules/sheetContradicts.js";
import { MECHANISM_RULES, MOTOR_RULES } from "../rules/table.js";
import type { AnalysedMechanism, Finding } from "./analysis.js";
import { tellAssumptions } from "./assumptions.js";
import { type ByFile, createKeeper } from "./byFile.js";
import { comesFrom } from "./comesFrom.js";
import { type Corner, cornersOf } from "./corners.js";
import type { Declared, DeclaredMechanism, DeclaredRobot } from "./declared.js";
import { supplyCallOf } from "./lentSupply.js";
import { sameItems, union } from "./lists.js";
import { createMemory } from "./memory.js";
import type { RobotLists } from "./robotLists.js";

/** Solutions that are remembered beside those of the declarations that are there. */
const SPARE = 100;

/** What is said of the mechanisms and motors of one file. */
export interface Judged {
  readonly mechanisms: readonly AnalysedMechanism[];
  readonly findings: readonly Finding[];
}

/** What is known of one mechanism on one supply. */
interface Solved {
  readonly supply: Supply | undefined;
  readonly drive: Drive;
  readonly numbers: MechanismNumbers;
  readonly corners: number;
  readonly verdicts: readonly Judgement[];
}

/** What is said of one call: the same objects as long as nothing that it rests on changed, so that those who show them can tell. */
interface Told {
  readonly solution: Solved;
  readonly robot: DeclaredRobot["declared"] | undefined;
  readonly isShared: boolean;
  readonly mechanism: AnalysedMechanism;
  readonly findings: readonly Finding[];
}

interface Judgement {
  readonly rule: MechanismRule;
  readonly verdict: Verdict;
}

interface Facts {
  readonly nominal: MechanismFacts;
  readonly corners: readonly (MechanismFacts & Pick<Corner, "told">)[];
}

/** Files without either are absent. */
export function createJudge(): (declared: ByFile<Declared>, lists: RobotLists, relisted: ReadonlySet<string>) => ByFile<Judged> {
  const kept = createKeeper<Judged>();
  /** Of mechanisms. */
  let count = 0;
  const solved = new WeakMap<Mechanism, Solved>();
  const remembered = createMemory<Pick<Solved, "drive" | "numbers" | "corners" | "verdicts">>(() => 2 * count + SPARE);
  const solve = (mechanism: Mechanism, call: DefinitionCall, robot: DeclaredRobot | undefined): Solved => {
    const lent = mechanism.si.supply === undefined ? robot : undefined;
    const supply = lent?.declared.supply.si;
    const before = solved.get(mechanism);
    if (before !== undefined && before.supply === supply) return before;
    const corners = cornersOf(call, lent && supplyCallOf(lent));
    // An edit makes every declaration of its file anew, most of them with the same numbers as before.
    const key = JSON.stringify([mechanism.si, supply, corners.map(({ told }) => told)]);
    const result = {
      supply,
      ...remembered.get(key, () => {
        const nominal = factsOf(mechanism, supply);
        const atCorners = corners.map((corner) => ({ ...factsOf(corner.mechanism, corner.supply ?? supply), told: corner.told }));
        const verdicts = judgeMechanism({ nominal, corners: atCorners });
        return { drive: nominal.drive, numbers: nominal.numbers, corners: corners.length, verdicts };
      }),
    };
    solved.set(mechanism, result);
    return result;
  };
  const told = new WeakMap<DefinitionCall, Told>();
  const keep = (call: DefinitionCall, result: Told): Told => {
    told.set(call, result);
    return result;
  };
  const tell = (one: DeclaredMechanism, declared: Mechanism, robot: DeclaredRobot | undefined, isShared: boolean): Told => {
    const solution = solve(declared, one.call, robot);
    const before = told.get(one.call);
    if (before?.solution === solution && before.robot === robot?.declared && before.isShared === isShared) return before;
    const { drive, numbers, corners, verdicts } = solution;
    const assumptions = tellAssumptions(declared, robot?.declared, corners);
    // A robot is declared anew whenever one of its mechanisms is.
    if (before?.solution === solution && before.isShared === isShared && sameAssumptions(before.mechanism, assumptions)) {
      return keep(one.call, { ...before, robot: robot?.declared });
    }
    return keep(one.call, {
      solution,
      robot: robot?.declared,
      isShared,
      mechanism: { ...one, drive, numbers, ...assumptions },
      findings: verdicts.map(({ rule, verdict }) => {
        const finding = toFinding(rule, verdict, one.at, one.call, one.name);
        return isShared ? { ...finding, message: `${one.name}: ${finding.message}` } : finding;
      }),
    });
  };
  const silent = new WeakMap<DefinitionCall, AnalysedMechanism>();
  const keepSilent = (one: DeclaredMechanism, why: string): AnalysedMechanism => {
    const result = silent.get(one.call) ?? { ...one, assumed: [], notChecked: [why] };
    silent.set(one.call, result);
    return result;
  };
  const motorFindings = new WeakMap<DefinitionCall, readonly Finding[]>();
  const judgeFile = ({ mechanisms, motors, shared }: Declared, lists: RobotLists): Judged => {
    const findings: Finding[] = [];
    const judged = mechanisms.map((one): AnalysedMechanism => {
      const { declared } = one;
      if (declared === undefined) return keepSilent(one, tellWhyUnknown(one.call));
      if (isImpossible(declared.motor)) return keepSilent(one, "Nothing: the motor's sheet contradicts itself.");
      const result = tell(one, declared, lists.lenderOf(declared), shared.has(one.call));
      findings.push(...result.findings);
      return result.mechanism;
    });
    for (const { declared, at, call } of motors) {
      const told = motorFindings.get(call) ?? judgeMotor(declared, at, call);
      motorFindings.set(call, told);
      findings.push(...told);
    }
    return { mechanisms: judged, findings };
  };
  return (declared, lists, relisted) => {
    const isSame = (one: Judged, other: Judged) =>
      sameItems(one.mechanisms, other.mechanisms) && sameItems(one.findings, other.findings);
    const make = (file: string) => {
      const here = declared.of.get(file);
      count += (here?.mechanisms.length ?? 0) - (kept.of.get(file)?.mechanisms.length ?? 0);
      return here === undefined || here.mechanisms.length + here.motors.length === 0 ? undefined : judgeFile(here, lists);
    };
    return kept.update(declared.of, union(declared.changed, relisted), make, isSame);
  };
}

type Assumptions = ReturnType<typeof tellAssumptions>;

function sameAssumptions(one: Assumptions, other: Assumptions): boolean {
  return sameItems(one.assumed, other.assumed) && sameItems(one.notChecked, other.notChecked);
}

function factsOf(mechanism: Mechanism, supply: Supply | undefined): MechanismFacts {
  const drive = supply === undefined ? mechanism.si : { ...mechanism.si, supply };
  return { mechanism, drive, ...solveMechanismRuns(drive) };
}

/** Every rule at its own worst corner; a rule that speaks silences others. */
function judgeMechanism({ nominal, corners }: Facts): Judgement[] {
  const silenced = new Set<RuleId>();
  return MECHANISM_RULES.flatMap((rule) => {
    if (silenced.has(rule.id)) return [];
    const verdict = worstVerdict(rule, nominal, corners);
    if (verdict === undefined) return [];
    for (const other of rule.silences) silenced.add(other);
    return [{ rule, verdict }];
  });
}

function worstVerdict(rule: MechanismRule, nominal: MechanismFacts, corners: Facts["corners"]): Verdict | undefined {
  if (corners.length === 0) return rule.judge(nominal);
  return corners
    .flatMap((corner) => {
      const verdict = rule.judge(corner);
      return verdict === undefined ? [] : [{ ...verdict, message: `${verdict.message} (With ${corner.told}.)` }];
    })
    .reduce<Verdict | undefined>(
      (worst, verdict) => (worst === undefined || verdict.excess > worst.excess ? verdict : worst),
      undefined,
    );
}

function judgeMotor(motor: Mechanism["motor"], at: Span, call: DefinitionCall): Finding[] {
  return MOTOR_RULES.flatMap((rule) => {
    const verdict = rule.judge(motor);
    return verdict === undefined ? [] : [toFinding(rule, verdict, at, call, null)];
  });
}

function toFinding(
  rule: Pick<MechanismRule, "id" | "level">,
  verdict: Verdict,
  at: Span,
  call: DefinitionCall,
  mechanism: string | null,
): Finding {
  const related = comesFrom(call, verdict.blames ?? []);
  return { rule: rule.id, level: verdict.level ?? rule.level, mechanism, message: verdict.message, at, related };
}

export function tellWhyUnknown(call: DefinitionCall): string {
  const unknown = call.unknowns[0];
  if (unknown !== undefined) return `Nothing: ${unknown.reason.message}`;
  return "Nothing: the declaration is not accepted.";
}
