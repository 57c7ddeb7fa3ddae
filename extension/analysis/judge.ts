/**
 * Runs the model over every declared mechanism and the rules over its numbers.
 *
 * Numbers are kept by the identity of the declared object, which the evaluator keeps while nothing that it depends on changes.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Robot } from "../declarations/robot.js";
import type { DefinitionCall, Span } from "../evaluator/value.js";
import type { Drive, Supply } from "../model/drive.js";
import type { MechanismNumbers } from "../model/numbers.js";
import { solveMechanism } from "../model/solve.js";
import type { Verdict } from "../rules/rule.js";
import { isImpossible } from "../rules/sheetContradicts.js";
import { MECHANISM_RULES, MOTOR_RULES } from "../rules/table.js";
import type { AnalysedMechanism, Finding } from "./analysis.js";
import { tellAssumptions } from "./assumptions.js";
import type { Declared } from "./declared.js";
import { spanAt } from "./places.js";

export interface Judged {
  readonly mechanisms: readonly AnalysedMechanism[];
  readonly findings: readonly Finding[];
}

interface Solved {
  readonly drive: Drive;
  readonly numbers: MechanismNumbers;
}

export function createJudge(): (declared: Declared) => Judged {
  const solved = new WeakMap<Mechanism, Solved>();
  const solve = (mechanism: Mechanism, supply: Supply | undefined): Solved => {
    const before = solved.get(mechanism);
    if (before !== undefined && before.drive.supply === supply) return before;
    const drive = supply === undefined ? mechanism.si : { ...mechanism.si, supply };
    const result = { drive, numbers: solveMechanism(drive) };
    solved.set(mechanism, result);
    return result;
  };
  return (declared) => {
    const findings: Finding[] = [];
    const mechanisms = declared.mechanisms.map((one): AnalysedMechanism => {
      const mechanism = one.declared;
      if (mechanism === undefined) return { ...one, assumed: [], notChecked: [tellWhyUnknown(one.call)] };
      if (isImpossible(mechanism.motor))
        return { ...one, assumed: [], notChecked: ["Nothing: the motor's sheet contradicts itself."] };
      const robot = robotOf(
        mechanism,
        declared.robots.map((each) => each.declared),
      );
      const { drive, numbers } = solve(mechanism, mechanism.si.supply ?? robot?.supply.si);
      const silenced = new Set<string>();
      for (const rule of MECHANISM_RULES) {
        if (silenced.has(rule.id)) continue;
        const verdict = rule.judge({ mechanism, drive, numbers });
        if (verdict === undefined) continue;
        for (const other of rule.silences) silenced.add(other);
        findings.push(toFinding(rule, verdict, one.at, one.call, one.name));
      }
      return { ...one, numbers, ...tellAssumptions(mechanism, robot) };
    });
    for (const { declared: motor, at, call } of declared.motors) {
      for (const rule of MOTOR_RULES) {
        const verdict = rule.judge(motor);
        if (verdict !== undefined) findings.push(toFinding(rule, verdict, at, call, null));
      }
    }
    return { mechanisms, findings };
  };
}

function toFinding(
  rule: Pick<Finding, "level"> & { readonly id: Finding["rule"] },
  verdict: Verdict,
  at: Span,
  call: DefinitionCall,
  mechanism: string | null,
): Finding {
  const argument = call.args.at(-1);
  const related = (verdict.blames ?? []).flatMap((path) => {
    const span = argument === undefined ? undefined : spanAt(argument, path);
    return span === undefined ? [] : [{ at: span, message: `"${path.join(".")}" is set here.` }];
  });
  return { rule: rule.id, level: verdict.level ?? rule.level, mechanism, message: verdict.message, at, related };
}

/** The one robot that lists the mechanism; with several, none of them is assumed. */
function robotOf(mechanism: Mechanism, robots: readonly Robot[]): Robot | undefined {
  const listing = robots.filter((robot) => robot.mechanisms.includes(mechanism));
  return listing.length === 1 ? listing[0] : undefined;
}

function tellWhyUnknown(call: DefinitionCall): string {
  const unknown = call.unknowns[0];
  if (unknown !== undefined) return `Nothing: ${unknown.reason.message}`;
  return "Nothing: the declaration is not accepted.";
}
