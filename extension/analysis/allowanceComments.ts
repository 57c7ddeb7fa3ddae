/** Where comments above mechanisms and robots allow something, and what. Whether they may is not asked here. */
import type { DefinitionCall, Span } from "../evaluator/value.js";
import { spanKey } from "./spans.js";

export interface AllowanceComment {
  readonly at: Span;
  /** As it is written. */
  readonly rule: string;
  readonly reason: string;
  /** The mechanisms below it: several where a loop or a helper declares them by one piece of text. */
  readonly names: ReadonlySet<string>;
  /** Where the findings of a robot below it sit. */
  readonly robots: readonly Span[];
}

interface Below {
  readonly name: string;
  readonly at: Span;
  readonly call: DefinitionCall;
}

/** Every comment once, with all that is below it. */
export function listAllowances(mechanisms: readonly Below[], robots: readonly Below[]): AllowanceComment[] {
  const comments = new Map<string, AllowanceComment & { readonly names: Set<string>; readonly robots: Span[] }>();
  const allowancesAbove = ({ leadingComments }: DefinitionCall) =>
    leadingComments.flatMap(({ text, span }) => {
      const allowance = readAllowance(text);
      if (allowance === undefined) return [];
      const key = spanKey(span);
      const comment = comments.get(key) ?? { at: span, ...allowance, names: new Set<string>(), robots: [] };
      comments.set(key, comment);
      return [comment];
    });
  for (const { name, call } of mechanisms) for (const { names } of allowancesAbove(call)) names.add(name);
  for (const { at, call } of robots) for (const comment of allowancesAbove(call)) comment.robots.push(at);
  return [...comments.values()];
}

/** Rules that are allowed, with a reason, above a declaration. */
export function allowedRules({ leadingComments }: DefinitionCall): Set<string> {
  return new Set(
    leadingComments.flatMap(({ text }) => {
      const { rule = "", reason = "" } = readAllowance(text) ?? {};
      return reason.trim() === "" ? [] : [rule];
    }),
  );
}

function readAllowance(comment: string): Pick<AllowanceComment, "rule" | "reason"> | undefined {
  const match = /^\/\/\s*loadmark-allow\b\s*([\w-]*)\s*(?::\s*(.*))?$/.exec(comment.trim());
  if (match === null) return undefined;
  const [, rule = "", reason = ""] = match;
  return { rule, reason };
}
