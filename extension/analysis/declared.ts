/** From calls to definitions to the mechanisms, motors and robots that each file declares. Runs no physics. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Motor } from "../declarations/motor.js";
import type { Robot } from "../declarations/robot.js";
import type { DefinitionCall, FileEvaluation, Span, Value } from "../evaluator/value.js";
import { type AllowanceComment, listAllowances } from "./allowanceComments.js";
import type { AnalysedMechanism, AnalysedMotor, AnalysedRobot } from "./analysis.js";
import { type ByFile, createKeeper } from "./byFile.js";
import { spanKey } from "./spans.js";

/** What one file declares. */
export interface Declared {
  readonly mechanisms: readonly DeclaredMechanism[];
  readonly motors: readonly AnalysedMotor[];
  readonly robots: readonly DeclaredRobot[];
  /** Those of which a value is unknown or refused. */
  readonly unknownRobots: readonly RobotCall[];
  /** Calls that declare several mechanisms by one piece of text, as in a loop or a helper: a finding there must say which it means. */
  readonly shared: ReadonlySet<DefinitionCall>;
  /** Comments above mechanisms and robots that allow something. */
  readonly allowances: readonly AllowanceComment[];
}

export type DeclaredMechanism = Omit<AnalysedMechanism, "assumed" | "notChecked" | "numbers">;

/** Where a robot is declared. */
export type RobotCall = Pick<AnalysedRobot, "name" | "at" | "call">;

export interface DeclaredRobot extends RobotCall {
  readonly declared: Robot;
}

export function createCollector(): (evaluations: ByFile<FileEvaluation>) => ByFile<Declared> {
  const kept = createKeeper<Declared>();
  return ({ of, changed }) =>
    kept.update(of, changed, (file) => {
      const evaluation = of.get(file);
      return evaluation && collect(evaluation.calls);
    });
}

function collect(calls: readonly DefinitionCall[]): Declared {
  const found = declaredBy(calls);
  return { ...found, shared: findShared(found), allowances: listAllowances(found.mechanisms, found.robots) };
}

type DeclaredThings = Omit<Declared, "shared" | "allowances">;

function findShared({ mechanisms }: DeclaredThings): Set<DefinitionCall> {
  const counts = new Map<string, number>();
  for (const { at } of mechanisms) counts.set(spanKey(at), (counts.get(spanKey(at)) ?? 0) + 1);
  return new Set(mechanisms.flatMap(({ at, call }) => ((counts.get(spanKey(at)) ?? 0) > 1 ? [call] : [])));
}

function declaredBy(calls: readonly DefinitionCall[]): DeclaredThings {
  return {
    mechanisms: calls
      .filter((call) => call.definition === "mechanism")
      .map((call) => ({
        ...place(call),
        call,
        ...(call.built === undefined ? {} : { declared: call.built as Mechanism }),
      })),
    motors: calls.flatMap((call) =>
      call.definition === "motor" && call.built !== undefined
        ? [{ at: place(call).at, call, declared: call.built as Motor }]
        : [],
    ),
    robots: calls.flatMap((call) =>
      call.definition === "robot" && call.built !== undefined ? [{ ...place(call), call, declared: call.built as Robot }] : [],
    ),
    unknownRobots: calls
      .filter((call) => call.definition === "robot" && call.built === undefined)
      .map((call) => ({ ...place(call), call })),
  };
}

/** Where a finding about the whole call sits, and how it is called there. */
function place(call: DefinitionCall): { readonly name: string; readonly at: Span } {
  const first = call.args[0];
  const written = first === undefined ? undefined : stringIn(first);
  const name = written ?? call.binding?.name ?? call.definition;
  return { name, at: call.binding?.span ?? (written === undefined ? call.callee : (first?.origin.span ?? call.callee)) };
}

/** The string that a value is known to be. */
export function stringIn(value: Value): string | undefined {
  if (!value.known || value.data.kind !== "primitive") return undefined;
  return typeof value.data.value === "string" ? value.data.value : undefined;
}
