/** From calls to definitions to the mechanisms, motors and robots that a workspace declares. Runs no physics. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Motor } from "../declarations/motor.js";
import type { Robot } from "../declarations/robot.js";
import type { DefinitionCall, FileEvaluation, Span, Value } from "../evaluator/value.js";
import { type AllowanceComment, listAllowances } from "./allowanceComments.js";
import type { AnalysedMechanism, AnalysedMotor, AnalysedRobot } from "./analysis.js";

export interface Declared {
  readonly mechanisms: readonly Omit<AnalysedMechanism, "assumed" | "notChecked" | "numbers">[];
  readonly motors: readonly AnalysedMotor[];
  readonly robots: readonly DeclaredRobot[];
  /** Those of which a value is unknown or refused. */
  readonly unknownRobots: readonly RobotCall[];
  /** Calls that declare several mechanisms by one piece of text, as in a loop or a helper: a finding there must say which it means. */
  readonly shared: readonly DefinitionCall[];
  /** Comments above mechanisms and robots that allow something. */
  readonly allowances: readonly AllowanceComment[];
}

/** Where a robot is declared. */
export type RobotCall = Pick<AnalysedRobot, "name" | "at" | "call">;

export interface DeclaredRobot extends RobotCall {
  readonly declared: Robot;
}

/** What each file declares is kept for as long as its evaluation is. */
export function createCollector(): (evaluations: Iterable<FileEvaluation>) => Declared {
  const known = new WeakMap<FileEvaluation, Declared>();
  return (evaluations) => {
    const all = [...evaluations].map((evaluation) => {
      const before = known.get(evaluation);
      if (before !== undefined) return before;
      const found = declaredBy(evaluation.calls);
      const declared = { ...found, shared: listShared(found), allowances: listAllowances(found.mechanisms, found.robots) };
      known.set(evaluation, declared);
      return declared;
    });
    return {
      mechanisms: all.flatMap(({ mechanisms }) => mechanisms),
      motors: all.flatMap(({ motors }) => motors),
      robots: all.flatMap(({ robots }) => robots),
      unknownRobots: all.flatMap(({ unknownRobots }) => unknownRobots),
      shared: all.flatMap(({ shared }) => shared),
      allowances: all.flatMap(({ allowances }) => allowances),
    };
  };
}

type DeclaredThings = Omit<Declared, "shared" | "allowances">;

function listShared({ mechanisms }: DeclaredThings): DefinitionCall[] {
  const counts = new Map<string, number>();
  for (const { at } of mechanisms) counts.set(keyOf(at), (counts.get(keyOf(at)) ?? 0) + 1);
  return mechanisms.flatMap(({ at, call }) => ((counts.get(keyOf(at)) ?? 0) > 1 ? [call] : []));
}

function keyOf({ file, start, end }: Span): string {
  return `${start} ${end} ${file}`;
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
